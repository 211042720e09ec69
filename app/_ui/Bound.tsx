/** A bound like "2^-108", set as a power. */
export function Bound({ bound }: { bound: string }) {
  const power = /^(\d+)\^(-?)(\d+)$/.exec(bound);
  if (power === null) return <>{bound}</>;
  return (
    <span style={{ whiteSpace: "nowrap" }}>
      {power[1]}
      <sup style={{ lineHeight: 0 }}>
        {power[2] === "-" ? "−" : ""}
        {power[3]}
      </sup>
    </span>
  );
}

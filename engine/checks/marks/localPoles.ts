/** Whether every denominator is a physical pole. */
import type { Bench } from "../bench";
import type { Mark } from "../report";

export function localPoles({ poles }: Bench): Mark {
  const spurious = poles.filter((p) => p.kind === "spurious");
  if (poles.length === 0) return { state: "holds", evidence: "The form has no denominator." };
  if (spurious.length === 0)
    return { state: "holds", evidence: `All ${poles.length} brackets in denominators are physical poles.` };
  const named = spurious.slice(0, 6).map((p) => p.bracket);
  const more = spurious.length > named.length ? ` and ${spurious.length - named.length} more` : "";
  return {
    state: "fails",
    evidence: `${spurious.length} of ${poles.length} brackets in denominators are spurious: ${named.join(", ")}${more}.`,
  };
}

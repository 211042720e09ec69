import type { Comparison, LeftOut } from "../../engine/checks/report";
import { formIdPattern } from "../_contract";
import { Bound } from "./Bound";
import { TableBox } from "./TableBox";
import { capital, numbered } from "./words";

/** Rows shown before the rest is folded: the sources and the first forms. */
const SHOWN = 8;

/** What a form was compared with; where that is much the rest is folded. */
export function Comparisons({ comparisons, label }: { comparisons: readonly Comparison[]; label: string }) {
  if (comparisons.length <= SHOWN + 4) return <ComparisonTable comparisons={comparisons} label={label} />;
  const rest = comparisons.slice(SHOWN);
  const agreeing = rest.filter((comparison) => comparison.agrees).length;
  return (
    <>
      <ComparisonTable comparisons={comparisons.slice(0, SHOWN)} label={label} />
      <details>
        <summary>
          {capital(numbered(rest.length, "more comparison"))}, of which{" "}
          {agreeing === rest.length ? "all agree" : `${numbered(agreeing, "agrees", "agree")}`}
        </summary>
        <ComparisonTable comparisons={rest} label={`${label}, continued`} />
      </details>
    </>
  );
}

/** One row for each comparison, with the number of points and primes and the bound that follows. */
function ComparisonTable({ comparisons, label }: { comparisons: readonly Comparison[]; label: string }) {
  const ranged = comparisons.some((comparison) => comparison.n !== undefined);
  return (
    <TableBox label={label}>
      <thead>
        <tr>
          <th scope="col">Compared with</th>
          {ranged && <th scope="col">n</th>}
          <th scope="col">Outcome</th>
          <th scope="col">Points</th>
          <th scope="col">Primes</th>
          <th scope="col">Chance of a false agreement below</th>
        </tr>
      </thead>
      <tbody>
        {comparisons.map((comparison) => (
          <tr key={`${comparison.with} ${comparison.n ?? ""}`}>
            <th scope="row">
              {comparison.kind === "form" && formIdPattern.test(comparison.with) ? (
                <a href={`/${comparison.with}`}>{comparison.with}</a>
              ) : (
                comparison.with
              )}
              {comparison.reference !== undefined && <> ({comparison.reference})</>}
            </th>
            {ranged && <td>{comparison.n}</td>}
            <td>{comparison.agrees ? "agrees" : "differs"}</td>
            <td>{comparison.points}</td>
            <td>{comparison.primes}</td>
            <td>{comparison.bound !== undefined ? <Bound bound={comparison.bound} /> : "–"}</td>
          </tr>
        ))}
      </tbody>
    </TableBox>
  );
}

const reasons: Record<LeftOut["reason"], string> = {
  budget: "it would take more operations than a check may",
  bound: "the expressions are too large for the bound",
};

/** What a form should have been compared with and was not, in sentences; nothing where nothing was left out. */
export function LeftOutSentences({ leftOut }: { leftOut: readonly LeftOut[] }) {
  if (leftOut.length === 0) return null;
  return (
    <ul>
      {leftOut.map((left) => (
        <li key={`${left.with} ${left.n ?? ""}`}>
          Not compared with {left.with}
          {left.n !== undefined && ` at n = ${left.n}`}: {reasons[left.reason]}.
        </li>
      ))}
    </ul>
  );
}

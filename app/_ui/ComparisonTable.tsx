import type { Comparison } from "../../engine/checks/report";
import { Bound } from "./Bound";
import { TableBox } from "./TableBox";

const identifier = /^n(?:\d+|X)k\d+L\d-/;

/** What a form was compared with, each with the number of points and primes and the bound that follows. */
export function ComparisonTable({ comparisons, label }: { comparisons: readonly Comparison[]; label: string }) {
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
              {comparison.kind === "form" && identifier.test(comparison.with) ? (
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

import type { Pole } from "../../engine/checks/report";
import { Bracket } from "./Formula";
import { TableBox } from "./TableBox";
import { capital, numbered } from "./words";

/** The order of a pole in words: "none", "simple", "double", "a zero". */
function order(value: number | undefined): string {
  if (value === undefined) return "not determined";
  if (value < 0) return "a zero";
  return ["none", "simple", "double", "triple"][value] ?? `of order ${value}`;
}

/** Which terms have the pole: their numbers where they are few. */
function termsOf(pole: Pole): string {
  if (pole.terms.length > 6) return numbered(pole.terms.length, "term");
  return pole.terms.map((index) => index + 1).join(", ");
}

/** Longer tables are folded, one for each kind. */
const SHOWN = 20;

/** Poles of a form in a table, or, where they are many, in a sentence with a folded table for each kind. */
export function Poles({ poles, label }: { poles: readonly Pole[]; label: string }) {
  if (poles.length <= SHOWN) return <PoleTable poles={poles} label={label} />;
  return (["physical", "spurious"] as const).map((kind) => {
    const those = poles.filter((pole) => pole.kind === kind);
    if (those.length === 0) return null;
    return (
      <details key={kind}>
        <summary>{capital(numbered(those.length, `${kind} pole`))}</summary>
        <PoleTable poles={those} label={`${label}, ${kind}`} />
      </details>
    );
  });
}

/** A table of poles: physical ones first, each with where it stands and its order there and in the sum. */
export function PoleTable({ poles, label }: { poles: readonly Pole[]; label: string }) {
  const ordered = (["physical", "spurious"] as const).flatMap((kind) => poles.filter((pole) => pole.kind === kind));
  return (
    <TableBox label={label}>
      <thead>
        <tr>
          <th scope="col">Pole</th>
          <th scope="col">Kind</th>
          <th scope="col">Terms</th>
          <th scope="col">In them</th>
          <th scope="col">In the sum</th>
        </tr>
      </thead>
      <tbody>
        {ordered.map((pole) => (
          <tr key={pole.bracket}>
            <th scope="row">
              <span aria-hidden="true">
                <Bracket text={pole.bracket} />
              </span>
              <span className="visually-hidden">{pole.bracket}</span>
            </th>
            <td>
              {pole.kind}
              {pole.reference && ", of the reference"}
            </td>
            <td>{termsOf(pole)}</td>
            <td>{order(pole.orderInTerms)}</td>
            <td>{order(pole.order)}</td>
          </tr>
        ))}
      </tbody>
    </TableBox>
  );
}

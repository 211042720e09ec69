/** Whether every spurious pole cancels in the sum. */
import type { Bench } from "../bench";
import type { Mark, Pole } from "../report";

export function spuriousCancel({ poles, ground }: Bench): Mark {
  const spurious = poles.filter((p) => p.kind === "spurious");
  if (spurious.length === 0)
    return { state: "notApplicable", evidence: "No denominator is spurious: there is nothing to cancel." };
  const left = spurious.filter((p) => (p.order ?? 0) > 0);
  const where = `each by one valuation in Laurent series modulo the 31-bit prime ${ground(0).prime}`;
  if (left.length > 0)
    return {
      state: "fails",
      evidence: `${left.length} of ${spurious.length} spurious poles are left in the sum: ${named(left)}, ${where}.`,
    };
  const open = spurious.filter(isOpen);
  if (open.length > 0)
    return {
      state: "untested",
      evidence: `${open.length} of ${spurious.length} spurious poles were not measured: ${named(open)}.`,
    };
  const parted = spurious.flatMap((p) => p.groups ?? []).map((group) => group.length);
  const groups = parted.length === 0 ? "" : ` The groups of terms in which they cancel have ${span(parted)} terms.`;
  const cancelled =
    spurious.length === 1 ? "The one spurious pole cancels" : `All ${spurious.length} spurious poles cancel`;
  return { state: "holds", evidence: `${cancelled} in the sum, ${where}.${groups}` };
}

/** A pole that was not measured. One without an order that no term has, or that cancels in groups of terms, was. */
export const isOpen = ({ order, groups, orderInTerms }: Pole): boolean =>
  order === undefined && groups === undefined && (orderInTerms ?? 1) > 0;

function named(poles: readonly Pole[]): string {
  const shown = poles.slice(0, 6).map((p) => (p.order === undefined ? p.bracket : `${p.bracket} (order ${p.order})`));
  return `${shown.join(", ")}${poles.length > shown.length ? ` and ${poles.length - shown.length} more` : ""}`;
}

function span(sizes: readonly number[]): string {
  const [least, most] = [Math.min(...sizes), Math.max(...sizes)];
  return least === most ? String(least) : `${least} to ${most}`;
}

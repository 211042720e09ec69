/** Checks a formula against the amplitude it is for: labels, loop lines, momenta, exponents, and how much work it is. */
import type { Diagnostic } from "../result";
import { countTerms } from "./count";
import type { Extent } from "./expand";
import { Faults, stop } from "./faults";
import { bindingsFor } from "./indices";
import { mostTerms } from "./limits";
import { reportRepeated } from "./momenta";
import { loopLetters, loopWords } from "./reader";
import type { Expression, Formula, IndexExpression, Item, LoopNumber } from "./tree";
import { everyExpression, everyItem, itemsOf, labelsOf, labelsOfItem, momentumSums, rootsOf } from "./walk";
import { checkWork } from "./work";

/** What a formula is checked against. */
export interface ValidationContext {
  /** The numbers of legs to check, ascending, each 4 to 64; at least one. */
  readonly n: readonly number[];
  readonly loops: number;
}

/**
 * The faults of a parsed formula that depend on the amplitude: bare labels beyond n, loop lines that the amplitude does not have, momenta named
 * twice, exponents out of range, and limits on terms, steps and degree for each n. Empty when the formula can be evaluated.
 */
export function validate(formula: Formula, context: ValidationContext): readonly Diagnostic[] {
  const faults = new Faults();
  try {
    checkPlaces(formula, context, faults);
    if (!faults.any) {
      for (const n of context.n) checkSize(formula, { n, loops: context.loops }, faults);
    }
  } catch (reason) {
    if (reason !== stop) throw reason;
  }
  return faults.list();
}

/** The part of `validate` that looks at each place of the text once and evaluates nothing; good for formulas with stand-ins too. */
export function validatePlaces(formula: Formula, context: ValidationContext): readonly Diagnostic[] {
  const faults = new Faults();
  try {
    checkPlaces(formula, context, faults);
  } catch (reason) {
    if (reason !== stop) throw reason;
  }
  return faults.list();
}

function checkPlaces(formula: Formula, { n: sizes, loops }: ValidationContext, faults: Faults): void {
  const n = sizes[0]!;
  const checkItems = (items: readonly Item[]): void => {
    for (const item of everyItem(items)) {
      for (const label of labelsOfItem(item)) checkLabel(label, n, faults);
      if (item.kind === "loopLine") checkLoop(item.loop, loops, item.span, faults);
      if (item.kind === "loopPoint")
        checkLoop((loopLetters.indexOf(item.letter) >> 1) as LoopNumber, loops, item.span, faults);
    }
  };
  const { expressions, items } = rootsOf(formula);
  checkItems(items);
  for (const root of expressions) {
    for (const expression of everyExpression(root)) {
      checkItems(itemsOf(expression));
      for (const label of labelsOf(expression)) checkLabel(label, n, faults);
      if (expression.kind === "distance") {
        for (const point of [expression.left, expression.right]) {
          if (point.kind === "loopLine") checkLoop(point.loop, loops, point.span, faults);
        }
      }
      checkConstantMomenta(expression, sizes, faults);
    }
  }
}

function checkLabel({ terms, constant, span }: IndexExpression, n: number, faults: Faults): void {
  if (terms.length > 0 || (BigInt(constant) >= 0n && BigInt(constant) <= BigInt(n))) return;
  const shown = constant.length > 20 ? `${constant.slice(0, 20)}...` : constant;
  faults.add("label-beyond", span, `There is no label ${shown} among ${n} legs.`, {
    help: `Bare labels are 1 to ${n}, and 0 is ${n}; label arithmetic such as n+1 wraps around.`,
  });
}

function checkLoop(line: LoopNumber, loops: number, span: readonly [number, number], faults: Faults): void {
  if (line < loops) return;
  const word = loopWords[line]!;
  const message =
    loops === 0
      ? `A tree amplitude has no loop line ${word}.`
      : `An amplitude with ${loops} loop${loops === 1 ? "" : "s"} has no loop line ${word}.`;
  faults.add("loop-beyond", span, message, {
    help:
      loops === 0
        ? "Set the number of loops, or use external twistors."
        : `Its lines are ${loopWords.slice(0, loops).join(", ")}.`,
  });
}

/** Momenta without indices are compared for each n; those with indices where they are evaluated (work.ts). */
function checkConstantMomenta(expression: Expression, sizes: readonly number[], faults: Faults): void {
  for (const momenta of momentumSums(expression)) {
    const labels = momenta.flatMap((momentum) =>
      momentum.kind === "single" ? [momentum.index] : [momentum.from, momentum.to],
    );
    if (labels.some(({ terms }) => terms.some(({ name }) => name !== "n"))) continue;
    sizes.find((n) => reportRepeated(momenta, bindingsFor(n), n, faults));
  }
}

function checkSize(formula: Formula, extent: Extent, faults: Faults): void {
  const terms = countTerms(formula, extent, mostTerms);
  if (terms > mostTerms) {
    faults.fatal(
      "limit-terms",
      formula.expression.span,
      `Written out at n = ${extent.n}, the formula has more than ${mostTerms.toLocaleString("en")} terms.`,
      {
        help: "Bound the sums more narrowly, or check parts of the formula separately.",
      },
    );
  }
  checkWork(formula, extent, faults);
}

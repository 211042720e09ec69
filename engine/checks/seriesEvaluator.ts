/**
 * The one place where the checks evaluate a form in Laurent series: a point of which some coordinates move with a small parameter
 * e, modulo a 31-bit prime, one value for each term and one for the sum.
 */
import { ZeroDenominator } from "../evaluate/algebra";
import { type FormAtN, inDualPoints } from "../evaluate/form";
import { NumericAlgebra } from "../evaluate/numeric";
import { Walker } from "../evaluate/walk";
import type { Field } from "../fields";
import { type PrimeSeries, type PrimeSeriesField, primeSeries } from "../fields/primeSeries";
import type { Point } from "../kinematics";
import { expandTerms, type Term } from "../notation/expand";
import { interpretTape } from "../tape";
import type { PreparedForm } from "./evaluator";

export interface SeriesValue {
  readonly field: PrimeSeriesField;
  readonly sum: PrimeSeries;
  readonly terms: readonly PrimeSeries[];
}

export interface SeriesForm {
  readonly form: FormAtN;
  /** Field multiplications of one evaluation at a point that does not move. */
  readonly operations: number;
  /**
   * The value along a path, computed again with twice the number of series terms until `enough` says that what is known
   * suffices, or the number is at its limit; null where a denominator vanishes all along the path, as far as that can be seen.
   */
  evaluate(
    base: Field<number>,
    path: (field: PrimeSeriesField) => Point<PrimeSeries>,
    enough: (value: SeriesValue) => boolean,
  ): SeriesValue | null;
  /** The same for some of the terms alone, `sum` being theirs: for forms of which each pole is in few terms. */
  evaluateTerms(
    indices: readonly number[],
    base: Field<number>,
    path: (field: PrimeSeriesField) => Point<PrimeSeries>,
    enough: (value: SeriesValue) => boolean,
  ): SeriesValue | null;
}

/** Most poles are simple: four terms reach the first coefficients that do not cancel. */
const fewestTerms = 4;
const mostTerms = 32;

/** The series of a form, on the tape that its other values are computed with; some of its terms alone by the tree walker. */
export function prepareSeries({ form, tape, operations }: PreparedForm): SeriesForm {
  let expanded: readonly Term[] | null = null;
  return {
    form,
    operations,
    evaluate: (base, path, enough) =>
      withMoreTerms(base, enough, (field) => {
        const found = interpretTape<PrimeSeries>(tape, field, path(field));
        return found.kind === "value" ? { field, sum: found.sum, terms: found.terms } : null;
      }),
    evaluateTerms: (indices, base, path, enough) => {
      expanded ??= [...expandTerms(form.formula, form)];
      const chosen = indices.map((index) => expanded![index]!);
      return withMoreTerms(base, enough, (field) => termsOf(form, chosen, field, path(field)));
    },
  };
}

/** Computes again with twice the number of series terms until that is enough, or as many as there may be. */
function withMoreTerms(
  base: Field<number>,
  enough: (value: SeriesValue) => boolean,
  compute: (field: PrimeSeriesField) => SeriesValue | null,
): SeriesValue | null {
  let best: SeriesValue | null = null;
  for (let terms = fewestTerms; terms <= mostTerms; terms *= 2) {
    const found = compute(primeSeries(base, terms));
    if (found === null) continue;
    best = found;
    if (enough(best)) return best;
  }
  return best;
}

function termsOf(
  form: FormAtN,
  chosen: readonly Term[],
  field: PrimeSeriesField,
  point: Point<PrimeSeries>,
): SeriesValue | null {
  const algebra = new NumericAlgebra<PrimeSeries>(field, point, form.squareSign);
  const walker = new Walker(algebra, form.formula, form);
  try {
    const measure = inDualPoints(form.formula) ? [algebra.dualMeasure()] : [];
    const terms = chosen.map((term) => {
      const value = algebra.multiply([...measure, walker.value(term.expression, term)]);
      const number = algebra.values.number(value);
      return term.sign === 1 ? number : field.negate(number);
    });
    return { field, terms, sum: terms.reduce(field.add, field.zero) };
  } catch (reason) {
    if (reason instanceof ZeroDenominator) return null;
    throw reason;
  }
}

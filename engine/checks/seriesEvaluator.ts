/**
 * The one place where the checks evaluate a form in Laurent series: a point of which some coordinates move with a small parameter
 * e, modulo a 31-bit prime, one value for each term and one for the sum.
 */
import type { FormAtN } from "../evaluate/form";
import type { Field } from "../fields";
import { type PrimeSeries, type PrimeSeriesField, primeSeries } from "../fields/primeSeries";
import type { Point } from "../kinematics";
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
}

/** Most poles are simple: four terms reach the first coefficients that do not cancel. */
const fewestTerms = 4;
const mostTerms = 32;

/** The series of a form, on the tape that its other values are computed with. */
export function prepareSeries({ form, tape, operations }: PreparedForm): SeriesForm {
  return {
    form,
    operations,
    evaluate(base, path, enough) {
      let best: SeriesValue | null = null;
      for (let terms = fewestTerms; terms <= mostTerms; terms *= 2) {
        const field = primeSeries(base, terms);
        const found = interpretTape<PrimeSeries>(tape, field, path(field));
        if (found.kind !== "value") continue;
        best = { field, sum: found.sum, terms: found.terms };
        if (enough(best)) return best;
      }
      return best;
    },
  };
}

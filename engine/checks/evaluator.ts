/** The one place where the checks evaluate a form: batches of samples in, one outcome each out. */
import { evaluateForm } from "../evaluate";
import type { FormAtN } from "../evaluate/form";
import { type Field, randomness, smallPrimeField } from "../fields";
import { type Point, randomPoint } from "../kinematics";
import type { Span } from "../result";

/** A point modulo a prime of 31 bits; residues in 0..prime-1. */
export interface Sample {
  readonly prime: number;
  readonly field: Field<number>;
  readonly point: Point<number>;
}

export type Outcome =
  | { readonly kind: "value"; readonly sum: number; readonly terms: readonly number[] }
  | { readonly kind: "zero-denominator"; readonly span: Span };

export interface PreparedForm {
  readonly form: FormAtN;
  /** Field operations for one sample. */
  readonly operations: number;
  evaluate(samples: readonly Sample[]): readonly Outcome[];
}

export const evaluatorName = "tree walker, a 31-bit prime for each point";

export function prepare(form: FormAtN): PreparedForm {
  let operations: number | null = null;
  return {
    form,
    get operations() {
      operations ??= countOperations(form);
      return operations;
    },
    evaluate: (samples) =>
      samples.map(({ field, point }) => {
        const evaluation = evaluateForm(field, form, point);
        return evaluation.kind === "value"
          ? { kind: "value", sum: evaluation.sum, terms: evaluation.terms }
          : { kind: "zero-denominator", span: evaluation.span };
      }),
  };
}

/** Additions, multiplications and inversions of one evaluation, counted by carrying it out at a point. */
function countOperations(form: FormAtN): number {
  const field = smallPrimeField(2 ** 31 - 1);
  let count = 0;
  const counted =
    <A extends readonly unknown[], R>(operation: (...args: A) => R) =>
    (...args: A): R => {
      count += 1;
      return operation(...args);
    };
  const counting: Field<number> = {
    ...field,
    add: counted(field.add),
    subtract: counted(field.subtract),
    multiply: counted(field.multiply),
    negate: counted(field.negate),
    inverse: counted(field.inverse),
  };
  evaluateForm(counting, form, randomPoint(field, form, randomness("operations")));
  return count;
}

/** The fingerprint of a form: its values at the public points. An index, never a reason to accept. */
import { MERSENNE_61, primeField } from "../fields";
import { publicPoint } from "../kinematics";
import type { Span } from "../result";
import { evaluateForm } from "./evaluate";
import type { FormAtN } from "./form";

const POINTS = 4;

/** How often the place of one point is taken by the next: a denominator that vanishes at all of these vanishes everywhere. */
const MOST_REPLACEMENTS = 16;

/** `values` modulo 2^61-1 and the numbers of the public points they belong to; `text` is the 64 hexadecimal digits. */
export type Fingerprint =
  | {
      readonly kind: "fingerprint";
      readonly text: string;
      readonly values: readonly bigint[];
      readonly points: readonly number[];
    }
  | { readonly kind: "zero-denominator"; readonly span: Span; readonly text?: string };

/**
 * The values of a form at public points 0, 1, 2, 3 of its amplitude, 16 hexadecimal digits each; where a denominator vanishes at
 * point m, point m+4 takes its place, and so on. `zero-denominator` when none of the first replacements will do.
 */
export function fingerprint(form: FormAtN): Fingerprint {
  const field = primeField(MERSENNE_61);
  const values: bigint[] = [];
  const points: number[] = [];
  for (let m = 0; m < POINTS; m++) {
    let number = m;
    let evaluation = evaluateForm(field, form, publicPoint(form, number));
    for (let i = 0; i < MOST_REPLACEMENTS && evaluation.kind !== "value"; i++) {
      number += POINTS;
      evaluation = evaluateForm(field, form, publicPoint(form, number));
    }
    if (evaluation.kind !== "value") return evaluation;
    values.push(evaluation.sum);
    points.push(number);
  }
  const text = values.map((value) => value.toString(16).padStart(16, "0")).join("");
  return { kind: "fingerprint", text, values, points };
}

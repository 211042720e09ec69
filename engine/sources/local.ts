/** What the local integrands share: the planes bar(i) and the propagators <AB i i+1>. */
import type { Modulus } from "./arithmetic";
import { type Bound, reciprocal } from "./bound";
import { bracket, plane, type Vector } from "./determinants";
import { cyclic } from "./question";

/** A four-bracket of variables has 24 monomials. */
export const bracketBits = Math.log2(24);

/** Covectors of the planes (i-1 i i+1), at index i. */
export const barsOf = (m: Modulus, twistors: readonly Vector[], n: number): number[][] =>
  Array.from({ length: n }, (_, i) => plane(m, twistors[cyclic(i - 1, n)]!, twistors[i]!, twistors[cyclic(i + 1, n)]!));

/** 1/<AB i i+1> at index i; null where one vanishes. */
export function loopSteps(
  m: Modulus,
  line: readonly [Vector, Vector],
  twistors: readonly Vector[],
  n: number,
): Int32Array | null {
  const steps = Int32Array.from({ length: n }, (_, i) =>
    bracket(m, line[0], line[1], twistors[i]!, twistors[cyclic(i + 1, n)]!),
  );
  return m.invertAll(steps, n) ? steps : null;
}

/** The bound of 1/<AB i i+1>. */
export const stepBound = (line: string, i: number): Bound => reciprocal(`<${line} ${i} ${i}+1>`, 4, bracketBits);

/** The shape shared by marks that say "the value does not change when the point is moved so". */
import { type Bench, pairs } from "../bench";
import { boundText } from "../bound";
import type { Sample } from "../evaluator";
import type { Mark } from "../report";

export interface Invariance {
  /** "leg a becomes leg a+1": completes "the value is unchanged when ...". */
  readonly when: string;
  readonly move: (sample: Sample) => Sample["point"];
  /** The moved value is this factor times the value; 1 where it is left out. */
  readonly factor?: (sample: Sample) => number;
}

/** Holds where every sample agrees, fails where one does not, untested where every moved sample was a bad point. */
export function testInvariance(bench: Bench, { when, move, factor }: Invariance): Mark {
  const compared = pairs(bench, move);
  const unequal = compared.filter(({ sample, at, moved }) => {
    const expected = factor === undefined ? at.sum : sample.field.multiply(at.sum, factor(sample));
    return moved.sum !== expected;
  });
  if (compared.length === 0)
    return { state: "untested", evidence: `Every sample became a point with a vanishing denominator when ${when}.` };
  if (unequal.length > 0)
    return {
      state: "fails",
      evidence: `The value changes when ${when}: at ${unequal.length} of ${compared.length} samples.`,
    };
  const bound = boundText(bench.miss, compared.length);
  return {
    state: "holds",
    evidence: `The value is unchanged when ${when}, at ${compared.length} samples with a fresh 31-bit prime each (bound ${bound}).`,
  };
}

/** Whether the multiset of term values is mapped to itself at the first samples (two are enough: terms are 31-bit residues). */
export function termsPermuted(bench: Bench, move: (sample: Sample) => Sample["point"], sign: 1 | -1 = 1): boolean {
  const two: Bench = { ...bench, samples: bench.samples.slice(0, 2), values: bench.values.slice(0, 2) };
  const compared = pairs(two, move);
  return (
    compared.length > 0 &&
    compared.every(({ sample, at, moved }) => {
      const expected = sign === 1 ? [...at.terms] : at.terms.map((t) => sample.field.negate(t));
      expected.sort(ascending);
      const found = [...moved.terms].sort(ascending);
      return found.length === expected.length && found.every((t, i) => t === expected[i]);
    })
  );
}

const ascending = (a: number, b: number): number => a - b;

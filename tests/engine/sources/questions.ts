/** Questions as the tests of the sources ask them. */
import type { Question } from "../../../engine/sources";

export const amplitude = (n: number, k: number, loops: number): Question => ({
  n,
  k,
  loops,
  negativeLegs: null,
  target: "amplitude",
});

export const component = (n: number, negativeLegs: readonly number[]): Question => ({
  n,
  k: negativeLegs.length - 2,
  loops: 0,
  negativeLegs,
  target: "amplitude",
});

/** All ascending choices of `size` of the labels 1..n. */
export function choices(n: number, size: number, from = 1): number[][] {
  if (size === 0) return [[]];
  const found: number[][] = [];
  for (let label = from; label <= n; label++) {
    for (const rest of choices(n, size - 1, label + 1)) found.push([label, ...rest]);
  }
  return found;
}

/** The order that moves leg a+1 to place a, and the one that reads the legs backwards. */
export const rotation = (n: number): number[] => Array.from({ length: n }, (_, leg) => (leg + 1) % n);
export const reflection = (n: number): number[] => Array.from({ length: n }, (_, leg) => n - 1 - leg);

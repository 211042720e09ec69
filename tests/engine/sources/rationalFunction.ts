/**
 * A rational function of one variable modulo a prime, from its values: interpolation and the extended Euclidean algorithm
 * for polynomials (rational interpolation after Cauchy). Coefficients in ascending order.
 */
import type { Modulus } from "../../../engine/sources/arithmetic";

export interface RationalFunction {
  readonly numerator: readonly number[];
  readonly denominator: readonly number[];
}

const trim = (a: number[]): number[] => {
  while (a.length > 0 && a[a.length - 1] === 0) a.pop();
  return a;
};
const combine = (m: Modulus, a: readonly number[], b: readonly number[], c: number): number[] =>
  trim(Array.from({ length: Math.max(a.length, b.length) }, (_, i) => m.subtract(a[i] ?? 0, m.multiply(c, b[i] ?? 0))));
const times = (m: Modulus, a: readonly number[], b: readonly number[]): number[] => {
  const product = new Array<number>(a.length + b.length).fill(0);
  a.forEach((x, i) => {
    b.forEach((y, j) => {
      product[i + j] = m.add(product[i + j]!, m.multiply(x, y));
    });
  });
  return trim(product);
};

export const evaluatePolynomial = (m: Modulus, a: readonly number[], x: number): number =>
  a.reduceRight((sum, c) => m.add(m.multiply(sum, x), c), 0);

/** The function of least total degree through the values at 1, 2, ..., samples; null where fewer than `spare` samples are left over to confirm it. */
export function reconstruct(
  m: Modulus,
  samples: number,
  spare: number,
  f: (x: number) => number,
): RationalFunction | null {
  // Newton interpolation.
  let interpolant: number[] = [];
  let modulus: number[] = [1];
  for (let x = 1; x <= samples; x++) {
    const gap = m.subtract(f(x), evaluatePolynomial(m, interpolant, x));
    const scale = m.divide(gap, evaluatePolynomial(m, modulus, x))!;
    interpolant = combine(m, interpolant, modulus, m.negate(scale));
    modulus = times(m, modulus, [m.negate(x), 1]);
  }
  let [before, now] = [modulus, interpolant];
  let [beforeFactor, nowFactor] = [[] as number[], [1]];
  let best: RationalFunction | null = null;
  for (;;) {
    if (best === null || now.length + nowFactor.length < best.numerator.length + best.denominator.length) {
      best = { numerator: now, denominator: nowFactor };
    }
    if (now.length === 0) break;
    let [rest, factor] = [before, beforeFactor];
    while (rest.length >= now.length) {
      const shift = new Array<number>(rest.length - now.length).fill(0);
      const lead = m.divide(rest[rest.length - 1]!, now[now.length - 1]!)!;
      rest = combine(m, rest, [...shift, ...now], lead);
      factor = combine(m, factor, [...shift, ...nowFactor], lead);
    }
    [before, now, beforeFactor, nowFactor] = [now, rest, nowFactor, factor];
  }
  return best.numerator.length + best.denominator.length - 1 + spare <= samples ? best : null;
}

/** The order at zero: negative for a pole. */
export function orderAtZero({ numerator, denominator }: RationalFunction): number {
  const order = (a: readonly number[]) => a.findIndex((x) => x !== 0);
  return order(numerator) - order(denominator);
}

/** The value at zero of a function without a pole there. */
export function valueAtZero(m: Modulus, { numerator, denominator }: RationalFunction): number {
  const low = denominator.findIndex((x) => x !== 0);
  if (numerator.slice(0, low).some((x) => x !== 0)) throw new Error("a pole at zero");
  return m.divide(numerator[low] ?? 0, denominator[low]!)!;
}

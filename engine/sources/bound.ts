/**
 * Upper bounds on a rational function, carried through the same sums and products as its value: the degree and the sum of
 * absolute coefficients of the numerator, over a product of named denominator factors that sums bring to their least
 * common multiple. The sum of absolute coefficients is submultiplicative and subadditive, so every step stays a bound.
 */
import type { SizeBound } from "./source";

interface Factor {
  readonly power: number;
  readonly degree: number;
  readonly bits: number;
}

/** numerator / product of factors; the map's key names the factor. `bits` is log2 of the sum of absolute coefficients. */
export interface Bound {
  readonly degree: number;
  readonly bits: number;
  readonly factors: ReadonlyMap<string, Factor>;
}

const none: ReadonlyMap<string, Factor> = new Map();

/** A polynomial of that total degree whose absolute coefficients add up to at most 2^bits. */
export const polynomial = (degree: number, bits: number): Bound => ({ degree, bits, factors: none });

/** One over such a polynomial; equal keys mean equal polynomials. */
export const reciprocal = (key: string, degree: number, bits: number, power = 1): Bound => ({
  degree: 0,
  bits: 0,
  factors: new Map([[key, { power, degree, bits }]]),
});

/** log2(2^x1 + 2^x2 + ...), rounded up a little; 0 for no summands, since a vanishing numerator has no coefficients to count. */
export function addBits(bits: readonly number[]): number {
  if (bits.length === 0) return 0;
  const largest = bits.reduce((x, y) => Math.max(x, y));
  return largest + Math.log2(bits.reduce((sum, x) => sum + 2 ** (x - largest), 0)) + 1e-9;
}

export function multiplyBounds(...bounds: readonly Bound[]): Bound {
  const factors = new Map<string, Factor>();
  let [degree, bits] = [0, 0];
  for (const bound of bounds) {
    degree += bound.degree;
    bits += bound.bits;
    for (const [key, factor] of bound.factors) {
      factors.set(key, { ...factor, power: factor.power + (factors.get(key)?.power ?? 0) });
    }
  }
  return { degree, bits, factors };
}

export function addBounds(bounds: readonly Bound[]): Bound {
  const common = new Map<string, Factor>();
  for (const { factors } of bounds) {
    for (const [key, factor] of factors) {
      if (factor.power > (common.get(key)?.power ?? 0)) common.set(key, factor);
    }
  }
  const whole = measure(common);
  let degree = 0;
  const bits = bounds.map((bound) => {
    const own = measure(bound.factors);
    degree = Math.max(degree, bound.degree + whole.degree - own.degree);
    return bound.bits + whole.bits - own.bits;
  });
  return { degree, bits: addBits(bits), factors: common };
}

export function powerBound(bound: Bound, exponent: number): Bound {
  return multiplyBounds(...Array.from({ length: exponent }, () => bound));
}

/** Multiplies the denominator out. */
export function sizeOf(bound: Bound): SizeBound {
  const denominator = measure(bound.factors);
  return {
    degree: bound.degree,
    denominatorDegree: denominator.degree,
    heightBits: bound.bits,
    denominatorHeightBits: denominator.bits,
  };
}

/** The bound of a value that is already multiplied out; equal keys mean equal denominators. */
export const boundOf = (size: SizeBound, key: string): Bound =>
  multiplyBounds(
    polynomial(size.degree, size.heightBits),
    reciprocal(key, size.denominatorDegree, size.denominatorHeightBits),
  );

function measure(factors: ReadonlyMap<string, Factor>): { degree: number; bits: number } {
  let [degree, bits] = [0, 0];
  for (const factor of factors.values()) {
    degree += factor.power * factor.degree;
    bits += factor.power * factor.bits;
  }
  return { degree, bits };
}

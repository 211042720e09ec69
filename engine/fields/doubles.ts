/**
 * Double-precision numbers with the operations of a field. Every operation rounds, so the laws of a field hold only nearly: for
 * physical numbers and pictures, never for a decision. Nothing has a tolerance: zero is 0 and equal is equal to the last bit.
 */
import { type Complex, type ComplexField, complexOver } from "./complex";
import type { Field } from "./field";
import { type Rational, rational } from "./rationals";

/** Real doubles. What is beyond their range becomes infinite or NaN, and stays so: look at results with `isFinite`. */
export const realDoubles: Field<number> = {
  name: "real double-precision numbers",
  characteristic: 0n,
  zero: 0,
  one: 1,
  fromInteger: Number,
  add: (a, b) => a + b,
  subtract: (a, b) => a - b,
  multiply: (a, b) => a * b,
  negate: (a) => -a,
  inverse: (a) => (a === 0 ? null : 1 / a),
  isZero: (a) => a === 0,
  equals: (a, b) => a === b,
  // The shortest decimal that reads back as the same number; there is one zero.
  toText: (a) => String(a === 0 ? 0 : a),
};

const plain = complexOver(realDoubles, "complex double-precision numbers");

/**
 * Complex doubles. The inverse divides by the larger part first (Commun. ACM 5 (1962) 435), so that squares of parts neither
 * overflow nor vanish.
 */
export const complexDoubles: ComplexField<number> = {
  ...plain,
  inverse: ({ re, im }) => {
    if (re === 0 && im === 0) return null;
    if (Math.abs(re) >= Math.abs(im)) {
      const ratio = im / re;
      const scale = re + im * ratio;
      return { re: 1 / scale, im: -ratio / scale };
    }
    const ratio = re / im;
    const scale = re * ratio + im;
    return { re: ratio / scale, im: -1 / scale };
  },
};

/** |a|, without overflow in between. */
export const magnitude = ({ re, im }: Complex<number>): number => Math.hypot(re, im);

/** How many bits of numerator and denominator are looked at: more than a double has. */
const BITS = 80n;

const bitLength = (x: bigint): bigint => BigInt(x.toString(2).length);

/** The double next to a rational number, within one unit in the last place, however long its numerator and denominator are. */
export function toDouble({ numerator, denominator }: Rational): number {
  const size = numerator < 0n ? -numerator : numerator;
  const shift = BITS - (bitLength(size) - bitLength(denominator));
  const quotient = shift >= 0n ? (size << shift) / denominator : size / (denominator << -shift);
  // Two steps, because 2^-shift alone can leave the range while the product is inside it.
  const half = Math.trunc(Number(-shift) / 2);
  const value = Number(quotient) * 2 ** half * 2 ** (Number(-shift) - half);
  return numerator < 0n ? -value : value;
}

/** A complex number with rational parts in double precision. */
export const toComplexDouble = ({ re, im }: Complex<Rational>): Complex<number> => ({
  re: toDouble(re),
  im: toDouble(im),
});

/**
 * The rational number that a double is, exactly.
 * @throws Error for infinities and NaN
 */
export function fromDouble(x: number): Rational {
  if (!Number.isFinite(x)) throw new Error(`fromDouble: expected a finite number, got ${x}`);
  let [mantissa, exponent] = [x, 0];
  while (!Number.isInteger(mantissa)) {
    mantissa *= 2;
    exponent++;
  }
  return rational(BigInt(mantissa), 1n << BigInt(exponent));
}

/** Exact rational numbers. */
import type { Field } from "./field";

/** numerator / denominator in lowest terms, denominator >= 1; zero is 0/1. Made by `rational` or by the field's operations only. */
export interface Rational {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  let x = a < 0n ? -a : a;
  let y = b < 0n ? -b : b;
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/**
 * The canonical form of numerator / denominator.
 * @throws Error for a denominator of zero
 */
export function rational(numerator: bigint, denominator = 1n): Rational {
  if (denominator === 0n) throw new Error(`rational: expected a denominator other than 0, got ${numerator}/0`);
  if (denominator === 1n) return { numerator, denominator };
  const divisor = greatestCommonDivisor(numerator, denominator) * (denominator < 0n ? -1n : 1n);
  return { numerator: numerator / divisor, denominator: denominator / divisor };
}

/** "p/q" in lowest terms, or "p" where q is 1. */
const toText = (a: Rational): string =>
  a.denominator === 1n ? a.numerator.toString() : `${a.numerator}/${a.denominator}`;

/** The field of rational numbers, exact and unbounded. */
export const rationals: Field<Rational> = {
  name: "rationals",
  characteristic: 0n,
  zero: rational(0n),
  one: rational(1n),
  fromInteger: (x) => rational(x),
  add: (a, b) => rational(a.numerator * b.denominator + b.numerator * a.denominator, a.denominator * b.denominator),
  subtract: (a, b) =>
    rational(a.numerator * b.denominator - b.numerator * a.denominator, a.denominator * b.denominator),
  multiply: (a, b) => rational(a.numerator * b.numerator, a.denominator * b.denominator),
  negate: (a) => ({ numerator: -a.numerator, denominator: a.denominator }),
  inverse: (a) => (a.numerator === 0n ? null : rational(a.denominator, a.numerator)),
  isZero: (a) => a.numerator === 0n,
  equals: (a, b) => a.numerator === b.numerator && a.denominator === b.denominator,
  toText,
};

/** The image of a rational number in a field, or null where its denominator vanishes there. */
export function fromRational<T>(field: Field<T>, x: Rational): T | null {
  const numerator = field.fromInteger(x.numerator);
  if (x.denominator === 1n) return numerator;
  const inverse = field.inverse(field.fromInteger(x.denominator));
  return inverse === null ? null : field.multiply(numerator, inverse);
}

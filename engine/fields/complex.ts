/** Pairs a + b i over a field in which -1 is not a square: the exact complex numbers. */
import type { Field } from "./field";
import { type Rational, rationals } from "./rationals";

/** re + im i. */
export interface Complex<T> {
  readonly re: T;
  readonly im: T;
}

/** A field of complex numbers with what is special to it. */
export interface ComplexField<T> extends Field<Complex<T>> {
  readonly base: Field<T>;
  /** i. */
  readonly unit: Complex<T>;
  /** A number of the base field, its imaginary part zero. */
  real(x: T): Complex<T>;
  conjugate(a: Complex<T>): Complex<T>;
}

/** "a", "b i" or "a + b i"; a sign of b is drawn into the middle. */
function complexText(re: string, im: string): string {
  if (im === "0") return re;
  const imaginary = `${im} i`;
  if (re === "0") return imaginary;
  return im.startsWith("-") ? `${re} - ${imaginary.slice(1)}` : `${re} + ${imaginary}`;
}

/**
 * The field of all re + im i over `base`.
 * @param base a field in which no square is -1: the rationals or the reals, not a prime field p = 1 modulo 4
 */
export function complexOver<T>(base: Field<T>, name: string): ComplexField<T> {
  const { add, subtract, multiply, negate, zero } = base;
  const real = (x: T): Complex<T> => ({ re: x, im: zero });
  return {
    name,
    characteristic: base.characteristic,
    base,
    zero: real(zero),
    one: real(base.one),
    unit: { re: zero, im: base.one },
    real,
    conjugate: ({ re, im }) => ({ re, im: negate(im) }),
    fromInteger: (x) => real(base.fromInteger(x)),
    add: (a, b) => ({ re: add(a.re, b.re), im: add(a.im, b.im) }),
    subtract: (a, b) => ({ re: subtract(a.re, b.re), im: subtract(a.im, b.im) }),
    multiply: (a, b) => ({
      re: subtract(multiply(a.re, b.re), multiply(a.im, b.im)),
      im: add(multiply(a.re, b.im), multiply(a.im, b.re)),
    }),
    negate: ({ re, im }) => ({ re: negate(re), im: negate(im) }),
    inverse: ({ re, im }) => {
      const norm = base.inverse(add(multiply(re, re), multiply(im, im)));
      return norm === null ? null : { re: multiply(re, norm), im: multiply(negate(im), norm) };
    },
    isZero: ({ re, im }) => base.isZero(re) && base.isZero(im),
    equals: (a, b) => base.equals(a.re, b.re) && base.equals(a.im, b.im),
    toText: ({ re, im }) => complexText(base.toText(re), base.toText(im)),
  };
}

/** The numbers a + b i with rational a and b, exact and unbounded. */
export const gaussianRationals: ComplexField<Rational> = complexOver(rationals, "complex numbers with rational parts");

import fc from "fast-check";
import {
  complex,
  type Complex as MathComplex,
  add as mathAdd,
  divide as mathDivide,
  multiply as mathMultiply,
} from "mathjs";
import { describe, expect, it } from "vitest";
import {
  type Complex,
  complexDoubles,
  type Field,
  fromDouble,
  fromWide,
  gaussianRationals,
  magnitude,
  type Rational,
  rational,
  rationals,
  realDoubles,
  toDouble,
  toWide,
  wideComplex,
} from "../../../engine/fields";

const integer = fc.bigInt({ min: -(2n ** 70n), max: 2n ** 70n });
const fraction = fc.tuple(integer, integer).map(([p, q]) => rational(p, q === 0n ? 1n : q));
const gaussian = fc.tuple(fraction, fraction).map(([re, im]): Complex<Rational> => ({ re, im }));

describe("complex numbers with rational parts", () => {
  const f: Field<Complex<Rational>> = gaussianRationals;
  const law = (check: (a: Complex<Rational>, b: Complex<Rational>, c: Complex<Rational>) => boolean): void =>
    fc.assert(fc.property(gaussian, gaussian, gaussian, check), { numRuns: 100 });

  it("obey the laws of a field", () => {
    law((a, b, c) => f.equals(f.add(a, f.add(b, c)), f.add(f.add(a, b), c)) && f.equals(f.add(a, b), f.add(b, a)));
    law((a, b, c) => f.equals(f.multiply(a, f.multiply(b, c)), f.multiply(f.multiply(a, b), c)));
    law((a, b, c) => f.equals(f.multiply(a, f.add(b, c)), f.add(f.multiply(a, b), f.multiply(a, c))));
    law((a, b) => f.equals(f.multiply(a, b), f.multiply(b, a)) && f.isZero(f.add(a, f.negate(a))));
    law((a, b) => f.equals(f.subtract(a, b), f.add(a, f.negate(b))) && f.equals(f.multiply(a, f.one), a));
    law((a) => f.isZero(a) || f.equals(f.multiply(a, f.inverse(a) ?? f.zero), f.one));
    expect(f.inverse(f.zero)).toBeNull();
  });

  it("have a unit of square -1 and the norm as a times its conjugate", () => {
    const { unit, conjugate } = gaussianRationals;
    expect(f.equals(f.multiply(unit, unit), f.fromInteger(-1n))).toBe(true);
    law((a) => {
      const norm = f.multiply(a, conjugate(a));
      const squares = rationals.add(rationals.multiply(a.re, a.re), rationals.multiply(a.im, a.im));
      return rationals.isZero(norm.im) && rationals.equals(norm.re, squares);
    });
  });

  it.each([
    [3n, 0n, "3"],
    [0n, -2n, "-2 i"],
    [1n, 5n, "1 + 5 i"],
    [-4n, -7n, "-4 - 7 i"],
    [0n, 0n, "0"],
  ])("%d + %d i is printed as %s", (re, im, text) => {
    expect(f.toText({ re: rational(re), im: rational(im) })).toBe(text);
  });
});

const part = fc.double({ min: -1e6, max: 1e6, noNaN: true, noDefaultInfinity: true });
const number = fc.tuple(part, part).map(([re, im]): Complex<number> => ({ re, im }));
const near = (a: Complex<number>, b: { re: number; im: number }, size: number): boolean =>
  Math.hypot(a.re - b.re, a.im - b.im) <= 1e-14 * size;
const theirs = ({ re, im }: Complex<number>): MathComplex => complex(re, im);

describe("complex doubles", () => {
  it("agree with mathjs", () => {
    fc.assert(
      fc.property(number, number, (a, b) => {
        const product = mathMultiply(theirs(a), theirs(b)) as MathComplex;
        const sum = mathAdd(theirs(a), theirs(b)) as MathComplex;
        const size = magnitude(a) + magnitude(b);
        return (
          near(complexDoubles.add(a, b), sum, size) &&
          near(complexDoubles.multiply(a, b), product, magnitude(a) * magnitude(b))
        );
      }),
    );
    fc.assert(
      fc.property(number, (a) => {
        fc.pre(magnitude(a) > 1e-100);
        const inverse = complexDoubles.inverse(a);
        const quotient = mathDivide(complex(1, 0), theirs(a)) as MathComplex;
        return inverse !== null && near(inverse, quotient, magnitude(inverse));
      }),
    );
  });

  it("have inverses where squares of the parts leave the range of doubles", () => {
    for (const [re, im] of [
      [1e200, 3e200],
      [-4e-200, 1e-200],
      [2e-300, 0],
      [0, 5e250],
    ] as const) {
      const inverse = complexDoubles.inverse({ re, im })!;
      expect(near(complexDoubles.multiply(inverse, { re, im }), { re: 1, im: 0 }, 1)).toBe(true);
    }
    expect(complexDoubles.inverse({ re: 0, im: -0 })).toBeNull();
    expect(realDoubles.inverse(0)).toBeNull();
    expect(realDoubles.toText(-0)).toBe("0");
  });
});

describe("doubles and rationals", () => {
  it("a double is the rational number that it is, and comes back", () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (x) => toDouble(fromDouble(x)) === x + 0),
    );
    expect(fromDouble(0.1)).toEqual(rational(3602879701896397n, 36028797018963968n)); // IEEE 754: 0x3FB999999999999A
    expect(() => fromDouble(Number.NaN)).toThrow(/finite/);
  });

  it("a long fraction is rounded to the nearest double, though its parts are beyond doubles", () => {
    const third = rational(10n ** 900n, 3n * 10n ** 900n + 1n);
    expect(toDouble(third)).toBe(1 / 3);
    expect(toDouble(rational(-(7n ** 500n), 7n ** 499n))).toBe(-7);
    expect(toDouble(rational(1n, 10n ** 400n))).toBe(0);
    expect(toDouble(rational(10n ** 400n))).toBe(Number.POSITIVE_INFINITY);
    expect(toDouble(rational(5n, 10n ** 324n))).toBe(5e-324);
  });
});

describe("complex doubles of any size", () => {
  /** Parts that are zero or far from the smallest doubles, which have fewer digits. */
  const plain = number.map(({ re, im }): Complex<number> => {
    const [a, b] = [re, im].map((x) => (Math.abs(x) < 1e-100 ? 0 : x)) as [number, number];
    return { re: a, im: b };
  });
  const scaled = fc.tuple(plain, fc.integer({ min: -3, max: 3 }));
  const power = (e: number): typeof wideComplex.one => {
    const large = wideComplex.fromInteger(2n ** 300n);
    const step = e < 0 ? wideComplex.inverse(large)! : large;
    return Array.from({ length: Math.abs(e) }).reduce<typeof large>(
      (x) => wideComplex.multiply(x, step),
      wideComplex.one,
    );
  };

  it("agree with complex doubles inside their range", () => {
    fc.assert(
      fc.property(number, number, (a, b) => {
        const [x, y] = [toWide(a), toWide(b)];
        const size = magnitude(a) + magnitude(b);
        return (
          near(fromWide(wideComplex.add(x, y))!, complexDoubles.add(a, b), size) &&
          near(fromWide(wideComplex.subtract(x, y))!, complexDoubles.subtract(a, b), size) &&
          (magnitude(a) * magnitude(b) < 1e-290 ||
            near(fromWide(wideComplex.multiply(x, y))!, complexDoubles.multiply(a, b), magnitude(a) * magnitude(b)))
        );
      }),
    );
  });

  it("powers of 2 far beyond doubles cancel exactly", () => {
    fc.assert(
      fc.property(scaled, scaled, ([a, e], [b, d]) => {
        const x = wideComplex.multiply(toWide(a), power(e));
        const y = wideComplex.multiply(toWide(b), power(d));
        const product = wideComplex.multiply(wideComplex.multiply(x, y), power(-e - d));
        const plain = wideComplex.multiply(toWide(a), toWide(b));
        return wideComplex.equals(product, plain);
      }),
    );
  });

  it("sums keep what both sizes let them keep, over every distance of exponents", () => {
    const [one, two] = [wideComplex.one, wideComplex.fromInteger(2n)];
    let x = one;
    for (let e = 1; e <= 600; e++) {
      x = wideComplex.multiply(x, two);
      const sum = wideComplex.add(x, one);
      const expected =
        e < 53 ? wideComplex.fromInteger(2n ** BigInt(e) + 1n) : wideComplex.fromInteger(2n ** BigInt(e));
      expect(wideComplex.equals(wideComplex.subtract(sum, expected), wideComplex.zero), `2^${e}`).toBe(true);
      const rest = fromWide(wideComplex.subtract(sum, x))!;
      expect(rest.re, `2^${e} + 1 - 2^${e}`).toBe(e < 53 ? 1 : 0);
    }
  });

  it("say what cannot be an ordinary double", () => {
    const huge = wideComplex.fromInteger(10n ** 400n);
    expect(fromWide(huge)).toBeNull();
    expect(fromWide(wideComplex.inverse(huge)!)).toBeNull();
    expect(fromWide(wideComplex.zero)).toEqual({ re: 0, im: 0 });
    expect(fromWide(toWide({ re: Number.NaN, im: 0 }))).toBeNull();
    const ratio = fromWide(wideComplex.multiply(huge, wideComplex.inverse(wideComplex.fromInteger(-(10n ** 399n)))!))!;
    expect(near(ratio, { re: -10, im: 0 }, 10)).toBe(true);
  });
});

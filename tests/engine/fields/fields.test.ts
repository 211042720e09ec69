import fc from "fast-check";
import { type Fraction, fraction, add as mathAdd, multiply as mathMultiply } from "mathjs";
import { describe, expect, it } from "vitest";
import {
  batchInverse,
  type Field,
  fromRational,
  MERSENNE_61,
  primeField,
  type Rational,
  rational,
  rationals,
  series,
  smallPrimeField,
} from "../../../engine/fields";

/** One row of the table of laws: a field and how to make its elements from integers. */
interface Row<T> {
  readonly field: Field<T>;
  readonly element: (a: bigint, b: bigint) => T;
}

const quotient =
  <T>(field: Field<T>) =>
  (a: bigint, b: bigint): T => {
    const inverse = field.inverse(field.fromInteger(b));
    return field.multiply(field.fromInteger(a), inverse ?? field.one);
  };
const row = <T>(field: Field<T>): Row<T> => ({ field, element: quotient(field) });

const seven = series(primeField(MERSENNE_61), 7);
const table: Row<unknown>[] = [
  row(primeField(2n)),
  row(primeField(7n)),
  row(primeField(MERSENNE_61)),
  row(primeField(2305843009213693921n)),
  row(smallPrimeField(2147483647)),
  row(smallPrimeField(1073741827)),
  row(rationals),
  {
    field: seven,
    // a e^-1 + b + e: poles of every order come in, and no sum of these cancels more than it keeps.
    element: (a: bigint, b: bigint) => {
      const inverse = seven.inverse(seven.parameter)!;
      const pole = seven.multiply(seven.fromInteger(a), inverse);
      return seven.add(seven.add(pole, seven.fromInteger(b)), seven.parameter);
    },
  },
] as Row<unknown>[];

const integer = fc.bigInt({ min: -(2n ** 70n), max: 2n ** 70n });

describe.each(table)("laws of a field: $field.name", ({ field: f, element }) => {
  const arbitrary = fc.tuple(integer, integer).map(([a, b]) => element(a, b));
  const law = (check: (a: unknown, b: unknown, c: unknown) => boolean): void =>
    fc.assert(fc.property(arbitrary, arbitrary, arbitrary, check), { numRuns: 200 });

  it("addition is associative, commutative, has zero and negatives", () => {
    law((a, b, c) => f.equals(f.add(a, f.add(b, c)), f.add(f.add(a, b), c)));
    law((a, b) => f.equals(f.add(a, b), f.add(b, a)));
    law((a) => f.equals(f.add(a, f.zero), a) && f.isZero(f.add(a, f.negate(a))));
    law((a, b) => f.equals(f.subtract(a, b), f.add(a, f.negate(b))));
  });

  it("multiplication is associative, commutative, has one, and distributes", () => {
    law((a, b, c) => f.equals(f.multiply(a, f.multiply(b, c)), f.multiply(f.multiply(a, b), c)));
    law((a, b) => f.equals(f.multiply(a, b), f.multiply(b, a)));
    law((a) => f.equals(f.multiply(a, f.one), a) && f.isZero(f.multiply(a, f.zero)));
    law((a, b, c) => f.equals(f.multiply(a, f.add(b, c)), f.add(f.multiply(a, b), f.multiply(a, c))));
  });

  it("what is not zero has an inverse, and zero has none", () => {
    law((a) => {
      const inverse = f.inverse(a);
      return inverse === null ? f.isZero(a) : !f.isZero(a) && f.equals(f.multiply(a, inverse), f.one);
    });
    expect(f.inverse(f.zero)).toBeNull();
  });

  it("integers are mapped as a ring, with the stated characteristic", () => {
    fc.assert(
      fc.property(integer, integer, (a, b) => {
        const [x, y] = [f.fromInteger(a), f.fromInteger(b)];
        return f.equals(f.fromInteger(a * b), f.multiply(x, y)) && f.equals(f.fromInteger(a + b), f.add(x, y));
      }),
    );
    expect(f.isZero(f.fromInteger(f.characteristic))).toBe(true);
    expect(f.isZero(f.one)).toBe(false);
  });

  it("batch inversion gives the inverses, and null for zeros", () => {
    fc.assert(
      fc.property(fc.array(fc.oneof(arbitrary, fc.constant(f.zero)), { maxLength: 9 }), (xs) =>
        batchInverse(f, xs).every((y, i) => (y === null ? f.isZero(xs[i]) : f.equals(f.multiply(xs[i], y), f.one))),
      ),
    );
  });
});

describe("prime fields", () => {
  // Values by PARI/GP 2.15.2, e.g. lift(1/Mod(1234567890123456789, 2^61-1)).
  it("agree with PARI/GP", () => {
    const large = primeField(MERSENNE_61);
    expect(large.inverse(1234567890123456789n)).toBe(2179019607881955056n);
    expect(large.multiply(2305843009213693950n, 1152921504606846977n)).toBe(1152921504606846974n);
    const small = smallPrimeField(2147483629);
    expect(small.inverse(1999999999)).toBe(1236613751);
    expect(small.multiply(2147483628, 2147483627)).toBe(2);
    expect(small.multiply(1987654321, 2012345678)).toBe(1399439128);
  });

  it.each([1073741827, 1500000001, 2147483629, 2147483647])(
    "machine numbers modulo %i agree with big integers",
    (p) => {
      const small = smallPrimeField(p);
      const residue = fc.oneof(
        fc.integer({ min: 0, max: p - 1 }),
        fc.integer({ min: 0, max: 3 }).map((x) => p - 1 - x),
        fc.integer({ min: 0, max: 46341 }),
      );
      fc.assert(
        fc.property(residue, residue, (a, b) => BigInt(small.multiply(a, b)) === (BigInt(a) * BigInt(b)) % BigInt(p)),
        { numRuns: 20000 },
      );
      // Products just above and below multiples of p, where a rounded quotient goes wrong first.
      for (let a = 1; a < 2000; a++) {
        const inverse = small.inverse(a)!;
        for (const b of [inverse, p - inverse, Math.floor(p / a), Math.floor(p / a) + 1]) {
          expect(BigInt(small.multiply(a, b))).toBe((BigInt(a) * BigInt(b)) % BigInt(p));
        }
      }
    },
  );

  it("refuse what is not a prime in range", () => {
    expect(() => primeField(91n)).toThrow("primeField: expected a prime, got 91");
    expect(() => primeField(1n)).toThrow("primeField: expected 2 <= p <= 2^61-1, got 1");
    expect(() => primeField(MERSENNE_61 + 2n)).toThrow("expected 2 <= p <= 2^61-1");
    expect(() => smallPrimeField(2147483645)).toThrow("smallPrimeField: expected a prime, got 2147483645");
    expect(() => smallPrimeField(65537)).toThrow("expected an integer 2^30 < p < 2^31");
    expect(() => smallPrimeField(2 ** 31 + 11)).toThrow("expected an integer 2^30 < p < 2^31");
  });
});

describe("rationals", () => {
  const asMath = (x: Rational): Fraction => fraction(x.numerator, x.denominator);
  const pair = fc.tuple(fc.bigInt({ min: -(2n ** 80n), max: 2n ** 80n }), fc.bigInt({ min: 1n, max: 2n ** 80n }));

  it("agree with mathjs fractions", () => {
    fc.assert(
      fc.property(pair, pair, ([a, b], [c, d]) => {
        const [x, y] = [rational(a, b), rational(c, d)];
        expect(rationals.toText(rationals.add(x, y))).toBe((mathAdd(asMath(x), asMath(y)) as Fraction).toFraction());
        const product = mathMultiply(asMath(x), asMath(y)) as Fraction;
        expect(rationals.toText(rationals.multiply(x, y))).toBe(product.toFraction());
      }),
    );
  });

  it("agree with PARI/GP 2.15.2, in lowest terms", () => {
    const [x, y] = [rational(-355n, 113n), rational(22n, 7n)];
    expect(rationals.toText(rationals.add(x, y))).toBe("1/791");
    expect(rationals.toText(rationals.multiply(x, rationals.inverse(y)!))).toBe("-2485/2486");
    expect(rationals.toText(rational(-6n, -3n))).toBe("2");
    expect(rationals.toText(rational(0n, -5n))).toBe("0");
    expect(() => rational(1n, 0n)).toThrow("rational: expected a denominator other than 0, got 1/0");
  });

  it("map into prime fields unless the denominator vanishes there", () => {
    const field = primeField(7n);
    expect(fromRational(field, rational(-1n, 3n))).toBe(2n);
    expect(fromRational(field, rational(1n, 14n))).toBeNull();
  });
});

describe("Laurent series", () => {
  // PARI/GP 2.15.2: (2+3*x+5*x^2)/(x^2-4*x^3+7*x^5)+O(x^4), and its cube + O(x^1).
  const field = series(rationals, 7);
  const polynomial = (coefficients: Record<number, bigint>) =>
    Object.entries(coefficients).reduce((sum, [power, c]) => {
      let term = field.fromInteger(c);
      for (let i = 0; i < Number(power); i++) term = field.multiply(term, field.parameter);
      return field.add(sum, term);
    }, field.zero);
  const ratio = field.multiply(
    polynomial({ 0: 2n, 1: 3n, 2: 5n }),
    field.inverse(polynomial({ 2: 1n, 3: -4n, 5: 7n }))!,
  );

  it("of a rational function", () => {
    expect(ratio.valuation).toBe(-2);
    expect(ratio.coefficients.slice(0, 6).map((c) => rationals.toText(c))).toEqual([
      "2",
      "11",
      "49",
      "182",
      "651",
      "2261",
    ]);
    const cube = field.multiply(field.multiply(ratio, ratio), ratio);
    expect(cube.valuation).toBe(-6);
    const cubed = ["8", "132", "1314", "9983", "64029", "365379", "1915774"];
    expect(cube.coefficients.map((c) => rationals.toText(c))).toEqual(cubed);
    expect(rationals.toText(field.coefficient(cube, -4)!)).toBe("1314");
    expect(rationals.toText(field.coefficient(cube, -9)!)).toBe("0");
    expect(field.coefficient(cube, 5)).toBeNull();
  });

  it("states what the truncation leaves unknown instead of calling it zero", () => {
    const lost = field.subtract(ratio, ratio);
    expect(field.isZero(lost)).toBe(true);
    expect(lost.valuation).toBe(5);
    expect(field.toText(lost)).toBe("O(e^5)");
    expect(field.inverse(lost)).toBeNull();
    expect(field.toText(field.zero)).toBe("0");
    const known = field.add(field.one, field.multiply(lost, field.inverse(field.parameter)!));
    expect(field.coefficient(known, 4)).toBeNull();
    expect(field.coefficient(known, 3)).toEqual(rational(0n));
  });
});

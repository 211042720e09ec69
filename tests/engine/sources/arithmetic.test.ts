import fc from "fast-check";
import { det, matrix } from "mathjs";
import { describe, expect, it } from "vitest";
import { Modulus } from "../../../engine/sources/arithmetic";
import { bracket, contract, determinant, plane } from "../../../engine/sources/determinants";
import { primes } from "../../support/randomPoint";

// Outside reference: BigInt arithmetic of the language (ECMA-262), and mathjs for determinants of small integers.
describe.each(primes)("residues modulo %d", (prime) => {
  const m = new Modulus(prime);
  const big = BigInt(prime);
  const residue = fc.oneof(
    fc.integer({ min: 0, max: prime - 1 }),
    fc.constantFrom(0, 1, 2, prime - 1, prime - 2, 65536),
  );

  it("adds, subtracts and multiplies like whole numbers do", () => {
    fc.assert(
      fc.property(residue, residue, (a, b) => {
        expect(BigInt(m.add(a, b))).toBe((BigInt(a) + BigInt(b)) % big);
        expect(BigInt(m.subtract(a, b))).toBe((BigInt(a) - BigInt(b) + big) % big);
        expect(BigInt(m.multiply(a, b))).toBe((BigInt(a) * BigInt(b)) % big);
      }),
      { numRuns: 5000, seed: 1 },
    );
  });

  it("inverts everything but zero", () => {
    expect(m.inverse(0)).toBeNull();
    fc.assert(
      fc.property(residue, (a) => {
        if (a !== 0) expect((BigInt(a) * BigInt(m.inverse(a)!)) % big).toBe(1n);
      }),
      { numRuns: 1000, seed: 2 },
    );
  });

  it("inverts many at once, and leaves them alone where one is zero", () => {
    const values = Int32Array.from([5, prime - 1, 12345, 2]);
    expect(m.invertAll(values, 4)).toBe(true);
    expect([...values]).toEqual([5, prime - 1, 12345, 2].map((x) => m.inverse(x)));
    const withZero = Int32Array.from([5, 0, 7]);
    expect(m.invertAll(withZero, 3)).toBe(false);
    expect([...withZero]).toEqual([5, 0, 7]);
  });

  it("has the determinants of mathjs", () => {
    const entry = fc.integer({ min: -20, max: 20 });
    const square = fc
      .integer({ min: 1, max: 6 })
      .chain((size) =>
        fc.array(fc.array(entry, { minLength: size, maxLength: size }), { minLength: size, maxLength: size }),
      );
    fc.assert(
      fc.property(square, (rows) => {
        const data = Int32Array.from(rows.flat(), (x) => m.residue(x));
        const expected = m.residue(Math.round(det(matrix(rows))));
        expect(
          determinant(
            m,
            data,
            rows.map((_, r) => r * rows.length),
          ),
        ).toBe(expected);
        if (rows.length !== 4) return;
        const [a, b, c, d] = rows.map((row) => row.map((x) => m.residue(x))) as [
          number[],
          number[],
          number[],
          number[],
        ];
        expect(bracket(m, a, b, c, d)).toBe(expected);
        expect(contract(m, a, plane(m, b, c, d))).toBe(expected);
      }),
      { numRuns: 300, seed: 3 },
    );
  });
});

it("refuses a modulus outside the range its products are exact in", () => {
  expect(() => new Modulus(2 ** 31)).toThrow("expected a prime between 2^30 and 2^31");
  expect(() => new Modulus(1000003)).toThrow("expected a prime between 2^30 and 2^31");
});

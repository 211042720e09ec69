import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { series, smallPrimeField } from "../../../engine/fields";
import { type PrimeSeries, precisionOf, primeSeries, valuationOf } from "../../../engine/fields/primeSeries";

// The generic series field is other code for the same ring: every operation must give what it gives, or know more.
const base = smallPrimeField(2147483629);
const terms = 5;
const fast = primeSeries(base, terms);
const slow = series(base, 12);

/** A random expression in both fields at once: polynomials of degree 2, sums, products and inverses. */
const pair = fc.letrec<{ tree: readonly [PrimeSeries, ReturnType<typeof slow.constant>] }>((tie) => ({
  tree: fc.oneof(
    { depthSize: "small", withCrossShrink: true },
    fc.tuple(...[0, 1, 2].map(() => fc.nat(5))).map(([a, b, c]) => {
      const e = slow.parameter;
      const polynomial = slow.add(
        slow.constant(a!),
        slow.add(slow.multiply(slow.constant(b!), e), slow.multiply(slow.constant(c!), slow.multiply(e, e))),
      );
      return [fast.quadratic(a!, b!, c!), polynomial] as const;
    }),
    fc.tuple(tie("tree"), tie("tree"), fc.constantFrom("add", "subtract", "multiply")).map(([x, y, operation]) => {
      const name = operation as "add" | "subtract" | "multiply";
      return [fast[name](x[0], y[0]), slow[name](x[1], y[1])] as const;
    }),
    tie("tree").map(
      (x) => [fast.inverse(x[0]) ?? x[0], fast.inverse(x[0]) === null ? x[1] : slow.inverse(x[1])!] as const,
    ),
  ),
})).tree;

describe("prime series", () => {
  it("agree with the generic series wherever both know a coefficient", () => {
    fc.assert(
      fc.property(pair, ([x, y]) => {
        for (let order = -6; order < 8; order++) {
          const [a, b] = [fast.coefficient(x, order), slow.coefficient(y, order)];
          if (a !== null && b !== null) expect(a).toBe(b);
        }
      }),
      { numRuns: 500 },
    );
  });

  it("stay exact for short polynomials, so that a difference that vanishes is zero", () => {
    const x = fast.linear(3, 4);
    expect(fast.subtract(fast.multiply(x, x), fast.quadratic(9, 24, 16))).toBe(0);
    expect(valuationOf(fast.subtract(x, 3))).toBe(1);
    expect(precisionOf(fast.inverse(x)!)).toBe(terms);
  });

  it("say what is not known", () => {
    const x = fast.inverse(fast.linear(1, 1))!;
    const difference = fast.subtract(x, x);
    expect([valuationOf(difference), precisionOf(difference)]).toEqual([null, terms]);
    expect(fast.inverse(difference)).toBeNull();
    expect(fast.coefficient(difference, terms)).toBeNull();
    expect(fast.coefficient(difference, terms - 1)).toBe(0);
  });
});

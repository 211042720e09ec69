import { describe, expect, it } from "vitest";
import { evaluateForm, type FormAtN, sizeBound } from "../../../engine/evaluate";
import { MERSENNE_61, primeField, randomness, rational, rationals } from "../../../engine/fields";
import { mapPoint, type Point, randomPoint } from "../../../engine/kinematics";
import { form } from "./support";

const field = primeField(MERSENNE_61);
const { add, subtract, multiply } = field;

/** The point a + t b. */
function onLine(a: Point<bigint>, b: Point<bigint>, t: bigint): Point<bigint> {
  const flat: bigint[] = [];
  mapPoint(b, (x) => flat.push(x));
  let at = 0;
  return mapPoint(a, (x) => add(x, multiply(t, flat[at++]!)));
}

/** A polynomial by its coefficients, the constant one first. */
type Polynomial = bigint[];
const trim = (p: Polynomial): Polynomial => {
  while (p.length > 0 && p[p.length - 1] === 0n) p.pop();
  return p;
};
const at = (p: Polynomial, t: bigint): bigint => p.reduceRight((sum, c) => add(multiply(sum, t), c), 0n);

/**
 * Degrees of numerator and denominator of the rational function through the given values at t = 0, 1, 2, ..., by the extended
 * Euclidean algorithm on the interpolating polynomial (rational function reconstruction), stopped in the middle of all degrees;
 * the result is checked at values that were not used.
 */
function degreesOf(values: readonly bigint[], unused: readonly bigint[]): [number, number] {
  const count = values.length;
  let product: Polynomial = [1n];
  let interpolant: Polynomial = [];
  values.forEach((value, i) => {
    const t = BigInt(i);
    const factor = multiply(subtract(value, at(interpolant, t)), field.inverse(at(product, t))!);
    interpolant = product.map((c, j) => add(multiply(factor, c), interpolant[j] ?? 0n));
    product = [0n, ...product].map((c, j) => subtract(c, multiply(t, product[j] ?? 0n)));
  });
  let [r0, r1]: [Polynomial, Polynomial] = [product, trim(interpolant)];
  let [t0, t1]: [Polynomial, Polynomial] = [[], [1n]];
  while (r1.length - 1 > count / 2) {
    const remainder = [...r0];
    const next = [...t0];
    const lead = field.inverse(r1[r1.length - 1]!)!;
    while (remainder.length >= r1.length) {
      const shift = remainder.length - r1.length;
      const factor = multiply(remainder[remainder.length - 1]!, lead);
      r1.forEach((c, i) => {
        remainder[i + shift] = subtract(remainder[i + shift]!, multiply(factor, c));
      });
      t1.forEach((c, i) => {
        next[i + shift] = subtract(next[i + shift] ?? 0n, multiply(factor, c));
      });
      for (let i = 0; i < next.length; i++) next[i] ??= 0n;
      trim(remainder);
    }
    [r0, r1, t0, t1] = [r1, remainder, t1, trim(next)];
  }
  unused.forEach((value, i) => {
    const t = BigInt(count + i);
    expect(multiply(value, at(t1, t))).toBe(at(r1, t));
  });
  return [r1.length - 1, t1.length - 1];
}

/** The true degrees of a form in reduced terms, along a random line through the space of points. */
function trueDegrees(of: FormAtN): [number, number] {
  const { degree, denominatorDegree } = sizeBound(of);
  const count = 2 * Math.max(degree, denominatorDegree) + 2;
  const random = randomness("size");
  const [a, b] = [randomPoint(field, of, random), randomPoint(field, of, random)];
  const values = Array.from({ length: count + 3 }, (_, t) => {
    const evaluation = evaluateForm(field, of, onLine(a, b, BigInt(t)));
    if (evaluation.kind !== "value") throw new Error("unexpected vanishing denominator");
    return evaluation.sum;
  });
  return degreesOf(values.slice(0, count), values.slice(count));
}

const cases: [string, FormAtN][] = [
  ["a bracket", form([6, 0, 0], "<1 2 3 4>")],
  ["a quotient", form([6, 0, 0], "<1 2 3 4>^2 <1 2 5 6> / (<2 3 4 5> <1 3 5 6>^3)")],
  ["an R-invariant", form([5, 1, 0], "[1 2 3 4 5]")],
  ["a sum of R-invariants", form([6, 1, 0], "[1 2 3 4 5] + [1 2 3 5 6]")],
  ["a product of R-invariants", form([6, 2, 0], "[1 2 3 4 5] [2 3 4 5 6]")],
  ["meets", form([7, 1, 0], "delta((1 2) cap (3 4 5) 3 4 6 7) / <(6 7) cap (1 2 3) 2 3 5>")],
  ["a chiral pentagon", form([6, 0, 1], "<AB bar(1) cap bar(3)> <X 1 3> / (<AB X><AB 6 1><AB 1 2><AB 2 3><AB 3 4>)")],
  [
    "two sums in denominators that differ by a sign",
    form([6, 0, 0], "1 / (<1 2 3 4> + <1 2 3 5>) + 1 / (<1 2 3 4> - <1 2 3 5>)"),
  ],
  ["the same with brackets exchanged", form([6, 0, 0], "1 / (<1 2 3 4> + <1 2 3 5>) + 1 / (<1 2 3 4> + <2 1 3 5>)")],
  ["spinor strings", form([6, 0, 0], "<1|2+3|4]^2 / (s(2 3 4) [5 6] <1 2>)")],
  ["dual points", form([4, 0, 1], "x2(1 3) x2(2 4) / (x2(1 AB) x2(2 AB) x2(3 AB) x2(4 AB))")],
  ["a constant", form([6, 0, 0], "(3/7 - 12/5)^3")],
];

describe("size bounds", () => {
  it.each(cases)("are no smaller than the degrees of the value: %s", (_, of) => {
    const bound = sizeBound(of);
    const [numerator, denominator] = trueDegrees(of);
    expect(bound.degree).toBeGreaterThanOrEqual(numerator);
    expect(bound.denominatorDegree).toBeGreaterThanOrEqual(denominator);
  });

  it("are exact where nothing cancels", () => {
    for (const name of ["a bracket", "a quotient", "an R-invariant"]) {
      const of = cases.find(([title]) => title === name)![1];
      const bound = sizeBound(of);
      expect([bound.degree, bound.denominatorDegree]).toEqual(trueDegrees(of));
    }
  });

  /** With integer components of size at most b, |N| <= 2^height b^degree, and so is the reduced numerator; the denominator likewise. */
  it.each(cases)("bound numerator and denominator at integer points: %s", (_, of) => {
    const bound = sizeBound(of);
    for (const size of [1n, 10n, 1000n]) {
      const random = randomness(`height ${size}`);
      for (let trial = 0; trial < 6; trial++) {
        const shape = randomPoint(rationals, of, random);
        const point = mapPoint(shape, () => rational(random.below(2n * size + 1n) - size));
        const evaluation = evaluateForm(rationals, of, point);
        if (evaluation.kind !== "value") continue;
        const { numerator, denominator } = evaluation.sum;
        const limit = (bits: number, degree: number) => (1n << BigInt(bits)) * size ** BigInt(degree);
        expect(numerator < 0n ? -numerator : numerator).toBeLessThanOrEqual(limit(bound.heightBits, bound.degree));
        expect(denominator).toBeLessThanOrEqual(limit(bound.denominatorHeightBits, bound.denominatorDegree));
      }
    }
  });

  it("know the 24 products of a bracket, and constants", () => {
    expect(sizeBound(form([6, 0, 0], "<1 2 3 4>"))).toEqual({
      degree: 4,
      denominatorDegree: 0,
      heightBits: 5,
      denominatorHeightBits: 0,
    });
    expect(sizeBound(form([6, 0, 0], "1000 <1 2 3 4> / 3"))).toMatchObject({
      degree: 4,
      heightBits: 15,
      denominatorHeightBits: 2,
    });
    expect(sizeBound(form([6, 0, 0], "2^100")).heightBits).toBeGreaterThanOrEqual(100);
  });

  it("share the denominators of a sum", () => {
    const one = sizeBound(form([8, 1, 0], "[1 2 3 4 5]"));
    const many = sizeBound(form([8, 1, 0], "sum(i : 1 <= i <= 40) i [1 2 3 4 5]"));
    expect(many.denominatorDegree).toBe(one.denominatorDegree);
    expect(many.degree).toBe(one.degree);
    const nested =
      "let p1 = (1 2) cap (3 4 5);" +
      Array.from({ length: 40 }, (_, i) => `let p${i + 2} = (p${i + 1} 2) cap (p${i + 1} 4 6);`).join("");
    expect(sizeBound(form([8, 0, 0], `${nested} <p41 1 2 3>`)).degree).toBeGreaterThan(2 ** 40);
  });
});

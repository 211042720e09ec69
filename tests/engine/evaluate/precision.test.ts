import { describe, expect, it } from "vitest";
import { evaluateForm, type FormAtN } from "../../../engine/evaluate";
import { allHelicities, helicityPoint } from "../../../engine/evaluate/helicity";
import { digitsOf, evaluateApproximately } from "../../../engine/evaluate/precision";
import { complexDoubles, magnitude, type Rational, randomness, rationals, toDouble } from "../../../engine/fields";
import { mapPoint, type Point, randomPoint } from "../../../engine/kinematics";
import { asComplex, formOf, invariant, pointOf, scatteringPoints, treeForm } from "../../support/physics";

/** The value in exact rational numbers. */
function exactly(form: FormAtN, point: Point<Rational>, negativeLegs: readonly number[]): Rational {
  const at = helicityPoint(rationals, point, negativeLegs)!;
  const evaluation = evaluateForm(rationals, form, at.point);
  if (evaluation.kind !== "value") throw new Error("a denominator vanishes");
  return rationals.multiply(evaluation.sum, at.factor);
}

const inDoubles = (point: Point<Rational>) => mapPoint(point, (x) => complexDoubles.real(toDouble(x)));

describe("values in double precision", () => {
  it.each([
    [5, 0],
    [6, 1],
    [7, 2],
    [8, 4],
  ])("differ from the exact value by less than the estimate, which is no wild one, at n = %d, k = %d", (n, k) => {
    const form = treeForm(n, k);
    const all = allHelicities(n, k);
    let [right, digits] = [0, 0];
    const tries = 15;
    for (let i = 0; i < tries; i++) {
      const point = randomPoint(rationals, { n, k, loops: 0 }, randomness(`precision ${n} ${k} ${i}`));
      const negativeLegs = all[(7 * i) % all.length]!;
      const exact = toDouble(exactly(form, point, negativeLegs));
      const found = evaluateApproximately(form, inDoubles(point), negativeLegs);
      if (found.kind !== "value") throw new Error(found.kind);
      const error = magnitude(complexDoubles.subtract(found.value, complexDoubles.real(exact)));
      if (error <= found.error) right++;
      digits += found.digits;
      // The digits that are claimed are there.
      expect(error / Math.abs(exact)).toBeLessThan(10 ** -found.digits);
    }
    expect(right).toBe(tries);
    expect(digits / tries).toBeGreaterThan(10);
  });

  it("have few digits where large terms cancel, and say so", () => {
    const n = 8;
    const point = pointOf(scatteringPoints(n, 1, "cancel")[0]!.map(asComplex), 0);
    const difference = "(<3 4 5 6><3 4 7 8> - <3 4 5 7><3 4 6 8> + <3 4 5 8><3 4 6 7>)";
    const form = formOf(`1 + 10^6 ${difference} / (<3 4 5 6><3 4 7 8>)`, n, 0);
    const found = evaluateApproximately(form, point, null);
    if (found.kind !== "value") throw new Error(found.kind);
    const error = magnitude(complexDoubles.subtract(found.value, complexDoubles.one));
    // The identity of the brackets (Plücker) makes the value 1.
    expect(error).toBeGreaterThan(0);
    expect(error).toBeLessThan(found.error);
    expect(found.digits).toBeLessThanOrEqual(9);
    expect(found.digits).toBeGreaterThanOrEqual(6);
    // Where nothing but rounding is left, no digit is claimed.
    const nothing = evaluateApproximately(formOf(difference, n, 0), point, null);
    expect(nothing.kind === "value" && nothing.digits).toBe(0);
  });

  it("lose digits towards a collinear point", () => {
    const form = formOf("[1 2]^2 [4 5]^2 / (<2 3>^4)", 5, 0);
    const digitsAt = (angle: number): number => {
      const [c, s] = [Math.cos(angle), Math.sin(angle)];
      // Legs 1 and 2 are at a small angle; 3 and 4 are back to back with their sum P in the frame of P + leg 5.
      const [p1, p2] = [
        [1, c, s, 0],
        [1, c, -s, 0],
      ];
      const sum = [2, 2 * c, 0, 0];
      const p5 = [-1.5, -0.6, 0, 1.5 * 0.9165151389911681];
      const rest = sum.map((x, i) => -x - p5[i]!);
      const m2 = rest[0]! ** 2 - rest[1]! ** 2 - rest[2]! ** 2 - rest[3]! ** 2;
      expect(m2).toBeLessThan(0);
      // A space-like rest: p3 + p4 = rest with p3 = w (1, u) and p4 of negative energy, u orthogonal to nothing; solve p4^2 = 0 for w.
      const u = [0.48, 0.64, 0.6];
      const dot = rest[0]! - u.reduce((total, x, i) => total + x * rest[i + 1]!, 0);
      const w = m2 / (2 * dot);
      const p3 = [w, ...u.map((x) => w * x)];
      const p4 = rest.map((x, i) => x - p3[i]!);
      const momenta = [p1, p2, p3, p4, p5].map((p) => asComplex(p as unknown as [number, number, number, number]));
      const found = evaluateApproximately(form, pointOf(momenta, 0), null);
      if (found.kind !== "value") throw new Error(found.kind);
      return found.digits;
    };
    const [wide, near, nearest] = [digitsAt(0.5), digitsAt(1e-4), digitsAt(1e-6)];
    expect(wide).toBeGreaterThan(11);
    expect(near).toBeLessThan(wide - 2);
    expect(nearest).toBeLessThan(near);
  });

  it("pass through sizes beyond doubles on the way, and say where the result is beyond them", () => {
    // Five-brackets of GeV-sized momenta: denominators of 10^60 each, products and squares of four of them.
    const form = treeForm(8, 4);
    const negativeLegs = [1, 2, 4, 5, 7, 8];
    const momenta = scatteringPoints(8, 1, "large")[0]!;
    const scaled = (factor: number, k: number) =>
      pointOf(
        momenta.map((p) => asComplex(p.map((x) => factor * x) as unknown as typeof p)),
        k,
      );
    const [small, large] = [1, 2 ** 13].map((factor) => {
      const found = evaluateApproximately(form, scaled(factor, 4), negativeLegs);
      if (found.kind !== "value") throw new Error(found.kind);
      return found;
    });
    // A tree of n gluons has dimension 4 - n in energy.
    expect(magnitude(large!.value) / (magnitude(small!.value) * 2 ** (13 * (4 - 8)))).toBeCloseTo(1, 8);
    expect(large!.digits).toBeGreaterThan(6);
    // In plain doubles the same evaluation is lost.
    const plain = helicityPoint(complexDoubles, scaled(2 ** 13, 4), negativeLegs)!;
    const lost = evaluateForm(complexDoubles, form, plain.point);
    expect(lost.kind === "value" && magnitude(lost.sum) > 0 && Number.isFinite(magnitude(lost.sum))).toBe(false);
    const power = formOf("(<1 2>^100 / 7)^20", 8, 0);
    expect(evaluateApproximately(power, scaled(2 ** 13, 0), null).kind).toBe("out-of-range");
    const inverse = formOf("1 / (<1 2>^100)^20", 8, 0);
    expect(evaluateApproximately(inverse, scaled(2 ** 13, 0), null).kind).toBe("out-of-range");
  });

  it("are none where a denominator is zero", () => {
    const point = pointOf(scatteringPoints(5, 1, "zero")[0]!.map(asComplex), 0);
    const found = evaluateApproximately(formOf("1 / (<1 2> - <1 2>)", 5, 0), point, null);
    expect(found).toMatchObject({ kind: "zero-denominator" });
  });

  it("keep the error of an input that does not hold better", () => {
    const point = pointOf(scatteringPoints(5, 1, "input")[0]!.map(asComplex), 0);
    const found = evaluateApproximately(formOf("<1 2>^4", 5, 0), point, null, 1e-5);
    expect(found.kind === "value" && found.digits).toBe(4);
  });

  it.each([
    [1, 0, 15],
    [1, 1e-16, 15],
    [2, 3e-10, 9],
    [1, 0.5, 0],
    [1, 7, 0],
    [0, 1, 0],
    [1, Number.POSITIVE_INFINITY, 0],
  ])("%d with an error of %d has %d digits", (size, error, digits) => {
    expect(digitsOf(size, error)).toBe(digits);
  });
});

describe("invariants in double precision", () => {
  it("are the scalar products of the momenta", () => {
    for (const momenta of scatteringPoints(6, 10, "invariants")) {
      const point = pointOf(momenta.map(asComplex), 0);
      for (const [a, b] of [
        [1, 2],
        [2, 5],
        [4, 6],
      ] as const) {
        const found = evaluateApproximately(formOf(`s(${a} ${b})`, 6, 0), point, null);
        if (found.kind !== "value") throw new Error(found.kind);
        const expected = complexDoubles.real(invariant(momenta, a, b));
        expect(magnitude(complexDoubles.subtract(found.value, expected))).toBeLessThan(1e-15 + 10 * found.error);
      }
    }
  });
});

import { describe, expect, it } from "vitest";
import { evaluateForm, type FormAtN } from "../../../engine/evaluate";
import { allHelicities, helicityPattern, helicityPoint, readHelicities } from "../../../engine/evaluate/helicity";
import { type Field, randomness, rational, rationals, smallPrimeField } from "../../../engine/fields";
import { type Point, randomPoint } from "../../../engine/kinematics";
import { gluonRecursion } from "../../../engine/sources/gluonRecursion";
import { formOf, treeForm } from "../../support/physics";

const prime = 2147483629;
const field = smallPrimeField(prime);

function component<T>(f: Field<T>, form: FormAtN, point: Point<T>, negativeLegs: readonly number[]): T | null {
  const at = helicityPoint(f, point, negativeLegs);
  if (at === null) return null;
  const evaluation = evaluateForm(f, form, at.point);
  if (evaluation.kind !== "value") throw new Error("a denominator vanishes");
  return f.multiply(at.factor, evaluation.sum);
}

/** Every component, or as many as `most`, spread over the list. */
function helicities(n: number, k: number, most: number): number[][] {
  const all = allHelicities(n, k);
  return all.filter((_, i) => Math.floor((i * most) / all.length) !== Math.floor(((i - 1) * most) / all.length));
}

describe("gluon components of superamplitude forms", () => {
  // Nucl. Phys. B306 (1988) 759: off-shell currents know nothing of superamplitudes or twistors.
  it.each([
    [4, 0, 6],
    [5, 0, 10],
    [5, 1, 10],
    [6, 0, 15],
    [6, 1, 20],
    [6, 2, 15],
    [7, 1, 12],
    [7, 2, 12],
    [7, 3, 12],
    [8, 2, 4],
    [8, 4, 4],
  ])("equal the off-shell gluon recursion at n = %d, k = %d, for %d helicities", (n, k, most) => {
    const form = treeForm(n, k);
    const found = helicities(n, k, most);
    expect(found).toHaveLength(most);
    found.forEach((negativeLegs, i) => {
      const point = randomPoint(field, { n, k, loops: 0 }, randomness(`component ${n} ${k} ${i}`));
      const question = { n, k, loops: 0, negativeLegs, target: "amplitude" } as const;
      expect(component(field, form, point, negativeLegs), negativeLegs.join()).toBe(
        gluonRecursion.evaluate(question, point, prime),
      );
    });
  });

  it("of the vertex expansion do not depend on its reference twistor", () => {
    const form = treeForm(6, 1, "vertex");
    const point = randomPoint(rationals, { n: 6, k: 1, loops: 0 }, randomness("reference"));
    const moved = { ...point, referenceTwistor: [3n, -7n, 2n, 11n].map((x) => rational(x)) };
    for (const negativeLegs of [
      [1, 2, 3],
      [1, 3, 5],
      [2, 5, 6],
    ]) {
      const value = component(rationals, form, point, negativeLegs)!;
      expect(rationals.equals(value, component(rationals, form, moved, negativeLegs)!)).toBe(true);
      expect(rationals.equals(value, component(rationals, treeForm(6, 1), point, negativeLegs)!)).toBe(true);
    }
  });

  // Phys. Rev. Lett. 56 (1986) 2459.
  it("have the closed form of two unequal helicities, as typed", () => {
    for (const [n, i, j] of [
      [4, 1, 3],
      [6, 2, 3],
      [7, 1, 5],
    ] as const) {
      const closed = formOf(`<${i} ${j}>^4 / prod(i : 1 <= i <= n) <i i+1>`, n, 0, [i, j]);
      const point = randomPoint(rationals, { n, k: 0, loops: 0 }, randomness(`closed ${n}`));
      const typed = evaluateForm(rationals, closed, point);
      expect(
        typed.kind === "value" && rationals.equals(typed.sum, component(rationals, treeForm(n, 0), point, [i, j])!),
      ).toBe(true);
    }
  });

  it("do not exist where neighbours, or all negative legs, are parallel", () => {
    const point = randomPoint(rationals, { n: 6, k: 0, loops: 0 }, randomness("parallel"));
    const parallelTo = (a: number, b: number): Point<typeof rationals.zero> => ({
      ...point,
      twistors: point.twistors.map((z, i) => (i === b ? [...point.twistors[a]!.slice(0, 2), ...z.slice(2)] : z)),
    });
    expect(helicityPoint(rationals, parallelTo(0, 1), [3, 5])).toBeNull();
    expect(helicityPoint(rationals, parallelTo(0, 5), [3, 5])).toBeNull();
    expect(helicityPoint(rationals, parallelTo(2, 4), [3, 5])).toBeNull();
    expect(helicityPoint(rationals, parallelTo(2, 4), [1, 5])).not.toBeNull();
    expect(() => helicityPoint(rationals, point, [1, 2, 3])).toThrow(/2 negative legs, got 3/);
  });
});

describe("helicity patterns", () => {
  it.each([
    ["--+-++", 6, [1, 2, 4]],
    [" \u2212+\u2212+ ", 4, [1, 3]],
    ["++++", 4, []],
    ["--+-++", 5, null],
    ["--+0++", 6, null],
    ["", 4, null],
    ["-1+1", 4, null],
  ])("%j for %d legs is %j", (pattern, n, negativeLegs) => {
    expect(readHelicities(pattern, n)).toEqual(negativeLegs);
  });

  it("are all there once, and read what they write", () => {
    for (const [n, k, count] of [
      [4, 0, 6],
      [6, 1, 20],
      [9, 3, 126],
    ] as const) {
      const all = allHelicities(n, k);
      const patterns = all.map((negativeLegs) => helicityPattern(negativeLegs, n));
      expect(new Set(patterns).size).toBe(count);
      expect(patterns.map((pattern) => readHelicities(pattern, n))).toEqual(all);
    }
  });
});

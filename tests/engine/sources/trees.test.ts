import { describe, expect, it } from "vitest";
import { Modulus } from "../../../engine/sources/arithmetic";
import { type Invariant, PlanBuilder } from "../../../engine/sources/plan";
import { legsOf } from "../../../engine/sources/question";
import { planFor, recursion } from "../../../engine/sources/recursion";
import { sumPlan } from "../../../engine/sources/runPlan";
import { vertexExpansion } from "../../../engine/sources/vertex";
import { diagrams } from "../../../engine/sources/vertexPlan";
import { moveLegs, primes, randomPoint } from "../../support/randomPoint";
import { paritySides } from "./parity";
import { amplitude, reflection, rotation } from "./questions";

const prime = primes[0];
const everyTree = Array.from({ length: 6 }, (_, i) => i + 4).flatMap((n) =>
  Array.from({ length: n - 3 }, (_, k) => [n, k] as const),
);

describe("on-shell recursion", () => {
  // The triangle of Narayana numbers, OEIS A001263, rows 1 to 8.
  it.each([
    [4, [1]],
    [5, [1, 1]],
    [6, [1, 3, 1]],
    [7, [1, 6, 6, 1]],
    [8, [1, 10, 20, 10, 1]],
    [9, [1, 15, 50, 50, 15, 1]],
    [10, [1, 21, 105, 175, 105, 21, 1]],
    [11, [1, 28, 196, 490, 490, 196, 28, 1]],
  ])("has Narayana numbers of terms at n = %d", (n, row) => {
    expect(row.map((_, k) => planFor(amplitude(n, k, 0)).terms.length)).toEqual(row);
  });

  // An amplitude does not know where the labels begin (hep-th/0501052); each cyclic image has other terms.
  it.each(everyTree)("is cyclic and reflection invariant at n = %d, k = %d", (n, k) => {
    const point = randomPoint(n, k, 0, 100 * n + k, prime);
    const value = recursion.evaluate(amplitude(n, k, 0), point, prime);
    expect(value).not.toBeNull();
    expect(recursion.evaluate(amplitude(n, k, 0), moveLegs(point, rotation(n)), prime)).toBe(value);
    expect(recursion.evaluate(amplitude(n, k, 0), moveLegs(point, reflection(n)), prime)).toBe(value);
  });

  it.each([...everyTree.filter(([, k]) => k > 0), [12, 1] as const, [10, 3] as const])(
    "equals the vertex expansion of 1009.1854 at n = %d, k = %d",
    (n, k) => {
      const point = randomPoint(n, k, 0, n, prime);
      const value = recursion.evaluate(amplitude(n, k, 0), point, prime);
      expect(vertexExpansion.evaluate(amplitude(n, k, 0), point, prime)).toBe(value);
      expect(value).not.toBe(0);
    },
  );

  // Dissections of the hexagon and the heptagon by k diagonals, OEIS A033282.
  it("has a vertex diagram for every dissection of the polygon", () => {
    expect([0, 1, 2, 3].map((k) => diagrams(6, k).length)).toEqual([1, 9, 21, 14]);
    expect([0, 1, 2, 3, 4].map((k) => diagrams(7, k).length)).toEqual([1, 14, 56, 84, 42]);
  });

  it.each([
    [5, 0],
    [5, 1],
    [6, 1],
    [7, 1],
    [7, 2],
    [8, 2],
    [8, 1],
    [8, 4],
  ])("turns into the parity conjugate at n = %d, k = %d", (n, k) => {
    const [there, here] = paritySides(recursion, randomPoint(n, k, 0, 7 * n + k, prime), prime, n + k);
    expect(there).toBe(here);
    expect(here).not.toBe(0);
  });

  it("is null where a bracket of it vanishes", () => {
    const point = randomPoint(6, 1, 0, 3, prime);
    const twistors = [...point.twistors];
    twistors[3] = twistors[2]!;
    expect(recursion.evaluate(amplitude(6, 1, 0), { ...point, twistors }, prime)).toBeNull();
    expect(vertexExpansion.evaluate(amplitude(6, 1, 0), { ...point, twistors }, prime)).toBeNull();
  });

  it("throws when asked what it does not cover", () => {
    expect(() => recursion.evaluate(amplitude(6, 1, 1), randomPoint(6, 1, 1, 3, prime), prime)).toThrow("not covered");
  });
});

describe("R-invariants", () => {
  const sumOf = (invariants: readonly Invariant[], signs: readonly number[], seed: number): number => {
    const m = new Modulus(prime);
    const point = randomPoint(6, 1, 0, seed, prime);
    return invariants.reduce((sum, labels, at) => {
      const builder = new PlanBuilder(6);
      const value = sumPlan(m, builder.finish([builder.invariant(...labels)]), legsOf(point, 6), 1)!;
      return signs[at]! > 0 ? m.add(sum, value) : m.subtract(sum, value);
    }, 0);
  };
  const without = (left: number): Invariant => [0, 1, 2, 3, 4, 5].filter((x) => x !== left) as unknown as Invariant;
  const all = [0, 1, 2, 3, 4, 5].map(without);

  // [1 2 3 4 5] - [2 3 4 5 6] + [3 4 5 6 1] - ... = 0 (0807.1095); in ascending order the six alternate in sign.
  it("obey the six-term identity, and no other choice of signs", () => {
    expect(sumOf(all, [1, -1, 1, -1, 1, -1], 5)).toBe(0);
    for (let flipped = 0; flipped < 6; flipped++) {
      const signs = [1, -1, 1, -1, 1, -1].map((sign, at) => (at === flipped ? -sign : sign));
      expect(sumOf(all, signs, 5)).not.toBe(0);
    }
  });

  it("change sign when two labels change places", () => {
    expect(
      sumOf(
        [
          [0, 1, 2, 3, 4],
          [1, 0, 2, 3, 4],
        ],
        [1, 1],
        6,
      ),
    ).toBe(0);
  });
});

describe("a source changed by one sign", () => {
  // Two labels of one invariant exchanged: the sign of every term that holds it.
  it.each([
    [6, 1],
    [7, 2],
    [8, 3],
  ])("is found out at n = %d, k = %d, whichever sign it is", (n, k) => {
    const m = new Modulus(prime);
    const point = randomPoint(n, k, 0, n + k, prime);
    const plan = planFor(amplitude(n, k, 0));
    const truth = recursion.evaluate(amplitude(n, k, 0), moveLegs(point, rotation(n)), prime);
    expect(sumPlan(m, plan, legsOf(point, n), k)).toBe(truth);
    plan.invariants.forEach((_, changed) => {
      const invariants = plan.invariants.map(
        ([a, b, c, d, e], at): Invariant => (at === changed ? [b, a, c, d, e] : [a, b, c, d, e]),
      );
      expect(sumPlan(m, { ...plan, invariants }, legsOf(point, n), k)).not.toBe(truth);
    });
  });
});

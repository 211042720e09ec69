import { describe, expect, it } from "vitest";
import { answering } from "../../../engine/sources";
import { Modulus } from "../../../engine/sources/arithmetic";
import { closedComponents } from "../../../engine/sources/closedComponents";
import { recursionComponents, vertexComponents } from "../../../engine/sources/components";
import { currentAmplitude, polarisations } from "../../../engine/sources/gluonCurrents";
import { gluonRecursion } from "../../../engine/sources/gluonRecursion";
import { anglesOf, squaresOf } from "../../../engine/sources/spinors";
import { moveLegs, primes, randomPoint } from "../../support/randomPoint";
import { choices, component, reflection, rotation } from "./questions";

const prime = primes[1];
const m = new Modulus(prime);

/** Every choice of negative legs with 0 <= k <= n-4. */
const everyHelicity = (n: number): number[][] => Array.from({ length: n - 3 }, (_, k) => choices(n, k + 2)).flat();

describe("gluon components", () => {
  // Nucl. Phys. B306 (1988) 759 against hep-th/0501052: currents of momenta against twistors.
  it.each([4, 5, 6])("of the superamplitude equal the off-shell recursion at n = %d, every helicity", (n) => {
    everyHelicity(n).forEach((negativeLegs, seed) => {
      const question = component(n, negativeLegs);
      const point = randomPoint(n, question.k, 0, 50 * n + seed, prime);
      const value = recursionComponents.evaluate(question, point, prime);
      expect(value, negativeLegs.join()).not.toBeNull();
      expect(gluonRecursion.evaluate(question, point, prime), negativeLegs.join()).toBe(value);
    });
  });

  it.each([
    [7, [1, 4, 6]],
    [7, [2, 3, 5, 7]],
    [7, [1, 2, 3, 5, 6]],
    [8, [1, 3, 5, 7]],
    [8, [2, 5, 8]],
    [8, [1, 2, 4, 5, 7]],
    [9, [1, 2, 3, 4, 5, 6]],
    [10, [1, 3, 4, 8]],
  ])("equal the off-shell recursion at n = %d with negative legs %j", (n, negativeLegs) => {
    const question = component(n, negativeLegs);
    const point = randomPoint(n, question.k, 0, n, prime);
    expect(gluonRecursion.evaluate(question, point, prime)).toBe(recursionComponents.evaluate(question, point, prime));
  });

  it.each([
    [6, [1, 2, 3]],
    [6, [1, 3, 5]],
    [7, [2, 4, 5]],
    [9, [1, 5, 6]],
    [7, [1, 2, 4, 6]],
    [8, [1, 3, 4, 6, 8]],
  ])("equal the vertex expansion at n = %d with negative legs %j (1009.1854)", (n, negativeLegs) => {
    const question = component(n, negativeLegs);
    const point = randomPoint(n, question.k, 0, n, prime);
    expect(vertexComponents.evaluate(question, point, prime)).toBe(
      recursionComponents.evaluate(question, point, prime),
    );
  });

  // Phys. Rev. Lett. 56 (1986) 2459, written out here: <i j>^4 over the angles, [i j]^4 over the squares.
  it.each([4, 5, 6, 7, 8])("have the closed form for two unequal helicities at n = %d", (n) => {
    const point = randomPoint(n, 0, 0, 11 * n, prime);
    const angles = point.twistors.map((z) => z.slice(0, 2));
    const squares = squaresOf(m, point, n)!.map((s) => [...s]);
    const minor = (s: readonly (readonly number[])[], a: number, b: number) =>
      m.subtract(m.multiply(s[a - 1]![0]!, s[b - 1]![1]!), m.multiply(s[a - 1]![1]!, s[b - 1]![0]!));
    const closed = (s: readonly (readonly number[])[], i: number, j: number) => {
      let chain = 1;
      for (let a = 1; a <= n; a++) chain = m.multiply(chain, minor(s, a, (a % n) + 1));
      return m.divide(m.power(minor(s, i, j), 4), chain);
    };
    for (const [i, j] of choices(n, 2) as [number, number][]) {
      const others = Array.from({ length: n }, (_, leg) => leg + 1).filter((leg) => leg !== i && leg !== j);
      expect(recursionComponents.evaluate(component(n, [i, j]), point, prime)).toBe(closed(angles, i, j));
      expect(closedComponents.evaluate(component(n, [i, j]), point, prime)).toBe(closed(angles, i, j));
      expect(recursionComponents.evaluate(component(n, others), point, prime)).toBe(closed(squares, i, j));
      expect(closedComponents.evaluate(component(n, others), point, prime)).toBe(closed(squares, i, j));
    }
  });

  it("turn with the legs, and take (-1)^n when read backwards", () => {
    for (const [n, negativeLegs] of [
      [6, [1, 2, 4]],
      [7, [1, 3, 4, 5]],
    ] as [number, number[]][]) {
      const k = negativeLegs.length - 2;
      const point = randomPoint(n, k, 0, n, prime);
      const value = recursionComponents.evaluate(component(n, negativeLegs), point, prime)!;
      const turned = negativeLegs.map((leg) => ((leg + n - 2) % n) + 1).sort((a, b) => a - b);
      const backwards = negativeLegs.map((leg) => n + 1 - leg).sort((a, b) => a - b);
      expect(recursionComponents.evaluate(component(n, turned), moveLegs(point, rotation(n)), prime)).toBe(value);
      expect(recursionComponents.evaluate(component(n, backwards), moveLegs(point, reflection(n)), prime)).toBe(
        n % 2 === 0 ? value : m.negate(value),
      );
    }
  });

  // Momentum conservation, sum of lambda lambdatilde = 0, is what the twistors are for (0905.1473).
  it("have conserved momenta", () => {
    const point = randomPoint(7, 0, 0, 3, prime);
    const [angles, squares] = [anglesOf(point, 7), squaresOf(m, point, 7)!];
    for (const i of [0, 1] as const) {
      for (const j of [0, 1] as const) {
        expect(angles.reduce((sum, angle, a) => m.add(sum, m.multiply(angle[i], squares[a]![j])), 0)).toBe(0);
      }
    }
  });

  it("do not depend on the reference of the polarisations, nor on that of the vertices", () => {
    const question = component(7, [1, 3, 6]);
    const point = randomPoint(7, 1, 0, 8, prime);
    const moved = { ...point, referenceTwistor: [5, 77, 1234, 31] };
    expect(gluonRecursion.evaluate(question, moved, prime)).toBe(gluonRecursion.evaluate(question, point, prime));
    expect(vertexComponents.evaluate(question, moved, prime)).toBe(vertexComponents.evaluate(question, point, prime));
  });

  it("vanish for fewer than two unequal helicities, as currents do", () => {
    const point = randomPoint(6, 0, 0, 9, prime);
    const [angles, squares] = [anglesOf(point, 6), squaresOf(m, point, 6)!];
    const reference = { angle: [3, 1], square: [1, 5] } as const;
    for (const negativeLegs of [[], [2]]) {
      const vectors = polarisations(m, angles, squares, negativeLegs, reference)!;
      expect(currentAmplitude(m, angles, squares, vectors)).toBe(0);
    }
  });

  it("are null where two neighbouring spinors are parallel", () => {
    const point = randomPoint(6, 1, 0, 4, prime);
    const twistors = [...point.twistors];
    twistors[2] = [...twistors[1]!.slice(0, 2), 8, 9];
    for (const source of answering(component(6, [1, 2, 3]))) {
      expect(source.evaluate(component(6, [1, 2, 3]), { ...point, twistors }, prime), source.name).toBeNull();
    }
  });
});

import { describe, expect, it } from "vitest";
import { Modulus } from "../../../engine/sources/arithmetic";
import { bracket } from "../../../engine/sources/determinants";
import { dualConformalIntegrals } from "../../../engine/sources/dualConformal";
import { loopPlan } from "../../../engine/sources/loopPlan";
import { loopVertexExpansion } from "../../../engine/sources/loopVertex";
import { loopDiagrams } from "../../../engine/sources/loopVertexPlan";
import { chiralPentagons, kermitExpansion, kermitExpansionReference } from "../../../engine/sources/oneLoopMhv";
import { oneLoopRecursion } from "../../../engine/sources/oneLoopRecursion";
import { doublePentagons } from "../../../engine/sources/twoLoopMhv";
import { twoLoopVertexExpansion } from "../../../engine/sources/twoLoopVertex";
import { moveLegs, primes, randomPoint } from "../../support/randomPoint";
import { paritySides } from "./parity";
import { amplitude, reflection, rotation } from "./questions";

const prime = primes[2];
const m = new Modulus(prime);

describe("one loop", () => {
  it("is the positive box at n = 4: <1 2 3 4>^2 / (<AB 1 2><AB 2 3><AB 3 4><AB 1 4>)", () => {
    const point = randomPoint(4, 0, 1, 1, prime);
    const [z1, z2, z3, z4] = point.twistors as [number[], number[], number[], number[]];
    const [a, b] = point.lines[0]!;
    const denominator = [
      bracket(m, a, b, z1, z2),
      bracket(m, a, b, z2, z3),
      bracket(m, a, b, z3, z4),
      bracket(m, a, b, z1, z4),
    ];
    const box = m.divide(
      m.power(bracket(m, z1, z2, z3, z4), 2),
      denominator.reduce((x, y) => m.multiply(x, y)),
    );
    for (const source of [
      kermitExpansion,
      kermitExpansionReference,
      chiralPentagons,
      oneLoopRecursion,
      dualConformalIntegrals,
    ]) {
      expect(source.evaluate(amplitude(4, 0, 1), point, prime), source.name).toBe(box);
    }
  });

  // 1012.6032 states the chiral pentagons, 1008.2958 the kermits.
  it.each([4, 5, 6, 7, 8, 10, 13])("has the same value as kermits and as chiral pentagons at n = %d", (n) => {
    const point = randomPoint(n, 0, 1, n, prime);
    const value = kermitExpansion.evaluate(amplitude(n, 0, 1), point, prime);
    expect(value).not.toBe(0);
    for (const source of [kermitExpansionReference, chiralPentagons, oneLoopRecursion]) {
      expect(source.evaluate(amplitude(n, 0, 1), point, prime), source.name).toBe(value);
    }
  });

  // 1008.2958: C(n-2,k) C(n-2,k+2) terms survive; the counts of ENGINE section 3 written out.
  it.each([
    [4, [1]],
    [5, [3, 3]],
    [6, [6, 16, 6]],
    [7, [10, 50, 50, 10]],
    [8, [15, 120, 225, 120, 15]],
  ])("has the known numbers of terms at n = %d", (n, row) => {
    expect(row.map((_, k) => loopPlan(n, k).terms.length)).toEqual(row);
  });

  const everyLoop = [4, 5, 6, 7, 8].flatMap((n) => Array.from({ length: n - 3 }, (_, k) => [n, k] as const));
  it.each([...everyLoop, [9, 2] as const, [10, 1] as const])(
    "is cyclic and reflection invariant at n = %d, k = %d",
    (n, k) => {
      const point = randomPoint(n, k, 1, 10 * n + k, prime);
      const value = oneLoopRecursion.evaluate(amplitude(n, k, 1), point, prime);
      expect(value).not.toBeNull();
      expect(oneLoopRecursion.evaluate(amplitude(n, k, 1), moveLegs(point, rotation(n)), prime)).toBe(value);
      expect(oneLoopRecursion.evaluate(amplitude(n, k, 1), moveLegs(point, reflection(n)), prime)).toBe(value);
    },
  );

  it.each([
    [4, 0],
    [5, 0],
    [5, 1],
    [6, 0],
    [6, 1],
    [7, 1],
    [7, 2],
    [8, 2],
  ])("turns into the parity conjugate at n = %d, k = %d", (n, k) => {
    const [there, here] = paritySides(oneLoopRecursion, randomPoint(n, k, 1, 3 * n + k, prime), prime, n * k + 1);
    expect(there).toBe(here);
    expect(here).not.toBe(0);
  });

  it.each([
    [5, 0],
    [5, 1],
    [6, 1],
    [6, 2],
  ])("depends on the line AB only, with weight -4, at n = %d, k = %d", (n, k) => {
    const point = randomPoint(n, k, 1, n + k, prime);
    const [a, b] = point.lines[0]!;
    const mix = (x: number, y: number) => a.map((_, i) => m.add(m.multiply(x, a[i]!), m.multiply(y, b[i]!)));
    const moved = { ...point, lines: [[mix(3, 5), mix(7, 2)] as const] };
    const value = oneLoopRecursion.evaluate(amplitude(n, k, 1), point, prime)!;
    expect(oneLoopRecursion.evaluate(amplitude(n, k, 1), moved, prime)).toBe(
      m.divide(value, m.power(m.residue(3 * 2 - 5 * 7), 4)),
    );
  });

  // 1009.1854 against 1008.2958: MHV vertices with a reference twistor against single cuts and the forward limit.
  it.each([
    [4, 0],
    [5, 0],
    [9, 0],
    [5, 1],
    [6, 1],
    [6, 2],
    [7, 1],
    [7, 2],
    [7, 3],
    [8, 2],
  ])("has the same value by recursion and by MHV vertices at n = %d, k = %d", (n, k) => {
    const point = randomPoint(n, k, 1, 8 * n + k, prime);
    const value = oneLoopRecursion.evaluate(amplitude(n, k, 1), point, prime);
    expect(value).not.toBe(0);
    expect(loopVertexExpansion.evaluate(amplitude(n, k, 1), point, prime)).toBe(value);
  });

  it("has a pair of spokes for every diagram at k = 0, and only diagrams without one-leg arcs", () => {
    expect(loopDiagrams(6, 2)).toHaveLength(15);
    for (const { spokes, arcs } of loopDiagrams(6, 4)) {
      expect(spokes.length + arcs.length).toBe(4);
      for (const [from, to] of arcs) expect([2, 3, 4]).toContain((to - from + 6) % 6);
    }
  });

  it("is null where a propagator vanishes", () => {
    const point = randomPoint(6, 1, 1, 2, prime);
    const lines = [[point.twistors[1]!, point.lines[0]![1]] as const];
    expect(oneLoopRecursion.evaluate(amplitude(6, 1, 1), { ...point, lines }, prime)).toBeNull();
    const both = { ...point, k: 0, loops: 2, lines: [...lines, ...point.lines] };
    expect(doublePentagons.evaluate(amplitude(6, 0, 2), both, prime)).toBeNull();
    for (const source of [kermitExpansion, kermitExpansionReference, chiralPentagons]) {
      expect(source.evaluate(amplitude(6, 0, 1), { ...point, k: 0, lines }, prime), source.name).toBeNull();
    }
  });
});

describe("two loops", () => {
  // hep-th/0505205: the sum of double boxes in both channels, written out in four-brackets.
  it("is the sum of double boxes at n = 4", () => {
    const point = randomPoint(4, 0, 2, 5, prime);
    const z = (label: number) => point.twistors[(label + 3) % 4]!;
    const step = (line: number, i: number) => bracket(m, ...point.lines[line]!, z(i), z(i + 1));
    const box = bracket(m, z(1), z(2), z(3), z(4));
    let sum = 0;
    for (let i = 1; i <= 4; i++) {
      // AB takes the steps i, i+1, i+2 and CD the steps i+2, i+3, i, so that each of <AB 4 1>, <CD 4 1> stands for minus <.. 1 4>.
      const near = [i, i + 1, i + 2];
      const far = [i + 2, i + 3, i];
      const denominator = [...near.map((j) => step(0, j)), ...far.map((j) => step(1, j))].reduce(
        (x, y) => m.multiply(x, y),
        bracket(m, ...point.lines[0]!, ...point.lines[1]!),
      );
      const term = m.divide(m.power(box, 3), denominator)!;
      const signs = [...near, ...far].filter((j) => j % 4 === 0).length;
      sum = signs % 2 === 0 ? m.add(sum, term) : m.subtract(sum, term);
    }
    const value = doublePentagons.evaluate(amplitude(4, 0, 2), point, prime);
    expect(value).toBe(sum);
    expect(dualConformalIntegrals.evaluate(amplitude(4, 0, 2), point, prime)).toBe(sum);
  });

  it.each([4, 5, 6, 7, 8])("is cyclic, reflection and loop-exchange invariant at n = %d", (n) => {
    const point = randomPoint(n, 0, 2, n, prime);
    const value = doublePentagons.evaluate(amplitude(n, 0, 2), point, prime);
    expect(value).not.toBe(0);
    expect(doublePentagons.evaluate(amplitude(n, 0, 2), moveLegs(point, rotation(n)), prime)).toBe(value);
    expect(doublePentagons.evaluate(amplitude(n, 0, 2), moveLegs(point, reflection(n)), prime)).toBe(value);
    const lines = [point.lines[1]!, point.lines[0]!];
    expect(doublePentagons.evaluate(amplitude(n, 0, 2), { ...point, lines }, prime)).toBe(value);
  });

  // 1009.1854 against 1012.6032: MHV vertices with a reference twistor against local integrals.
  it.each([4, 5, 6, 7, 8, 10])("have the same value by double pentagons and by MHV vertices at n = %d", (n) => {
    const point = randomPoint(n, 0, 2, 3 * n, prime);
    const value = doublePentagons.evaluate(amplitude(n, 0, 2), point, prime);
    expect(twoLoopVertexExpansion.evaluate(amplitude(n, 0, 2), point, prime)).toBe(value);
  });

  it("turns into the parity conjugate at n = 4", () => {
    const [there, here] = paritySides(doublePentagons, randomPoint(4, 0, 2, 6, prime), prime, 2);
    expect(there).toBe(here);
  });
});

describe("three loops at n = 4", () => {
  it("are cyclic, reflection and loop-permutation invariant, and parity even", () => {
    const point = randomPoint(4, 0, 3, 7, prime);
    const value = dualConformalIntegrals.evaluate(amplitude(4, 0, 3), point, prime);
    expect(value).not.toBe(0);
    expect(dualConformalIntegrals.evaluate(amplitude(4, 0, 3), moveLegs(point, rotation(4)), prime)).toBe(value);
    expect(dualConformalIntegrals.evaluate(amplitude(4, 0, 3), moveLegs(point, reflection(4)), prime)).toBe(value);
    const lines = [point.lines[1]!, point.lines[2]!, point.lines[0]!];
    expect(dualConformalIntegrals.evaluate(amplitude(4, 0, 3), { ...point, lines }, prime)).toBe(value);
    const [there, here] = paritySides(dualConformalIntegrals, point, prime, 2);
    expect(there).toBe(here);
  });
});

/**
 * Quadruple cuts (hep-th/0412103, "Generalized Unitarity and One-Loop Amplitudes in N=4 Super-Yang-Mills"): where AB passes through
 * Z_i and Z_j the four propagators <AB i-1 i>, <AB i i+1>, <AB j-1 j>, <AB j j+1> vanish, and the residue is the product of the
 * amplitudes at the corners. At this solution the corners i and j are three-point amplitudes that only pass Z_i and Z_j on, so that the
 * residue is M(i, ..., j) M(j, ..., i), summed over how the degree k is shared. This is the coefficient of a two-mass-easy box, and
 * fixes the normalisation of the integrand absolutely: 1 for MHV.
 */
import { describe, expect, it } from "vitest";
import type { Point } from "../../../engine/kinematics/point";
import type { Source } from "../../../engine/sources";
import { Modulus } from "../../../engine/sources/arithmetic";
import { bracket } from "../../../engine/sources/determinants";
import { dualConformalIntegrals } from "../../../engine/sources/dualConformal";
import { loopVertexExpansion } from "../../../engine/sources/loopVertex";
import { chiralPentagons } from "../../../engine/sources/oneLoopMhv";
import { oneLoopRecursion } from "../../../engine/sources/oneLoopRecursion";
import { PlanBuilder, timesTerms } from "../../../engine/sources/plan";
import { legsOf } from "../../../engine/sources/question";
import { sumPlan } from "../../../engine/sources/runPlan";
import { treeExists, treeRecursion } from "../../../engine/sources/treePlan";
import { primes, randomPoint, residues } from "../../support/randomPoint";
import { amplitude } from "./questions";
import { reconstruct, valueAtZero } from "./rationalFunction";

const prime = primes[0];
const m = new Modulus(prime);

/** The residue of a one-loop integrand where AB passes through two points, along a random path there; i and j from 0. */
function residue(
  source: Source,
  point: Point<number>,
  ends: readonly [number[], number[]],
  i: number,
  j: number,
): number {
  const { n, k } = point;
  const next = residues(31 * i + j, prime);
  const [r, s] = [Array.from({ length: 4 }, next), Array.from({ length: 4 }, next)];
  const move = (x: readonly number[], by: readonly number[], e: number) =>
    x.map((c, at) => m.add(c, m.multiply(e, by[at]!)));
  const z = (at: number) => point.twistors[(at + n) % n]!;
  const product = reconstruct(m, 90, 4, (e) => {
    const line = [move(ends[0], r, e), move(ends[1], s, e)] as const;
    const value = source.evaluate(amplitude(n, k, 1), { ...point, lines: [line] }, prime)!;
    return [i - 1, i, j - 1, j].reduce((all, at) => m.multiply(all, bracket(m, ...line, z(at), z(at + 1))), value);
  })!;
  // The Jacobian of the four propagators at AB = (i j) over the measure <AB d^2A><AB d^2B>. With A = Z_i + a P + b Q, B = Z_j + c P + d Q
  // the first two are linear in a, b, with determinant <P Q i j><i-1 i i+1 j>, the others in c, d, with <P Q j i><j-1 j j+1 i>; the
  // measure is <i j P Q>^2 there, and a sign is left.
  const jacobian = m.multiply(bracket(m, z(i - 1), z(i), z(i + 1), z(j)), bracket(m, z(j - 1), z(j), z(j + 1), z(i)));
  return m.divide(valueAtZero(m, product), m.subtract(0, jacobian))!;
}

/** Legs from..to with both ends, cyclically, from 0. */
const stretch = (from: number, to: number, n: number): number[] =>
  Array.from({ length: ((to - from + n) % n) + 1 }, (_, step) => (from + step) % n);

/** The product of the two trees of the cut through legs i and j. */
function trees(point: Point<number>, i: number, j: number): number {
  const { n, k } = point;
  const builder = new PlanBuilder(n);
  const tree = treeRecursion(builder);
  const [one, other] = [stretch(i, j, n), stretch(j, i, n)];
  const terms = Array.from({ length: k + 1 }, (_, kL) => kL).flatMap((kL) =>
    treeExists(one.length, kL) && treeExists(other.length, k - kL)
      ? timesTerms(tree(one, kL), tree(other, k - kL))
      : [],
  );
  const value = sumPlan(m, builder.finish(terms), legsOf(point, n), k);
  if (value === null) throw new Error("trees: a bad point");
  return value;
}

const pairs = (n: number): [number, number][] =>
  Array.from({ length: n }, (_, i) => i).flatMap((i) =>
    Array.from({ length: n }, (_, j) => j)
      .filter((j) => j >= i + 2 && !(i === 0 && j === n - 1))
      .map((j): [number, number] => [i, j]),
  );

describe("quadruple cuts at AB = (i j)", () => {
  it.each([
    ["on-shell recursion", oneLoopRecursion, 4],
    ["on-shell recursion", oneLoopRecursion, 6],
    ["chiral pentagons", chiralPentagons, 5],
    ["chiral pentagons", chiralPentagons, 7],
    ["vertex expansion", loopVertexExpansion, 5],
    ["dual-conformal box", dualConformalIntegrals, 4],
  ] as const)("%s (%#): every two-mass-easy box of MHV has coefficient 1", (_, source, n) => {
    if (!source.covers(amplitude(n, 0, 1))) throw new Error("not covered");
    const point = randomPoint(n, 0, 1, 3 * n, prime);
    for (const [i, j] of pairs(n)) {
      const ends = [Array.from(point.twistors[i]!), Array.from(point.twistors[j]!)] as const;
      expect(residue(source, point, [ends[0], ends[1]], i, j), `legs ${i + 1} and ${j + 1}`).toBe(1);
    }
  });

  it.each([
    [5, 1],
    [6, 1],
    [6, 2],
    [7, 1],
  ])("is the product of two trees at n = %d, k = %d", (n, k) => {
    const point = randomPoint(n, k, 1, 11 * n + k, prime);
    const seen = new Set<number>();
    for (const [i, j] of pairs(n)) {
      const ends: [number[], number[]] = [Array.from(point.twistors[i]!), Array.from(point.twistors[j]!)];
      const expected = trees(point, i, j);
      seen.add(expected);
      expect(residue(oneLoopRecursion, point, ends, i, j), `legs ${i + 1} and ${j + 1}`).toBe(expected);
    }
    // Conjugate MHV has all of its residues at the other solution.
    expect([...seen].some((value) => value !== 0)).toBe(k < n - 4);
  });
});

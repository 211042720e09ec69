import { describe, expect, it } from "vitest";
import type { Point } from "../../../engine/kinematics/point";
import type { Source } from "../../../engine/sources";
import { Modulus } from "../../../engine/sources/arithmetic";
import { bracket } from "../../../engine/sources/determinants";
import { dualConformalIntegrals } from "../../../engine/sources/dualConformal";
import { chiralPentagons } from "../../../engine/sources/oneLoopMhv";
import { oneLoopRecursion } from "../../../engine/sources/oneLoopRecursion";
import { PlanBuilder, timesTerms } from "../../../engine/sources/plan";
import { legsOf } from "../../../engine/sources/question";
import { type SuperPoint, sumPlan } from "../../../engine/sources/runPlan";
import { treeExists, treeRecursion } from "../../../engine/sources/treePlan";
import { doublePentagons } from "../../../engine/sources/twoLoopMhv";
import { primes, randomPoint, residues } from "../../support/randomPoint";
import { amplitude } from "./questions";
import { reconstruct, valueAtZero } from "./rationalFunction";

// Two-particle cuts (1008.2958; hep-ph/9403226): where AB meets lines (i i+1) and (j j+1) an integrand is the product of two
// amplitudes with the legs i+1..j and j+1..i, both with the two points where AB meets those lines.
const prime = primes[0];
const m = new Modulus(prime);

interface Cut {
  /** [M <AB i i+1><AB j j+1>] on the cut, with the factors that its measure leaves. */
  readonly residue: number;
  readonly crossing: readonly [SuperPoint, SuperPoint];
}

/** i, j from 0; AB passes through Z_i + a Z_{i+1} and Z_j + b Z_{j+1} at e = 0. */
function cut(source: Source, point: Point<number>, i: number, j: number): Cut {
  const { n, k, loops } = point;
  const next = residues(i * 17 + j, prime);
  const [a, b] = [next(), next()];
  const [r, s] = [Array.from({ length: 4 }, next), Array.from({ length: 4 }, next)];
  const legs = legsOf(point, n);
  const mix = (x: ArrayLike<number>, y: ArrayLike<number>, by: number) =>
    Array.from(x, (value, at) => m.add(value, m.multiply(by, y[at]!)));
  const between = (at: number, by: number): SuperPoint => {
    const [p, q] = [legs[at]!, legs[(at + 1) % n]!];
    return { twistor: mix(p.twistor, q.twistor, by), chi: p.chi.map((row, f) => mix(row, q.chi[f]!, by)) };
  };
  const crossing = [between(i, a), between(j, b)] as const;
  const [atI, atJ] = [crossing[0].twistor, crossing[1].twistor];
  const z = (at: number) => point.twistors[at % n]!;
  const product = reconstruct(m, 90, 4, (e) => {
    const line = [mix(atI, r, e), mix(atJ, s, e)] as const;
    const value = source.evaluate(amplitude(n, k, loops), { ...point, lines: [line, ...point.lines.slice(1)] }, prime)!;
    const steps = m.multiply(bracket(m, ...line, z(i), z(i + 1)), bracket(m, ...line, z(j), z(j + 1)));
    return m.multiply(value, steps);
  })!;
  const top = m.multiply(bracket(m, atI, atJ, z(i + 1), r), bracket(m, atI, atJ, z(j + 1), s));
  const bottom = m.multiply(bracket(m, r, atJ, z(i), z(i + 1)), bracket(m, atI, s, z(j), z(j + 1)));
  const jacobian = m.divide(m.multiply(m.multiply(a, b), top), bottom)!;
  return { residue: m.multiply(valueAtZero(m, product), jacobian), crossing };
}

/** Legs from+1..to, cyclically, from 0. */
const legsBetween = (from: number, to: number, n: number): number[] =>
  Array.from({ length: (to - from + n) % n }, (_, step) => (from + 1 + step) % n);

describe("two-particle cuts of one loop into trees", () => {
  const everyLoop = [4, 5, 6, 7].flatMap((n) => Array.from({ length: n - 3 }, (_, k) => [n, k] as const));
  it.each(everyLoop)("hold at n = %d, k = %d", (n, k) => {
    const point = randomPoint(n, k, 1, 5 * n + k, prime);
    for (let j = 2; j <= n - 2; j++) {
      const { residue, crossing } = cut(oneLoopRecursion, point, 0, j);
      const builder = new PlanBuilder(n + 2);
      const tree = treeRecursion(builder);
      const [one, other] = [
        [n, ...legsBetween(0, j, n), n + 1],
        [n + 1, ...legsBetween(j, 0, n), n],
      ];
      const terms = Array.from({ length: k + 1 }, (_, kL) => kL).flatMap((kL) =>
        treeExists(one.length, kL) && treeExists(other.length, k - kL)
          ? timesTerms(tree(one, kL), tree(other, k - kL))
          : [],
      );
      const expected = sumPlan(m, builder.finish(terms), [...legsOf(point, n), ...crossing], k);
      expect(residue, `legs 1 and ${j + 1}`).toBe(expected);
    }
  });
});

describe("two-particle cuts of more loops at k = 0", () => {
  const byLoops: readonly Source[][] = [[], [chiralPentagons], [doublePentagons]];
  const value = (
    source: Source | null,
    point: Point<number>,
    legs: readonly ArrayLike<number>[],
    lines: Point<number>["lines"],
  ) => {
    if (lines.length === 0) return 1;
    if (legs.length < 4 || source === null) return 0;
    const twistors = legs.map((leg) => Array.from(leg));
    const n = legs.length;
    return source.evaluate(
      amplitude(n, 0, lines.length),
      { ...point, n, loops: lines.length, twistors, lines },
      prime,
    )!;
  };

  it.each([
    [4, 2, doublePentagons],
    [5, 2, doublePentagons],
    [6, 2, doublePentagons],
    [7, 2, doublePentagons],
    [4, 2, dualConformalIntegrals],
    [4, 3, dualConformalIntegrals],
  ])("hold at n = %d with %d loops", (n, loops, source) => {
    const point = randomPoint(n, 0, loops, 9 * n + loops, prime);
    const rest = point.lines.slice(1);
    for (let j = 2; j <= n - 2; j++) {
      const { residue, crossing } = cut(source, point, 0, j);
      const [first, second] = [crossing[0].twistor, crossing[1].twistor];
      const one = [first, ...legsBetween(0, j, n).map((leg) => point.twistors[leg]!), second];
      const other = [second, ...legsBetween(j, 0, n).map((leg) => point.twistors[leg]!), first];
      let expected = 0;
      for (let set = 0; set < 2 ** rest.length; set++) {
        const left = rest.filter((_, at) => (set & (1 << at)) !== 0);
        const right = rest.filter((_, at) => (set & (1 << at)) === 0);
        const product = m.multiply(
          value(byLoops[left.length]?.[0] ?? null, point, one, left),
          value(byLoops[right.length]?.[0] ?? null, point, other, right),
        );
        expected = m.add(expected, product);
      }
      expect(residue, `legs 1 and ${j + 1}`).toBe(expected);
    }
  });
});

/** The recursion with shared sub-amplitudes against its terms written out one by one, each with determinants of its own. */
import { describe, expect, it } from "vitest";
import { randomness, smallPrimeField } from "../../../engine/fields";
import { randomPoint } from "../../../engine/kinematics";
import { Modulus } from "../../../engine/sources/arithmetic";
import { sizeOf } from "../../../engine/sources/bound";
import { planBound, superGrading } from "../../../engine/sources/planBound";
import { legsOf } from "../../../engine/sources/question";
import { sumPlan } from "../../../engine/sources/runPlan";
import { sumTree } from "../../../engine/sources/runSubamplitudes";
import { treeBound } from "../../../engine/sources/subamplitudeBound";
import { sharedTree } from "../../../engine/sources/subamplitudes";
import { treePlan, treeTermCount } from "../../../engine/sources/treePlan";

const cases = [
  [5, 1],
  [6, 2],
  [8, 3],
  [9, 4],
  [9, 5],
  [10, 3],
  [12, 8],
] as const;

describe("the recursion with shared sub-amplitudes", () => {
  it.each(cases)("n = %d, k = %d has the value of its terms one by one", (n, k) => {
    const tree = sharedTree(n, k);
    expect(tree.whole.terms).toBe(treeTermCount(n, k));
    for (const prime of [1073741827, 2147483647]) {
      const m = new Modulus(prime);
      const point = randomPoint(smallPrimeField(prime), { n, k, loops: 0 }, randomness(`shared ${n} ${k} ${prime}`));
      expect(sumTree(m, tree, legsOf(point, n))).toBe(sumPlan(m, treePlan(n, k), legsOf(point, n), k));
    }
  });

  it.each(cases)("n = %d, k = %d has the bound of its terms one by one", (n, k) => {
    const shared = treeBound(sharedTree(n, k));
    const single = sizeOf(planBound(treePlan(n, k), superGrading(k)));
    expect(shared.degree).toBe(single.degree);
    expect(shared.denominatorDegree).toBe(single.denominatorDegree);
    expect(shared.heightBits).toBeCloseTo(single.heightBits, 6);
    expect(shared.denominatorHeightBits).toBeCloseTo(single.denominatorHeightBits, 6);
  });

  it("has no value where two legs are one point", () => {
    const prime = 2147483629;
    const point = randomPoint(smallPrimeField(prime), { n: 7, k: 2, loops: 0 }, randomness("shared, degenerate"));
    const legs = [...legsOf(point, 7)];
    legs[3] = legs[2]!;
    expect(sumTree(new Modulus(prime), sharedTree(7, 2), legs)).toBeNull();
  });

  it("reduces sums of 32 products of the largest residues exactly", () => {
    for (const prime of [1073741827, 2147483647]) {
      const m = new Modulus(prime);
      const x = prime - 1;
      // (-1)(-1) = 1, 32 times; with the other sign -32.
      const [high, low] = [32 * (x >>> 16) * x, 32 * (x & 0xffff) * x];
      expect(m.reduceSplit(high, low)).toBe(32);
      expect(m.reduceSplit(-high, -low)).toBe(prime - 32);
      expect(m.reduceSplit(0, 0)).toBe(0);
    }
  });
});

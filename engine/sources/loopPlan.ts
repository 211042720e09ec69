/** The one-loop recursion as a plan, with the forward limit in closed form (1008.2958, section 3). */
import { Modulus } from "./arithmetic";
import { determinant } from "./determinants";
import { keepTerms, type Plan, PlanBuilder, type Term, timesTerms } from "./plan";
import { evaluatePlan } from "./runPlan";
import { binomial, splitLegs, type TreeTerms, treeExists, treeRecursion } from "./treePlan";

/** The number of terms that do not vanish, C(n-2,k) C(n-2,k+2). */
export const loopTermCount = (n: number, k: number): number => binomial(n - 2, k) * binomial(n - 2, k + 2);

const loopExists = (legs: number, k: number): boolean => legs >= 4 && k >= 0 && k <= legs - 4;

/**
 * M(1..n)_k at one loop: the tree recursion with the loop on either side of each channel, plus the forward limit
 * sum over j = 2..n-2 and kL + kR = k of K(AB; (1 j j+1), (1 n-1 n)) M_R(1..j, I)_kR M_L(I, j+1..n-1, nhat, Ahat, A_j)_kL, trees with
 * I = (j j+1) cap (A B 1), nhat = (n-1 n) cap (A B 1), A_j = (AB) cap (1 j j+1), Ahat = (AB) cap (n-1 n 1).
 */
function loopRecursion(builder: PlanBuilder, tree: TreeTerms, line: readonly [number, number]): TreeTerms {
  const known = new Map<string, readonly Term[]>();
  const loop: TreeTerms = (legs, k) => {
    if (!loopExists(legs.length, k)) return [];
    const key = `${k}:${legs}`;
    const found = known.get(key);
    if (found !== undefined) return found;
    const n = legs.length;
    const sum = [...loop(legs.slice(0, -1), k)];
    for (let j = 2; j <= n - 3; j++) {
      for (let kR = 0; kR < k; kR++) {
        const kL = k - 1 - kR;
        if (loopExists(j + 1, kR) && treeExists(n - j + 1, kL)) {
          const { invariant, right, left } = splitLegs(builder, legs, j, true, kL > 0);
          sum.push(...timesTerms([builder.invariant(...invariant)], timesTerms(loop(right, kR), tree(left, kL))));
        }
        if (treeExists(j + 1, kR) && loopExists(n - j + 1, kL)) {
          const { invariant, right, left } = splitLegs(builder, legs, j, kR > 0, true);
          sum.push(...timesTerms([builder.invariant(...invariant)], timesTerms(tree(right, kR), loop(left, kL))));
        }
      }
    }
    sum.push(...forwardLimit(builder, tree, line, legs, k));
    known.set(key, sum);
    return sum;
  };
  return loop;
}

function forwardLimit(
  builder: PlanBuilder,
  tree: TreeTerms,
  [a, b]: readonly [number, number],
  legs: readonly number[],
  k: number,
): Term[] {
  const n = legs.length;
  const leg = (label: number): number => legs[label - 1]!;
  const [first, beforeLast, last] = [leg(1), leg(n - 1), leg(n)];
  const sum: Term[] = [];
  for (let j = 2; j <= n - 2; j++) {
    const kermit = builder.kermit(a, b, first, leg(j), leg(j + 1), beforeLast, last);
    for (let kR = 0; kR <= k; kR++) {
      const kL = k - kR;
      if (!treeExists(j + 1, kR) || !treeExists(n - j + 3, kL)) continue;
      const inner = builder.meet([leg(j), leg(j + 1)], [a, b, first]);
      const right = [...legs.slice(0, j), inner];
      const left = [
        inner,
        ...legs.slice(j, n - 1),
        builder.meet([beforeLast, last], [a, b, first]),
        builder.meet([a, b], [beforeLast, last, first], "plane"),
        builder.meet([a, b], [first, leg(j), leg(j + 1)], "plane"),
      ];
      sum.push(...timesTerms([kermit], timesTerms(tree(right, kR), tree(left, kL))));
    }
  }
  return sum;
}

/** Any prime and any points do for finding what vanishes identically. */
const probePrime = 2147483647;

/**
 * The plan of the one-loop (n,k) integrand; base points are the legs, A and B.
 *
 * In the forward limit nhat, Ahat, A_j and I lie in one plane together with their Grassmann parts, so that terms with an
 * invariant that holds all four, or points made from them in that plane, are 0^4/0 and vanish. They are found by evaluation
 * at two points: the rows of their delta functions are linearly dependent at both.
 */
export function loopPlan(n: number, k: number): Plan {
  const builder = new PlanBuilder(n + 2);
  const tree = treeRecursion(builder);
  const legs = Array.from({ length: n }, (_, leg) => leg);
  const all = builder.finish(loopRecursion(builder, tree, [n, n + 1])(legs, k));
  const m = new Modulus(probePrime);
  const probes = [1, 2].map((seed) => {
    const next = probeNumbers(m, seed);
    const base = Array.from({ length: n + 2 }, (_, index) => ({
      twistor: Array.from({ length: 4 }, next),
      chi: [Array.from({ length: k }, () => (index < n ? next() : 0))],
    }));
    return evaluatePlan(m, all, base, k);
  });
  return keepTerms(all, ({ invariants }) => {
    const offsets = invariants.map((index) => index * k);
    const vanishes = probes.every(({ rows }) => determinant(m, rows, offsets) === 0);
    const divides = probes.every(({ denominators }) => invariants.some((index) => denominators[index] === 0));
    if (divides && !vanishes) throw new Error("loop recursion: a pole without a vanishing delta function");
    return !vanishes;
  });
}

/** Residues by a quadratic congruence: all that matters is that no polynomial identity holds between them. */
function probeNumbers(m: Modulus, seed: number): () => number {
  let state = m.residue(123456789 + seed * 987654321);
  return () => {
    state = m.add(m.multiply(state, state), m.residue(1046527 + seed));
    return state;
  };
}

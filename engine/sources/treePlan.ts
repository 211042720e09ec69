/** The on-shell recursion of trees as a plan (hep-th/0501052; in momentum twistors 1008.2958, section 2). */
import { type Invariant, type Plan, PlanBuilder, type Term, timesTerms, unit } from "./plan";

/** Terms of the (legs.length, k) tree by the recursion; legs are point indices of the builder and are not read for k = 0. */
export type TreeTerms = (legs: readonly number[], k: number) => readonly Term[];

/** The number of terms of the recursion, the Narayana number C(n-3,k) C(n-3,k+1) / (n-3). */
export function treeTermCount(n: number, k: number): number {
  return Math.round((binomial(n - 3, k) * binomial(n - 3, k + 1)) / (n - 3));
}

/** A tree exists: three legs with k = 0 (their value is 1) or 0 <= k <= legs - 4. */
export const treeExists = (legs: number, k: number): boolean => k >= 0 && (k === 0 ? legs >= 3 : k <= legs - 4);

/**
 * M(1..n)_k = M(1..n-1)_k + sum over j = 2..n-3 and kL + kR = k-1 of
 * [j j+1 n-1 n 1] M_R(1..j, I)_kR M_L(I, j+1..n-1, nhat)_kL with I = (j j+1) cap (n-1 n 1), nhat = (n-1 n) cap (1 j j+1).
 */
export function treeRecursion(builder: PlanBuilder): TreeTerms {
  const known = new Map<string, readonly Term[]>();
  const terms: TreeTerms = (legs, k) => {
    if (k === 0) return [unit];
    if (!treeExists(legs.length, k)) return [];
    const key = `${k}:${legs}`;
    const found = known.get(key);
    if (found !== undefined) return found;
    const sum = [...terms(legs.slice(0, -1), k)];
    for (let j = 2; j <= legs.length - 3; j++) sum.push(...channel(builder, terms, legs, j, k));
    known.set(key, sum);
    return sum;
  };
  return terms;
}

/** The terms of one channel j of the recursion, for every way to share k - 1 between the two sides. */
function channel(builder: PlanBuilder, tree: TreeTerms, legs: readonly number[], j: number, k: number): Term[] {
  const sum: Term[] = [];
  for (let kR = 0; kR < k; kR++) {
    const kL = k - 1 - kR;
    if (!treeExists(j + 1, kR) || !treeExists(legs.length - j + 1, kL)) continue;
    const split = splitLegs(builder, legs, j, kR > 0, kL > 0);
    const factor = [builder.invariant(...split.invariant)];
    sum.push(...timesTerms(factor, timesTerms(tree(split.right, kR), tree(split.left, kL))));
  }
  return sum;
}

/** The legs on both sides of channel j; a side with k = 0 and no loop needs none, and its meets are not made. */
export function splitLegs(
  builder: PlanBuilder,
  legs: readonly number[],
  j: number,
  needsRight: boolean,
  needsLeft: boolean,
): { invariant: Invariant; right: readonly number[]; left: readonly number[] } {
  const leg = (label: number): number => legs[label - 1]!;
  const n = legs.length;
  const [first, last, beforeLast] = [leg(1), leg(n), leg(n - 1)];
  const cut: [number, number] = [leg(j), leg(j + 1)];
  const invariant: Invariant = [leg(j), leg(j + 1), beforeLast, last, first];
  if (!needsRight && !needsLeft) return { invariant, right: [], left: [] };
  const inner = builder.meet(cut, [beforeLast, last, first]);
  const right = [...legs.slice(0, j), inner];
  if (!needsLeft) return { invariant, right, left: [] };
  const shifted = builder.meet([beforeLast, last], [first, leg(j), leg(j + 1)]);
  return { invariant, right, left: [inner, ...legs.slice(j, n - 1), shifted] };
}

/** The plan of the (n,k) tree; its base points are the n legs. */
export function treePlan(n: number, k: number): Plan {
  const builder = new PlanBuilder(n);
  return builder.finish(
    treeRecursion(builder)(
      Array.from({ length: n }, (_, leg) => leg),
      k,
    ),
  );
}

export function binomial(n: number, k: number): number {
  let value = 1;
  for (let i = 1; i <= k; i++) value = (value * (n - k + i)) / i;
  return k < 0 || k > n ? 0 : Math.round(value);
}

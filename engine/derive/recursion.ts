/**
 * On-shell recursion, for trees and one loop, as lists of terms over abstract points.
 *
 * Trees: hep-th/0501052, in momentum twistors 1008.2958. One loop: the loop in either factor, plus the forward limit in closed
 * form (1008.2958). The last point of a list is the one that is shifted, along the line to the one before it.
 */
import { inForwardPlane, type Meets, type Vertex } from "./points";

/** One term of the recursion for a one-loop MHV integrand: pivot and two lines, K(AB; (p a b), (p c d)). */
export interface Kermit {
  readonly pivot: Vertex;
  readonly first: readonly [Vertex, Vertex];
  readonly second: readonly [Vertex, Vertex];
}

/** A product of R-invariants, with one kermit factor where there is a loop. */
export interface Term {
  readonly brackets: readonly (readonly Vertex[])[];
  readonly kermit: Kermit | null;
}

const one: Term = { brackets: [], kermit: null };

const product = (left: readonly Term[], right: readonly Term[], factor: Term): Term[] =>
  left.flatMap((a) =>
    right.map((b) => ({
      brackets: [...factor.brackets, ...a.brackets, ...b.brackets],
      kermit: factor.kermit ?? a.kermit ?? b.kermit,
    })),
  );

/** Whether an amplitude of that many legs exists; three legs count as the number one at k = 0 without loops. */
const exists = (legs: number, k: number, loops: number): boolean =>
  legs === 3 ? k === 0 && loops === 0 : legs > 3 && k >= 0 && k <= legs - 4;

/** Writes the terms of amplitudes over given points; `meets` is where new points are made. */
export class Recursion {
  private readonly done = new Map<string, readonly Term[]>();

  constructor(private readonly meets: Meets) {}

  /** The terms for these points (three at least); empty where the amplitude vanishes. `loops` is 0 or 1. */
  terms(points: readonly Vertex[], k: number, loops: 0 | 1): readonly Term[] {
    if (!exists(points.length, k, loops)) return [];
    if (k === 0 && loops === 0) return [one];
    const key = `${loops} ${k} ${points.map((point) => point.key).join(" ")}`;
    const known = this.done.get(key);
    if (known !== undefined) return known;
    const terms = [
      ...this.terms(points.slice(0, -1), k, loops),
      ...this.factorised(points, k, loops),
      ...(loops === 1 ? this.forward(points, k) : []),
    ];
    this.done.set(key, terms);
    return terms;
  }

  /** sum over j, kL + kR = k - 1 of [j j+1 n-1 n 1] M_R(1..j, I) M_L(I, j+1..n-1, nhat), the loop on either side. */
  private factorised(points: readonly Vertex[], k: number, loops: 0 | 1): Term[] {
    const n = points.length;
    const at = (label: number) => points[label - 1]!;
    const terms: Term[] = [];
    for (let j = 2; j <= n - 3; j++) {
      const corner = this.meets.ofLine(at(j), at(j + 1), [at(n - 1), at(n), at(1)]);
      const shifted = this.meets.ofLine(at(n - 1), at(n), [at(1), at(j), at(j + 1)]);
      const factor: Term = { brackets: [[at(j), at(j + 1), at(n - 1), at(n), at(1)]], kermit: null };
      const right = [...points.slice(0, j), corner];
      const left = [corner, ...points.slice(j, n - 1), shifted];
      for (let kRight = 0; kRight < k; kRight++) {
        for (let onRight = loops; onRight >= 0; onRight--) {
          const rightTerms = this.terms(right, kRight, onRight as 0 | 1);
          if (rightTerms.length === 0) continue;
          terms.push(...product(rightTerms, this.terms(left, k - 1 - kRight, (loops - onRight) as 0 | 1), factor));
        }
      }
    }
    return terms;
  }

  /**
   * sum over j, kL + kR = k of K(AB; (1 j j+1), (1 n-1 n)) M_R(1..j, I) M_L(I, j+1..n-1, nhat, Ahat, A_j).
   * I, nhat, Ahat and A_j lie in one plane. The numerator of an R-invariant that holds four points of it vanishes to the
   * fourth power and its denominator once: such terms are left out.
   */
  private forward(points: readonly Vertex[], k: number): Term[] {
    const n = points.length;
    const at = (label: number) => points[label - 1]!;
    const pivot = at(1);
    const shifted = this.meets.ofLine(at(n - 1), at(n), { loopAnd: pivot });
    const last = this.meets.ofLoop([at(n - 1), at(n), pivot]);
    const alive = (term: Term) =>
      term.brackets.every((bracket) => bracket.filter((point) => inForwardPlane(point, pivot)).length < 4);
    const terms: Term[] = [];
    for (let j = 2; j <= n - 2; j++) {
      const corner = this.meets.ofLine(at(j), at(j + 1), { loopAnd: pivot });
      const first = this.meets.ofLoop([pivot, at(j), at(j + 1)]);
      const kermit: Kermit = { pivot, first: [at(j), at(j + 1)], second: [at(n - 1), at(n)] };
      const right = [...points.slice(0, j), corner];
      const left = [corner, ...points.slice(j, n - 1), shifted, last, first];
      for (let kRight = 0; kRight <= k; kRight++) {
        const rightTerms = this.terms(right, kRight, 0);
        if (rightTerms.length === 0) continue;
        const leftTerms = this.terms(left, k - kRight, 0).filter(alive);
        terms.push(...product(rightTerms, leftTerms, { brackets: [], kermit }));
      }
    }
    return terms;
  }
}

/**
 * An upper bound of the number of terms, which is exact for trees (Narayana numbers), found without writing any; Infinity where
 * it is beyond 2^53.
 */
export function countRecursionTerms(n: number, k: number, loops: 0 | 1): number {
  const done = new Map<number, number>();
  const count = (legs: number, order: number, loop: number): number => {
    if (!exists(legs, order, loop)) return 0;
    if (order === 0 && loop === 0) return 1;
    const key = (legs * (n + 3) + order) * 2 + loop;
    const known = done.get(key);
    if (known !== undefined) return known;
    let total = count(legs - 1, order, loop);
    // Either factor may be 0 and the other beyond all bounds, which is no term.
    const addPairs = (right: number, left: () => number) => {
      const leftCount = right > 0 ? left() : 0;
      if (leftCount > 0) total += right * leftCount;
    };
    for (let j = 2; j <= legs - 3 && total <= Number.MAX_SAFE_INTEGER; j++) {
      for (let kRight = 0; kRight < order && kRight <= Math.max(0, j - 3); kRight++) {
        for (let onRight = 0; onRight <= loop; onRight++) {
          addPairs(count(j + 1, kRight, onRight), () => count(legs - j + 1, order - 1 - kRight, loop - onRight));
        }
      }
    }
    for (let j = 2; loop === 1 && j <= legs - 2 && total <= Number.MAX_SAFE_INTEGER; j++) {
      for (let kRight = 0; kRight <= order && kRight <= Math.max(0, j - 3); kRight++) {
        addPairs(count(j + 1, kRight, 0), () => count(legs - j + 3, order - kRight, 0));
      }
    }
    if (total > Number.MAX_SAFE_INTEGER) total = Number.POSITIVE_INFINITY;
    done.set(key, total);
    return total;
  };
  return count(n, k, loops);
}

import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { addBounds, multiplyBounds, polynomial, reciprocal, sizeOf } from "./bound";
import { bracket, lineThroughPlanes, type Vector } from "./determinants";
import { barsOf, bracketBits, loopSteps, stepBound } from "./local";
import { asksSuperamplitude, assertCovered, cyclic } from "./question";
import type { Question, Source } from "./source";

/** Cyclically ordered 4-tuples of distinct labels 0..n-1, each of the four rotations counted. */
export function cyclicFours(n: number): [number, number, number, number][] {
  const found: [number, number, number, number][] = [];
  for (let i = 0; i < n; i++) {
    for (let j = 1; j < n; j++) {
      for (let k = j + 1; k < n; k++) {
        for (let l = k + 1; l < n; l++) found.push([i, (i + j) % n, (i + k) % n, (i + l) % n]);
      }
    }
  }
  return found;
}

/**
 * The two-loop MHV integrand as local double pentagons: the sum over i < j < k < l < i (cyclically, rotations counted) of
 * <AB bar(i) cap bar(j)><CD bar(k) cap bar(l)><i j k l> / (<AB i-1 i><AB i i+1><AB j-1 j><AB j j+1><AB CD>
 * <CD k-1 k><CD k k+1><CD l-1 l><CD l l+1>).
 */
export const doublePentagons: Source = {
  name: "double pentagons",
  reference: "arXiv:1012.6032 Local Integrals for Planar Scattering Amplitudes",
  lineage: "local double pentagons",
  covers: (question) => asksSuperamplitude(question, 2) && question.k === 0 && question.n <= 24,
  cost: ({ n }) => 200 * n * n + 80 * cyclicFours(n).length,
  size({ n }) {
    const terms = cyclicFours(n).map(([i, j, k, l]) =>
      multiplyBounds(
        polynomial(20, 2 + 5 * bracketBits),
        reciprocal("<AB CD>", 4, bracketBits),
        ...[i, j].flatMap((leg) => [stepBound("AB", cyclic(leg - 1, n)), stepBound("AB", leg)]),
        ...[k, l].flatMap((leg) => [stepBound("CD", cyclic(leg - 1, n)), stepBound("CD", leg)]),
      ),
    );
    return sizeOf(addBounds(terms));
  },
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    const { n } = question;
    const [first, second] = [point.lines[0]!, point.lines[1]!];
    const between = m.inverse(bracket(m, ...first, ...second));
    const left = pentagonSides(m, first, point.twistors, n);
    const right = pentagonSides(m, second, point.twistors, n);
    if (between === null || left === null || right === null) return null;
    let sum = 0;
    for (const [i, j, k, l] of cyclicFours(n)) {
      const [zi, zj, zk, zl] = [point.twistors[i]!, point.twistors[j]!, point.twistors[k]!, point.twistors[l]!];
      const sides = m.multiply(left[i * n + j]!, right[k * n + l]!);
      sum = m.add(sum, m.multiply(sides, bracket(m, zi, zj, zk, zl)));
    }
    return m.multiply(sum, between);
  },
};

/** <AB bar(i) cap bar(j)> / (<AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>) at index i n + j; null where a propagator vanishes. */
function pentagonSides(
  m: Modulus,
  line: readonly [Vector, Vector],
  twistors: readonly Vector[],
  n: number,
): Int32Array | null {
  const bars = barsOf(m, twistors, n);
  const steps = loopSteps(m, line, twistors, n);
  if (steps === null) return null;
  const sides = new Int32Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      if (i === j) continue;
      const propagators = m.multiply(
        m.multiply(steps[cyclic(i - 1, n)]!, steps[i]!),
        m.multiply(steps[cyclic(j - 1, n)]!, steps[j]!),
      );
      sides[i * n + j] = m.multiply(propagators, lineThroughPlanes(m, ...line, bars[i]!, bars[j]!));
    }
  }
  return sides;
}

import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { addBounds, multiplyBounds, polynomial, reciprocal, sizeOf } from "./bound";
import { bracket, lineThroughPlanes } from "./determinants";
import { barsOf, bracketBits, loopSteps, stepBound } from "./local";
import { type Plan, PlanBuilder, type Term } from "./plan";
import { planBound, planCost, superGrading } from "./planBound";
import { asksSuperamplitude, assertCovered, cyclic } from "./question";
import { sumPlan } from "./runPlan";
import type { Question, Source } from "./source";

const asksOneLoopMhv = (question: Question): boolean => asksSuperamplitude(question, 1) && question.k === 0;

/**
 * The sum over i < j of the kermits <AB (p i i+1) cap (p j j+1)>^2 / (<AB p i><AB i i+1><AB i+1 p><AB p j><AB j j+1><AB j+1 p>).
 * Base points: the legs, A, B, the reference. The pivot p is the reference, with i, j over all legs, or leg 1 with 1 < i < j < n.
 */
export function kermitPlan(n: number, pivot: "leg" | "reference"): Plan {
  const builder = new PlanBuilder(n + 3);
  const [p, first, end] = pivot === "leg" ? [0, 1, n - 1] : [n + 2, 0, n];
  const terms: Term[] = [];
  for (let i = first; i < end; i++) {
    for (let j = i + 1; j < end; j++) {
      terms.push(builder.kermit(n, n + 1, p, i, cyclic(i + 1, n), j, cyclic(j + 1, n)));
    }
  }
  return builder.finish(terms);
}

const kermitSource = (name: string, pivot: "leg" | "reference", lineage: string): Source => ({
  name,
  reference: "arXiv:1008.2958 The All-Loop Integrand For Scattering Amplitudes in Planar N=4 SYM",
  lineage,
  covers: asksOneLoopMhv,
  cost: (question) => planCost(kermitPlan(question.n, pivot), superGrading(0)),
  size: (question) => sizeOf(planBound(kermitPlan(question.n, pivot), superGrading(0))),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const twistors = [...point.twistors.slice(0, question.n), ...point.lines[0]!, point.referenceTwistor];
    const base = twistors.map((twistor) => ({ twistor, chi: [] }));
    return sumPlan(new Modulus(prime), kermitPlan(question.n, pivot), base, 0);
  },
});

/** The one-loop MHV integrand as kermits seen from leg 1: the terms of the loop recursion, whence the lineage. */
export const kermitExpansion = kermitSource("kermit expansion from leg 1", "leg", "on-shell recursion");

/** The same sum from the reference twistor, on which it does not depend: its diagrams of MHV vertices (1009.1854). */
export const kermitExpansionReference = kermitSource(
  "kermit expansion from a reference",
  "reference",
  "vertex expansion",
);

/**
 * The one-loop MHV integrand as chiral pentagons with the reference line X: the sum over i < j of
 * <AB bar(i) cap bar(j)> <X i j> / (<AB X><AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>).
 */
export const chiralPentagons: Source = {
  name: "chiral pentagons",
  reference: "arXiv:1012.6032 Local Integrals for Planar Scattering Amplitudes",
  lineage: "chiral pentagons",
  covers: asksOneLoopMhv,
  cost: ({ n }) => 120 * n * n + 160 * n,
  size({ n }) {
    const terms = pairs(n).map(([i, j]) =>
      multiplyBounds(
        polynomial(12, 1 + 3 * bracketBits),
        reciprocal("<AB X>", 4, bracketBits),
        ...[cyclic(i - 1, n), i, cyclic(j - 1, n), j].map((step) => stepBound("AB", step)),
      ),
    );
    return sizeOf(addBounds(terms));
  },
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    const { n } = question;
    const twistors = point.twistors;
    const [a, b] = point.lines[0]!;
    const [x1, x2] = point.referenceLine;
    const bars = barsOf(m, twistors, n);
    const steps = loopSteps(m, point.lines[0]!, twistors, n);
    const across = m.inverse(bracket(m, a, b, x1, x2));
    if (steps === null || across === null) return null;
    let sum = 0;
    for (const [i, j] of pairs(n)) {
      const numerator = m.multiply(
        lineThroughPlanes(m, a, b, bars[i]!, bars[j]!),
        bracket(m, x1, x2, twistors[i]!, twistors[j]!),
      );
      const propagators = m.multiply(
        m.multiply(steps[cyclic(i - 1, n)]!, steps[i]!),
        m.multiply(steps[cyclic(j - 1, n)]!, steps[j]!),
      );
      sum = m.add(sum, m.multiply(numerator, propagators));
    }
    return m.multiply(sum, across);
  },
};

const pairs = (n: number): [number, number][] =>
  Array.from({ length: n }, (_, i) => i).flatMap((i) =>
    Array.from({ length: n - 1 - i }, (_, d): [number, number] => [i, i + 1 + d]),
  );

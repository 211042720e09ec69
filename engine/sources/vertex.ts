import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { sizeOf } from "./bound";
import { type Plan, PlanBuilder, type Term } from "./plan";
import { planBound, planCost, superGrading } from "./planBound";
import { asksSuperamplitude, assertCovered, legsOf } from "./question";
import { sumPlan } from "./runPlan";
import type { Question, Source } from "./source";

/** The sum over non-adjacent i < j of [* i i+1 j j+1]; base point n is the reference. */
export function vertexPlan(n: number): Plan {
  const builder = new PlanBuilder(n + 1);
  const terms: Term[] = [];
  for (let i = 0; i < n; i++) {
    for (let j = i + 2; j < n; j++) {
      if ((j + 1) % n !== i) terms.push(builder.invariant(n, i, i + 1, j, (j + 1) % n));
    }
  }
  return builder.finish(terms);
}

/** NMHV trees for every n by the expansion in MHV vertices, with the point's reference twistor and its Grassmann part. */
export const vertexExpansion: Source = {
  name: "vertex expansion",
  reference: "arXiv:1009.1854 MHV Diagrams in Momentum Twistor Space",
  lineage: "vertex expansion",
  covers: (question) => asksSuperamplitude(question, 0) && question.k === 1,
  cost: (question) => planCost(vertexPlan(question.n), superGrading(1)),
  size: (question) => sizeOf(planBound(vertexPlan(question.n), superGrading(1))),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const reference = { twistor: point.referenceTwistor, chi: point.referenceChi };
    const base = [...legsOf(point, question.n), reference];
    return sumPlan(new Modulus(prime), vertexPlan(question.n), base, 1);
  },
};

import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { sizeOf } from "./bound";
import { remembering } from "./plan";
import { planBound, planCost, superGrading } from "./planBound";
import { asksSuperamplitude, assertCovered, inRange, legsOf } from "./question";
import { sumPlan } from "./runPlan";
import type { Question, Source } from "./source";
import { diagramCount, vertexPlan } from "./vertexPlan";

/** Above this many diagrams other sources are far cheaper; (10, k) for k <= 4 is below. */
const mostDiagrams = 6_000;

const plans = remembering(8, (key) => {
  const [n, k] = key.split(",").map(Number) as [number, number];
  return vertexPlan(n, k);
});

/** The plan of the expansion, shared by all points. */
export const vertexPlanFor = ({ n, k }: Question) => plans(`${n},${k}`);

/** k = 0 has no propagator and nothing to expand. */
export const diagramsInReach = (question: Question): boolean =>
  inRange(question) && question.k >= 1 && diagramCount(question.n, question.k) <= mostDiagrams;

/** Trees with k >= 1 by the expansion in MHV vertices, with the point's reference twistor and its Grassmann part. */
export const vertexExpansion: Source = {
  name: "vertex expansion",
  reference: "arXiv:1009.1854 MHV Diagrams in Momentum Twistor Space",
  lineage: "vertex expansion",
  covers: (question) => asksSuperamplitude(question, 0) && diagramsInReach(question),
  cost: (question) => planCost(vertexPlanFor(question), superGrading(question.k)),
  size: (question) => sizeOf(planBound(vertexPlanFor(question), superGrading(question.k))),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const reference = { twistor: point.referenceTwistor, chi: point.referenceChi };
    const base = [...legsOf(point, question.n), reference];
    return sumPlan(new Modulus(prime), vertexPlanFor(question), base, question.k);
  },
};

import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { sizeOf } from "./bound";
import { remembering } from "./plan";
import { planBound, planCost, superGrading } from "./planBound";
import { asksSuperamplitude, assertCovered, inRange, legsOf } from "./question";
import { sumPlan } from "./runPlan";
import type { Question, Source } from "./source";
import { treePlan, treeTermCount } from "./treePlan";

/** Above this many terms the plan alone takes seconds: (14, k) for every k, (31, 2) and (64, 1) are below. */
export const mostTreeTerms = 50_000;

/** The recursion's plan for (n, k), shared by all points. */
export const recursionPlan = remembering(8, (key) => {
  const [n, k] = key.split(",").map(Number) as [number, number];
  return treePlan(n, k);
});

export const planFor = (question: Question) => recursionPlan(`${question.n},${question.k}`);

/** Whether the number of terms is within reach. */
export const treeInReach = (question: Question): boolean =>
  inRange(question) && treeTermCount(question.n, question.k) <= mostTreeTerms;

/** The tree superamplitude over the MHV tree, for every (n,k) with up to 50,000 terms, by on-shell recursion. */
export const recursion: Source = {
  name: "on-shell recursion",
  reference: "arXiv:1008.2958 The All-Loop Integrand For Scattering Amplitudes in Planar N=4 SYM; arXiv:hep-th/0501052",
  lineage: "on-shell recursion",
  covers: (question) => asksSuperamplitude(question, 0) && treeInReach(question),
  cost: (question) => planCost(planFor(question), superGrading(question.k)),
  size: (question) => sizeOf(planBound(planFor(question), superGrading(question.k))),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    return sumPlan(new Modulus(prime), planFor(question), legsOf(point, question.n), question.k);
  },
};

import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { sizeOf } from "./bound";
import { loopPlan, loopTermCount } from "./loopPlan";
import { remembering } from "./plan";
import { planBound, planCost, superGrading } from "./planBound";
import { asksSuperamplitude, assertCovered, legsOf } from "./question";
import { type SuperPoint, sumPlan } from "./runPlan";
import type { Question, Source } from "./source";

const plans = remembering(8, (key) => {
  const [n, k] = key.split(",").map(Number) as [number, number];
  return loopPlan(n, k);
});

/** The one-loop plan, shared by all points. */
export const loopPlanFor = ({ n, k }: Question) => plans(`${n},${k}`);

/** Above this many terms making the plan takes seconds: (11, k) for every k is below. */
const mostLoopTerms = 12_000;

/** The one-loop integrand over the MHV tree for every (n,k) with up to 12,000 terms, by loop recursion. */
export const oneLoopRecursion: Source = {
  name: "loop recursion",
  reference: "arXiv:1008.2958 The All-Loop Integrand For Scattering Amplitudes in Planar N=4 SYM",
  lineage: "on-shell recursion",
  covers: (question) => asksSuperamplitude(question, 1) && loopTermCount(question.n, question.k) <= mostLoopTerms,
  cost: (question) => planCost(loopPlanFor(question), superGrading(question.k)),
  size: (question) => sizeOf(planBound(loopPlanFor(question), superGrading(question.k))),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const noChi = Array.from({ length: 4 }, () => new Array<number>(question.k).fill(0));
    const line: SuperPoint[] = point.lines[0]!.map((twistor) => ({ twistor, chi: noChi }));
    const base = [...legsOf(point, question.n), ...line];
    return sumPlan(new Modulus(prime), loopPlanFor(question), base, question.k);
  },
};

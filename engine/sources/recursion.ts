import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { sizeOf } from "./bound";
import { mostColumns } from "./exteriorTables";
import { remembering } from "./plan";
import { planBound, planCost, superGrading } from "./planBound";
import { asksSuperamplitude, assertCovered, inRange, legsOf } from "./question";
import { type SuperPoint, sumPlan } from "./runPlan";
import { sumTree } from "./runSubamplitudes";
import type { Question, SizeBound, Source } from "./source";
import { treeBound, treeCost } from "./subamplitudeBound";
import { sharedTree } from "./subamplitudes";
import { treePlan, treeTermCount } from "./treePlan";

/** Above this many terms plan and bound alone take seconds: (14, k) for every k, (31, 2) and (64, 1) are below. */
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

/** What one (n, k) is evaluated with, its bound and its cost. */
interface Prepared {
  readonly cost: number;
  readonly size: SizeBound;
  sum(m: Modulus, legs: readonly SuperPoint[]): number | null;
}

const one: SizeBound = { degree: 0, denominatorDegree: 0, heightBits: 0, denominatorHeightBits: 0 };

/** Sub-amplitudes are shared up to k = 16; above, the few terms that are within reach have determinants of their own. */
const preparedFor = remembering(8, (key): Prepared => {
  const [n, k] = key.split(",").map(Number) as [number, number];
  if (k === 0) return { cost: 1, size: one, sum: () => 1 };
  if (k > mostColumns) {
    const plan = recursionPlan(key);
    const grading = superGrading(k);
    return {
      cost: planCost(plan, grading),
      size: sizeOf(planBound(plan, grading)),
      sum: (m, legs) => sumPlan(m, plan, legs, k),
    };
  }
  const tree = sharedTree(n, k);
  return { cost: treeCost(tree), size: treeBound(tree), sum: (m, legs) => sumTree(m, tree, legs) };
});
const prepared = ({ n, k }: Question): Prepared => preparedFor(`${n},${k}`);

/** The tree superamplitude over the MHV tree, for every (n,k) with up to 50,000 terms, by on-shell recursion. */
export const recursion: Source = {
  name: "on-shell recursion",
  reference: "arXiv:1008.2958 The All-Loop Integrand For Scattering Amplitudes in Planar N=4 SYM; arXiv:hep-th/0501052",
  lineage: "on-shell recursion",
  covers: (question) => asksSuperamplitude(question, 0) && treeInReach(question),
  cost: (question) => prepared(question).cost,
  size: (question) => prepared(question).size,
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    return prepared(question).sum(new Modulus(prime), legsOf(point, question.n));
  },
};

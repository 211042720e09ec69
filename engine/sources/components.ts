import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { multiplyBounds, reciprocal, sizeOf } from "./bound";
import type { Plan } from "./plan";
import { type Grading, planBound, planCost } from "./planBound";
import { asksComponent, assertCovered } from "./question";
import { planFor, treeInReach } from "./recursion";
import { type SuperPoint, sumPlan } from "./runPlan";
import type { Question, Source } from "./source";
import { anglesOf, contractSpinors, cyclicProduct } from "./spinors";
import { diagramsInReach, vertexPlanFor } from "./vertex";

/**
 * The legs with the Grassmann parts that pick out a gluon component: unit vectors of F^(k+2) as etatilde of the negative
 * legs, theta_1 = 0, theta_{a+1} = theta_a - lambda_a etatilde_a, chi_a = <theta_a lambda_a>; one flavour for four equal ones.
 * `supermomentum` holds the two rows sum_a lambda_a etatilde_a.
 */
export function componentPoint(
  m: Modulus,
  point: Point<number>,
  question: Question,
): { legs: SuperPoint[]; supermomentum: number[][] } {
  const negativeLegs = question.negativeLegs ?? [];
  const size = negativeLegs.length;
  const angles = anglesOf(point, question.n);
  const supermomentum = [0, 1].map((i) => negativeLegs.map((leg) => angles[leg - 1]![i as 0 | 1]));
  const legs = angles.map((spinor, a) => {
    const chi = new Array<number>(size).fill(0);
    negativeLegs.forEach((leg, place) => {
      if (leg - 1 < a) chi[place] = m.negate(contractSpinors(m, angles[leg - 1]!, spinor));
    });
    return { twistor: point.twistors[a]!, chi: [chi] };
  });
  return { legs, supermomentum };
}

/** Each entry of chi is a two-bracket (degree 2, two terms) or zero; the rows of the supermomentum are single components. */
const componentGrading = (k: number): Grading => ({
  flavours: 1,
  dimension: k + 2,
  chiDegree: 2,
  chiBits: 1,
  rowsAbove: 2,
  rowDegree: 1,
  rowBits: 0,
});

function componentSize(plan: Plan, { n, k }: Question) {
  const bound = planBound(plan, componentGrading(k));
  return sizeOf(multiplyBounds(bound, reciprocal("<1 2>...<n 1>", 2 * n, n)));
}

/** Sum of the plan's terms with the two supermomentum rows on top, over <1 2>...<n 1>. */
function evaluateComponent(
  plan: Plan,
  question: Question,
  point: Point<number>,
  prime: number,
  reference: SuperPoint[],
): number | null {
  const m = new Modulus(prime);
  const { legs, supermomentum } = componentPoint(m, point, question);
  const sum = sumPlan(m, plan, [...legs, ...reference], question.k + 2, supermomentum);
  return sum === null ? null : m.divide(sum, cyclicProduct(m, anglesOf(point, question.n)));
}

/** Gluon components of trees, the MHV denominator included: <i j>^4 / (<1 2>...<n 1>) for k = 0. */
export const recursionComponents: Source = {
  name: "on-shell recursion, component",
  reference: "arXiv:1008.2958 The All-Loop Integrand For Scattering Amplitudes in Planar N=4 SYM; arXiv:hep-th/0501052",
  lineage: "on-shell recursion",
  covers: (question) => asksComponent(question) && treeInReach(question),
  cost: (question) => planCost(planFor(question), componentGrading(question.k)) + 40 * question.n,
  size: (question) => componentSize(planFor(question), question),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    return evaluateComponent(planFor(question), question, point, prime, []);
  },
};

/** Gluon components of trees with k >= 1 by the vertex expansion; the reference twistor has Grassmann part zero. */
export const vertexComponents: Source = {
  name: "vertex expansion, component",
  reference: "arXiv:1009.1854 MHV Diagrams in Momentum Twistor Space",
  lineage: "vertex expansion",
  covers: (question) => asksComponent(question) && diagramsInReach(question),
  cost: (question) => planCost(vertexPlanFor(question), componentGrading(question.k)) + 40 * question.n,
  size: (question) => componentSize(vertexPlanFor(question), question),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const reference = { twistor: point.referenceTwistor, chi: [new Array<number>(question.k + 2).fill(0)] };
    return evaluateComponent(vertexPlanFor(question), question, point, prime, [reference]);
  },
};

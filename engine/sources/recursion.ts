import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { mostColumns } from "./exteriorTables";
import { remembering } from "./plan";
import { asksSuperamplitude, assertCovered, inRange, legsOf } from "./question";
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

/** The shared recursion for (n, k) with its bound, k >= 1. */
const sharedFor = remembering(4, (key) => {
  const [n, k] = key.split(",").map(Number) as [number, number];
  const tree = sharedTree(n, k);
  return { tree, size: treeBound(tree), cost: treeCost(tree) };
});
const one: SizeBound = { degree: 0, denominatorDegree: 0, heightBits: 0, denominatorHeightBits: 0 };

/** The tree superamplitude over the MHV tree, for every (n,k) with up to 50,000 terms and k <= 16, by on-shell recursion. */
export const recursion: Source = {
  name: "on-shell recursion",
  reference: "arXiv:1008.2958 The All-Loop Integrand For Scattering Amplitudes in Planar N=4 SYM; arXiv:hep-th/0501052",
  lineage: "on-shell recursion",
  covers: (question) => asksSuperamplitude(question, 0) && question.k <= mostColumns && treeInReach(question),
  cost: ({ n, k }) => (k === 0 ? 1 : sharedFor(`${n},${k}`).cost),
  size: ({ n, k }) => (k === 0 ? one : sharedFor(`${n},${k}`).size),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const { n, k } = question;
    return k === 0 ? 1 : sumTree(new Modulus(prime), sharedFor(`${n},${k}`).tree, legsOf(point, n));
  },
};

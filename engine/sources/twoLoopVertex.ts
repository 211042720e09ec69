import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { sizeOf } from "./bound";
import { remembering } from "./plan";
import { planBound, planCost, superGrading } from "./planBound";
import { asksSuperamplitude, assertCovered } from "./question";
import { sumPlan } from "./runPlan";
import type { Question, Source } from "./source";
import { twoLoopVertexPlan } from "./twoLoopVertexPlan";

const plans = remembering(4, (key) => twoLoopVertexPlan(Number(key)));

/**
 * The two-loop MHV integrand by the expansion in MHV vertices with the point's reference twistor. The Grassmann parts of A, B, C, D are
 * integrated out by making them the unit vectors of four dimensions; legs and reference have none.
 */
export const twoLoopVertexExpansion: Source = {
  name: "vertex expansion at two loops",
  reference: "arXiv:1009.1854 MHV Diagrams in Momentum Twistor Space",
  lineage: "vertex expansion",
  covers: (question) => asksSuperamplitude(question, 2) && question.k === 0 && question.n <= 14,
  cost: ({ n }) => planCost(plans(`${n}`), superGrading(4)),
  size: ({ n }) => sizeOf(planBound(plans(`${n}`), superGrading(4))),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const { n } = question;
    const twistors = [...point.twistors.slice(0, n), point.referenceTwistor, ...point.lines[0]!, ...point.lines[1]!];
    const base = twistors.map((twistor, index) => {
      const unit = Array.from({ length: 4 }, (_, at) => (at === index - n - 1 ? 1 : 0));
      return { twistor, chi: Array.from({ length: 4 }, () => unit) };
    });
    return sumPlan(new Modulus(prime), plans(`${n}`), base, 4);
  },
};

import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { sizeOf } from "./bound";
import { loopVertexPlan } from "./loopVertexPlan";
import { remembering } from "./plan";
import { planBound, planCost, superGrading } from "./planBound";
import { asksSuperamplitude, assertCovered, legsOf } from "./question";
import { type SuperPoint, sumPlan } from "./runPlan";
import type { Question, Source } from "./source";

/** For each k the largest n with fewer than about 9,000 diagrams. */
const largestN = [64, 14, 9, 8];

const plans = remembering(8, (key) => {
  const [n, k] = key.split(",").map(Number) as [number, number];
  return loopVertexPlan(n, k);
});

const planFor = ({ n, k }: Question) => plans(`${n},${k}`);

/**
 * One-loop integrands with k <= 3 by the expansion in MHV vertices with the point's reference twistor: no recursion, no forward limit.
 * The Grassmann parts of A and B are integrated out by giving the vectors two more dimensions, in which they are the units.
 */
export const loopVertexExpansion: Source = {
  name: "vertex expansion at one loop",
  reference: "arXiv:1009.1854 MHV Diagrams in Momentum Twistor Space",
  lineage: "vertex expansion",
  covers: (question) => asksSuperamplitude(question, 1) && question.n <= (largestN[question.k] ?? 0),
  cost: (question) => planCost(planFor(question), superGrading(question.k + 2)),
  size: (question) => sizeOf(planBound(planFor(question), superGrading(question.k + 2))),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    const { n, k } = question;
    const padded = ({ twistor, chi }: SuperPoint): SuperPoint => ({
      twistor,
      chi: Array.from({ length: 4 }, (_, flavour) => [...Array.from(chi[flavour] ?? []), 0, 0]),
    });
    const line = point.lines[0]!.map((twistor, end) => {
      const unit = Array.from({ length: k + 2 }, (_, at) => (at === k + end ? 1 : 0));
      return { twistor, chi: Array.from({ length: 4 }, () => unit) };
    });
    const reference = padded({ twistor: point.referenceTwistor, chi: point.referenceChi });
    const base = [...legsOf(point, n).map(padded), reference, ...line];
    const sum = sumPlan(m, planFor(question), base, k + 2);
    return sum === null ? null : m.negate(sum);
  },
};

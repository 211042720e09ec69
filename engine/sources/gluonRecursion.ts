import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { sizeOf } from "./bound";
import { currentBound } from "./gluonBound";
import { currentAmplitude, polarisations } from "./gluonCurrents";
import { asksComponent, assertCovered } from "./question";
import type { Question, Source } from "./source";
import { anglesOf, squaresOf } from "./spinors";

/** The currents cost n^4; beyond this their size bound is out of proportion to the other sources'. */
const largestN = 12;

/**
 * Gluon components of trees by the off-shell recursion of gluon currents: nothing to do with twistors but the momenta.
 *
 * The scaled currents give 2^(n-2) (-1)^k times the component. The power of two is the scaling of n-1 legs. The sign: on a
 * pole P^2 -> 0 the currents factorise with sum_h e^h(P) e^-h(P) and 2 e^+.e^- = 1; but e(-P) = -e(P), when -P has spinors
 * lambda and -lambdatilde, so the amplitudes made of them factorise with -1, the components with +1 and k = kL + kR + 1.
 * A sign of (-1)^k makes up for it, and the three-leg amplitudes (k = 0 and -1) begin with 1 and -1.
 */
export const gluonRecursion: Source = {
  name: "off-shell gluon recursion",
  reference: "Nucl. Phys. B306 (1988) 759 Recursive calculations for processes with n gluons",
  lineage: "off-shell gluon recursion",
  covers: (question) => asksComponent(question) && question.n <= largestN,
  cost: ({ n }) => 20 * n ** 4,
  size(question) {
    const size = sizeOf(currentBound(question.n, question.negativeLegs ?? []));
    return { ...size, denominatorHeightBits: size.denominatorHeightBits + question.n - 2 };
  },
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    const { n, k } = question;
    const angles = anglesOf(point, n);
    const squares = squaresOf(m, point, n);
    if (squares === null) return null;
    const [r0, r1, r2, r3] = point.referenceTwistor as [number, number, number, number];
    const reference = { angle: [r0, r1], square: [r2, r3] } as const;
    const vectors = polarisations(m, angles, squares, question.negativeLegs ?? [], reference);
    if (vectors === null) return null;
    const scaled = currentAmplitude(m, angles, squares, vectors);
    if (scaled === null) return null;
    const component = m.divide(scaled, m.power(2, n - 2));
    return component === null || k % 2 === 0 ? component : m.negate(component);
  },
};

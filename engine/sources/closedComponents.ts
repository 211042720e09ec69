import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { multiplyBounds, polynomial, reciprocal, sizeOf } from "./bound";
import { asksComponent, assertCovered } from "./question";
import type { Question, Source } from "./source";
import { anglesOf, contractSpinors, cyclicProduct, squaresOf } from "./spinors";

/**
 * Components with two negative or two positive gluons in closed form: <i j>^4 / (<1 2>...<n 1>) for the negative legs i, j, and
 * [i j]^4 / ([1 2]...[n 1]) for the positive ones (with s(a b) = <a b>[a b] and all momenta outgoing no sign is left).
 */
export const closedComponents: Source = {
  name: "closed formula for two unequal helicities",
  reference: "Phys. Rev. Lett. 56 (1986) 2459 Amplitude for n-Gluon Scattering",
  lineage: "closed formula",
  covers: (question) => asksComponent(question) && (question.k === 0 || question.k === question.n - 4),
  cost: ({ n }) => 60 * n,
  size({ n, k }) {
    if (k === 0) return sizeOf(multiplyBounds(polynomial(8, 4), reciprocal("<1 2>...<n 1>", 2 * n, n)));
    // Multiply every lambdatilde by all <a a+1>: entries of degree 3 + 2(n-2) with 6 2^(n-2) monomials at most. The value has
    // weight 8 - 2n in them, so 2n - 8 powers of the product of all <a a+1> stay in the numerator.
    const [degree, bits] = [3 + 2 * (n - 2), Math.log2(6) + n - 2];
    const numerator = polynomial(8 * degree + (2 * n - 8) * 2 * n, 4 * (2 * bits + 1) + (2 * n - 8) * n);
    return sizeOf(multiplyBounds(numerator, reciprocal("[1 2]...[n 1]", 2 * n * degree, n * (2 * bits + 1))));
  },
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    const negativeLegs = question.negativeLegs ?? [];
    const spinors = question.k === 0 ? anglesOf(point, question.n) : squaresOf(m, point, question.n);
    if (spinors === null) return null;
    const legs = spinors.map((_, leg) => leg + 1);
    const pair = legs.filter((leg) => negativeLegs.includes(leg) === (question.k === 0));
    const power = m.power(contractSpinors(m, spinors[pair[0]! - 1]!, spinors[pair[1]! - 1]!), 4);
    return m.divide(power, cyclicProduct(m, spinors));
  },
};

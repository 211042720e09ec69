/**
 * The integrand of the logarithm of k = 0 integrands. With the sums over labelled loops that normalise the integrands,
 * L = 2: M2(12) - M1(1) M1(2); L = 3: M3(123) - sum over a of M1(a) M2(bc) + 2 M1(1) M1(2) M1(3).
 */
import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { addBounds, type Bound, boundOf, multiplyBounds, polynomial, sizeOf } from "./bound";
import { dualConformalIntegrals } from "./dualConformal";
import { chiralPentagons, kermitExpansionReference } from "./oneLoopMhv";
import { assertCovered, inRange } from "./question";
import type { Question, Source } from "./source";
import { doublePentagons } from "./twoLoopMhv";
import { twoLoopVertexExpansion } from "./twoLoopVertex";

/** A product of integrands, each over some of the loops, with an integer coefficient. */
interface Product {
  readonly coefficient: number;
  readonly loops: readonly (readonly number[])[];
}

const expansion: Readonly<Record<number, readonly Product[]>> = {
  2: [
    { coefficient: 1, loops: [[0, 1]] },
    { coefficient: -1, loops: [[0], [1]] },
  ],
  3: [
    { coefficient: 1, loops: [[0, 1, 2]] },
    { coefficient: -1, loops: [[0], [1, 2]] },
    { coefficient: -1, loops: [[1], [0, 2]] },
    { coefficient: -1, loops: [[2], [0, 1]] },
    { coefficient: 2, loops: [[0], [1], [2]] },
  ],
};

const amplitudeAt = (question: Question, loops: number): Question => ({ ...question, target: "amplitude", loops });

/** `integrands[L-1]` is the source of the L-loop integrand. */
const logarithmOf = (name: string, integrands: readonly Source[]): Source => ({
  name,
  reference: [...new Set(integrands.map((source) => source.reference))].join("; "),
  lineage: integrands.at(-1)!.lineage,
  covers: (question) =>
    question.target === "log" &&
    question.negativeLegs === null &&
    question.k === 0 &&
    inRange(question) &&
    expansion[question.loops] !== undefined &&
    question.loops <= integrands.length &&
    integrands.slice(0, question.loops).every((source, at) => source.covers(amplitudeAt(question, at + 1))),
  cost: (question) =>
    expansion[question.loops]!.flatMap(({ loops }) => loops).reduce(
      (sum, { length }) => sum + integrands[length - 1]!.cost(amplitudeAt(question, length)),
      0,
    ),
  size(question) {
    const factor = (loops: readonly number[]): Bound =>
      boundOf(integrands[loops.length - 1]!.size(amplitudeAt(question, loops.length)), loops.join(" "));
    const products = expansion[question.loops]!.map(({ coefficient, loops }) =>
      multiplyBounds(polynomial(0, Math.log2(Math.abs(coefficient))), ...loops.map(factor)),
    );
    return sizeOf(addBounds(products));
  },
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    let sum = 0;
    for (const { coefficient, loops } of expansion[question.loops]!) {
      let product = m.residue(coefficient);
      for (const labels of loops) {
        const lines = labels.map((label) => point.lines[label]!);
        const factor = integrands[labels.length - 1]!.evaluate(
          amplitudeAt(question, labels.length),
          { ...point, loops: labels.length, lines },
          prime,
        );
        if (factor === null) return null;
        product = m.multiply(product, factor);
      }
      sum = m.add(sum, product);
    }
    return sum;
  },
});

export const logarithms: readonly Source[] = [
  logarithmOf("logarithm of local integrands", [chiralPentagons, doublePentagons]),
  logarithmOf("logarithm of vertex expansions", [kermitExpansionReference, twoLoopVertexExpansion]),
  logarithmOf("logarithm of dual-conformal integrals", [
    dualConformalIntegrals,
    dualConformalIntegrals,
    dualConformalIntegrals,
  ]),
];

/** The parity-even part of k = 0 integrands, (M(Z; AB) + M(Z'; A'B'))/2 with the parity image of the point. */
import type { Point, Twistor } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { addBounds, boundOf, multiplyBounds, polynomial, reciprocal, sizeOf } from "./bound";
import { bracket, plane, type Vector } from "./determinants";
import { dualConformalIntegrals } from "./dualConformal";
import { barsOf, bracketBits, loopSteps, stepBound } from "./local";
import { chiralPentagons, kermitExpansion } from "./oneLoopMhv";
import { assertCovered, cyclic, inRange } from "./question";
import type { Question, SizeBound, Source } from "./source";
import { doublePentagons } from "./twoLoopMhv";
import { twoLoopVertexExpansion } from "./twoLoopVertex";

const asksEven = (question: Question): boolean =>
  question.target === "even" && question.negativeLegs === null && question.k === 0 && inRange(question);

const asAmplitude = (question: Question): Question => ({ ...question, target: "amplitude" });

/**
 * W_a = <a-1 a a+1 e_x>, x = 1..4, without its two-brackets, since an integrand has weight 0 in every leg; Z' = (W_4, -W_3, W_2, -W_1),
 * so that lambda and lambdatilde change places. A line goes to the images of (A B e_1) and (A B e_2); its weight -4 is made
 * good by <AB e_1 e_2>^4, the second value.
 */
export function parityImage(m: Modulus, point: Point<number>, n: number): [image: Point<number>, factor: number] {
  const image = (covector: Vector): Twistor<number> => [
    covector[3]!,
    m.negate(covector[2]!),
    covector[1]!,
    m.negate(covector[0]!),
  ];
  const [e1, e2] = [
    [1, 0, 0, 0],
    [0, 1, 0, 0],
  ] as const;
  const twistors = barsOf(m, point.twistors, n).map(image);
  const lines = point.lines.map(([a, b]) => [image(plane(m, a, b, e1)), image(plane(m, a, b, e2))] as const);
  const factor = point.lines.reduce((product, [a, b]) => m.multiply(product, m.power(bracket(m, a, b, e1, e2), 4)), 1);
  return [{ ...point, twistors, lines }, factor];
}

/** Image components are 3x3 minors (degree 3, six monomials), those of lines and of the factor 2x2 minors. */
function evenSize(size: SizeBound, loops: number): SizeBound {
  const imageBits = Math.log2(6);
  const image: SizeBound = {
    degree: 3 * size.degree + 8 * loops,
    denominatorDegree: 3 * size.denominatorDegree,
    heightBits: size.heightBits + size.degree * imageBits + 4 * loops,
    denominatorHeightBits: size.denominatorHeightBits + size.denominatorDegree * imageBits,
  };
  const half = reciprocal("2", 0, 1);
  return sizeOf(multiplyBounds(half, addBounds([boundOf(size, "value"), boundOf(image, "image")])));
}

const evenPartOf = (source: Source): Source => ({
  name: `even part of ${source.name}`,
  reference: source.reference,
  lineage: source.lineage,
  covers: (question) => asksEven(question) && source.covers(asAmplitude(question)),
  cost: (question) => 2 * source.cost(asAmplitude(question)) + 40 * question.n,
  size: (question) => evenSize(source.size(asAmplitude(question)), question.loops),
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    const [image, factor] = parityImage(m, point, question.n);
    const here = source.evaluate(asAmplitude(question), point, prime);
    const there = source.evaluate(asAmplitude(question), image, prime);
    return here === null || there === null ? null : m.divide(m.add(here, m.multiply(factor, there)), 2);
  },
});

/**
 * At one loop, half the sum over non-adjacent i < j of
 * <i-1 i i+1 j><i j-1 j j+1> / (<AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>).
 */
const halfBoxes: Source = {
  name: "half the sum of boxes",
  reference: "arXiv:hep-ph/9403226 One-Loop n-Point Gauge Theory Amplitudes, Unitarity and Collinear Limits",
  lineage: "box expansion",
  covers: (question) => asksEven(question) && question.loops === 1,
  cost: ({ n }) => 140 * n * n + 160 * n,
  size({ n }) {
    const terms = farPairs(n).map(([i, j]) =>
      multiplyBounds(
        polynomial(8, 2 * bracketBits),
        ...[cyclic(i - 1, n), i, cyclic(j - 1, n), j].map((step) => stepBound("AB", step)),
      ),
    );
    return sizeOf(multiplyBounds(reciprocal("2", 0, 1), addBounds(terms)));
  },
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    const { n } = question;
    const leg = (label: number) => point.twistors[cyclic(label, n)]!;
    const steps = loopSteps(m, point.lines[0]!, point.twistors, n);
    if (steps === null) return null;
    let sum = 0;
    for (const [i, j] of farPairs(n)) {
      const numerator = m.multiply(
        bracket(m, leg(i - 1), leg(i), leg(i + 1), leg(j)),
        bracket(m, leg(i), leg(j - 1), leg(j), leg(j + 1)),
      );
      const propagators = m.multiply(
        m.multiply(steps[cyclic(i - 1, n)]!, steps[i]!),
        m.multiply(steps[cyclic(j - 1, n)]!, steps[j]!),
      );
      sum = m.add(sum, m.multiply(numerator, propagators));
    }
    return m.divide(sum, 2);
  },
};

/** Pairs i < j of legs 0..n-1 that are not neighbours. */
const farPairs = (n: number): [number, number][] =>
  Array.from({ length: n }, (_, i) => i).flatMap((i) =>
    Array.from({ length: n }, (_, j): [number, number] => [i, j]).filter(([, j]) => j > i + 1 && j - i < n - 1),
  );

export const evenParts: readonly Source[] = [
  ...[kermitExpansion, chiralPentagons, doublePentagons, twoLoopVertexExpansion, dualConformalIntegrals].map(
    evenPartOf,
  ),
  halfBoxes,
];

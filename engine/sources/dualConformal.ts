import type { Point } from "../kinematics/point";
import { Modulus } from "./arithmetic";
import { addBounds, multiplyBounds, polynomial, reciprocal, sizeOf } from "./bound";
import { bracket, type Vector } from "./determinants";
import { bracketBits } from "./local";
import { asksSuperamplitude, assertCovered } from "./question";
import type { Question, Source } from "./source";

/** A squared dual distance between two of the dual points 1..4 and the loop points AB, CD, EF. */
type Distance = readonly [Dual, Dual];
type Dual = 1 | 2 | 3 | 4 | "AB" | "CD" | "EF";

/** One integral: numerator over denominator, all cyclic images (`rotations`) and all permutations of the loops (`permutations`) added. */
interface Integral {
  readonly numerator: readonly Distance[];
  readonly denominator: readonly Distance[];
  readonly rotations: boolean;
  readonly permutations: boolean;
}

const box: Integral = {
  numerator: [
    [1, 3],
    [2, 4],
  ],
  denominator: [
    [1, "AB"],
    [2, "AB"],
    [3, "AB"],
    [4, "AB"],
  ],
  rotations: false,
  permutations: false,
};

/** In its four rotations: both channels, with AB on either side. */
const doubleBox: Integral = {
  numerator: [
    [1, 3],
    [1, 3],
    [2, 4],
  ],
  denominator: [
    [1, "AB"],
    [2, "AB"],
    [3, "AB"],
    ["AB", "CD"],
    [3, "CD"],
    [4, "CD"],
    [1, "CD"],
  ],
  rotations: true,
  permutations: false,
};

/** The three-loop ladder in one channel and, with the dual points moved by one, in the other. */
const ladder: Integral = {
  numerator: [
    [1, 3],
    [1, 3],
    [1, 3],
    [2, 4],
  ],
  denominator: [
    [1, "AB"],
    [2, "AB"],
    [3, "AB"],
    ["AB", "CD"],
    [1, "CD"],
    [3, "CD"],
    ["CD", "EF"],
    [1, "EF"],
    [3, "EF"],
    [4, "EF"],
  ],
  rotations: false,
  permutations: true,
};
const turnedLadder: Integral = { ...ladder, ...turn(ladder, 1) };

/** The box over a double box with a numerator that holds a loop. */
const tennisCourt: Integral = {
  numerator: [
    [1, 3],
    [2, 4],
    [2, 4],
    [3, "AB"],
  ],
  denominator: [
    [4, "AB"],
    [1, "AB"],
    [2, "AB"],
    ["AB", "CD"],
    ["AB", "EF"],
    [2, "CD"],
    [3, "CD"],
    ["CD", "EF"],
    [4, "EF"],
    [3, "EF"],
  ],
  rotations: true,
  permutations: true,
};

/** The integrals of the four-point integrand at one, two and three loops, all with coefficient 1. */
const integralsByLoops: readonly (readonly Integral[])[] = [
  [],
  [box],
  [doubleBox],
  [ladder, turnedLadder, tennisCourt],
];

const loopNames = ["AB", "CD", "EF"] as const;

function turn({ numerator, denominator }: Pick<Integral, "numerator" | "denominator">, by: number) {
  const moved = (dual: Dual): Dual =>
    typeof dual === "number" ? ((((dual - 1 + by) % 4) + 1) as 1 | 2 | 3 | 4) : dual;
  const all = (distances: readonly Distance[]) => distances.map(([p, q]): Distance => [moved(p), moved(q)]);
  return { numerator: all(numerator), denominator: all(denominator) };
}

function permuteLoops({ numerator, denominator }: Pick<Integral, "numerator" | "denominator">, order: readonly Dual[]) {
  const moved = (dual: Dual): Dual => (typeof dual === "number" ? dual : order[loopNames.indexOf(dual)]!);
  const all = (distances: readonly Distance[]) => distances.map(([p, q]): Distance => [moved(p), moved(q)]);
  return { numerator: all(numerator), denominator: all(denominator) };
}

const permutations = <T>(items: readonly T[]): T[][] =>
  items.length === 0
    ? [[]]
    : items.flatMap((item, at) => permutations(items.toSpliced(at, 1)).map((rest) => [item, ...rest]));

/** Every term of the integrand, rotations and permutations written out. */
function termsAt(loops: number): Pick<Integral, "numerator" | "denominator">[] {
  return integralsByLoops[loops]!.flatMap((integral) => {
    const turned = (integral.rotations ? [0, 1, 2, 3] : [0]).map((by) => turn(integral, by));
    if (!integral.permutations) return turned;
    return permutations(loopNames.slice(0, loops)).flatMap((order) => turned.map((term) => permuteLoops(term, order)));
  });
}

/**
 * The four-point integrand at one, two and three loops from dual-conformal integrals. A distance between the points of lines
 * P and Q is <P Q> over two-brackets; those cancel with the measure, so the four-brackets alone are multiplied.
 */
export const dualConformalIntegrals: Source = {
  name: "dual-conformal integrals",
  reference:
    "arXiv:hep-th/0505205 Iteration of Planar Amplitudes in Maximally Supersymmetric Yang-Mills Theory at Three Loops and Beyond",
  lineage: "dual-conformal integrals",
  covers: ({ loops, ...question }) =>
    [1, 2, 3].includes(loops) && asksSuperamplitude({ ...question, loops }, loops) && question.n === 4,
  cost: ({ loops }) => termsAt(loops).length * 1000,
  size({ loops }) {
    const terms = termsAt(loops).map(({ numerator, denominator }) =>
      multiplyBounds(
        polynomial(4 * numerator.length, bracketBits * numerator.length),
        ...denominator.map((pair) => reciprocal([...pair].map(String).sort().join(" "), 4, bracketBits)),
      ),
    );
    return sizeOf(addBounds(terms));
  },
  evaluate(question: Question, point: Point<number>, prime: number): number | null {
    assertCovered(this.name, this.covers(question), question);
    const m = new Modulus(prime);
    const lineOf = (dual: Dual): readonly [Vector, Vector] =>
      typeof dual === "number"
        ? [point.twistors[(dual + 2) % 4]!, point.twistors[dual - 1]!]
        : point.lines[loopNames.indexOf(dual)]!;
    const product = (distances: readonly Distance[]) =>
      distances.reduce((value, [p, q]) => m.multiply(value, bracket(m, ...lineOf(p), ...lineOf(q))), 1);
    let sum = 0;
    for (const { numerator, denominator } of termsAt(question.loops)) {
      const term = m.divide(product(numerator), product(denominator));
      if (term === null) return null;
      sum = m.add(sum, term);
    }
    return sum;
  },
};

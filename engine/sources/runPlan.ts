/** Evaluates a plan at one point modulo a 31-bit prime. */
import type { Modulus } from "./arithmetic";
import { bracket, contractAt, determinant, lineThroughPlanes, plane, planeAt } from "./determinants";
import type { Plan } from "./plan";

/** A point with its Grassmann part: four components, then for each flavour a vector of `dimension` numbers. */
export interface SuperPoint {
  readonly twistor: ArrayLike<number>;
  readonly chi: readonly ArrayLike<number>[];
}

/** What the invariants and loop factors of a plan are at one point. */
export interface PlanValues {
  /** Five-bracket products of the invariants, then six-bracket products of the kermits: the denominators. */
  readonly denominators: Int32Array;
  /** `flavours` rows of `dimension` numbers for each invariant: the argument of its delta function. */
  readonly rows: Int32Array;
  /** Squares in the numerators of the kermits. */
  readonly numerators: Int32Array;
}

/** @param base the plan's base points, all with the same number of flavours and the same dimension. */
export function evaluatePlan(m: Modulus, plan: Plan, base: readonly SuperPoint[], dimension: number): PlanValues {
  if (base.length !== plan.basePoints) throw new Error(`plan: expected ${plan.basePoints} points, got ${base.length}`);
  const flavours = base[0]!.chi.length;
  const width = flavours * dimension;
  const stride = 4 + width;
  const points = new Int32Array((plan.basePoints + plan.meets.length) * stride);
  base.forEach((point, index) => {
    points.set(Array.from(point.twistor), index * stride);
    point.chi.forEach((row, flavour) => {
      points.set(Array.from(row), index * stride + 4 + flavour * dimension);
    });
  });
  fillMeets(m, plan, points, stride);

  const rows = new Int32Array(plan.invariants.length * width);
  const denominators = new Int32Array(plan.invariants.length + plan.kermits.length);
  const fives = new Int32Array(5);
  const sum = new LinearCombination(m, points, 5);
  for (let index = 0; index < plan.invariants.length; index++) {
    const labels = plan.invariants[index]!;
    denominators[index] = fiveBrackets(m, points, labels, stride, fives);
    for (let i = 0; i < 5; i++) sum.set(i, fives[i]!, labels[i]! * stride);
    sum.write(rows, index * width, 4, stride);
  }

  const numerators = new Int32Array(plan.kermits.length);
  plan.kermits.forEach((labels, index) => {
    const value = kermit(
      m,
      labels.map((label) => points.subarray(label * stride, label * stride + 4)),
    );
    numerators[index] = value.numerator;
    denominators[plan.invariants.length + index] = value.denominator;
  });
  return { denominators, rows, numerators };
}

/**
 * The sum of the plan's terms: each the product of its kermits and, over the flavours, of the determinants of its delta
 * rows (below the rows `above`, as many as are missing to `dimension`; one flavour stands for four equal ones).
 * Null where a denominator vanishes.
 */
export function sumPlan(
  m: Modulus,
  plan: Plan,
  base: readonly SuperPoint[],
  dimension: number,
  above: readonly (readonly number[])[] = [],
): number | null {
  const { denominators, rows, numerators } = evaluatePlan(m, plan, base, dimension);
  if (!m.invertAll(denominators, denominators.length)) return null;
  const flavours = base[0]!.chi.length;
  const width = flavours * dimension;
  const matrixRows = new Int32Array(rows.length + above.length * dimension);
  matrixRows.set(rows);
  above.forEach((row, index) => {
    matrixRows.set(row, rows.length + index * dimension);
  });
  const aboveOffsets = above.map((_, index) => rows.length + index * dimension);

  let sum = 0;
  for (const term of plan.terms) {
    let value = 1;
    for (const index of term.kermits) {
      value = m.multiply(value, m.multiply(numerators[index]!, denominators[plan.invariants.length + index]!));
    }
    for (const index of term.invariants) value = m.multiply(value, denominators[index]!);
    for (let flavour = 0; flavour < flavours; flavour++) {
      const offsets = term.invariants.map((index) => index * width + flavour * dimension);
      const minor = determinant(m, matrixRows, [...aboveOffsets, ...offsets]);
      value = m.multiply(value, flavours === 1 ? m.power(minor, 4) : minor);
    }
    sum = m.add(sum, value);
  }
  return sum;
}

/** (a b) cap (c d e) = Z_a <b c d e> - Z_b <a c d e> = -(Z_c <d e a b> + Z_d <e c a b> + Z_e <c d a b>), Grassmann parts likewise. */
function fillMeets(m: Modulus, plan: Plan, points: Int32Array, stride: number): void {
  const covector = new Int32Array(4);
  const onLine = new LinearCombination(m, points, 2);
  const onPlane = new LinearCombination(m, points, 3);
  const at = (point: number) => points.subarray(point * stride, point * stride + 4);
  for (let index = 0; index < plan.meets.length; index++) {
    const { line, plane: corners, part } = plan.meets[index]!;
    const [a, b] = [line[0] * stride, line[1] * stride];
    const [c, d, e] = [corners[0] * stride, corners[1] * stride, corners[2] * stride];
    planeAt(m, points, c, d, e, covector);
    onLine.set(0, contractAt(m, points, b, covector), a);
    onLine.set(1, m.negate(contractAt(m, points, a, covector)), b);
    const target = (plan.basePoints + index) * stride;
    onLine.write(points, target, 0, part === "line" ? stride : 4);
    if (part === "line") continue;
    const [p, q] = [at(line[0]), at(line[1])];
    const [u, v, w] = [at(corners[0]), at(corners[1]), at(corners[2])];
    onPlane.set(0, m.negate(bracket(m, v, w, p, q)), c);
    onPlane.set(1, m.negate(bracket(m, w, u, p, q)), d);
    onPlane.set(2, m.negate(bracket(m, u, v, p, q)), e);
    onPlane.write(points, target + 4, 4, stride);
  }
}

/**
 * sum of scalars times vectors that lie in one array. Scalars are split into 15 high and 16 low bits, so that sums of a few products
 * are exact in doubles and are reduced once.
 */
class LinearCombination {
  private readonly high: Float64Array;
  private readonly low: Float64Array;
  private readonly from: Int32Array;

  constructor(
    private readonly m: Modulus,
    private readonly vectors: Int32Array,
    private readonly length: number,
  ) {
    this.high = new Float64Array(length);
    this.low = new Float64Array(length);
    this.from = new Int32Array(length);
  }

  set(place: number, scalar: number, from: number): void {
    this.high[place] = scalar >>> 16;
    this.low[place] = scalar & 0xffff;
    this.from[place] = from;
  }

  /** Entries first .. end-1 of the combination to out[at], out[at+1], ... */
  write(out: Int32Array, at: number, first: number, end: number): void {
    const { high, low, from, vectors, length, m } = this;
    for (let i = first; i < end; i++) {
      let above = 0;
      let below = 0;
      for (let place = 0; place < length; place++) {
        const entry = vectors[from[place]! + i]!;
        above += high[place]! * entry;
        below += low[place]! * entry;
      }
      out[at + i - first] = m.reduceSplit(above, below);
    }
  }
}

/**
 * For points a b c d e: entry i of `out` is the coefficient of point i in the delta function, the cyclic four-bracket of
 * the other four; returns their product. The ten 2x2 minors of the first and of the last two components are shared.
 */
function fiveBrackets(
  m: Modulus,
  points: Int32Array,
  labels: readonly number[],
  stride: number,
  out: Int32Array,
): number {
  for (let half = 0; half < 2; half++) {
    let number = 10 * half;
    for (let i = 0; i < 4; i++) {
      const p = labels[i]! * stride + 2 * half;
      for (let j = i + 1; j < 5; j++) {
        const q = labels[j]! * stride + 2 * half;
        minors[number++] = m.cross(points[p]!, points[q + 1]!, points[p + 1]!, points[q]!);
      }
    }
  }
  // <bcde>, <cdea>, <deab>, <eabc>, <abcd>; moving one entry past three others changes the sign, past two does not.
  out[0] = fourOf(m, 4, 5, 6, 7, 8, 9);
  out[1] = m.negate(fourOf(m, 1, 2, 3, 7, 8, 9));
  out[2] = fourOf(m, 0, 2, 3, 5, 6, 9);
  out[3] = m.negate(fourOf(m, 0, 1, 3, 4, 6, 8));
  out[4] = fourOf(m, 0, 1, 2, 4, 5, 7);
  let product = out[0]!;
  for (let i = 1; i < 5; i++) product = m.multiply(product, out[i]!);
  return product;
}

/** The ten minors of the first and the ten of the last two components: 01, 02, 03, 04, 12, 13, 14, 23, 24, 34. */
const minors = new Int32Array(20);

/** <abcd> from the numbers of its six minors. */
function fourOf(m: Modulus, ab: number, ac: number, ad: number, bc: number, bd: number, cd: number): number {
  const outer = m.add(m.multiply(minors[ab]!, minors[10 + cd]!), m.multiply(minors[cd]!, minors[10 + ab]!));
  const middle = m.add(m.multiply(minors[ac]!, minors[10 + bd]!), m.multiply(minors[bd]!, minors[10 + ac]!));
  const inner = m.add(m.multiply(minors[ad]!, minors[10 + bc]!), m.multiply(minors[bc]!, minors[10 + ad]!));
  return m.add(m.subtract(outer, middle), inner);
}

/** Numerator and denominator of <AB (a b c) cap (a d e)>^2 / (<AB a b><AB b c><AB c a><AB a d><AB d e><AB e a>). */
export function kermit(m: Modulus, points: readonly ArrayLike<number>[]): { numerator: number; denominator: number } {
  const [lineA, lineB, a, b, c, d, e] = points as readonly [
    ArrayLike<number>,
    ArrayLike<number>,
    ArrayLike<number>,
    ArrayLike<number>,
    ArrayLike<number>,
    ArrayLike<number>,
    ArrayLike<number>,
  ];
  const root = lineThroughPlanes(m, lineA, lineB, plane(m, a, b, c), plane(m, a, d, e));
  const pairs = [
    [a, b],
    [b, c],
    [c, a],
    [a, d],
    [d, e],
    [e, a],
  ] as const;
  const denominator = pairs.reduce((product, [x, y]) => m.multiply(product, bracket(m, lineA, lineB, x, y)), 1);
  return { numerator: m.multiply(root, root), denominator };
}

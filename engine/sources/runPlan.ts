/** Evaluates a plan at one point modulo a 31-bit prime. */
import type { Modulus } from "./arithmetic";
import { bracket, contract, determinant, lineThroughPlanes, plane } from "./determinants";
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
  const twistors = Array.from({ length: points.length / stride }, (_, i) =>
    points.subarray(i * stride, i * stride + 4),
  );
  fillMeets(m, plan, points, twistors, stride);

  const rows = new Int32Array(plan.invariants.length * width);
  const denominators = new Int32Array(plan.invariants.length + plan.kermits.length);
  const fives = new Int32Array(5);
  plan.invariants.forEach((labels, index) => {
    denominators[index] = fiveBrackets(m, points, labels, stride, fives);
    const start = index * width;
    for (let column = 0; column < width; column++) {
      let sum = 0;
      for (let i = 0; i < 5; i++) sum = m.add(sum, m.multiply(fives[i]!, points[labels[i]! * stride + 4 + column]!));
      rows[start + column] = sum;
    }
  });

  const numerators = new Int32Array(plan.kermits.length);
  plan.kermits.forEach((labels, index) => {
    const value = kermit(
      m,
      labels.map((label) => twistors[label]!),
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
function fillMeets(m: Modulus, plan: Plan, points: Int32Array, twistors: readonly Int32Array[], stride: number): void {
  const planes = new Map<string, number[]>();
  plan.meets.forEach(({ line: [a, b], plane: [c, d, e], part }, index) => {
    const key = `${c} ${d} ${e}`;
    let covector = planes.get(key);
    if (covector === undefined) {
      covector = plane(m, twistors[c]!, twistors[d]!, twistors[e]!);
      planes.set(key, covector);
    }
    const alongA = contract(m, twistors[b]!, covector);
    const alongB = contract(m, twistors[a]!, covector);
    const target = (plan.basePoints + index) * stride;
    const columns = part === "line" ? stride : 4;
    for (let i = 0; i < columns; i++) {
      points[target + i] = m.cross(alongA, points[a * stride + i]!, alongB, points[b * stride + i]!);
    }
    if (part === "line") return;
    const weights = [
      bracket(m, twistors[d]!, twistors[e]!, twistors[a]!, twistors[b]!),
      bracket(m, twistors[e]!, twistors[c]!, twistors[a]!, twistors[b]!),
      bracket(m, twistors[c]!, twistors[d]!, twistors[a]!, twistors[b]!),
    ];
    for (let i = 4; i < stride; i++) {
      let sum = 0;
      for (const [at, corner] of [c, d, e].entries()) {
        sum = m.add(sum, m.multiply(weights[at]!, points[corner * stride + i]!));
      }
      points[target + i] = m.negate(sum);
    }
  });
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
  const front = (i: number, j: number) => {
    const [p, q] = [labels[i]! * stride, labels[j]! * stride];
    return m.cross(points[p]!, points[q + 1]!, points[p + 1]!, points[q]!);
  };
  const back = (i: number, j: number) => {
    const [p, q] = [labels[i]! * stride + 2, labels[j]! * stride + 2];
    return m.cross(points[p]!, points[q + 1]!, points[p + 1]!, points[q]!);
  };
  // Minor number 4i + j - (i+1)(i+2)/2 for i < j.
  const fronts = [
    front(0, 1),
    front(0, 2),
    front(0, 3),
    front(0, 4),
    front(1, 2),
    front(1, 3),
    front(1, 4),
    front(2, 3),
    front(2, 4),
    front(3, 4),
  ];
  const backs = [
    back(0, 1),
    back(0, 2),
    back(0, 3),
    back(0, 4),
    back(1, 2),
    back(1, 3),
    back(1, 4),
    back(2, 3),
    back(2, 4),
    back(3, 4),
  ];
  const four = (ab: number, ac: number, ad: number, bc: number, bd: number, cd: number) => {
    const outer = m.add(m.multiply(fronts[ab]!, backs[cd]!), m.multiply(fronts[cd]!, backs[ab]!));
    const middle = m.add(m.multiply(fronts[ac]!, backs[bd]!), m.multiply(fronts[bd]!, backs[ac]!));
    const inner = m.add(m.multiply(fronts[ad]!, backs[bc]!), m.multiply(fronts[bc]!, backs[ad]!));
    return m.add(m.subtract(outer, middle), inner);
  };
  // <bcde>, <cdea>, <deab>, <eabc>, <abcd>; moving one entry past three others changes the sign, past two does not.
  out[0] = four(4, 5, 6, 7, 8, 9);
  out[1] = m.negate(four(1, 2, 3, 7, 8, 9));
  out[2] = four(0, 2, 3, 5, 6, 9);
  out[3] = m.negate(four(0, 1, 3, 4, 6, 8));
  out[4] = four(0, 1, 2, 4, 5, 7);
  let product = out[0]!;
  for (let i = 1; i < 5; i++) product = m.multiply(product, out[i]!);
  return product;
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

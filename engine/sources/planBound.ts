/** Upper bounds on the value of a plan, and the number of field operations it takes. */
import { addBounds, type Bound, multiplyBounds, polynomial, powerBound, reciprocal } from "./bound";
import type { Plan } from "./plan";

/** Degree and log2 of the sum of absolute coefficients of the components of a point and of its Grassmann part. */
export interface PointSize {
  readonly degree: number;
  readonly bits: number;
  readonly chiDegree: number;
  readonly chiBits: number;
}

/** What the determinants of a plan are made of: four flavours, or one to the fourth power, over some rows from outside. */
export interface Grading {
  readonly flavours: 1 | 4;
  readonly dimension: number;
  /** Degree and bits of every Grassmann component of the base points, and of every entry of the rows above the delta rows. */
  readonly chiDegree: number;
  readonly chiBits: number;
  readonly rowsAbove: number;
  readonly rowDegree: number;
  readonly rowBits: number;
}

/** A superamplitude: every chi is a variable of its own. */
export const superGrading = (k: number): Grading => ({
  flavours: 4,
  dimension: k,
  chiDegree: 1,
  chiBits: 0,
  rowsAbove: 0,
  rowDegree: 0,
  rowBits: 0,
});

export const log2Factorial = (x: number): number => (x < 2 ? 0 : Math.log2(x) + log2Factorial(x - 1));
const bracketBits = Math.log2(24);

/** The bound of the plan's value, terms over the least common multiple of the distinct brackets in their denominators. */
export function planBound(plan: Plan, grading: Grading): Bound {
  const points = pointSizes(plan, grading);
  const over = (...labels: number[]): Bound => {
    const [degree, bits] = bracketSize(points, labels);
    return reciprocal(`<${[...labels].sort((x, y) => x - y)}>`, degree, bits);
  };
  const invariantDenominators = plan.invariants.map(([a, b, c, d, e]) =>
    multiplyBounds(over(a, b, c, d), over(b, c, d, e), over(c, d, e, a), over(d, e, a, b), over(e, a, b, c)),
  );
  const deltaRows = plan.invariants.map((labels) => {
    const { degree, bits } = rowSize(points, labels);
    return polynomial(degree, bits);
  });
  const above = polynomial(grading.rowsAbove * grading.rowDegree, grading.rowsAbove * grading.rowBits);
  const permutations = polynomial(0, log2Factorial(grading.dimension));
  const kermits = plan.kermits.map(([p, q, a, b, c, d, e]) => {
    const [first, firstBits] = [p, q, a, a, b, c, d, e].reduce(
      ([degree, bits], label) => [degree + points[label]!.degree, bits + points[label]!.bits],
      [0, 0],
    );
    return multiplyBounds(
      powerBound(polynomial(first, firstBits + 1 + 2 * bracketBits), 2),
      ...[over(p, q, a, b), over(p, q, b, c), over(p, q, a, c), over(p, q, a, d), over(p, q, d, e), over(p, q, a, e)],
    );
  });
  return addBounds(
    plan.terms.map((term) => {
      const determinant = multiplyBounds(permutations, above, ...term.invariants.map((index) => deltaRows[index]!));
      return multiplyBounds(
        powerBound(determinant, 4),
        ...term.invariants.map((index) => invariantDenominators[index]!),
        ...term.kermits.map((index) => kermits[index]!),
      );
    }),
  );
}

/** Field operations for one point, counted from above: the products, each with at most one sum. */
export function planCost(plan: Plan, grading: Grading): number {
  const width = grading.flavours * grading.dimension;
  const size = grading.dimension;
  const determinant = size < 3 ? 2 : size * 2 ** (size - 1);
  const products =
    plan.meets.length * (140 + 5 * width) +
    plan.invariants.length * (80 + 5 * width) +
    plan.kermits.length * 320 +
    plan.terms.length * (grading.flavours * (determinant + 3) + 2 * size + 4);
  return 2 * products;
}

/** Degree and bits of each component of the argument of an invariant's delta function. */
export function rowSize(points: readonly PointSize[], labels: readonly number[]): { degree: number; bits: number } {
  let [all, allBits] = [0, 0];
  for (const label of labels) {
    all += points[label]!.degree;
    allBits += points[label]!.bits;
  }
  let [degree, bits] = [0, 0];
  for (const label of labels) {
    const point = points[label]!;
    degree = Math.max(degree, all - point.degree + point.chiDegree);
    bits = Math.max(bits, allBits - point.bits + point.chiBits);
  }
  return { degree, bits: bits + Math.log2(5) + bracketBits };
}

export function pointSizes(plan: Plan, grading: Grading): PointSize[] {
  const points: PointSize[] = Array.from({ length: plan.basePoints }, () => ({
    degree: 1,
    bits: 0,
    chiDegree: grading.chiDegree,
    chiBits: grading.chiBits,
  }));
  for (const { line, plane, part } of plan.meets) {
    const all = [...line, ...plane].map((label) => points[label]!);
    const degree = all.reduce((sum, point) => sum + point.degree, 0);
    const bits = all.reduce((sum, point) => sum + point.bits, 0);
    const carriers = (part === "line" ? line : plane).map((label) => points[label]!);
    points.push({
      degree,
      bits: bits + Math.log2(2) + bracketBits,
      chiDegree: Math.max(...carriers.map((point) => degree - point.degree + point.chiDegree)),
      chiBits:
        Math.max(...carriers.map((point) => bits - point.bits + point.chiBits)) +
        Math.log2(carriers.length) +
        bracketBits,
    });
  }
  return points;
}

export function bracketSize(points: readonly PointSize[], labels: readonly number[]): [degree: number, bits: number] {
  return labels.reduce<[number, number]>(
    ([degree, bits], label) => [degree + points[label]!.degree, bits + points[label]!.bits],
    [0, bracketBits],
  );
}

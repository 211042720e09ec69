/**
 * Gluon components of superamplitude forms. With theta_1 = 0, theta_{a+1} = theta_a - lambda_a etatilde_a, chi_a = <theta_a lambda_a>
 * and unit vectors of F^(k+2) as etatilde of the k+2 negative legs, the component is the sum over terms of coefficient times
 * det(q-row 1, q-row 2, k delta rows)^4 over <1 2><2 3>...<n 1>, the q-rows being sum_a lambda_a etatilde_a (0807.1095, "Dual
 * superconformal symmetry of scattering amplitudes in N=4 super-Yang-Mills theory", for the superamplitude in these variables).
 *
 * The two q-rows are the same in every term, so they are eliminated once: with negative legs i, j of <i j> != 0,
 * det(q1, q2, r1, ..., rk) = +-<i j> det(r1', ..., rk'), r' the entries of r other than i, j, each less (r_i <m j> + r_j <i m>)/<i j>.
 * A component is then an ordinary value of the form, at the point with these chi, times a factor.
 */
import type { Field } from "../fields";
import { angle, type Point } from "../kinematics";

/** Where a superamplitude form is evaluated for a component, and what its value is multiplied by. */
export interface HelicityPoint<T> {
  readonly point: Point<T>;
  /** <i j>^4 / (<1 2>...<n 1>). */
  readonly factor: T;
}

/** Two of the negative legs (places in the list) with <i j> != 0, the largest by `size` where numbers have one; null for none. */
function pickPair<T>(
  field: Field<T>,
  point: Point<T>,
  negativeLegs: readonly number[],
  size: (x: T) => number,
): readonly [number, number] | null {
  let best: readonly [number, number] | null = null;
  let largest = 0;
  for (let i = 0; i < negativeLegs.length; i++) {
    for (let j = i + 1; j < negativeLegs.length; j++) {
      const value = angle(field, point.twistors[negativeLegs[i]! - 1]!, point.twistors[negativeLegs[j]! - 1]!);
      if (field.isZero(value) || !(size(value) > largest)) continue;
      [best, largest] = [[i, j], size(value)];
    }
  }
  return best;
}

/**
 * The point that a superamplitude form of (n, k) is evaluated at for the component with the given k+2 negative legs.
 * Its reference twistor has Grassmann part zero; whatever chi `point` had is not read.
 * @param negativeLegs k+2 labels, ascending, 1..n
 * @param size how large a number is, where that matters for rounding; all the same for exact numbers
 * @returns null where two neighbours' lambdas are parallel, or those of all negative legs
 */
export function helicityPoint<T>(
  field: Field<T>,
  point: Point<T>,
  negativeLegs: readonly number[],
  size: (x: T) => number = () => 1,
): HelicityPoint<T> | null {
  const k = negativeLegs.length - 2;
  if (k !== point.k)
    throw new Error(`helicityPoint: expected ${point.k + 2} negative legs, got ${negativeLegs.length}`);
  const { add, multiply, negate, subtract, zero } = field;
  const between = (a: number, b: number): T => angle(field, point.twistors[a - 1]!, point.twistors[b - 1]!);
  let cycle = field.one;
  for (let a = 1; a <= point.n; a++) cycle = multiply(cycle, between(a, (a % point.n) + 1));
  const denominator = field.inverse(cycle);
  const pair = pickPair(field, point, negativeLegs, size);
  if (denominator === null || pair === null) return null;
  const [i, j] = [negativeLegs[pair[0]]!, negativeLegs[pair[1]]!];
  const bracket = between(i, j);
  const inverse = field.inverse(bracket);
  if (inverse === null) return null;
  const others = negativeLegs.filter((m) => m !== i && m !== j);
  const weights = others.map((m) => [multiply(between(m, j), inverse), multiply(between(i, m), inverse)] as const);
  const chi = point.twistors.map((_, index) => {
    // chi_a = -<m a> in the place of each negative leg m before a.
    const entry = (m: number): T => (m < index + 1 ? negate(between(m, index + 1)) : zero);
    const row = others.map((m, place) => {
      const [ofI, ofJ] = weights[place]!;
      return subtract(entry(m), add(multiply(entry(i), ofI), multiply(entry(j), ofJ)));
    });
    return [row, row, row, row];
  });
  const nothing = new Array<T>(k).fill(zero);
  const square = multiply(bracket, bracket);
  return {
    point: { ...point, chi, referenceChi: [nothing, nothing, nothing, nothing] },
    factor: multiply(denominator, multiply(square, square)),
  };
}

const SIGNS = /^[+-]+$/;

/**
 * The negative legs of a helicity pattern, "--+-++" (a minus sign U+2212 counts as one), ascending; null where it is none for n legs.
 */
export function readHelicities(pattern: string, n: number): number[] | null {
  const signs = pattern.trim().replace(/\u2212/g, "-");
  if (!SIGNS.test(signs) || signs.length !== n) return null;
  return [...signs].flatMap((sign, a) => (sign === "-" ? [a + 1] : []));
}

/** The pattern of negative legs, "--+-++". */
export const helicityPattern = (negativeLegs: readonly number[], n: number): string =>
  Array.from({ length: n }, (_, a) => (negativeLegs.includes(a + 1) ? "-" : "+")).join("");

/** Every choice of k+2 negative legs of n, in lexicographic order; there are C(n, k+2). */
export function allHelicities(n: number, k: number): number[][] {
  const extend = (from: number, missing: number): number[][] =>
    missing === 0
      ? [[]]
      : Array.from({ length: Math.max(0, n - from - missing + 2) }, (_, d) => from + d).flatMap((leg) =>
          extend(leg + 1, missing - 1).map((rest) => [leg, ...rest]),
        );
  return extend(1, k + 2);
}

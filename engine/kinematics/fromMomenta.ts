/**
 * From momenta to spinors and momentum twistors, and back.
 *
 * Spinors of p are lambda and lambdatilde with p = lambda lambdatilde, free up to lambda -> t lambda, lambdatilde -> lambdatilde/t.
 * Here t is fixed as follows, and with it the phase of every amplitude (a leg of helicity -1 takes t^2, one of +1 takes 1/t^2):
 * - doubles: both have the same length, and the first component of lambda that is not zero (above 2^-200 of the other) is positive. For real momenta in (1,3)
 *   then lambdatilde = +conj(lambda) for positive energy and -conj(lambda) for negative: p and -p share lambda, and
 *   lambdatilde changes sign. So |<a b>|^2 = |s(a b)|.
 * - exact numbers: the first component of lambda that is not zero is 1; no square root is needed.
 *
 * Dual points are x_1 = 0, x_{a+1} = x_a + p_a, and mu_a = x_a lambda_a = x_{a+1} lambda_a (each column of x in a two-bracket with
 * lambda), in which orientation the formula of `lambdaTilde` gives lambdatilde back (0905.1473).
 */
import { type Complex, complexDoubles, type Field, magnitude } from "../fields";
import { bispinorOf, type FourMomentum, fourMomentumOf, type Spacetime } from "./momenta";
import type { Twistor } from "./point";
import { lambdaOf, lambdaTilde, type Momentum, type Spinor, spinorBracket } from "./spinors";

/** p = lambda tilde. */
export interface LegSpinors<T> {
  readonly lambda: Spinor<T>;
  readonly tilde: Spinor<T>;
}

const column = <T>(p: Momentum<T>, j: 0 | 1): Spinor<T> => [p[0][j], p[1][j]];

/** The spinors with first non-zero component of lambda 1, of a matrix of determinant zero; null for the zero matrix. */
export function rationalSpinors<T>(field: Field<T>, p: Momentum<T>): LegSpinors<T> | null {
  for (const i of [0, 1] as const) {
    for (const j of [0, 1] as const) {
      const inverse = field.inverse(p[i][j]);
      if (inverse === null) continue;
      const [first, second] = column(p, j);
      return { lambda: [field.multiply(first, inverse), field.multiply(second, inverse)], tilde: p[i] };
    }
  }
  return null;
}

const length = ([a, b]: Spinor<Complex<number>>): number => Math.hypot(a.re, a.im, b.re, b.im);

/** A first component of lambda below this share of the second is zero: its phase would be that of a rounding error. */
const NOTHING = 2 ** -200;

/**
 * The spinors of equal length with first non-zero component of lambda positive; null for the zero matrix. They are read off the row
 * and the column of the largest entry, so that a small deviation of det p from zero stays small in both.
 */
export function balancedSpinors(p: Momentum<Complex<number>>): LegSpinors<Complex<number>> | null {
  const { multiply, inverse } = complexDoubles;
  let [row, col, largest] = [0, 0, 0] as [0 | 1, 0 | 1, number];
  for (const i of [0, 1] as const) {
    for (const j of [0, 1] as const) {
      const size = magnitude(p[i][j]);
      if (size > largest) [row, col, largest] = [i, j, size];
    }
  }
  const pivot = inverse(p[row][col]);
  if (pivot === null) return null;
  const lambda = column(p, col);
  const tilde: Spinor<Complex<number>> = [multiply(p[row][0], pivot), multiply(p[row][1], pivot)];
  const lead = magnitude(lambda[0]) <= NOTHING * magnitude(lambda[1]) ? lambda[1] : lambda[0];
  const scale = Math.sqrt(length(tilde) / length(lambda));
  const size = magnitude(lead);
  const turn = { re: (scale * lead.re) / size, im: (-scale * lead.im) / size };
  const back = inverse(turn);
  if (back === null) return null;
  return {
    lambda: [multiply(lambda[0], turn), multiply(lambda[1], turn)],
    tilde: [multiply(tilde[0], back), multiply(tilde[1], back)],
  };
}

/**
 * The momentum twistors of legs in order; their momenta are taken to add up to zero.
 * @returns as many twistors as legs, (lambda, mu)
 */
export function twistorsOfSpinors<T>(field: Field<T>, legs: readonly LegSpinors<T>[]): Twistor<T>[] {
  const { add, multiply, zero } = field;
  let x: Momentum<T> = [
    [zero, zero],
    [zero, zero],
  ];
  return legs.map(({ lambda, tilde }) => {
    const mu = ([0, 1] as const).map((j) => spinorBracket(field, column(x, j), lambda));
    const entry = (i: 0 | 1, j: 0 | 1): T => add(x[i][j], multiply(lambda[i], tilde[j]));
    x = [
      [entry(0, 0), entry(0, 1)],
      [entry(1, 0), entry(1, 1)],
    ];
    return [...lambda, ...mu];
  });
}

/** The spinors of momentum twistors; null where two neighbours have parallel lambdas. */
export function spinorsOfTwistors<T>(field: Field<T>, twistors: readonly Twistor<T>[]): LegSpinors<T>[] | null {
  const legs: LegSpinors<T>[] = [];
  for (const [a, z] of twistors.entries()) {
    const tilde = lambdaTilde(field, twistors, a + 1);
    if (tilde === null) return null;
    legs.push({ lambda: lambdaOf(z), tilde });
  }
  return legs;
}

/** The four-momenta of momentum twistors, massless and adding up to zero; null where two neighbours have parallel lambdas. */
export function momentaOfTwistors<T>(
  space: Spacetime<T>,
  twistors: readonly Twistor<T>[],
): readonly FourMomentum<T>[] | null {
  const { multiply } = space.field;
  const legs = spinorsOfTwistors(space.field, twistors);
  return (
    legs?.map(({ lambda: [a, b], tilde: [c, d] }) =>
      fourMomentumOf(space, [
        [multiply(a, c), multiply(a, d)],
        [multiply(b, c), multiply(b, d)],
      ]),
    ) ?? null
  );
}

/**
 * The momentum twistors of momenta that passed `checkMomenta`.
 * @param spinors `balancedSpinors` for doubles, `rationalSpinors` for exact numbers
 * @throws Error for a leg without momentum
 */
export function twistorsOfMomenta<T>(
  space: Spacetime<T>,
  momenta: readonly FourMomentum<T>[],
  spinors: (p: Momentum<T>) => LegSpinors<T> | null,
): Twistor<T>[] {
  const legs = momenta.map((p, a) => {
    const found = spinors(bispinorOf(space, p));
    if (found === null) throw new Error(`twistorsOfMomenta: expected leg ${a + 1} to have a momentum, got zero`);
    return found;
  });
  return twistorsOfSpinors(space.field, legs);
}

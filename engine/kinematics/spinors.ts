/**
 * Spinors of a point: lambda and mu are the first and last two components of Z, momenta are p_a = lambda_a lambdatilde_a, and
 * p^2 = det p, so that s(a b) = <a b>[a b].
 */
import type { Field } from "../fields";
import { type Line, lineBracket, lineThrough } from "./incidence";
import { cyclicRange, wrapLabel } from "./labels";
import type { Twistor } from "./point";

export type Spinor<T> = readonly [T, T];

/** p[alpha][alphadot] = lambda_alpha lambdatilde_alphadot. */
export type Momentum<T> = readonly [Spinor<T>, Spinor<T>];

export const lambdaOf = <T>(z: Twistor<T>): Spinor<T> => [z[0]!, z[1]!];
export const muOf = <T>(z: Twistor<T>): Spinor<T> => [z[2]!, z[3]!];

/** a_1 b_2 - a_2 b_1: `<a b>` for angle spinors, `[a b]` for square ones. */
export const spinorBracket = <T>(field: Field<T>, a: Spinor<T>, b: Spinor<T>): T =>
  field.subtract(field.multiply(a[0], b[1]), field.multiply(a[1], b[0]));

/** `<a b>` of two twistors, or of the line through them: its first Plücker coordinate. */
export const angle = <T>(field: Field<T>, a: Twistor<T>, b: Twistor<T>): T =>
  spinorBracket(field, lambdaOf(a), lambdaOf(b));

/**
 * lambdatilde_a = (<a-1 a> mu_{a+1} + <a+1 a-1> mu_a + <a a+1> mu_{a-1}) / (<a-1 a><a a+1>) (0905.1473, "Eliminating spurious
 * poles from gauge-theoretic amplitudes"); null where the denominator vanishes.
 */
export function lambdaTilde<T>(field: Field<T>, twistors: readonly Twistor<T>[], label: number): Spinor<T> | null {
  const at = (a: number): Twistor<T> => twistors[wrapLabel(twistors.length, a) - 1]!;
  const [before, here, after] = [at(label - 1), at(label), at(label + 1)];
  const left = angle(field, before, here);
  const right = angle(field, here, after);
  const inverse = field.inverse(field.multiply(left, right));
  if (inverse === null) return null;
  const across = angle(field, after, before);
  const component = (i: 2 | 3): T => {
    const neighbours = field.add(field.multiply(left, after[i]!), field.multiply(right, before[i]!));
    return field.multiply(inverse, field.add(neighbours, field.multiply(across, here[i]!)));
  };
  return [component(2), component(3)];
}

/** The sum of lambda lambdatilde over the given pairs of spinors. */
export function totalMomentum<T>(
  field: Field<T>,
  legs: readonly { readonly lambda: Spinor<T>; readonly tilde: Spinor<T> }[],
): Momentum<T> {
  const entry = (alpha: 0 | 1, alphadot: 0 | 1): T =>
    legs.reduce((sum, { lambda, tilde }) => field.add(sum, field.multiply(lambda[alpha], tilde[alphadot])), field.zero);
  return [
    [entry(0, 0), entry(0, 1)],
    [entry(1, 0), entry(1, 1)],
  ];
}

/** p^2 = det p. */
export const momentumSquared = <T>(field: Field<T>, p: Momentum<T>): T => spinorBracket(field, p[0], p[1]);

/**
 * A spinor string, `<a|P|b] = sum over c in P of <a c>[c b]`, longer ones likewise, angle and square contractions in turn.
 * @param left which bracket the first spinor has; the last one's follows from the number of momenta
 */
export function spinorString<T>(
  field: Field<T>,
  left: "angle" | "square",
  first: Spinor<T>,
  middle: readonly Momentum<T>[],
  last: Spinor<T>,
): T {
  let side = left;
  let spinor = first;
  for (const p of middle) {
    // Contract with one index of the momentum; what is left carries the other one.
    const column = (j: 0 | 1): Spinor<T> => [p[0][j], p[1][j]];
    spinor =
      side === "angle"
        ? [spinorBracket(field, spinor, column(0)), spinorBracket(field, spinor, column(1))]
        : [spinorBracket(field, spinor, p[0]), spinorBracket(field, spinor, p[1])];
    side = side === "angle" ? "square" : "angle";
  }
  return spinorBracket(field, spinor, last);
}

/** Of the `contractions` = momenta + 1 brackets of a spinor string, how many are square. */
export const squareContractions = (left: "angle" | "square", momenta: number): number =>
  left === "square" ? Math.ceil((momenta + 1) / 2) : Math.floor((momenta + 1) / 2);

/** A dual point as the line that stands for it: (i-1 i) for leg i. */
export const dualPointOfLeg = <T>(field: Field<T>, twistors: readonly Twistor<T>[], i: number): Line<T> => {
  const [before, here] = cyclicRange(twistors.length, i - 1, i) as [number, number];
  return lineThrough(field, twistors[before - 1]!, twistors[here - 1]!);
};

/**
 * The squared distance of two dual points, <L M> / (<L><M>) with <L> the first Plücker coordinate: x2(i j) = s(i..j-1); null
 * where the denominator vanishes.
 */
export function dualDistance<T>(field: Field<T>, l: Line<T>, m: Line<T>): T | null {
  const inverse = field.inverse(field.multiply(l[0], m[0]));
  return inverse === null ? null : field.multiply(lineBracket(field, l, m), inverse);
}

/**
 * Values in double precision, with an estimate of how many digits they have: the form is evaluated again in other frames, where
 * every number is rounded differently. In exact arithmetic nothing would change; the largest difference is the estimate.
 */
import { type Complex, complexDoubles, magnitude, type Randomness, randomness } from "../fields";
import { type Point, transformPoint } from "../kinematics";
import type { Span } from "../result";
import { evaluateForm } from "./evaluate";
import type { FormAtN } from "./form";
import { helicityPoint } from "./helicity";

/** A value with |true value - value| of about `error`; `digits` decimal digits of it can be relied on, 0 to 15. */
export interface Approximation {
  readonly value: Complex<number>;
  readonly error: number;
  readonly digits: number;
}

/** Why there is no value; `parallel` where two neighbours (or all negative legs) have parallel lambdas. */
export type NoValue =
  | { readonly kind: "zero-denominator"; readonly span: Span }
  | { readonly kind: "parallel" }
  | { readonly kind: "out-of-range" };

type Matrix = readonly (readonly Complex<number>[])[];

const FRAMES = 3;
const MOST_DIGITS = 15;

/** The smallest relative error that is claimed: some roundings of 2^-53 are in every value. */
const LEAST_ERROR = 2 ** -51;

/** A difference of few evaluations can be small by chance; the estimate is this much larger. */
const CAUTION = 3;

/** A complex number with both parts in -1..1. */
function draw(random: Randomness): Complex<number> {
  const part = (): number => Number(random.below(2n ** 32n)) / 2 ** 31 - 1;
  return { re: part(), im: part() };
}

/** A complex 2x2 matrix of determinant 1 that is no larger than a turn and a small boost. */
function unimodular(random: Randomness): Matrix {
  const { add, inverse, multiply, one } = complexDoubles;
  const lead = draw(random);
  const a = { re: 1 + lead.re / 4, im: lead.im };
  const [b, c] = [draw(random), draw(random)];
  const d = multiply(add(one, multiply(b, c)), inverse(a) ?? one);
  return [
    [a, b],
    [c, d],
  ];
}

/**
 * A change of frame of all twistors: angle and square spinors turn by a matrix of determinant 1 each, and the origin of dual space
 * moves. Every bracket of the notation keeps its value.
 */
function frame(random: Randomness): Matrix {
  const { zero } = complexDoubles;
  const [angles, squares] = [unimodular(random), unimodular(random)];
  const origin = [0, 1].map(() => [draw(random), draw(random)]);
  return [...angles.map((row) => [...row, zero, zero]), ...squares.map((row, i) => [...origin[i]!, ...row])];
}

let known: readonly Matrix[] | null = null;

/** The same frames for everybody, so that an estimate can be repeated. */
function frames(): readonly Matrix[] {
  if (known === null) {
    const random = randomness("equiform-frames-1");
    known = Array.from({ length: FRAMES }, () => frame(random));
  }
  return known;
}

const isFinite = ({ re, im }: Complex<number>): boolean => Number.isFinite(re) && Number.isFinite(im);

function valueAt(
  form: FormAtN,
  point: Point<Complex<number>>,
  negativeLegs: readonly number[] | null,
): { readonly kind: "value"; readonly value: Complex<number> } | NoValue {
  const at =
    negativeLegs === null
      ? { point, factor: complexDoubles.one }
      : helicityPoint(complexDoubles, point, negativeLegs, magnitude);
  if (at === null) return { kind: "parallel" };
  const evaluation = evaluateForm(complexDoubles, form, at.point);
  if (evaluation.kind !== "value") return { kind: "zero-denominator", span: evaluation.span };
  const value = complexDoubles.multiply(evaluation.sum, at.factor);
  return isFinite(value) ? { kind: "value", value } : { kind: "out-of-range" };
}

/** How many digits a value with this error has. */
export function digitsOf(size: number, error: number): number {
  if (error === 0) return MOST_DIGITS;
  return Math.max(0, Math.min(MOST_DIGITS, Math.floor(-Math.log10(error / size))));
}

/**
 * The value of a form at a point in double precision.
 * @param negativeLegs for a gluon component of a superamplitude form, see `helicityPoint`; null for the form's own value
 * @param deviation relative error of the input itself, as `checkMomenta` finds it
 */
export function evaluateApproximately(
  form: FormAtN,
  point: Point<Complex<number>>,
  negativeLegs: readonly number[] | null,
  deviation = 0,
): ({ readonly kind: "value" } & Approximation) | NoValue {
  const first = valueAt(form, point, negativeLegs);
  if (first.kind !== "value") return first;
  const size = magnitude(first.value);
  let error = 0;
  for (const matrix of frames()) {
    const again = valueAt(form, transformPoint(complexDoubles, point, matrix), negativeLegs);
    const difference =
      again.kind === "value"
        ? magnitude(complexDoubles.subtract(again.value, first.value))
        : Number.POSITIVE_INFINITY;
    error = Math.max(error, CAUTION * difference);
  }
  error = Math.max(error, size * LEAST_ERROR) + size * deviation;
  return { kind: "value", value: first.value, error, digits: digitsOf(size, error) };
}

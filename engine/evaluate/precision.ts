/**
 * Values in double precision, with an estimate of how many digits they have: the form is evaluated again in other frames, where
 * every number is rounded differently. In exact arithmetic nothing would change; the largest difference is the estimate.
 */
import {
  type Complex,
  complexDoubles,
  fromWide,
  magnitude,
  type Randomness,
  randomness,
  toWide,
  type WideComplex,
  wideComplex,
} from "../fields";
import { mapPoint, type Point, transformPoint } from "../kinematics";
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

/** Parts of a change of frame: two matrices of determinant 1 for the spinors and the move of the origin, in units of the point. */
interface Frame {
  readonly angles: Matrix;
  readonly squares: Matrix;
  readonly origin: Matrix;
}

let known: readonly Frame[] | null = null;

/** The same frames for everybody, so that an estimate can be repeated. */
function frames(): readonly Frame[] {
  if (known === null) {
    const random = randomness("equiform-frames-1");
    known = Array.from({ length: FRAMES }, () => ({
      angles: unimodular(random),
      squares: unimodular(random),
      origin: [0, 1].map(() => [draw(random), draw(random)]),
    }));
  }
  return known;
}

/** How large dual points are: mu over lambda, each the largest of the legs'. */
function dualSize({ twistors }: Point<Complex<number>>): number {
  const largest = (from: number): number =>
    Math.max(0, ...twistors.flatMap((z) => z.slice(from, from + 2).map(magnitude)));
  const size = largest(2) / largest(0);
  return Number.isFinite(size) ? size : 1;
}

/** The point in another frame, in which every bracket of the notation has the value that it had. */
function inFrame(point: Point<Complex<number>>, { angles, squares, origin }: Frame): Point<Complex<number>> {
  const { multiply, real, zero } = complexDoubles;
  const size = real(dualSize(point));
  return transformPoint(complexDoubles, point, [
    ...angles.map((row) => [...row, zero, zero]),
    ...squares.map((row, i) => [...origin[i]!.map((x) => multiply(size, x)), ...row]),
  ]);
}

const sizeOfWide = (x: WideComplex): number => magnitude(fromWide(x) ?? complexDoubles.zero);

function valueAt(
  form: FormAtN,
  doubles: Point<Complex<number>>,
  negativeLegs: readonly number[] | null,
): { readonly kind: "value"; readonly value: Complex<number> } | NoValue {
  const point = mapPoint(doubles, toWide);
  const at =
    negativeLegs === null
      ? { point, factor: wideComplex.one }
      : helicityPoint(wideComplex, point, negativeLegs, sizeOfWide);
  if (at === null) return { kind: "parallel" };
  const evaluation = evaluateForm(wideComplex, form, at.point);
  if (evaluation.kind !== "value") return { kind: "zero-denominator", span: evaluation.span };
  const value = fromWide(wideComplex.multiply(evaluation.sum, at.factor));
  return value === null ? { kind: "out-of-range" } : { kind: "value", value };
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
  for (const frame of frames()) {
    const again = valueAt(form, inFrame(point, frame), negativeLegs);
    const difference =
      again.kind === "value" ? magnitude(complexDoubles.subtract(again.value, first.value)) : Number.POSITIVE_INFINITY;
    error = Math.max(error, CAUTION * difference);
  }
  error = Math.max(error, size * LEAST_ERROR) + size * deviation;
  return { kind: "value", value: first.value, error, digits: digitsOf(size, error) };
}

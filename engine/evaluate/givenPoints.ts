/** The points that somebody asks values at, typed, drawn or from momenta, in the numbers that the values are wanted in. */
import {
  type Complex,
  complexDoubles,
  type Field,
  fromRational,
  gaussianRationals,
  MERSENNE_61,
  magnitude,
  primeField,
  type Rational,
  randomness,
  rationals,
  toComplexDouble,
} from "../fields";
import {
  balancedSpinors,
  checkMomenta,
  doubleSpacetime,
  exactSpacetime,
  type FourMomentum,
  mapPoint,
  nearSingular,
  type Point,
  type PointUse,
  randomPoint,
  rationalSpinors,
  readComplexPoints,
  readMomenta,
  readPoints,
  type Spacetime,
  twistorsOfMomenta,
} from "../kinematics";
import { type Diagnostic, failure, type Result, success } from "../result";
import type { FormAtN } from "./form";

/** What values are computed in: exact rationals, integers modulo 2^61-1, or complex doubles. */
export const numberKinds = ["rational", "prime", "complex"] as const;
export type NumberKind = (typeof numberKinds)[number];

/**
 * Where the points come from: a points document, a momenta document (CONTRACT of the command `value`), or a seed. The seed of momenta
 * draws the references `*` and `X`, which momenta do not fix.
 */
export type PointSource =
  | { readonly kind: "points"; readonly document: unknown }
  | { readonly kind: "momenta"; readonly document: unknown; readonly seed: string }
  | { readonly kind: "random"; readonly count: number; readonly seed: string };

/** A number as it is written: "p/q" or a decimal, or ["re", "im"]. */
export type WrittenNumber = string | readonly [re: string, im: string];

export interface PointRemark {
  /** Place in the list of points, from 0. */
  readonly point: number;
  readonly message: string;
}

/** Points over an exact field. */
export interface ExactPoints<T> {
  readonly field: Field<T>;
  readonly points: readonly Point<T>[];
  readonly write: (x: T) => WrittenNumber;
  readonly warnings: readonly PointRemark[];
}

/** Points in double precision; `deviations` are the relative errors that their input has at least. */
export interface ApproximatePoints {
  readonly points: readonly Point<Complex<number>>[];
  readonly deviations: readonly number[];
  readonly warnings: readonly PointRemark[];
}

const MOST_DIAGNOSTICS = 100;

/** The largest and smallest sizes of components in double precision: p^2 must be in range. */
const LARGEST_COMPONENT = 1e120;

/** Momenta that hold better than this are as good as doubles can be. */
const ROUNDING = 1e-13;

const drawn = <T>(field: Field<T>, form: FormAtN, count: number, seed: string): Point<T>[] => {
  const random = randomness(seed);
  return Array.from({ length: count }, () => randomPoint(field, form, random));
};

/** Rational points over another field; a denominator that is zero there is a fault. */
function carried<T>(field: Field<T>, points: readonly Point<Rational>[]): Result<Point<T>[]> {
  let outside = false;
  const images = points.map((point) =>
    mapPoint(point, (x) => {
      const image = fromRational(field, x);
      outside ||= image === null;
      return image ?? field.zero;
    }),
  );
  if (!outside) return success(images);
  return failure({
    code: "points-field",
    message: `A coordinate has a denominator that is zero in the ${field.name}.`,
    help: "Use rational numbers.",
  });
}

/** Faults of a form that momenta alone do not make a point for. */
function momentaFaults(form: FormAtN, use: PointUse): Diagnostic[] {
  const faults: Diagnostic[] = [];
  if (use.lines) {
    faults.push({
      code: "momenta-loops",
      message: "The form has loop lines, which momenta of the legs do not fix.",
      help: "Give a points document with twistors and lines.",
    });
  }
  if (use.chi) {
    faults.push({
      code: "momenta-helicities",
      message: `The form is a superamplitude, and momenta have no Grassmann part.`,
      help: `Ask for gluon helicities with ${form.k + 2} minus signs, such as ${"-".repeat(form.k + 2)}${"+".repeat(form.n - form.k - 2)}.`,
    });
  }
  return faults;
}

type ExactMomentum = FourMomentum<Complex<Rational>>;

/** Every point's momenta converted and checked. */
function checked<T>(
  space: Spacetime<T>,
  points: readonly (readonly FourMomentum<T>[])[],
): Result<{ deviations: number[]; warnings: PointRemark[] }> {
  const faults: Diagnostic[] = [];
  const deviations: number[] = [];
  const warnings: PointRemark[] = [];
  points.forEach((momenta, point) => {
    const { diagnostics, deviation } = checkMomenta(space, momenta, `momenta[${point}]`);
    faults.push(...diagnostics);
    deviations.push(deviation > ROUNDING ? deviation : 0);
    if (diagnostics.length > 0) return;
    if (deviation > ROUNDING) {
      const message = `the momenta are massless and conserved only to ${deviation.toExponential(1)}, and values are no better`;
      warnings.push({ point, message });
    }
    for (const message of nearSingular(space, momenta))
      warnings.push({ point, message: `${message}: digits are lost` });
  });
  return faults.length > 0 ? failure(...faults.slice(0, MOST_DIAGNOSTICS)) : success({ deviations, warnings });
}

const toDoubles = (p: ExactMomentum): FourMomentum<Complex<number>> =>
  p.map(toComplexDouble) as unknown as FourMomentum<Complex<number>>;

const outOfRange = (p: FourMomentum<Complex<number>>): boolean =>
  p.some((x) => {
    const size = magnitude(x);
    return !(size <= LARGEST_COMPONENT) || (size > 0 && size < 1 / LARGEST_COMPONENT);
  });

function approximateMomenta(form: FormAtN, use: PointUse, document: unknown, seed: string): Result<ApproximatePoints> {
  const read = readMomenta(document, form.n);
  const faults = momentaFaults(form, use);
  if (!read.ok || faults.length > 0) return failure(...faults, ...(read.ok ? [] : read.diagnostics));
  const space = doubleSpacetime(read.value.signature);
  const momenta = read.value.points.map((legs) => legs.map(toDoubles));
  const far = momenta.findIndex((legs) => legs.some(outOfRange));
  if (far >= 0) {
    const message = `momenta[${far}]: a component is beyond 10^120 or below 10^-120 in size.`;
    return failure({ code: "momenta-range", message, help: "Choose another unit of energy, or rational numbers." });
  }
  const verdict = checked(space, momenta);
  if (!verdict.ok) return verdict;
  const [reference] = drawn(complexDoubles, form, 1, seed);
  const points = momenta.map((legs) => ({ ...reference!, twistors: twistorsOfMomenta(space, legs, balancedSpinors) }));
  return success({ points, ...verdict.value });
}

/** Exact points of momenta: complex numbers with rational parts, written as pairs in signature (1,3). */
export function exactMomenta(
  form: FormAtN,
  use: PointUse,
  document: unknown,
  seed: string,
): Result<ExactPoints<Complex<Rational>>> {
  const read = readMomenta(document, form.n);
  const faults = momentaFaults(form, use);
  if (!read.ok || faults.length > 0) return failure(...faults, ...(read.ok ? [] : read.diagnostics));
  const { signature, points } = read.value;
  const space = exactSpacetime(signature);
  const verdict = checked(space, points);
  if (!verdict.ok) return verdict;
  const field = gaussianRationals;
  const [reference] = drawn(field, form, 1, seed);
  const write = ({ re, im }: Complex<Rational>): WrittenNumber =>
    signature === "2,2" && rationals.isZero(im) ? rationals.toText(re) : [rationals.toText(re), rationals.toText(im)];
  return success({
    field,
    points: points.map((legs) => ({
      ...reference!,
      twistors: twistorsOfMomenta(space, legs, (p) => rationalSpinors(field, p)),
    })),
    write,
    // Exact values lose nothing: a point near a singular place is as good as any.
    warnings: [],
  });
}

/** The points in double precision. `use` says what of a points document is read. */
export function approximatePoints(form: FormAtN, source: PointSource, use: PointUse): Result<ApproximatePoints> {
  if (source.kind === "momenta") return approximateMomenta(form, use, source.document, source.seed);
  const plain = (points: readonly Point<Complex<number>>[]): ApproximatePoints => ({
    points,
    deviations: points.map(() => 0),
    warnings: [],
  });
  if (source.kind === "random") return success(plain(drawn(complexDoubles, form, source.count, source.seed)));
  const read = readComplexPoints(source.document, form, use);
  return read.ok ? success(plain(read.value.map((point) => mapPoint(point, toComplexDouble)))) : read;
}

type Unphysical = Exclude<PointSource, { readonly kind: "momenta" }>;

/** The points with exact rational coordinates. */
export function rationalPoints(form: FormAtN, source: Unphysical, use: PointUse): Result<ExactPoints<Rational>> {
  const read =
    source.kind === "points"
      ? readPoints(source.document, form, use)
      : success(drawn(rationals, form, source.count, source.seed));
  return read.ok ? success({ field: rationals, points: read.value, write: rationals.toText, warnings: [] }) : read;
}

/** The points modulo 2^61-1. */
export function primePoints(form: FormAtN, source: PointSource, use: PointUse): Result<ExactPoints<bigint>> {
  const field = primeField(MERSENNE_61);
  if (source.kind === "momenta") {
    const message = `Momenta have no spinors among the ${field.name}.`;
    return failure({ code: "momenta-field", message, help: "Use complex or rational numbers." });
  }
  if (source.kind === "random") {
    const points = drawn(field, form, source.count, source.seed);
    return success({ field, points, write: field.toText, warnings: [] });
  }
  const read = readPoints(source.document, form, use);
  const points = read.ok ? carried(field, read.value) : read;
  return points.ok ? success({ field, points: points.value, write: field.toText, warnings: [] }) : points;
}

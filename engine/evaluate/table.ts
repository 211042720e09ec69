/** Values of one form at many points: as it is, for one gluon helicity, or for several; exact or in double precision. */
import { complexDoubles, type Field, realDoubles } from "../fields";
import { angle, type Point } from "../kinematics";
import { failure, type Result, type Span, success } from "../result";
import { evaluateForm } from "./evaluate";
import { type FormAtN, pointUse } from "./form";
import {
  type ApproximatePoints,
  approximatePoints,
  type ExactPoints,
  exactMomenta,
  type NumberKind,
  type PointRemark,
  type PointSource,
  primePoints,
  rationalPoints,
  type WrittenNumber,
} from "./givenPoints";
import { helicityPattern, helicityPoint } from "./helicity";
import { evaluateApproximately } from "./precision";

/**
 * `helicities` lists the negative legs (ascending) of each component that is wanted of a superamplitude form; null asks for the
 * form's own value. For a form that is itself a component only null, or its own negative legs.
 */
export interface ValueRequest {
  readonly form: FormAtN;
  readonly source: PointSource;
  readonly numbers: NumberKind;
  readonly helicities: readonly (readonly number[] | null)[];
}

/** The values of one component, point by point. */
export interface ValueColumn {
  /** "--+-++", or null for the form's own value. */
  readonly helicities: string | null;
  /** Null where there is no value; `reasons` then says why. */
  readonly values: readonly (WrittenNumber | null)[];
  readonly reasons: readonly PointRemark[];
  /** In double precision: estimates of |true value - value|, and decimal digits to rely on. Null where there is no value. */
  readonly errors?: readonly (string | null)[];
  readonly digits?: readonly (number | null)[];
}

export interface ValueTable {
  readonly columns: readonly ValueColumn[];
  /** What of a point costs digits. */
  readonly warnings: readonly PointRemark[];
}

/** Points times components of one request. */
export const mostValues = 100_000;

const tooMany = (points: number, columns: number): Result<never> =>
  failure({
    code: "values-many",
    message: `There are ${points} points and ${columns} components, more than ${mostValues} values together.`,
    help: "Ask for fewer points or helicities at a time.",
  });

const vanishing = ([start, end]: Span): string =>
  `a denominator vanishes at characters ${start} to ${end} of the notation`;

/** Which two-bracket of neighbours vanishes, where a component has no value. */
function parallel<T>(field: Field<T>, { n, twistors }: Point<T>): string {
  for (let a = 1; a <= n; a++) {
    const b = (a % n) + 1;
    if (field.isZero(angle(field, twistors[a - 1]!, twistors[b - 1]!))) {
      return `<${a} ${b}> vanishes: legs ${a} and ${b} are collinear, and the amplitude is singular`;
    }
  }
  return "all two-brackets of the negative legs vanish: their component cannot be told from the others here";
}

interface Cell {
  readonly value: WrittenNumber;
  readonly error?: string;
  readonly digits?: number;
}

type CellOrReason = Cell | { readonly reason: string };

function column(
  { n }: FormAtN,
  negativeLegs: readonly number[] | null,
  cells: readonly CellOrReason[],
  approximate: boolean,
): ValueColumn {
  const kept = cells.map((cell) => ("reason" in cell ? null : cell));
  return {
    helicities: negativeLegs === null ? null : helicityPattern(negativeLegs, n),
    values: kept.map((cell) => cell?.value ?? null),
    reasons: cells.flatMap((cell, point) => ("reason" in cell ? [{ point, message: cell.reason }] : [])),
    ...(approximate
      ? { errors: kept.map((cell) => cell?.error ?? null), digits: kept.map((cell) => cell?.digits ?? null) }
      : {}),
  };
}

function exactCell<T>(
  { field, write }: ExactPoints<T>,
  form: FormAtN,
  point: Point<T>,
  negativeLegs: readonly number[] | null,
): CellOrReason {
  const at = negativeLegs === null ? { point, factor: field.one } : helicityPoint(field, point, negativeLegs);
  if (at === null) return { reason: parallel(field, point) };
  const evaluation = evaluateForm(field, form, at.point);
  if (evaluation.kind !== "value") return { reason: vanishing(evaluation.span) };
  return { value: write(field.multiply(evaluation.sum, at.factor)) };
}

function approximateCell(
  { points, deviations }: ApproximatePoints,
  form: FormAtN,
  place: number,
  negativeLegs: readonly number[] | null,
): CellOrReason {
  const point = points[place]!;
  const found = evaluateApproximately(form, point, negativeLegs, deviations[place]);
  switch (found.kind) {
    case "value": {
      const { re, im } = found.value;
      const value = [realDoubles.toText(re), realDoubles.toText(im)] as const;
      return { value, error: found.error.toExponential(1), digits: found.digits };
    }
    case "parallel":
      return { reason: parallel(complexDoubles, point) };
    case "zero-denominator":
      return { reason: vanishing(found.span) };
    case "out-of-range":
      return { reason: "the value is beyond the range of double precision; choose another unit, or rational numbers" };
  }
}

/** Columns that are wanted of the form, its own component counted as its value; a fault where they do not fit it. */
function evaluatedAs(form: FormAtN, negativeLegs: readonly number[] | null): Result<readonly number[] | null> {
  if (negativeLegs === null) return success(null);
  const pattern = helicityPattern(negativeLegs, form.n);
  if (form.negativeLegs !== null) {
    const own = helicityPattern(form.negativeLegs, form.n);
    if (own === pattern) return success(null);
    return failure({
      code: "helicities-component",
      message: `The form is the component ${own}, and says nothing of ${pattern}.`,
      help: "Leave the helicities out, or give a form of the superamplitude.",
    });
  }
  if (negativeLegs.length === form.k + 2) return success(negativeLegs);
  return failure({
    code: "helicities-count",
    message: `The helicities ${pattern} have ${negativeLegs.length} minus signs; for k = ${form.k} there are ${form.k + 2}.`,
    help: `Give ${form.n} signs with k + 2 = ${form.k + 2} of them minus.`,
  });
}

/**
 * Values of a form at points. Faults are those of the points (`readPoints`, `readMomenta`, `checkMomenta`) and of helicities that
 * do not fit the form (`helicities-count`, `helicities-component`), or `values-many`.
 */
export function valuesOf({ form, source, numbers, helicities }: ValueRequest): Result<ValueTable> {
  const wanted: (readonly number[] | null)[] = [];
  for (const negativeLegs of helicities) {
    const at = evaluatedAs(form, negativeLegs);
    if (!at.ok) return at;
    wanted.push(at.value);
  }
  // Counted before ten thousand points are drawn for nothing.
  if (source.kind === "random" && source.count * wanted.length > mostValues)
    return tooMany(source.count, wanted.length);
  const onlyComponents = wanted.every((negativeLegs) => negativeLegs !== null);
  const own = pointUse(form);
  const use = onlyComponents ? { ...own, twistors: true, chi: false, referenceChi: false } : own;
  if (numbers === "complex") {
    const given = approximatePoints(form, source, use);
    if (!given.ok) return given;
    const { points } = given.value;
    if (points.length * wanted.length > mostValues) return tooMany(points.length, wanted.length);
    const columns = wanted.map((negativeLegs, i) => {
      const cells = points.map((_, place) => approximateCell(given.value, form, place, negativeLegs));
      return column(form, helicities[i] ?? null, cells, true);
    });
    return success({ columns, warnings: given.value.warnings });
  }
  const exact = <T>(given: ExactPoints<T>): Result<ValueTable> => {
    if (given.points.length * wanted.length > mostValues) return tooMany(given.points.length, wanted.length);
    const columns = wanted.map((negativeLegs, i) => {
      const cells = given.points.map((point) => exactCell(given, form, point, negativeLegs));
      return column(form, helicities[i] ?? null, cells, false);
    });
    return success({ columns, warnings: given.warnings });
  };
  if (numbers === "prime") {
    const given = primePoints(form, source, use);
    return given.ok ? exact(given.value) : given;
  }
  if (source.kind === "momenta") {
    const given = exactMomenta(form, use, source.document, source.seed);
    return given.ok ? exact(given.value) : given;
  }
  const given = rationalPoints(form, source, use);
  return given.ok ? exact(given.value) : given;
}

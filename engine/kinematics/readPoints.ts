/** Points as JSON: what people hand to `value --points`. */
import { z } from "zod";
import { type Complex, type Field, gaussianRationals, type Rational, rationals } from "../fields";
import { type Diagnostic, failure, type Result, success } from "../result";
import type { AmplitudeSize } from "./makePoint";
import type { GrassmannVectors, Point, Twistor } from "./point";
import { complexNumberSchema, fractionSchema } from "./readNumber";

/** Which parts of a point are read. What is read must be there; what is not read may be left out. */
export interface PointUse {
  readonly twistors: boolean;
  readonly chi: boolean;
  readonly lines: boolean;
  readonly referenceTwistor: boolean;
  readonly referenceChi: boolean;
  readonly referenceLine: boolean;
}

interface RawPoint<T> {
  readonly twistors?: readonly Twistor<T>[] | undefined;
  readonly chi?: readonly GrassmannVectors<T>[] | undefined;
  readonly lines?: readonly (readonly [Twistor<T>, Twistor<T>])[] | undefined;
  readonly referenceTwistor?: Twistor<T> | undefined;
  readonly referenceChi?: GrassmannVectors<T> | undefined;
  readonly referenceLine?: readonly [Twistor<T>, Twistor<T>] | undefined;
}

/** The schema of a points document with coordinates of one kind. */
function documentOf<T>(number: z.ZodType<T>): z.ZodType<{ readonly points: readonly RawPoint<T>[] }> {
  const twistor = z.array(number).length(4, "expected 4 components");
  const line = z.tuple([twistor, twistor], { error: "expected a pair of twistors" });
  const chi = z.array(z.array(number)).length(4, "expected 4 flavours");
  const point = z.strictObject({
    twistors: z.array(twistor).optional(),
    chi: z.array(chi).optional(),
    lines: z.array(line).optional(),
    referenceTwistor: twistor.optional(),
    referenceChi: chi.optional(),
    referenceLine: line.optional(),
  });
  return z.strictObject({ points: z.array(point) });
}

const rationalDocument = documentOf(fractionSchema);
const complexDocument = documentOf(complexNumberSchema);

const HELP = 'a points document is {"points": [{"twistors": [["1", "0", "3/2", "5"], ...], ...}]}';

const place = (path: readonly PropertyKey[]): string =>
  path
    .map((step) => (typeof step === "number" ? `[${step}]` : `.${String(step)}`))
    .join("")
    .replace(/^\./, "");

/** What is missing or of the wrong size in one point, as diagnostics. */
function complaints(
  raw: RawPoint<unknown>,
  index: number,
  { n, k, loops }: AmplitudeSize,
  use: PointUse,
): Diagnostic[] {
  const found: Diagnostic[] = [];
  const complain = (code: string, message: string, help: string): void => {
    found.push({ code, message: `points[${index}]: ${message}`, help });
  };
  for (const name of Object.keys(use) as (keyof PointUse)[]) {
    if (use[name] && raw[name] === undefined) {
      complain("points-missing", `${name} is missing, and the form reads it`, `add "${name}" to the point`);
    }
  }
  const counts = [
    ["twistors", raw.twistors?.length, n, "one for each leg"],
    ["chi", raw.chi?.length, n, "one for each leg"],
    ["lines", raw.lines?.length, loops, "one pair for each loop"],
  ] as const;
  for (const [name, given, wanted, what] of counts) {
    if (use[name] && given !== undefined && given !== wanted) {
      complain("points-count", `${name} has ${given} entries, expected ${wanted}`, `give ${wanted} entries, ${what}`);
    }
  }
  const rows = [
    ...(use.chi ? (raw.chi ?? []).flatMap((chi, a) => chi.map((row, f) => [`chi[${a}][${f}]`, row] as const)) : []),
    ...(use.referenceChi ? (raw.referenceChi ?? []).map((row, f) => [`referenceChi[${f}]`, row] as const) : []),
  ];
  for (const [name, row] of rows) {
    if (row.length !== k)
      complain("points-count", `${name} has ${row.length} numbers, expected ${k}`, `give k = ${k} numbers`);
  }
  return found;
}

/** A whole point; parts that the form does not read are zero where they were left out or have another size. */
function complete<T>({ zero }: Field<T>, raw: RawPoint<T>, { n, k, loops }: AmplitudeSize, use: PointUse): Point<T> {
  const zeros = [zero, zero, zero, zero];
  const noChi = [0, 1, 2, 3].map(() => new Array<T>(k).fill(zero));
  return {
    n,
    k,
    loops,
    twistors: (use.twistors ? raw.twistors : undefined) ?? new Array(n).fill(zeros),
    chi: (use.chi ? raw.chi : undefined) ?? new Array(n).fill(noChi),
    lines: (use.lines ? raw.lines : undefined) ?? new Array(loops).fill([zeros, zeros]),
    referenceTwistor: raw.referenceTwistor ?? zeros,
    referenceChi: (use.referenceChi ? raw.referenceChi : undefined) ?? noChi,
    referenceLine: raw.referenceLine ?? [zeros, zeros],
  };
}

const MOST_DIAGNOSTICS = 100;

function read<T>(
  field: Field<T>,
  document: z.ZodType<{ readonly points: readonly RawPoint<T>[] }>,
  json: unknown,
  size: AmplitudeSize,
  use: PointUse,
): Result<readonly Point<T>[]> {
  const parsed = document.safeParse(json);
  if (!parsed.success) {
    const issues = parsed.error.issues.slice(0, MOST_DIAGNOSTICS);
    return failure(
      ...issues.map(({ path, message }) => ({
        code: "points-shape",
        message: path.length === 0 ? message : `${place(path)}: ${message}`,
        help: HELP,
      })),
    );
  }
  const found = parsed.data.points.flatMap((raw, index) => complaints(raw, index, size, use));
  if (found.length > 0) return failure(...found.slice(0, MOST_DIAGNOSTICS));
  return success(parsed.data.points.map((raw) => complete(field, raw, size, use)));
}

/**
 * Reads a points document, exact rationals, for a form of the given size that reads the given parts.
 * Faults: `points-shape` (structure or a malformed number), `points-missing`, `points-count`, each with its place and what to do.
 */
export const readPoints = (json: unknown, size: AmplitudeSize, use: PointUse): Result<readonly Point<Rational>[]> =>
  read(rationals, rationalDocument, json, size, use);

/** The same where each coordinate is a number ("p", "p/q", a decimal) or a pair ["re", "im"] of these. */
export const readComplexPoints = (
  json: unknown,
  size: AmplitudeSize,
  use: PointUse,
): Result<readonly Point<Complex<Rational>>[]> => read(gaussianRationals, complexDocument, json, size, use);

/** `value`: a form at points. */
import { evaluateForm } from "../evaluate";
import { type FormAtN, formAt, pointUse } from "../evaluate/form";
import { type Field, fromRational, MERSENNE_61, primeField, randomness, rationals } from "../fields";
import { mapPoint, type Point, randomPoint, readPoints } from "../kinematics";
import { readEntry } from "../notation";
import type { Diagnostic, Result } from "../result";
import { failure, success } from "../result";
import { type Call, type Command, type Exit, integerOption, Usage } from "./command";
import { readText } from "./files";
import { diagnosticsText, printJson } from "./print";
import { freshSeed } from "./seed";

const mostRandom = 10_000;

export const value: Command = {
  name: "value",
  positional: "FILE",
  fewestPositional: 1,
  mostPositional: 1,
  summary: "Evaluates the form of an entry document at given or random points.",
  options: [
    { name: "points", value: "FILE", help: "points with rational coordinates, as the conventions page describes them" },
    { name: "random", value: "N", help: `N random points, 1 to ${mostRandom}, in place of --points` },
    { name: "seed", value: "S", help: "seed of the random points; drawn and printed where it is left out" },
    { name: "field", value: "FIELD", help: "rational (the default) or prime, the integers modulo 2^61-1" },
    { name: "n", value: "N", help: "the n to evaluate at, for a form for many n" },
  ],
  run,
};

async function run(call: Call): Promise<Exit> {
  const points = call.option("points");
  const random = integerOption(call, "random", 1, mostRandom);
  const fieldName = call.option("field") ?? "rational";
  if ((points === null) === (random === null)) throw new Usage("give either --points FILE or --random N");
  if (fieldName !== "rational" && fieldName !== "prime")
    throw new Usage(`--field: expected rational or prime, got ${fieldName}`);
  const text = await readText(call.positional[0] ?? "-", call.io);
  const entry = text.ok ? readEntry(text.value) : text;
  if (!entry.ok) return fail(call, entry.diagnostics);
  const { amplitude } = entry.value;
  const asked = integerOption(call, "n", 4, 64);
  if (typeof amplitude.n === "number" && asked !== null && asked !== amplitude.n)
    throw new Usage(`--n: this form is for n = ${amplitude.n}`);
  const n = asked ?? (typeof amplitude.n === "number" ? amplitude.n : amplitude.n.from);
  if (typeof amplitude.n !== "number" && (n < amplitude.n.from || (amplitude.n.to !== null && n > amplitude.n.to)))
    throw new Usage(
      `--n: this form is for n from ${amplitude.n.from}${amplitude.n.to === null ? "" : ` to ${amplitude.n.to}`}`,
    );
  const form = formAt(entry.value, n);
  const seed = random === null ? null : (call.option("seed") ?? freshSeed());
  const reply =
    fieldName === "rational"
      ? await values(rationals, form, call, points, random, seed)
      : await values(primeField(MERSENNE_61), form, call, points, random, seed);
  if (!reply.ok) return fail(call, reply.diagnostics);
  const result = { ...reply.value, ...(seed === null ? {} : { seed }) };
  if (call.json) printJson(call, result);
  else {
    call.io.stdout.write(
      `${result.values.map((v, i) => v ?? `no value: ${result.reasons?.find((r) => r.point === i)?.message}`).join("\n")}\n`,
    );
    if (seed !== null && call.option("seed") === null) call.io.stderr.write(`seed ${seed}\n`);
  }
  return 0;
}

interface Values {
  readonly values: readonly (string | null)[];
  /** For each null its point and why it has no value. */
  readonly reasons?: readonly { readonly point: number; readonly message: string }[];
}

async function values<T>(
  field: Field<T>,
  form: FormAtN,
  call: Call,
  file: string | null,
  random: number | null,
  seed: string | null,
): Promise<Result<Values>> {
  const points =
    file === null ? success(drawn(field, form, random ?? 0, seed ?? "")) : await given(field, form, file, call);
  if (!points.ok) return points;
  const reasons: { point: number; message: string }[] = [];
  const found = points.value.map((point, i) => {
    const evaluation = evaluateForm(field, form, point);
    if (evaluation.kind === "value") return field.toText(evaluation.sum);
    reasons.push({
      point: i,
      message: `a denominator vanishes at characters ${evaluation.span[0]} to ${evaluation.span[1]} of the notation`,
    });
    return null;
  });
  return success({ values: found, ...(reasons.length > 0 ? { reasons } : {}) });
}

function drawn<T>(field: Field<T>, form: FormAtN, count: number, seed: string): Point<T>[] {
  const random = randomness(seed);
  return Array.from({ length: count }, () => randomPoint(field, form, random));
}

/** Points from a file: rationals, carried over to the field where it is another. */
async function given<T>(
  field: Field<T>,
  form: FormAtN,
  file: string,
  call: Call,
): Promise<Result<readonly Point<T>[]>> {
  const text = await readText(file, call.io);
  if (!text.ok) return text;
  let document: unknown;
  try {
    document = JSON.parse(text.value);
  } catch {
    return failure({ code: "points-json", message: `${file} is not JSON.`, help: "Give a points document." });
  }
  const points = readPoints(document, form, pointUse(form));
  if (!points.ok) return points;
  let outside = false;
  const carried = points.value.map((point) =>
    mapPoint(point, (x) => {
      const image = fromRational(field, x);
      outside ||= image === null;
      return image ?? field.zero;
    }),
  );
  if (!outside) return success(carried);
  return failure({
    code: "points-field",
    message: `A coordinate has a denominator that is zero in the ${field.name}.`,
    help: "Use --field rational.",
  });
}

function fail(call: Call, diagnostics: readonly Diagnostic[]): Exit {
  if (call.json) printJson(call, { values: [], diagnostics });
  else call.io.stderr.write(`${diagnosticsText(diagnostics, null)}\n`);
  return 2;
}

/** `value`: a form at points, or its gluon components. */
import {
  allHelicities,
  countHelicities,
  type Diagnostic,
  type Form,
  type FormAtN,
  failure,
  formAt,
  mostValues,
  type NumberKind,
  numberKinds,
  type PointSource,
  type Result,
  readEntry,
  readHelicities,
  seedUsed,
  success,
  type ValueTable,
  valueReply,
  valuesOf,
} from "../index";
import { type Call, type Command, type Exit, integerOption, Usage } from "./command";
import { readText } from "./files";
import { diagnosticsText, printJson } from "./print";
import { freshSeed } from "./seed";
import { tableText } from "./valueTable";

const mostRandom = 10_000;

export const value: Command = {
  name: "value",
  positional: "FILE",
  fewestPositional: 1,
  mostPositional: 1,
  summary: "Evaluates the form of an entry document at given or random points, or at physical momenta.",
  options: [
    {
      name: "points",
      value: "FILE",
      help: 'points with twistors as coordinates, "p/q" each; ["re", "im"] with --field complex',
    },
    {
      name: "momenta",
      value: "FILE",
      help: "four-momenta (E, x, y, z) of the legs, all outgoing, massless and conserved; the command points draws some",
    },
    { name: "random", value: "N", help: `N random points, 1 to ${mostRandom}, in place of a file` },
    {
      name: "seed",
      value: "S",
      help: "seed of the random points, or of the references * and X beside momenta; drawn and printed where it is left out",
    },
    {
      name: "field",
      value: "FIELD",
      help: "rational (exact, the default), prime (the integers modulo 2^61-1), or complex (double precision with an error estimate, the default for --momenta). Exact momenta have spinors that begin with 1, so their values differ from complex ones by a power of that scale for each leg",
    },
    {
      name: "helicities",
      value: "SIGNS",
      help: "the gluon component of a superamplitude, as in --helicities=--+-++ (k+2 minus signs, all legs outgoing); MHV denominator included",
    },
    { name: "all-helicities", help: "every component with k+2 minus signs" },
    { name: "n", value: "N", help: "the n to evaluate at, for a form for many n" },
  ],
  run,
};

async function run(call: Call): Promise<Exit> {
  const given = ["points", "momenta", "random"].filter((name) => call.has(name));
  if (given.length !== 1) throw new Usage("give one of --points FILE, --momenta FILE and --random N");
  const numbers = numbersAsked(call);
  if (numbers === "prime" && call.has("momenta")) throw new Usage("--momenta goes with --field complex or rational");
  const text = await readText(call.positional[0] ?? "-", call.io);
  const entry = text.ok ? readEntry(text.value) : text;
  if (!entry.ok) return fail(call, entry.diagnostics);
  const form = formAt(entry.value, sizeAsked(call, entry.value));
  const helicities = helicitiesAsked(call, form);
  const source = await sourceAsked(call);
  if (!source.ok) return fail(call, source.diagnostics);
  const table = valuesOf({ form, source: source.value, numbers, helicities });
  if (!table.ok) return fail(call, table.diagnostics);
  const seed = seedUsed(form, source.value);
  const many = call.has("all-helicities");
  if (call.json) printJson(call, valueReply(table.value, many, seed));
  else {
    call.io.stdout.write(tableText(table.value, many));
    for (const warning of warningLines(table.value)) call.io.stderr.write(`${warning}\n`);
    if (seed !== null && call.option("seed") === null) call.io.stderr.write(`seed ${seed}\n`);
  }
  return 0;
}

const warningLines = (table: ValueTable): string[] =>
  table.warnings.map(({ point, message }) => `point ${point}: ${message}`);

function numbersAsked(call: Call): NumberKind {
  const name = call.option("field") ?? (call.has("momenta") ? "complex" : "rational");
  const kind = numberKinds.find((known) => known === name);
  if (kind === undefined) throw new Usage(`--field: expected ${numberKinds.join(", ")}, got ${name}`);
  return kind;
}

/** The n to evaluate at. @throws Usage where the form has no such n */
function sizeAsked(call: Call, { amplitude }: Form): number {
  const asked = integerOption(call, "n", 4, 64);
  const { n: range } = amplitude;
  if (typeof range === "number") {
    if (asked !== null && asked !== range) throw new Usage(`--n: this form is for n = ${range}`);
    return range;
  }
  const n = asked ?? range.from;
  if (n < range.from || (range.to !== null && n > range.to))
    throw new Usage(`--n: this form is for n from ${range.from}${range.to === null ? "" : ` to ${range.to}`}`);
  return n;
}

function helicitiesAsked(call: Call, form: FormAtN): (readonly number[] | null)[] {
  const pattern = call.option("helicities");
  if (call.has("all-helicities")) {
    if (pattern !== null) throw new Usage("give either --helicities or --all-helicities");
    if (form.negativeLegs !== null) throw new Usage("--all-helicities: this form is one component");
    // Counted before they are written out: C(n, k+2) is beyond all memory for n = 64.
    const count = countHelicities(form.n, form.k);
    if (count > mostValues)
      throw new Usage(`--all-helicities: there are ${count} of them, and at most ${mostValues} values in one call`);
    return allHelicities(form.n, form.k);
  }
  if (pattern === null) return [null];
  const negativeLegs = readHelicities(pattern, form.n);
  if (negativeLegs === null) throw new Usage(`--helicities: expected ${form.n} signs + and -, got ${pattern}`);
  return [negativeLegs];
}

async function sourceAsked(call: Call): Promise<Result<PointSource>> {
  const random = integerOption(call, "random", 1, mostRandom);
  const seed = call.option("seed") ?? freshSeed();
  if (random !== null) return success({ kind: "random", count: random, seed });
  const points = call.option("points");
  const file = points ?? call.option("momenta") ?? "-";
  const text = await readText(file, call.io);
  if (!text.ok) return text;
  const what = points === null ? "momenta" : "points";
  try {
    const document: unknown = JSON.parse(text.value);
    return success(points === null ? { kind: "momenta", document, seed } : { kind: "points", document });
  } catch {
    return failure({ code: `${what}-json`, message: `${file} is not JSON.`, help: `Give a ${what} document.` });
  }
}

function fail(call: Call, diagnostics: readonly Diagnostic[]): Exit {
  if (call.json) printJson(call, { values: [], diagnostics });
  else call.io.stderr.write(`${diagnosticsText(diagnostics, null)}\n`);
  return 2;
}

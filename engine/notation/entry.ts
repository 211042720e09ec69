/** The entry document: what a person submits and what every command reads. */
import { z } from "zod";
import { type Diagnostic, failure, type Result, success } from "../result";
import type { Code } from "./codes";
import { fewestLegs, mostDiagnostics, mostLegs, mostLoops, mostSourceUnits } from "./limits";
import { read } from "./parse";
import type { Formula } from "./tree";
import { validate, validatePlaces } from "./validate";

const longestTitle = 300;
const longestNote = 20_000;
const mostReferences = 50;

const legs = z.int().min(fewestLegs).max(mostLegs);
const text = (longest: number) => z.string().max(longest);

const referenceSchema = z
  .strictObject({
    arxiv: text(40).optional(),
    doi: text(200).optional(),
    journal: text(300).optional(),
    title: text(500).optional(),
    /** Section or equation. */
    where: text(300).optional(),
  })
  .refine((r) => r.arxiv !== undefined || r.doi !== undefined || r.journal !== undefined, {
    error: "a reference needs arxiv, doi or journal",
  });

/** Structure of the document; what depends on several fields is checked by `readEntryValue`. */
export const entryDocumentSchema = z
  .strictObject({
    amplitude: z.strictObject({
      n: z.union([legs, z.strictObject({ from: legs, to: legs.optional() })], {
        error: `expected an integer from ${fewestLegs} to ${mostLegs}, or {"from": ..., "to": ...}`,
      }),
      k: z.int().min(0),
      loops: z.int().min(0).max(mostLoops),
    }),
    notation: text(mostSourceUnits),
    component: z
      .union([z.string(), z.strictObject({ minus: z.array(z.int().min(1).max(mostLegs)) })], {
        error: 'expected a word of + and -, or {"minus": [labels]}',
      })
      .optional(),
    target: z.enum(["amplitude", "even", "log", "zero"]).optional(),
    s: z.enum(["<ab>[ab]", "<ab>[ba]"]).optional(),
    title: text(longestTitle).optional(),
    method: text(longestTitle).optional(),
    references: z.array(referenceSchema).max(mostReferences).optional(),
    note: text(longestNote).optional(),
  })
  .meta({ id: "Entry", description: "A form of a scattering amplitude, or of one of its components." });

export type EntryDocument = z.infer<typeof entryDocumentSchema>;
export type Reference = z.infer<typeof referenceSchema>;

/** An entry document that was read without a fault. */
export interface Form {
  readonly amplitude: {
    readonly n: number | { readonly from: number; readonly to: number | null };
    readonly k: number;
    readonly loops: number;
  };
  /** Negative legs in ascending order, null for the superamplitude. */
  readonly component: readonly number[] | null;
  readonly target: "amplitude" | "even" | "log" | "zero";
  /** -1 for the convention s_ab = <ab>[ba]. */
  readonly squareSign: 1 | -1;
  readonly formula: Formula;
  readonly notation: string;
  readonly title: string | null;
  readonly method: string | null;
  readonly references: readonly Reference[];
  readonly note: string | null;
}

/** The document's JSON Schema (draft 2020-12). */
export const entrySchema = (): Record<string, unknown> =>
  z.toJSONSchema(entryDocumentSchema, { target: "draft-2020-12", io: "input" }) as Record<string, unknown>;

/** Reads a document from its text. */
export function readEntry(source: string): Result<Form> {
  let value: unknown;
  try {
    value = JSON.parse(source);
  } catch (error) {
    const marked = source.startsWith("\uFEFF");
    const help = marked
      ? "Save the file as UTF-8 without a byte-order mark."
      : "An entry document is one JSON object with amplitude and notation.";
    const reason = error instanceof Error ? error.message.replace(/\s+/g, " ").slice(0, 120) : "";
    return failure({ code: "json-syntax", message: `This is not JSON${reason === "" ? "" : `: ${reason}`}.`, help });
  }
  return readEntryValue(value);
}

/** Reads a document from a JSON value. Spans of faults in the formula are places in `notation`. */
export function readEntryValue(value: unknown): Result<Form> {
  const spoiled = spoiledField(value, "");
  if (spoiled !== null) return failure(spoiled);
  const parsed = entryDocumentSchema.safeParse(value);
  if (!parsed.success) return failure(...parsed.error.issues.slice(0, 50).map(fieldFault));
  const document = parsed.data;
  const { n, k, loops } = document.amplitude;
  const range = typeof n === "number" ? n : { from: n.from, to: n.to ?? null };
  const smallest = typeof range === "number" ? range : range.from;
  const component = readComponent(document.component, range, k);
  const faults = [...amplitudeFaults(range, smallest, k), ...component.faults];
  const { formula, diagnostics } = read(document.notation);
  if (formula === null || faults.length > 0) return failure(...faults, ...diagnostics);
  if (diagnostics.length > 0) {
    const places = validatePlaces(formula, { n: [smallest], loops });
    return failure(...inOrder([...diagnostics, ...places]).slice(0, mostDiagnostics + 1));
  }
  const form: Form = {
    amplitude: { n: range, k, loops },
    component: component.legs,
    target: document.target ?? "amplitude",
    squareSign: document.s === "<ab>[ba]" ? -1 : 1,
    formula,
    notation: document.notation,
    title: document.title ?? null,
    method: document.method ?? null,
    references: document.references ?? [],
    note: document.note ?? null,
  };
  const found = validate(formula, { n: sizesOf(form, smallest + 3), loops });
  return found.length > 0 ? failure(...found) : success(form);
}

/** The document of a form: what `readEntryValue` gives the same form for. */
export function entryOf(form: Form): EntryDocument {
  const { n, k, loops } = form.amplitude;
  return {
    amplitude: { n: typeof n === "number" ? n : { from: n.from, ...(n.to === null ? {} : { to: n.to }) }, k, loops },
    notation: form.notation,
    ...(form.component === null ? {} : { component: { minus: [...form.component] } }),
    ...(form.target === "amplitude" ? {} : { target: form.target }),
    ...(form.squareSign === 1 ? {} : { s: "<ab>[ba]" as const }),
    ...(form.title === null ? {} : { title: form.title }),
    ...(form.method === null ? {} : { method: form.method }),
    ...(form.references.length === 0 ? {} : { references: [...form.references] }),
    ...(form.note === null ? {} : { note: form.note }),
  };
}

/** "n6k1L0", or "nXk1L0" for a form for many n. */
export function amplitudeKey(form: Form): string {
  const { n, k, loops } = form.amplitude;
  return `n${typeof n === "number" ? n : "X"}k${k}L${loops}`;
}

/** The helicities at one n, "--+-++", or null for the superamplitude. */
export const componentText = (form: Form, n: number): string | null =>
  form.component === null
    ? null
    : Array.from({ length: n }, (_, i) => (form.component?.includes(i + 1) ? "-" : "+")).join("");

/** Every n of the form in ascending order; an open range ends at `largest`, or three legs after its beginning if that is more. */
export function sizesOf(form: Form, largest: number): readonly number[] {
  const { n } = form.amplitude;
  if (typeof n === "number") return [n];
  const last = n.to ?? Math.min(mostLegs, Math.max(largest, n.from + 3));
  return Array.from({ length: last - n.from + 1 }, (_, i) => n.from + i);
}

/** Diagnostics in the order of their places in the text. */
const inOrder = (diagnostics: readonly Diagnostic[]): Diagnostic[] =>
  [...diagnostics].sort((a, b) => (a.span?.[0] ?? 0) - (b.span?.[0] ?? 0));

/** The first text outside the notation that holds half a surrogate pair or a NUL, which databases and files do not keep. */
function spoiledField(value: unknown, path: string): Diagnostic | null {
  if (typeof value === "string") {
    if (path === "notation" || !/\p{Surrogate}|\0/u.test(value)) return null;
    return fault("json-text", `${path} holds half a surrogate pair or a NUL character.`, "Delete the character.");
  }
  if (typeof value !== "object" || value === null) return null;
  const depth = path.split(".").length;
  if (depth > 4) return null;
  for (const [name, member] of Object.entries(value)) {
    const found = spoiledField(member, path === "" ? name : `${path}.${name}`);
    if (found !== null) return found;
  }
  return null;
}

function amplitudeFaults(range: Form["amplitude"]["n"], smallest: number, k: number): Diagnostic[] {
  const faults: Diagnostic[] = [];
  if (typeof range !== "number" && range.to !== null && range.to < range.from)
    faults.push(
      fault(
        "amplitude-range",
        `The range of n from ${range.from} to ${range.to} is empty.`,
        "Let to be at least from.",
      ),
    );
  if (k > smallest - 4)
    faults.push(
      fault(
        "amplitude-degree",
        `There is no amplitude with n = ${smallest} and k = ${k}: k is at most n-4.`,
        "N^kMHV has k from 0 (MHV) to n-4 (conjugate MHV).",
      ),
    );
  return faults;
}

function readComponent(
  component: EntryDocument["component"],
  range: Form["amplitude"]["n"],
  k: number,
): { readonly legs: readonly number[] | null; readonly faults: Diagnostic[] } {
  if (component === undefined) return { legs: null, faults: [] };
  const smallest = typeof range === "number" ? range : range.from;
  const faults: Diagnostic[] = [];
  let negative: number[];
  if (typeof component === "string") {
    if (typeof range !== "number")
      faults.push(
        fault(
          "component-legs",
          "A word of helicities fits one n only.",
          'For a range write {"minus": [1, 2]}, the negative legs.',
        ),
      );
    else if (!/^[+-]*$/.test(component))
      faults.push(
        fault("component-legs", "A component is a word of + and -.", 'One helicity for each leg, such as "--+-++".'),
      );
    else if (component.length !== range)
      faults.push(
        fault(
          "component-legs",
          `The component has ${component.length} helicities, the amplitude ${range} legs.`,
          "Give one helicity for each leg.",
        ),
      );
    negative = [...component].flatMap((helicity, i) => (helicity === "-" ? [i + 1] : []));
  } else {
    negative = [...component.minus].sort((a, b) => a - b);
    const beyond = negative.find((leg) => leg > smallest);
    if (beyond !== undefined)
      faults.push(
        fault(
          "component-legs",
          `Leg ${beyond} is no leg at n = ${smallest}.`,
          `Negative legs are named by labels 1 to ${smallest}, the smallest n.`,
        ),
      );
    if (new Set(negative).size < negative.length)
      faults.push(fault("component-legs", "A negative leg is named twice.", "Name each negative leg once."));
  }
  if (faults.length === 0 && negative.length !== k + 2)
    faults.push(
      fault(
        "component-count",
        `The component has ${negative.length} negative legs; N^kMHV with k = ${k} has k+2 = ${k + 2}.`,
        "Change k or the helicities.",
      ),
    );
  return { legs: negative, faults };
}

const fault = (code: Code, message: string, help: string): Diagnostic => ({ code, message, help });

function fieldFault(issue: z.core.$ZodIssue): Diagnostic {
  const place = issue.path.length === 0 ? "The document" : issue.path.join(".");
  const help =
    "The fields of an entry document are amplitude, notation, component, target, s, title, method, references, note.";
  if (issue.code === "unrecognized_keys")
    return fault("entry-unknown-field", `${place}: there is no field ${issue.keys.join(", ")}.`, help);
  if (issue.code === "too_big") {
    const limit = limitCodes[issue.path.join(".")];
    if (limit !== undefined)
      return fault(limit, `${place}: ${issue.message}.`, "This is the largest that can be checked.");
  }
  const missing = issue.code === "invalid_type" && issue.message.endsWith("received undefined");
  const code = missing
    ? "entry-missing"
    : (fieldCodes[issue.path.join(".")] ?? (issue.code === "invalid_type" ? "entry-type" : "entry-value"));
  return fault(code, missing ? `${place} is missing.` : `${place}: ${issue.message}.`, help);
}

/** Fields whose upper bound is a limit of the program. */
const limitCodes: Readonly<Record<string, Code>> = {
  "amplitude.n": "limit-legs",
  "amplitude.n.from": "limit-legs",
  "amplitude.n.to": "limit-legs",
  "amplitude.loops": "limit-loops",
  notation: "limit-source",
};

const fieldCodes: Readonly<Record<string, Code>> = {
  "amplitude.n": "amplitude-legs",
  "amplitude.n.from": "amplitude-legs",
  "amplitude.n.to": "amplitude-legs",
  "amplitude.k": "amplitude-degree",
  "amplitude.loops": "amplitude-loops",
};

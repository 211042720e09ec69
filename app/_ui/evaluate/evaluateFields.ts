/** The fields of the page of values as a person fills them in, the address that says the same, and the request they make. */
import { deriveFieldNames } from "../derive/deriveQuery";
import { emptyFields, entryOf } from "../editor/entryFields";

export const evaluateFieldNames = [
  "form",
  "derived",
  "leg",
  "direction",
  "n",
  "k",
  "loops",
  "component",
  "notation",
  "at",
  "where",
  "count",
  "energy",
  "seed",
  "field",
  "helicities",
  "data",
] as const;
type Name = (typeof evaluateFieldNames)[number];
export type EvaluateFields = Record<Name, string>;

export const emptyEvaluate: EvaluateFields = {
  form: "",
  derived: "",
  leg: "",
  direction: "",
  n: "",
  k: "",
  loops: "0",
  component: "",
  notation: "",
  at: "",
  where: "random",
  count: "4",
  energy: "",
  seed: "",
  field: "",
  helicities: "",
  data: "",
};

/** Where the points come from. */
export const places = ["random", "phaseSpace", "own"] as const;

/** Reads an address: `random=4` or `phaseSpace=4` say where and how many, as in the API. */
export function fieldsOfQuery(query: Readonly<Record<string, unknown>>): EvaluateFields {
  const fields = { ...emptyEvaluate };
  for (const name of evaluateFieldNames) {
    const value = query[name];
    if (typeof value === "string") fields[name] = value.replaceAll("\r\n", "\n");
  }
  for (const where of ["random", "phaseSpace"] as const) {
    const count = query[where];
    if (typeof count !== "string") continue;
    fields.where = where;
    fields.count = count;
  }
  if (!(places as readonly string[]).includes(fields.where)) fields.where = "random";
  return fields;
}

/** Whether the fields name something to evaluate. */
export const asksForValues = ({ form, derived, notation }: EvaluateFields): boolean =>
  [form, derived, notation].some((text) => text.trim() !== "");

/** The address that gives the same values again. */
export function addressOf(fields: EvaluateFields): string {
  const parameters = new URLSearchParams();
  const left: readonly Name[] = fields.form.trim() === "" ? [] : ["n", "k", "loops", "component", "notation"];
  for (const name of evaluateFieldNames) {
    const value = fields[name].trim();
    if (value === "" || name === "where" || name === "count" || left.includes(name)) continue;
    if (name !== "loops" && value === emptyEvaluate[name]) continue;
    parameters.set(name, value);
  }
  if (fields.where === "own") parameters.set("where", "own");
  else parameters.set(fields.where, fields.count.trim());
  return `/evaluate?${parameters}`;
}

export interface Asked {
  readonly request: Record<string, unknown>;
  /** The formula whose characters the faults are about; empty for a kept form. */
  readonly notation: string;
}

/** The request of the fields, or a sentence that says which field cannot be read. `derived` is the document of a derived form. */
export function requestOf(fields: EvaluateFields, derived: unknown): Asked | { readonly fault: string } {
  const request: Record<string, unknown> = {};
  let notation = "";
  if (fields.form.trim() !== "") request.form = fields.form.trim();
  else if (derived !== undefined) request.document = derived;
  else {
    const document = documentOf(fields);
    if (typeof document === "string") return { fault: document };
    request.document = document;
    if (typeof document.notation === "string") notation = document.notation;
  }
  if (fields.at.trim() !== "") {
    if (!/^\d{1,3}$/.test(fields.at.trim())) return { fault: `“${fields.at}” is no number of legs to evaluate at.` };
    request.n = Number(fields.at);
  }
  const points = pointsOf(fields);
  if (typeof points === "string") return { fault: points };
  Object.assign(request, points);
  if (fields.where !== "own" || points.momenta !== undefined) {
    if (fields.seed.trim() !== "") request.seed = fields.seed.trim();
  }
  if (fields.field !== "") request.field = fields.field;
  if (fields.helicities.trim() !== "") request.helicities = fields.helicities.trim().replaceAll("−", "-");
  return { request, notation };
}

function documentOf(fields: EvaluateFields): Record<string, unknown> | string {
  const text = fields.notation.trim();
  if (text === "") return "Give the identifier of a form, a formula, or an entry document.";
  if (!text.startsWith("{")) {
    const { n, k, loops, component, notation } = fields;
    const { entry, diagnostics } = entryOf({ ...emptyFields, n, k, loops, component, notation });
    return diagnostics[0] === undefined ? entry : `${diagnostics[0].message} ${diagnostics[0].help ?? ""}`;
  }
  const document = readJson(text);
  return document ?? "The formula begins with a brace like an entry document, and is not JSON.";
}

function readJson(text: string): Record<string, unknown> | null {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === "object" && value !== null && !Array.isArray(value)
      ? (value as Record<string, unknown>)
      : null;
  } catch {
    return null;
  }
}

function pointsOf({ where, count, energy, data }: EvaluateFields): Record<string, unknown> | string {
  if (where === "own") {
    if (data.trim() === "") return "Give points or momenta as JSON, typed or as a file.";
    const document = readJson(data);
    if (document === null) return "The points are not a JSON object.";
    const { points, momenta, signature } = document;
    if ((points === undefined) === (momenta === undefined))
      return "The document of points has neither or both of points and momenta.";
    return points === undefined ? { momenta, ...(signature !== undefined && { signature }) } : { points };
  }
  if (!/^\d{1,6}$/.test(count.trim())) return `“${count}” is no number of points.`;
  const request: Record<string, unknown> = { [where]: Number(count) };
  if (where === "phaseSpace" && energy.trim() !== "") {
    if (!/^[0-9.]+([eE][+-]?\d+)?$/.test(energy.trim())) return `“${energy}” is no energy.`;
    request.energy = Number(energy);
  }
  return request;
}

/** The part of an address that names a derived form. */
export const deriveFieldsOf = (fields: EvaluateFields): Record<string, string> =>
  Object.fromEntries(deriveFieldNames.map((name) => [name, name === "method" ? fields.derived : fields[name]]));

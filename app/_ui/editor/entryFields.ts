/** The fields of the submit page as a person fills them in, and the entry document they make. Used by browser and server. */

import type { Diagnostic } from "../../../engine/result";
import type { FormView } from "../../_contract";

export const fieldNames = [
  "n",
  "k",
  "loops",
  "component",
  "target",
  "square",
  "notation",
  "title",
  "method",
  "references",
  "note",
] as const;
export type FieldName = (typeof fieldNames)[number];
export type Fields = Record<FieldName, string>;

export const emptyFields: Fields = {
  n: "",
  k: "",
  loops: "0",
  component: "",
  target: "amplitude",
  square: "<ab>[ab]",
  notation: "",
  title: "",
  method: "",
  references: "",
  note: "",
};

/** A published example that the page and the home page open with: the NMHV tree (arXiv:0807.1095). */
export const exampleFields: Fields = {
  ...emptyFields,
  n: "7",
  k: "1",
  notation: "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]",
};

/** Reads the known fields out of a form or an address; missing ones are empty as in `emptyFields`. */
export function readFields(get: (name: FieldName) => unknown): Fields {
  const fields = { ...emptyFields };
  for (const name of fieldNames) {
    const value = get(name);
    if (typeof value === "string") fields[name] = value.replaceAll("\r\n", "\n");
  }
  return fields;
}

/** The fields that make a derived form. */
export function fieldsOfDocument(document: {
  readonly amplitude: { readonly n: number; readonly k: number; readonly loops: number };
  readonly title: string;
  readonly notation: string;
  readonly method: string;
  readonly references: readonly { readonly arxiv: string }[];
}): Fields {
  const { amplitude, title, notation, method, references } = document;
  return {
    ...emptyFields,
    n: String(amplitude.n),
    k: String(amplitude.k),
    loops: String(amplitude.loops),
    notation,
    title,
    method,
    references: references.map(({ arxiv }) => arxiv).join("\n"),
  };
}

/** The fields that make a kept form again, to be changed and submitted. */
export function fieldsOf(form: FormView): Fields {
  const { n, k, loops, range } = form.amplitude;
  const legs = range === null ? String(n) : `${range.from}..${range.to ?? ""}`;
  const component = form.component ?? "";
  return {
    n: legs,
    k: String(k),
    loops: String(loops),
    component: typeof component === "string" ? component : component.minus.join(", "),
    target: form.target,
    square: form.s,
    notation: form.notation,
    title: form.title ?? "",
    method: form.method ?? "",
    references: form.references
      .map(({ arxiv, doi, journal, where }) => [arxiv ?? doi ?? journal ?? "", where ?? ""].join(" ").trim())
      .join("\n"),
    note: form.note ?? "",
  };
}

/**
 * The entry document of the fields. What cannot be read as what its field asks for (a number of legs, a list of legs) is a
 * diagnostic without a place; all else is left to the entry's own schema and the parser.
 */
export function entryOf(fields: Fields): { entry: Record<string, unknown>; diagnostics: readonly Diagnostic[] } {
  const diagnostics: Diagnostic[] = [];
  const n = readLegs(fields.n.trim(), diagnostics);
  const k = readWhole("k", fields.k.trim(), "the degree k, from 0 to n-4", diagnostics);
  const loops = readWhole("loops", fields.loops.trim(), "the number of loops, from 0 to 4", diagnostics);
  const component = readComponent(fields.component.trim(), diagnostics);
  const references = fields.references
    .split("\n")
    .flatMap((line) => (line.trim() === "" ? [] : [readReference(line.trim())]));
  const entry = {
    amplitude: { n, k, loops },
    ...(component !== null && { component }),
    ...(fields.target !== "amplitude" && { target: fields.target }),
    ...(fields.square !== "<ab>[ab]" && { s: fields.square }),
    ...(fields.title.trim() !== "" && { title: fields.title.trim() }),
    notation: fields.notation,
    ...(fields.method.trim() !== "" && { method: fields.method.trim() }),
    ...(references.length > 0 && { references }),
    ...(fields.note.trim() !== "" && { note: fields.note }),
  };
  return { entry, diagnostics };
}

function readWhole(field: "k" | "loops", text: string, what: string, diagnostics: Diagnostic[]): number | null {
  if (/^\d{1,4}$/.test(text)) return Number(text);
  diagnostics.push({
    code: `field-${field}`,
    message:
      text === "" ? `The field ${field} is empty.` : `The field ${field} holds “${text}”, which is not a whole number.`,
    help: `Give ${what}.`,
  });
  return null;
}

function readLegs(text: string, diagnostics: Diagnostic[]): number | { from: number; to?: number } | null {
  if (/^\d{1,4}$/.test(text)) return Number(text);
  const range = /^(\d{1,4})\s*\.\.\s*(\d{1,4})?$/.exec(text);
  if (range !== null) {
    return { from: Number(range[1]), ...(range[2] !== undefined && { to: Number(range[2]) }) };
  }
  diagnostics.push({
    code: "field-n",
    message: text === "" ? "The field n is empty." : `The field n holds “${text}”, which is no number of legs.`,
    help: "Give one number, as 7, or a range, as 5..12, or 5.. for every n from 5 on.",
  });
  return null;
}

function readComponent(text: string, diagnostics: Diagnostic[]): string | { minus: number[] } | null {
  if (text === "") return null;
  const signs = text.replaceAll("−", "-").replaceAll(/\s/g, "");
  if (/^[+-]+$/.test(signs)) return signs;
  if (/^\d{1,2}([\s,]+\d{1,2})*$/.test(text)) return { minus: text.split(/[\s,]+/).map(Number) };
  diagnostics.push({
    code: "field-component",
    message: `The field for the component holds “${text}”, which is neither signs nor legs.`,
    help: "Give one sign for each leg, as --+-++, or the negative legs, as 1, 2; leave it empty for the superamplitude.",
  });
  return null;
}

/** "1008.2958 section 2", "doi:10.1103/... (4.5)", or any other text as a journal reference. */
function readReference(line: string): Record<string, string> {
  const arxiv = /^(?:arxiv:\s*)?(\d{4}\.\d{4,5}|[a-z-]+(?:\.[A-Z]{2})?\/\d{7})(?:v\d+)?[\s,;:]*(.*)$/i.exec(line);
  const doi = /^(?:doi:\s*|https?:\/\/(?:dx\.)?doi\.org\/)?(10\.\d{4,9}\/\S+?)[,;:]?(?:\s+(.*))?$/i.exec(line);
  const found = arxiv ?? doi;
  if (found === null) return { journal: line };
  const where = found[2]?.trim() ?? "";
  return { [found === arxiv ? "arxiv" : "doi"]: found[1] ?? "", ...(where !== "" && { where }) };
}

/** An entry document, read by the engine and laid out for storing: everything that is computed before a transaction. */
import { createHash } from "node:crypto";
import type { Target } from "../../../engine/checks/report";
import { amplitudeKey, digestOf, type Form, latexLines, readEntryValue } from "../../../engine/notation";
import { type Result, success } from "../../../engine/result";
import type { AmplitudeName } from "../identifiers";

/** Largest n of the notation: an open range ends here. */
const largestN = 64;

export interface StoredEntry {
  readonly amplitude: AmplitudeName;
  readonly rangeFrom: number;
  readonly rangeTo: number;
  /** Negative legs, "1,2"; "" for the superamplitude. */
  readonly component: string;
  readonly target: Target;
  readonly title: string | null;
  readonly method: string | null;
  readonly digest: string;
  /** The document itself. */
  readonly source: string;
  readonly latex: readonly string[];
  /** Text in which the filter `q` looks, without the identifier. */
  readonly words: string;
}

/** Reads a parsed JSON value as an entry document. */
export function readStoredEntry(value: unknown): Result<StoredEntry> {
  const read = readEntryValue(value);
  if (!read.ok) return read;
  const form = read.value;
  const { n, k, loops } = form.amplitude;
  return success({
    amplitude: { key: amplitudeKey(form), n: typeof n === "number" ? n : null, k, loops },
    rangeFrom: typeof n === "number" ? n : n.from,
    rangeTo: typeof n === "number" ? n : (n.to ?? largestN),
    component: form.component === null ? "" : form.component.join(","),
    target: form.target,
    title: form.title ?? null,
    method: form.method ?? null,
    digest: digestOf(form),
    source: JSON.stringify(value),
    latex: latexLines(form.formula),
    words: searchable(wordsOf(form)),
  });
}

function wordsOf(form: Form): string {
  const references = (form.references ?? []).flatMap((reference) => Object.values(reference));
  return [form.title, form.method, form.note, ...references, form.notation].filter(Boolean).join("\n");
}

/**
 * Text as the filter `q` compares it: compatibility forms and letter case are folded, and the three characters that mean something in a
 * LIKE pattern are replaced by private ones, so that containment is exact on both databases.
 */
export const searchable = (text: string): string =>
  text.normalize("NFKC").toLowerCase().replaceAll("%", "\uE000").replaceAll("_", "\uE001").replaceAll("\\", "\uE002");

/** Hash of a request's body, by which a reused idempotency key is told from a repeated one. */
export const bodyHash = (value: unknown): string =>
  createHash("sha256")
    .update(JSON.stringify(value) ?? "")
    .digest("hex");

/** The members of a stored document that a page shows; the document was read before it was stored. */
export interface EntryMembers {
  readonly amplitude: {
    readonly n: number | { readonly from: number; readonly to?: number };
    readonly k: number;
    readonly loops: number;
  };
  readonly notation: string;
  readonly component?: string | { readonly minus: number[] };
  readonly s?: string;
  readonly title?: string;
  readonly method?: string;
  readonly note?: string;
  readonly references?: Record<string, string>[];
}

export const membersOf = (source: string): EntryMembers => JSON.parse(source) as EntryMembers;

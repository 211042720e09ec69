/** What the page shows of a formula while it is typed: its faults, or its terms rendered. Runs in the browser's worker. */
import { countTerms, latexLines, readEntryValue, sizesOf } from "../../../engine/notation";
import type { Diagnostic } from "../../../engine/result";
import { renderLatex } from "../latex";
import { entryOf, type Fields } from "./entryFields";

/** Lines that the preview renders; the form's own page shows them all. */
export const PREVIEW_LINES = 24;

export type Preview =
  | { readonly kind: "empty" }
  | { readonly kind: "faults"; readonly diagnostics: readonly Diagnostic[] }
  | {
      readonly kind: "formula";
      /** HTML of the first lines; null where KaTeX refuses one, which is then shown as LaTeX. */
      readonly lines: readonly { readonly latex: string; readonly html: string | null }[];
      readonly allLines: number;
      /** Number of terms at the number of legs `at`. */
      readonly terms: number;
      readonly at: number;
    };

/** Reads the fields as the server will, and renders what can be read. */
export function previewOf(fields: Fields): Preview {
  if (fields.notation.trim() === "") return { kind: "empty" };
  const { entry, diagnostics } = entryOf(fields);
  if (diagnostics.length > 0) return { kind: "faults", diagnostics };
  const read = readEntryValue(entry);
  if (!read.ok) return { kind: "faults", diagnostics: read.diagnostics };
  const form = read.value;
  const lines = latexLines(form.formula);
  const at = sizesOf(form, 1)[0] ?? 0;
  return {
    kind: "formula",
    lines: lines.slice(0, PREVIEW_LINES).map((latex) => ({ latex, html: renderLatex(latex) })),
    allLines: lines.length,
    terms: countTerms(form.formula, { n: at, loops: form.amplitude.loops }, 300_000),
    at,
  };
}

/** Marks of forms typed in a test. */
import { checkForm } from "../../../../engine/checks";
import { type Form, readEntryValue } from "../../../../engine/notation";

export interface Size {
  readonly n: number;
  readonly k?: number;
  readonly loops?: number;
}

export function entry(notation: string, { n, k = 0, loops = 0 }: Size, more: Record<string, unknown> = {}): Form {
  const form = readEntryValue({ amplitude: { n, k, loops }, notation, ...more });
  if (!form.ok) throw new Error(form.diagnostics.map((d) => d.message).join("\n"));
  return form.value;
}

/** The report without any comparison: marks and poles alone decide. */
export const alone = (notation: string, size: Size, more: Record<string, unknown> = {}) =>
  checkForm(entry(notation, size, more), { seed: "marks", sources: [] }).report;

export const poleOf = (report: ReturnType<typeof alone>, bracket: string) =>
  report.poles.find((pole) => pole.bracket === bracket);

/** What the engine says of a formula while it is typed, by itself and without the server. Runs in the browser's worker. */
import { type LiveVerdict, liveVerdict } from "../../../engine/checks";
import { readEntryValue } from "../../../engine/notation";
import { KernelUnavailable } from "../../../engine/tape";
import { entryOf, type Fields } from "./entryFields";

export interface Verdict extends LiveVerdict {
  /** How long it took, reading included. */
  readonly milliseconds: number;
}

/** The verdict on the fields; null where they cannot be read. */
export function verdictOf(fields: Fields): Verdict | null {
  if (fields.notation.trim() === "") return null;
  const started = performance.now();
  const { entry, diagnostics } = entryOf(fields);
  if (diagnostics.length > 0) return null;
  const read = readEntryValue(entry);
  if (!read.ok) return null;
  try {
    const verdict = liveVerdict(read.value, crypto.randomUUID());
    return { ...verdict, milliseconds: performance.now() - started };
  } catch (error) {
    if (!(error instanceof KernelUnavailable)) throw error;
    return { state: "undecided", message: `Not looked at here: ${error.message}.`, n: 0, milliseconds: 0 };
  }
}

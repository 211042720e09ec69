/** Where the faults of a text stand: its lines with faults, cut into pieces, with pointers for the row below. */
import type { Diagnostic } from "../../engine/result";

export interface Piece {
  readonly text: string;
  readonly faulty: boolean;
  /** Offset in the line, UTF-16 code units. */
  readonly at: number;
}

export interface FaultyLine {
  /** From 1. */
  readonly number: number;
  readonly pieces: readonly Piece[];
  /** Blanks and carets that stand under the faulty characters. */
  readonly pointers: string;
  /** Diagnostics that begin in the line, with their column from 1. */
  readonly diagnostics: readonly { readonly diagnostic: Diagnostic; readonly column: number }[];
}

/** A longer line is cut around its faults, so that a formula of a million characters shows a short excerpt. */
const CONTEXT = 60;

/**
 * The lines of `source` that a diagnostic with a span begins in, in order; diagnostics without a span are `unplaced`.
 * A span that runs over the end of its line is cut there; an empty span points at the character it stands before.
 */
export function faultyLines(
  source: string,
  diagnostics: readonly Diagnostic[],
): { lines: readonly FaultyLine[]; unplaced: readonly Diagnostic[] } {
  const starts = lineStarts(source);
  const byLine = new Map<number, Diagnostic[]>();
  const unplaced: Diagnostic[] = [];
  for (const diagnostic of diagnostics) {
    if (diagnostic.span === undefined) {
      unplaced.push(diagnostic);
      continue;
    }
    const line = lineOf(starts, Math.min(diagnostic.span[0], source.length));
    const found = byLine.get(line);
    if (found === undefined) byLine.set(line, [diagnostic]);
    else found.push(diagnostic);
  }
  const lines = [...byLine.entries()]
    .sort(([a], [b]) => a - b)
    .map(([line, faults]) => {
      const start = starts[line] ?? 0;
      const next = starts[line + 1];
      const text = source.slice(start, next === undefined ? source.length : next - 1);
      return markedLine(line + 1, start, text, faults);
    });
  return { lines, unplaced };
}

function lineStarts(source: string): number[] {
  const starts = [0];
  for (let at = source.indexOf("\n"); at !== -1; at = source.indexOf("\n", at + 1)) starts.push(at + 1);
  return starts;
}

/** Index of the line that holds the offset, by bisection. */
function lineOf(starts: readonly number[], offset: number): number {
  let low = 0;
  let high = starts.length;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((starts[middle] ?? 0) <= offset) low = middle;
    else high = middle;
  }
  return low;
}

function markedLine(number: number, start: number, text: string, faults: readonly Diagnostic[]): FaultyLine {
  const placed = faults
    .map((diagnostic) => {
      const [from, to] = diagnostic.span ?? [start, start];
      const column = Math.min(from - start, text.length);
      return {
        diagnostic,
        from: column,
        to: Math.min(Math.max(to - start, column + 1), Math.max(text.length, column + 1)),
      };
    })
    .sort((a, b) => a.from - b.from || a.to - b.to);
  const first = placed[0]?.from ?? 0;
  const last = placed.reduce((most, { to }) => Math.max(most, to), 0);
  const cutFrom = text.length > 4 * CONTEXT && first > CONTEXT ? first - CONTEXT : 0;
  const cutTo =
    text.length > 4 * CONTEXT ? Math.min(text.length, Math.min(last, first + 10 * CONTEXT) + CONTEXT) : text.length;
  const inFault = (at: number) => placed.some(({ from, to }) => from <= at && at < to);
  const pieces: Piece[] = [];
  let pointers = "";
  if (cutFrom > 0) {
    pieces.push({ text: "… ", faulty: false, at: -1 });
    pointers += "  ";
  }
  let pieceFrom = cutFrom;
  for (let at = cutFrom; at < cutTo; at++) {
    pointers += inFault(at) ? "^" : " ";
    if (at + 1 === cutTo || inFault(at + 1) !== inFault(at)) {
      pieces.push({ text: text.slice(pieceFrom, at + 1), faulty: inFault(at), at: pieceFrom });
      pieceFrom = at + 1;
    }
  }
  if (cutTo < text.length) pieces.push({ text: " …", faulty: false, at: text.length });
  else if (placed.some(({ from }) => from >= text.length)) pointers += "^";
  return {
    number,
    pieces,
    pointers,
    diagnostics: placed.map(({ diagnostic, from }) => ({ diagnostic, column: from + 1 })),
  };
}

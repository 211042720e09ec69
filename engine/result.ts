/**
 * What every layer of the engine says when a person's input is at fault.
 *
 * A fault of the user is a value (`Result`); a broken invariant of the program throws.
 */

/** Half-open range of UTF-16 code units in the source text. */
export type Span = readonly [start: number, end: number];

/** A replacement that would mend one fault. */
export interface Suggestion {
  readonly span: Span;
  readonly replacement: string;
}

/** One fault in something a person typed. `code` is stable; `message` is one line; `help` says what to do. */
export interface Diagnostic {
  readonly code: string;
  readonly message: string;
  readonly span?: Span;
  readonly help?: string;
  readonly suggestion?: Suggestion;
}

export type Result<T> =
  | { readonly ok: true; readonly value: T }
  | { readonly ok: false; readonly diagnostics: readonly Diagnostic[] };

export const success = <T>(value: T): Result<T> => ({ ok: true, value });

export const failure = (...diagnostics: readonly Diagnostic[]): Result<never> => ({ ok: false, diagnostics });

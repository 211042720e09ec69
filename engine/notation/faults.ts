/** Collects the faults of one text, up to a limit. */
import type { Diagnostic, Span, Suggestion } from "../result";
import type { Code } from "./codes";
import { mostDiagnostics } from "./limits";

/** Thrown inside the parser, never out of it, when there is no sense in reading on. */
export const stop = Symbol("stop");

export interface Advice {
  readonly help?: string;
  /** Replaces the span of the fault, or its own span. */
  readonly replacement?: string;
  readonly suggestion?: Suggestion;
}

export class Faults {
  private readonly found: Diagnostic[] = [];

  get any(): boolean {
    return this.found.length > 0;
  }

  /** @throws stop once there are more than `mostDiagnostics`. */
  add(code: Code, span: Span | undefined, message: string, { help, replacement, suggestion }: Advice = {}): void {
    if (this.found.length === mostDiagnostics) {
      this.found.push({
        code: "more-faults",
        message: `There are more than ${mostDiagnostics} faults; the rest are not listed.`,
        ...(span === undefined ? {} : { span }),
        help: "Mend the first ones and check again.",
      });
    }
    if (this.found.length > mostDiagnostics) throw stop;
    const mended = suggestion ?? (replacement === undefined || span === undefined ? undefined : { span, replacement });
    this.found.push({
      code,
      message,
      ...(span === undefined ? {} : { span }),
      ...(help === undefined ? {} : { help }),
      ...(mended === undefined ? {} : { suggestion: mended }),
    });
  }

  /** A fault after which nothing is read. @throws stop always. */
  fatal(code: Code, span: Span | undefined, message: string, advice: Advice = {}): never {
    this.add(code, span, message, advice);
    throw stop;
  }

  /** In the order of the text; "more-faults" last. */
  list(): readonly Diagnostic[] {
    const rank = ({ code, span }: Diagnostic): number =>
      code === "more-faults" ? Number.POSITIVE_INFINITY : (span?.[0] ?? -1);
    return [...this.found].sort((a, b) => (rank(a) === rank(b) ? 0 : rank(a) - rank(b)));
  }
}

/** The one place where the checks evaluate a form: it is compiled to a tape, and batches of samples go through the kernel. */
import type { FormAtN } from "../evaluate/form";
import type { Field } from "../fields";
import type { Point } from "../kinematics";
import type { Diagnostic, Span } from "../result";
import { compile, evaluateTape, type Tape } from "../tape";

/** A point modulo a prime of 31 bits; residues in 0..prime-1. */
export interface Sample {
  readonly prime: number;
  readonly field: Field<number>;
  readonly point: Point<number>;
}

export type Outcome =
  | { readonly kind: "value"; readonly sum: number; readonly terms: readonly number[] }
  | { readonly kind: "zero-denominator"; readonly span: Span };

export interface PreparedForm {
  readonly form: FormAtN;
  readonly tape: Tape;
  /** Field multiplications for one sample. */
  readonly operations: number;
  evaluate(samples: readonly Sample[]): readonly Outcome[];
}

export const evaluatorName = "WebAssembly SIMD tape, a 31-bit prime for each point";

/** A form whose tape would be larger than the limits: a fault of the input, with its place. */
export class FormTooLarge extends Error {
  constructor(readonly diagnostics: readonly Diagnostic[]) {
    super(diagnostics[0]?.message ?? "the form is too large");
  }
}

/** Compiles a form that was validated for its n, k and loops. @throws FormTooLarge; KernelUnavailable at the first evaluation */
export function prepare(form: FormAtN): PreparedForm {
  const compiled = compile(form);
  if (!compiled.ok) throw new FormTooLarge(compiled.diagnostics);
  const tape: Tape = compiled.value;
  return {
    form,
    tape,
    operations: tape.counts.multiplications,
    evaluate: (samples) => (samples.length === 0 ? [] : evaluated(tape, samples)),
  };
}

function evaluated(tape: Tape, samples: readonly Sample[]): readonly Outcome[] {
  const { values } = evaluateTape(tape, samples, { terms: true });
  if (values === null) throw new Error("prepare: an evaluation that nobody cancelled was cancelled");
  return values.map((v) => (v.kind === "value" ? { kind: "value", sum: v.sum, terms: v.terms ?? [] } : v));
}

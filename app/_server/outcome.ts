/** What a domain function answers where a caller can be at fault: a value, or a problem document. */

import type { Diagnostic } from "../../engine/result";
import { type Problem, type ProblemCode, problemCodes } from "../_contract";

export type Outcome<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly problem: Problem };

export const answer = <T>(value: T): Outcome<T> => ({ ok: true, value });

/** The problem document of `code`; `detail` says what happened and what to do. */
export function problemOf(code: ProblemCode, detail: string, diagnostics?: readonly Diagnostic[]): Problem {
  const { status, title } = problemCodes[code];
  return {
    type: `urn:equiform:problem:${code}`,
    title,
    status,
    code,
    detail,
    ...(diagnostics ? { diagnostics: diagnostics.map(plainDiagnostic) } : {}),
  };
}

export const refuse = (code: ProblemCode, detail: string, diagnostics?: readonly Diagnostic[]): Outcome<never> => ({
  ok: false,
  problem: problemOf(code, detail, diagnostics),
});

/** A diagnostic as the contract's mutable JSON. */
export function plainDiagnostic(fault: Diagnostic): NonNullable<Problem["diagnostics"]>[number] {
  const { code, message, span, help, suggestion } = fault;
  return {
    code,
    message,
    ...(span ? { span: [span[0], span[1]] as [number, number] } : {}),
    ...(help === undefined ? {} : { help }),
    ...(suggestion
      ? {
          suggestion: {
            span: [suggestion.span[0], suggestion.span[1]] as [number, number],
            replacement: suggestion.replacement,
          },
        }
      : {}),
  };
}

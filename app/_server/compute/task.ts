/** What is computed for somebody who waits for it, as plain data to the thread and back. */
import type { DeriveRequest } from "../../../engine/derive";
import type { NumberKind, PointSource } from "../../../engine/evaluate";
import type { Diagnostic } from "../../../engine/result";
import type { EvaluateReply } from "../../_contract";

export interface EvaluateTask {
  readonly what: "evaluate";
  /** An entry document that was read without a fault, and the n to evaluate at. */
  readonly entry: unknown;
  readonly n: number;
  readonly source:
    | PointSource
    | { readonly kind: "phaseSpace"; readonly count: number; readonly energy: number; readonly seed: string };
  readonly numbers: NumberKind;
  readonly helicities: readonly (readonly number[] | null)[];
  /** True for the reply with `components`. */
  readonly many: boolean;
}

export interface DeriveTask {
  readonly what: "derive";
  readonly request: DeriveRequest;
}

/** A derived form as pages show it. */
export interface Derived {
  readonly document: {
    readonly amplitude: { readonly n: number; readonly k: number; readonly loops: number };
    readonly title: string;
    readonly notation: string;
    readonly method: string;
    readonly references: { readonly arxiv: string; readonly title: string }[];
  };
  readonly terms: number;
  /** Line by line, definitions first. */
  readonly latex: readonly string[];
}

export type Task = EvaluateTask | DeriveTask;

export type Computed =
  | { readonly kind: "values"; readonly reply: EvaluateReply }
  | { readonly kind: "derived"; readonly derived: Derived }
  | { readonly kind: "refused"; readonly diagnostics: readonly Diagnostic[] };

/** What the thread says at the end of a task. */
export type Answer = Computed | { readonly kind: "failed"; readonly message: string };

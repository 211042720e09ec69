/** What every diagnosis is given: the form, its truth, and points over one prime where both have values. */
import type { FormAtN } from "../../evaluate/form";
import type { Question } from "../../sources";
import type { Bench, Value } from "../bench";
import { drawOverOnePrime } from "../draws";
import { type Outcome, prepare, type Sample } from "../evaluator";
import type { Comparand } from "../truth";
import type { WeightReport } from "../weights";

export interface Probe {
  readonly sample: Sample;
  readonly value: Value;
  readonly truth: number;
}

export interface DiagnosisCase {
  readonly seed: string;
  readonly form: FormAtN;
  readonly question: Question;
  readonly weights: WeightReport;
  /** Null where the form has no value, because its summands differ in Grassmann degree or it is of another degree. */
  readonly bench: Bench | null;
  /** What the form was compared with, the cheapest first; empty where nothing was. */
  readonly truths: readonly Comparand[];
  /** Points over one prime; empty where the form has no value or no truth. */
  readonly probes: readonly Probe[];
  /** Sources of another question about the same legs, if any covers it. */
  readonly truthOf: (question: Question) => Comparand | null;
  /** Accounts for operations; false when the budget is used up. */
  readonly spend: (operations: number) => boolean;
}

/** Points enough that a coincidence modulo one prime (at most d/p each) is out of the question for a sentence that is confirmed anyway. */
export const probeCount = 4;

/** Values of a form and of its truth at fresh points over one prime, bad points left out. */
export function drawProbes(seed: string, form: FormAtN, truth: Comparand): readonly Probe[] {
  const samples = drawOverOnePrime(seed, "diagnosis", form, 2 * probeCount);
  const values = prepare(form).evaluate(samples);
  const truths = truth.evaluate(samples);
  return samples
    .flatMap((sample, i) => {
      const [value, expected] = [values[i], truths[i]];
      return value?.kind === "value" && expected !== null && expected !== undefined
        ? [{ sample, value, truth: expected }]
        : [];
    })
    .slice(0, probeCount);
}

/** True where every outcome is a value and equals what is expected there. */
export const allEqual = (outcomes: readonly Outcome[], expected: readonly number[]): boolean =>
  outcomes.length > 0 && outcomes.every((o, i) => o.kind === "value" && o.sum === expected[i]);

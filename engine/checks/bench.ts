/** What the marks and the diagnosis work with: one form at one n, prepared, with its values at the samples of the check. */
import type { FormAtN } from "../evaluate/form";
import type { Outcome, PreparedForm, Sample } from "./evaluator";
import type { Ground } from "./ground";
import type { Pole, Target } from "./report";
import type { SeriesForm } from "./seriesEvaluator";

export interface Value {
  readonly sum: number;
  readonly terms: readonly number[];
}

export interface Bench {
  readonly seed: string;
  readonly form: FormAtN;
  readonly target: Target;
  readonly prepared: PreparedForm;
  /** Values in Laurent series, for what is looked at near a divisor or in a limit. */
  readonly series: SeriesForm;
  /** Generic points that paths start from, drawn once for all marks. */
  readonly ground: (attempt: number) => Ground;
  readonly samples: readonly Sample[];
  /** Values of the form at the samples, in their order. */
  readonly values: readonly Value[];
  readonly poles: readonly Pole[];
  /** Probability that one sample does not see a difference between two functions of the size of this form. */
  readonly miss: number;
}

export const asValue = (outcome: Outcome): Value | null => (outcome.kind === "value" ? outcome : null);

/** Values at moved samples beside those at the samples themselves, bad points left out. */
export function pairs(
  bench: Bench,
  move: (sample: Sample) => Sample["point"],
): readonly { readonly sample: Sample; readonly at: Value; readonly moved: Value }[] {
  const outcomes = bench.prepared.evaluate(bench.samples.map((sample) => ({ ...sample, point: move(sample) })));
  return outcomes.flatMap((outcome, i) => {
    const [sample, at, moved] = [bench.samples[i], bench.values[i], asValue(outcome)];
    return sample && at && moved ? [{ sample, at, moved }] : [];
  });
}

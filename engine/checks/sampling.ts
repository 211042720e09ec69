/** Draws the samples of a check: those at which the form and everything it is compared with have a value. */
import type { Span } from "../result";
import type { Value } from "./bench";
import { drawSample } from "./draws";
import type { PreparedForm, Sample } from "./evaluator";
import type { Chosen } from "./truth";

export interface Sampled {
  readonly samples: readonly Sample[];
  /** The number of each sample in the stream of draws: numbers left out were bad points. */
  readonly draws: readonly number[];
  readonly values: readonly Value[];
  /** Values of each comparand at the first samples, as many as it needs. */
  readonly truths: readonly (readonly number[])[];
}

/** A denominator that vanished at every point drawn. */
export interface VanishingDenominator {
  readonly span: Span;
}

/** So many bad points in a row, each with a prime of its own, mean that a denominator is zero everywhere. */
const drawsBeforeGivingUp = 8;

/**
 * `count` samples, drawn in order, bad points left out.
 * @returns where the first `drawsBeforeGivingUp` draws are all bad for the form, the denominator that vanished at the last one.
 * @throws Error where a comparand has no value at many points at which the form has: a fault of the program.
 */
export function drawSamples(
  seed: string,
  prepared: PreparedForm,
  chosen: readonly Chosen[],
  count: number,
  onProgress: (done: number) => void = () => {},
): Sampled | VanishingDenominator {
  const kept = {
    samples: [] as Sample[],
    draws: [] as number[],
    values: [] as Value[],
    truths: chosen.map(() => [] as number[]),
  };
  let badForTruth = 0;
  for (let draw = 0; kept.samples.length < count; draw++) {
    const sample = drawSample(seed, "sample", prepared.form, draw);
    const [outcome] = prepared.evaluate([sample]);
    if (outcome === undefined) throw new Error("drawSamples: no outcome for a sample");
    if (outcome.kind === "zero-denominator") {
      if (kept.samples.length === 0 && draw + 1 >= drawsBeforeGivingUp) return { span: outcome.span };
      if (draw > 4 * count + 4 * drawsBeforeGivingUp) return { span: outcome.span };
      continue;
    }
    const asked = chosen.filter((c) => c.samples > kept.samples.length);
    const truths = asked.map((c) => c.comparand.evaluate([sample])[0] ?? null);
    if (truths.includes(null)) {
      badForTruth += 1;
      if (badForTruth > 2 * count + drawsBeforeGivingUp) {
        const name = asked[truths.indexOf(null)]?.comparand.name;
        throw new Error(`drawSamples: ${name} has no value at ${badForTruth} random points`);
      }
      continue;
    }
    kept.samples.push(sample);
    kept.draws.push(draw);
    kept.values.push(outcome);
    asked.forEach((c, i) => {
      const value = truths[i];
      if (value !== null && value !== undefined) kept.truths[chosen.indexOf(c)]?.push(value);
    });
    onProgress(kept.samples.length);
  }
  return kept;
}

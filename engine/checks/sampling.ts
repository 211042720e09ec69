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
 * `count` samples, drawn in order and evaluated in rounds of as many as are missing; bad points are left out.
 * @returns where the first round of draws is bad for the form at every point, the denominator that vanished.
 * @throws Error where a comparand has no value at many points at which the form has: a fault of the program.
 */
export function drawSamples(
  seed: string,
  prepared: PreparedForm,
  chosen: readonly Chosen[],
  count: number,
): Sampled | VanishingDenominator {
  const kept = {
    samples: [] as Sample[],
    draws: [] as number[],
    values: [] as Value[],
    truths: chosen.map(() => [] as number[]),
  };
  let draw = 0;
  let badForTruth = 0;
  while (kept.samples.length < count) {
    const missing = kept.samples.length === 0 ? Math.max(count, drawsBeforeGivingUp) : count - kept.samples.length;
    const round = Array.from({ length: missing }, () => ({
      draw,
      sample: drawSample(seed, "sample", prepared.form, draw++),
    }));
    const outcomes = prepared.evaluate(round.map((r) => r.sample));
    const good = round.flatMap((r, i) => {
      const outcome = outcomes[i];
      return outcome?.kind === "value" ? [{ ...r, value: outcome }] : [];
    });
    const [bad] = outcomes.filter((o) => o.kind === "zero-denominator");
    if (bad !== undefined && (kept.samples.length === 0 ? good.length === 0 : draw > 8 * count))
      return { span: bad.span };
    const truths = chosen.map((c) =>
      truthsOf(
        c,
        good.map((g) => g.sample),
        kept.samples.length,
      ),
    );
    for (const [i, candidate] of good.entries()) {
      if (kept.samples.length === count) break;
      const asked = chosen.flatMap((c, at) => (c.samples > kept.samples.length ? [at] : []));
      const found = asked.map((at) => truths[at]?.(i) ?? null);
      const nameless = found.indexOf(null);
      if (nameless >= 0) {
        badForTruth += 1;
        if (badForTruth > 2 * count + drawsBeforeGivingUp)
          throw new Error(
            `drawSamples: ${chosen[asked[nameless] ?? 0]?.comparand.name} has no value at ${badForTruth} random points`,
          );
        continue;
      }
      kept.samples.push(candidate.sample);
      kept.draws.push(candidate.draw);
      kept.values.push(candidate.value);
      asked.forEach((at, j) => {
        kept.truths[at]?.push(found[j] ?? 0);
      });
    }
  }
  return kept;
}

/**
 * Values of a comparand at the candidates of one round. Those it is sure to be asked for are found together; later ones, which take the
 * place of rejected points, one by one.
 */
function truthsOf(
  { comparand, samples }: Chosen,
  candidates: readonly Sample[],
  kept: number,
): (index: number) => number | null {
  const together = comparand.evaluate(candidates.slice(0, Math.max(0, samples - kept)));
  return (index) => {
    const candidate = candidates[index];
    if (index < together.length) return together[index] ?? null;
    return candidate === undefined ? null : (comparand.evaluate([candidate])[0] ?? null);
  };
}

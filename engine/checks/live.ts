/**
 * The verdict alone, for somebody who is typing: the form at a few random points beside the cheapest source of truth. It says what the
 * check will find and decides nothing: acceptance draws its own primes and needs its bound.
 */
import { formAt } from "../evaluate/form";
import { type Form, sizesOf } from "../notation";
import { FormTooLarge, prepare } from "./evaluator";
import { drawSamples } from "./sampling";
import { cheapestTruth } from "./truth";
import { checkWeights } from "./weights";

export interface LiveVerdict {
  readonly state: "agrees" | "disagrees" | "undecided" | "unreadable";
  /** One sentence. */
  readonly message: string;
  /** The n that was tried. */
  readonly n: number;
}

/** Points that are tried: enough to see a difference but for a chance of about (degree / 2^30)^3. */
const livePoints = 3;
/** Multiplications that one look may take: what is larger waits for the check. */
const liveBudget = 50_000_000;

/** The verdict at the smallest n of the form that has a tree of some size (n >= 6 where the range allows it). */
export function liveVerdict(form: Form, seed: string): LiveVerdict {
  const sizes = sizesOf(form, 6);
  const n = sizes.find((size) => size >= 6) ?? sizes.at(-1) ?? 4;
  const at = formAt(form, n);
  const weights = checkWeights(at, form.target);
  const [fault] = weights.faults;
  if (fault !== undefined) return { state: "disagrees", message: fault.message, n };
  const truth = cheapestTruth({ n, k: at.k, loops: at.loops, negativeLegs: at.negativeLegs, target: form.target });
  if (truth === null) return { state: "undecided", message: "There is no source of truth for this amplitude.", n };
  try {
    const prepared = prepare(at);
    if (livePoints * (prepared.operations + truth.cost) > liveBudget)
      return {
        state: "undecided",
        message: "The form is too large to be looked at while you type; submit it to have it checked.",
        n,
      };
    const sampled = drawSamples(seed, prepared, [{ comparand: truth, miss: 0, samples: livePoints }], livePoints);
    if ("span" in sampled) return { state: "unreadable", message: "A denominator is zero at every point.", n };
    const agrees = sampled.values.every((value, i) => value.sum === sampled.truths[0]?.[i]);
    const where = typeof form.amplitude.n === "number" ? "" : ` at n = ${n}`;
    return agrees
      ? { state: "agrees", message: `Agrees with ${truth.name} at ${livePoints} random points${where}.`, n }
      : { state: "disagrees", message: `Differs from ${truth.name}${where}.`, n };
  } catch (error) {
    if (!(error instanceof FormTooLarge)) throw error;
    return { state: "unreadable", message: error.message, n };
  }
}

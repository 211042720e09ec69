/** Whether every term has one sign on positive kinematics, and all the same: positivity made manifest, which says nothing of dissections. */
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { signsOf } from "./positivity";

export function termsOneSign(bench: Bench): Mark {
  const signs = signsOf(bench);
  if ("state" in signs) return signs;
  const { samples } = signs;
  const [first] = samples;
  const of = `${samples.length} samples of positive kinematics, in exact rational numbers`;
  const terms = first?.terms.length ?? 0;
  const seen = Array.from({ length: terms }, (_, term) => new Set(samples.map((sample) => sample.terms[term]!)));
  const changing = seen.flatMap((values, term) => (values.has(1) && values.has(-1) ? [term + 1] : []));
  if (changing.length > 0) {
    const shown = changing.slice(0, 6).join(", ");
    return {
      state: "fails",
      evidence: `${changing.length} of ${terms} terms change sign among ${of}: ${changing.length === 1 ? "term" : "terms"} ${shown}${changing.length > 6 ? " and more" : ""}.`,
    };
  }
  const negative = seen.filter((values) => values.has(-1)).length;
  const positive = seen.filter((values) => values.has(1)).length;
  if (negative > 0 && positive > 0)
    return {
      state: "fails",
      evidence: `Each of the ${terms} terms keeps its sign at ${of}, but ${positive} are positive and ${negative} negative.`,
    };
  return {
    state: "holds",
    evidence: `Each of the ${terms} terms is ${negative > 0 ? "negative" : "positive"} at ${of}: evidence, not a proof.`,
  };
}

/** What a check is doing, in a sentence for each stage the engine names. */
import type { CheckState } from "../_contract";

const sentences: Record<string, string> = {
  reading: "Reading the formula.",
  weights: "Counting weights in every label.",
  lowering: "Preparing the formula for evaluation.",
  equality: "Comparing with the sources of truth and the accepted forms at random points.",
  symmetries: "Trying the symmetries.",
  reference: "Changing the reference.",
  poles: "Finding and classifying the poles.",
  diagnosis: "Looking for what is wrong.",
  certificate: "Writing the certificate.",
};

/** The sentence for a state and stage; a stage without one is named as it is. */
export function stageSentence(state: CheckState, stage: string): string {
  if (state === "queued") return "Waiting for a free worker.";
  if (state === "cancelled") return "The check was cancelled.";
  if (state === "done") return "The check has ended.";
  return sentences[stage] ?? (stage === "" ? "Starting." : `At work: ${stage}.`);
}

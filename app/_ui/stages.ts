/** What a check is doing, in a sentence for each stage the engine names. */
import type { CheckState } from "../_contract";
import { markNames } from "./marks";

const sentences: Record<string, string> = {
  weights: "Counting weights in every label.",
  values: "Comparing with the sources of truth and the accepted forms at random points.",
  diagnosis: "Looking for what is wrong.",
  fingerprint: "Computing the fingerprint.",
};

/** The sentence for a state and stage; a stage that tries a mark is named after it, any other as it is. */
export function stageSentence(state: CheckState, stage: string): string {
  if (state === "queued") return "Waiting for a free worker.";
  if (state === "cancelled") return "The check was cancelled.";
  if (state === "done") return "The check has ended.";
  const mark = markNames.get(stage);
  if (mark !== undefined) return `Trying: ${mark}.`;
  return sentences[stage] ?? (stage === "" ? "Starting." : `At work: ${stage}.`);
}

import { assertCovered } from "./question";
import type { Source } from "./source";

/** What an identity must evaluate to. */
export const zero: Source = {
  name: "zero",
  reference: "an identity states that its value vanishes",
  lineage: "zero",
  covers: (question) => question.target === "zero",
  cost: () => 0,
  size: () => ({ degree: 0, denominatorDegree: 0, heightBits: 0, denominatorHeightBits: 0 }),
  evaluate(question): number {
    assertCovered(this.name, this.covers(question), question);
    return 0;
  },
};

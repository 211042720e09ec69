/** Whether the value has one sign on positive kinematics: evidence, never a proof. */
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { signsOf } from "./positivity";

export function oneSign(bench: Bench): Mark {
  const signs = signsOf(bench);
  if ("state" in signs) return signs;
  const { samples } = signs;
  const count = (sign: number): number => samples.filter(({ sum }) => sum === sign).length;
  const where = " of positive kinematics, in exact rational numbers";
  for (const [sign, says] of [
    [1, "positive"],
    [-1, "negative"],
  ] as const)
    if (count(sign) === samples.length)
      return {
        state: "holds",
        evidence: `The value is ${says} at all ${samples.length} samples${where}: evidence, not a proof.`,
      };
  return {
    state: "fails",
    evidence: `The value is positive at ${count(1)} and negative at ${count(-1)} of ${samples.length} samples${where}.`,
  };
}

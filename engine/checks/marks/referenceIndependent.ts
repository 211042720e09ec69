/** Independence of the reference twistor `*` and of the reference line `X`. */
import { pointUse } from "../../evaluate/form";
import { randomness } from "../../fields";
import { randomPoint, replaceReferences } from "../../kinematics";
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { testInvariance } from "./invariance";

export function referenceIndependent(bench: Bench): Mark {
  const { referenceTwistor, referenceLine } = pointUse(bench.form);
  if (!referenceTwistor && !referenceLine)
    return { state: "notApplicable", evidence: "The form holds no reference twistor and no reference line." };
  return testInvariance(bench, {
    when: "the reference twistor and the reference line are drawn again",
    move: ({ prime, field, point }) =>
      replaceReferences(point, randomPoint(field, bench.form, randomness(`${bench.seed}|references|${prime}`))),
  });
}

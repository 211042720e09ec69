/** The k-preserving collinear limits: a leg goes to one of its neighbours (for components the splitting factors). */
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { componentCollinear } from "./componentLimits";
import { testLimits } from "./limits";

export function collinear(bench: Bench): Mark {
  if (bench.form.negativeLegs !== null && bench.target === "amplitude") return componentCollinear(bench);
  return testLimits(bench, [
    { goal: "the leg before it", end: (_, before) => before },
    { goal: "the leg after it", end: (_ground, _before, after) => after },
  ]);
}

/** The soft limit: a leg goes to a point of the line through its neighbours (1008.2958; for components the eikonal factor). */
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { componentSoft } from "./componentLimits";
import { testLimits } from "./limits";
import { combine } from "./moves";

export function soft(bench: Bench): Mark {
  if (bench.form.negativeLegs !== null && bench.target === "amplitude") return componentSoft(bench);
  return testLimits(bench, [
    {
      goal: "a point of the line through its neighbours",
      end: (ground, before, after) => {
        const [a, b] = ground.numbers("soft", 2) as [number, number];
        return combine(ground.field, [
          [a, before],
          [b, after],
        ]);
      },
    },
  ]);
}

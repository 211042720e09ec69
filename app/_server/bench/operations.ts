/** Operations of each source of truth at one point, for every amplitude of few legs: what budgets are counted in. */
import { answering, type Question } from "../../../engine/sources";
import type { Report } from "./report";

const mostLegs = 10;

/** Entries "operations n6k1L0: SOURCE (LINEAGE)". */
export function operations(report: Report): void {
  for (const loops of [0, 1, 2, 3]) {
    for (let n = 4; n <= mostLegs; n++) {
      for (let k = 0; k <= n - 4; k++) {
        const question: Question = { n, k, loops, negativeLegs: null, target: "amplitude" };
        for (const source of answering(question)) {
          report.entries.push({
            name: `operations n${n}k${k}L${loops}: ${source.name} (${source.lineage})`,
            median: Math.round(source.cost(question)),
            unit: "operations",
          });
        }
      }
    }
  }
}

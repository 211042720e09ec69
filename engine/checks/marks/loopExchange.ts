/** Symmetry in the loop lines. */
import { exchangeLoops } from "../../kinematics";
import type { LoopNumber } from "../../notation/tree";
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { termsPermuted, testInvariance } from "./invariance";

export function loopExchange(bench: Bench): Mark {
  const { loops } = bench.form;
  if (loops < 2) return { state: "notApplicable", evidence: "There are not two loop lines to exchange." };
  const lines = Array.from({ length: loops }, (_, l) => l as LoopNumber);
  // Exchanges of neighbours generate all permutations.
  const exchanges = lines
    .slice(1)
    .map((l) => lines.map((m) => (m === l ? ((l - 1) as LoopNumber) : m === l - 1 ? l : m)));
  let mark: Mark | null = null;
  for (const exchange of exchanges) {
    mark = testInvariance(bench, {
      when: "two loop lines are exchanged",
      move: ({ point }) => exchangeLoops(point, exchange),
    });
    if (mark.state !== "holds") return mark;
  }
  if (mark === null) throw new Error("loopExchange: no exchange was tried");
  return {
    ...mark,
    manifest: exchanges.every((exchange) => termsPermuted(bench, ({ point }) => exchangeLoops(point, exchange))),
  };
}

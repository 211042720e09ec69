/** A form typed by hand: from its text to its values. */

import { evaluateTape } from "../../../engine/tape";
import { duration } from "../../../engine/tape/bench/measure";
import { pointsFor, tapeOf, treeForm } from "./forms";
import { addRatio, type Report } from "./report";

const LIMIT_SECONDS = 0.016;

/** Fifty terms at n = 8: all R-invariants of eight legs but six. */
export function typing(report: Report): void {
  const invariants: string[] = [];
  for (let set = 0; set < 256; set++) {
    const labels = [1, 2, 3, 4, 5, 6, 7, 8].filter((label) => (set >> (label - 1)) & 1);
    if (labels.length === 5) invariants.push(`[${labels.join(" ")}]`);
  }
  const notation = invariants.slice(0, 50).join(" + ");
  const points = pointsFor(treeForm(notation, 8, 1), 12);
  const work = (): void => {
    evaluateTape(tapeOf(treeForm(notation, 8, 1)), points);
  };
  // An editor is warm after a few letters.
  for (let i = 0; i < 30; i++) work();
  const seconds = duration(work, 25);
  report.entries.push({ name: "50 terms at n=8: read, compile, 12 points", median: 1000 * seconds, unit: "ms" });
  addRatio(report, "50 terms at n=8: 16 ms over the time", LIMIT_SECONDS / seconds, 1);
}

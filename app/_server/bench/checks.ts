/** Time of a whole check (values, poles, marks) for each (n, k, L) that a derived form is there for, in steps of n until it passes ten seconds. */
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { checkForm } from "../../../engine/checks";
import { derive } from "../../../engine/derive";
import { type EntryDocument, printFormula, readEntryValue } from "../../../engine/notation";
import type { Report } from "./report";

/** Seconds of processor time above which no larger n is tried. */
const limit = 10;

const sizes = [4, 5, 6, 7, 8, 9, 10, 12, 14, 16, 20, 24, 32, 40, 48, 64];

interface Series {
  readonly name: string;
  readonly k: number;
  readonly loops: number;
  readonly sizes: readonly number[];
  /** The form at n, null where there is none. */
  readonly entry: (n: number) => EntryDocument | null;
}

function derived(k: number, loops: number, method: "recursion" | "local"): Series {
  return {
    name: method === "recursion" ? "on-shell recursion" : "local integrals",
    k,
    loops,
    sizes: sizes.filter((n) => n >= k + 4),
    entry: (n) => {
      const form = derive({ n, k, loops, method });
      if (!form.ok) return null;
      return { amplitude: form.value.amplitude, notation: printFormula(form.value.formula) };
    },
  };
}

/** Four legs at three loops: the form of the seed library. */
const threeLoops = (root: string): Series => ({
  name: "dual-conformal integrals",
  k: 0,
  loops: 3,
  sizes: [4],
  entry: () =>
    JSON.parse(readFileSync(join(root, "seed-data", "three-loop", "ladders-4-dual.json"), "utf8")) as EntryDocument,
});

const all = (root: string): readonly Series[] => [
  ...[0, 1, 2, 3, 4].map((k) => derived(k, 0, "recursion")),
  ...[0, 1, 2, 3].map((k) => derived(k, 1, "recursion")),
  derived(0, 2, "local"),
  threeLoops(root),
];

/** One entry for each check, named "check n6k1L0: METHOD", in seconds; a verdict other than `agrees` is a note. */
export function checks(report: Report, root: string): void {
  for (const { name, k, loops, sizes: legs, entry } of all(root)) {
    for (const n of legs) {
      const document = entry(n);
      if (document === null) {
        report.notes.push(`n${n}k${k}L${loops}: no form by ${name}`);
        break;
      }
      const started = process.cpuUsage().user;
      const read = readEntryValue(document);
      if (!read.ok) {
        report.notes.push(`n${n}k${k}L${loops}: the form by ${name} is too large for the notation`);
        break;
      }
      const found = checkForm(read.value, { seed: "bench" });
      const seconds = (process.cpuUsage().user - started) / 1e6;
      if (found.report.verdict === "agrees")
        report.entries.push({
          name: `check n${n}k${k}L${loops}: ${name}`,
          median: Number(seconds.toPrecision(3)),
          unit: "s",
        });
      else report.notes.push(`n${n}k${k}L${loops}: ${found.report.verdict} after ${seconds.toPrecision(3)} s`);
      if (seconds > limit) break;
    }
  }
}

/** `npm run bench`: the fast evaluator against its targets, as ratios within one run. Prints a table, or JSON with --json. */
import { cpus } from "node:os";
import { join } from "node:path";
import { checks } from "./checks";
import { costs } from "./costs";
import { operations } from "./operations";
import type { Report } from "./report";
import { sums } from "./sums";
import { typing } from "./typing";

/** The parts of the bench by name; `--only NAME` runs one. `large` takes minutes and a gibibyte or two, `checks` minutes: these run only when they are asked for. */
const parts: Readonly<Record<string, (report: Report, root: string) => void>> = {
  w: (report, root) => sums(report, join(root, "engine", "tape", "bench", "tape.c")),
  typing: (report) => typing(report),
  cost: (report) => costs(report, ["9,3", "10,3", "11,4", "12,4", "13,5"]),
  checks: (report, root) => {
    operations(report);
    checks(report, root);
  },
  large: (report) => costs(report, ["14,5", "16,6"]),
};
const always = ["w", "typing", "cost"];

const usage = `usage: npm run bench -- [--json] [--only ${Object.keys(parts).join("|")}]`;

/** @returns the exit status */
export function main(words: readonly string[], root: string): number {
  let json = false;
  let chosen = always;
  for (let i = 0; i < words.length; i++) {
    if (words[i] === "--json") json = true;
    else if (words[i] === "--only" && words[i + 1] !== undefined && words[i + 1]! in parts) chosen = [words[++i]!];
    else {
      console.error(
        words[i] === "--help" ? usage : `bench: ${words.slice(i, i + 2).join(" ")} is not understood\n${usage}`,
      );
      return words[i] === "--help" ? 0 : 2;
    }
  }
  const report: Report = { entries: [], ratios: [], notes: [] };
  for (const name of chosen) {
    console.error(`bench: ${name}`);
    parts[name]!(report, root);
  }
  const machine = `${cpus()[0]?.model.trim() ?? "unknown processor"}, ${cpus().length} cores, Node ${process.versions.node}`;
  for (const note of report.notes) console.error(`bench: ${note}`);
  if (json)
    console.log(
      JSON.stringify({ machine, entries: report.entries, ratios: report.ratios, notes: report.notes }, null, 2),
    );
  else print(machine, report);
  return 0;
}

function print(machine: string, { entries, ratios }: Report): void {
  const lines = [machine, ""];
  const width = Math.max(...[...entries, ...ratios].map(({ name }) => name.length));
  for (const { name, median, unit } of entries)
    lines.push(`${name.padEnd(width)}  ${Number(median.toPrecision(3))} ${unit}`);
  lines.push("");
  for (const { name, value, target, meets } of ratios) {
    lines.push(`${name.padEnd(width)}  ${value.toPrecision(3)}  target ${target}  ${meets ? "met" : "NOT MET"}`);
  }
  console.log(lines.join("\n"));
}

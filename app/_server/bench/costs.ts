/** Cost of recursion forms against their number of terms, with the fitted exponents. */
import { evaluateTape } from "../../../engine/tape";
import { duration, exponent } from "../../../engine/tape/bench/measure";
import { pointsFor, recursionForm, tapeOf } from "./forms";
import { addRatio, type Report } from "./report";

const POINTS = 16;

/** Targets of PERFORMANCE for compiling and 16 points, in seconds, with both cores; one is used here. */
const limits: Readonly<Record<string, number>> = { "12,4": 0.2, "16,6": 5 };

/** @param sizes "n,k" of each form */
export function costs(report: Report, sizes: readonly string[]): void {
  const compiling: [number, number][] = [];
  const running: [number, number][] = [];
  for (const size of sizes) {
    const [n, k] = size.split(",").map(Number) as [number, number];
    const form = recursionForm(n, k);
    const tape = tapeOf(form);
    const points = pointsFor(form, POINTS);
    const { terms, multiplications } = tape.counts;
    const rounds = terms > 50_000 ? 1 : 5;
    const compile = duration(() => tapeOf(form), rounds);
    evaluateTape(tape, points);
    const run = duration(() => evaluateTape(tape, points), rounds);
    compiling.push([terms, compile]);
    running.push([terms, run]);
    const name = `recursion n=${n} k=${k}`;
    report.entries.push(
      { name: `${name}, terms`, median: terms, unit: "terms" },
      { name: `${name}, multiplications at a point`, median: multiplications, unit: "multiplications" },
      { name: `${name}, compile`, median: 1000 * compile, unit: "ms" },
      { name: `${name}, ${POINTS} points`, median: 1000 * run, unit: "ms" },
      { name: `${name}, code`, median: (4 * tape.code.length) / 2 ** 20, unit: "MiB" },
    );
    const limit = limits[size];
    if (limit !== undefined) addRatio(report, `${name}: ${limit} s over the time`, limit / (compile + run), 1);
  }
  if (sizes.length < 3) return;
  for (const [what, points] of [
    ["compile", compiling],
    ["run", running],
  ] as const) {
    const fitted = exponent(points);
    report.entries.push({ name: `recursion, ${what}: exponent of the number of terms`, median: fitted, unit: "" });
    addRatio(report, `recursion, ${what}: 1.1 over the exponent`, 1.1 / fitted, 1);
  }
}

/** W of the bench, the NMHV sum, at n = 12, 20, 40: kernel, C tape and PARI/GP at the same points. */
import { MERSENNE_61, primeField, randomness, smallPrimeField } from "../../../engine/fields";
import { randomPoint } from "../../../engine/kinematics";
import { evaluateTape, MERSENNE_31 } from "../../../engine/tape";
import { CTape, pariNmhv } from "../../../engine/tape/bench/baselines";
import { kernelRate } from "../../../engine/tape/bench/kernelRate";
import { median, rate } from "../../../engine/tape/bench/measure";
import { mersenne31, mersenne61, montgomery31 } from "../../../engine/tape/kernelFields";
import { tapeOf, treeForm } from "./forms";
import { addRatio, type Report } from "./report";

const ROUNDS = 5;
const SECONDS = 0.15;
const BLOCK = 64;

/** @param source the path of the C baseline */
export function sums(report: Report, source: string): void {
  const c = CTape.build(source);
  if (c === null) report.notes.push("no C compiler (cc): the C tape was not measured");
  try {
    for (const n of [12, 20, 40]) one(report, n, c);
  } finally {
    c?.dispose();
  }
  report.notes.push("FLINT is not among the baselines: PARI/GP and the C tape stand for it");
}

function one(report: Report, n: number, c: CTape | null): void {
  const form = treeForm("sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]", n, 1);
  const tape = tapeOf(form);
  const point = randomPoint(smallPrimeField(MERSENNE_31), form, randomness("bench"));
  const kernel: number[] = [];
  const outside: number[] = [];
  // In turn, so that both see the same state of the machine.
  for (let round = 0; round < ROUNDS; round++) {
    const own = kernelRate(mersenne31, tape, point, MERSENNE_31, BLOCK, SECONDS);
    kernel.push(own.rate);
    if (c === null) continue;
    const other = c.run(tape, point, BLOCK / 4, 1000 * SECONDS);
    if (other.sum !== own.sum) throw new Error(`the C tape has ${other.sum} where the kernel has ${own.sum}`);
    outside.push(other.rate);
  }
  const own = median(kernel);
  const entry = (name: string, value: number): void => {
    report.entries.push({ name: `W n=${n}, ${name}`, median: value, unit: "points/s" });
  };
  entry("kernel, 2^31-1", own);
  const prime = 2147483629;
  const other = randomPoint(smallPrimeField(prime), form, randomness("bench"));
  entry("kernel, any prime of 31 bits", kernelRate(montgomery31, tape, other, prime, BLOCK, SECONDS).rate);
  const large = randomPoint(primeField(MERSENNE_61), form, randomness("bench"));
  entry("kernel, 2^61-1", kernelRate(mersenne61, tape, large, null, BLOCK, SECONDS).rate);
  const samples = Array.from({ length: 16 * BLOCK }, () => ({ point, prime: MERSENNE_31 }));
  entry("kernel, points brought in and values read", samples.length * rate(() => evaluateTape(tape, samples), SECONDS));
  if (c !== null) {
    entry("C tape, 128-bit vectors", median(outside));
    addRatio(report, `W n=${n}, kernel over C tape`, own / median(outside), 0.9);
  }
  const pari = pariNmhv(n, point, Math.ceil(20_000 / n ** 2));
  if (pari === null) {
    report.notes.push("no PARI/GP (gp): it was not measured");
    return;
  }
  const values = evaluateTape(tape, [{ point, prime: MERSENNE_31 }]).values![0]!;
  if (values.kind !== "value" || values.sum !== pari.sum)
    throw new Error("PARI/GP has another value of W than the kernel");
  entry("PARI/GP", pari.rate);
  addRatio(report, `W n=${n}, kernel over PARI/GP`, own / pari.rate, 400);
}

/**
 * The ratio test at one loop, k >= 1: M_k - M_k^tree M_0 goes as e^-1 with the line near a leg and in its plane, where both parts go as
 * e^-2: the ratio of amplitudes is less divergent (1012.6032; MARKS "Ratio test").
 */
import { precisionOf, valuationOf } from "../../fields/primeSeries";
import type { Bench } from "../bench";
import { type Ground, mostAttempts } from "../ground";
import type { Mark } from "../report";
import type { SeriesForm } from "../seriesEvaluator";
import { atSomeGround } from "./linePaths";
import { collinearRegion } from "./logTest";
import {
  type Lower,
  lowerAmplitude,
  missingSource,
  notApplicable,
  onlyAmplitudes,
  overBudget,
  superamplitude,
  untested,
  valueOfLower,
} from "./lower";
import { mhvSeries } from "./mhvSeries";

export function ratioTest(bench: Bench): Mark {
  const { n, k, loops } = bench.form;
  const other = onlyAmplitudes(bench);
  if (other !== null) return other;
  if (loops !== 1 || k === 0) return notApplicable("The ratio is looked at for k >= 1 at one loop.");
  const tree = lowerAmplitude(superamplitude(n, k, 0));
  if (tree.kind === "unknown") return missingSource(tree.question);
  const costly = overBudget(bench, n);
  if (costly !== null) return costly;
  const mhv = mhvSeries(n, 1);
  if (mhv === null) return missingSource(superamplitude(n, 0, 1));
  for (let i = 1; i <= n; i++) {
    const order = atSomeGround(bench, mostAttempts, (ground) => orderOfRatio(bench, tree, mhv, i, ground));
    const where = `with AB near leg ${i} and in its plane`;
    if (order === "bad") return untested(`A denominator vanishes at every point tried ${where}.`);
    if (order < -1)
      return { state: "fails", evidence: `M - M^tree M^MHV goes as e^${order} ${where}, where it should go as e^-1.` };
  }
  return {
    state: "holds",
    evidence: `M - M^tree M^MHV goes as e^-1 with AB near each of the ${n} legs and in its plane (each part goes as e^-2): one Laurent series each, modulo the 31-bit prime ${bench.ground(0).prime}.`,
  };
}

function orderOfRatio(
  bench: Bench,
  tree: Exclude<Lower, { kind: "unknown" }>,
  mhv: SeriesForm,
  i: number,
  ground: Ground,
): number | "bad" {
  const path = collinearRegion(ground, 0, i);
  const whole = bench.series.evaluate(ground.field, path, ({ sum }) => precisionOf(sum) >= 0);
  const { point } = ground;
  const factor = valueOfLower(tree, { ...point, loops: 0, lines: [] }, ground.prime);
  const divided = mhv.evaluate(
    ground.field,
    (series) => ({ ...path(series), k: 0 }),
    ({ sum }) => precisionOf(sum) >= 0,
  );
  if (whole === null || factor === null || divided === null) return "bad";
  const { field } = whole;
  const ratio = field.subtract(whole.sum, field.multiply(factor, divided.sum));
  if (precisionOf(ratio) < -1) return "bad";
  return Math.min(-1, valuationOf(ratio) ?? -1);
}

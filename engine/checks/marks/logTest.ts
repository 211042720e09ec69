/**
 * The log test: with a line near leg i and in its plane amplitudes go as e^-2, the integrand of the logarithm as e^-1 (1012.6032,
 * 1112.6432). With sums over labelled loops log M is M2 - M1 M1 at two loops and M3 - sum M1 M2 + 2 M1 M1 M1 at three.
 */
import { type PrimeSeries, type PrimeSeriesField, precisionOf, valuationOf } from "../../fields/primeSeries";
import type { Point } from "../../kinematics";
import type { Bench } from "../bench";
import { type Ground, mostAttempts } from "../ground";
import type { Mark } from "../report";
import type { SeriesForm } from "../seriesEvaluator";
import { atSomeGround, directionsOf, legTwistor, linePath } from "./linePaths";
import { lowerBudget, notApplicable, onlyAmplitudes, overBudget, untested } from "./lower";
import { mhvSeries } from "./mhvSeries";

/** Products of integrands of fewer loops that are subtracted: coefficient, and the lines of each factor. */
type Products = readonly { readonly coefficient: number; readonly factors: readonly (readonly number[])[] }[];

const subtracted: Readonly<Record<number, Products>> = {
  2: [{ coefficient: -1, factors: [[0], [1]] }],
  3: [
    { coefficient: -1, factors: [[0], [1, 2]] },
    { coefficient: -1, factors: [[1], [0, 2]] },
    { coefficient: -1, factors: [[2], [0, 1]] },
    { coefficient: 2, factors: [[0], [1], [2]] },
  ],
};

export function logTest(bench: Bench): Mark {
  const { n, k, loops } = bench.form;
  const other = onlyAmplitudes(bench);
  if (other !== null) return other;
  if (loops < 2) return notApplicable("The logarithm differs from the integrand from two loops on.");
  if (k > 0) return notApplicable("The logarithm is taken for k = 0.");
  const products = subtracted[loops];
  if (products === undefined) return untested(`The logarithm at ${loops} loops needs integrands that no source knows.`);
  const integrands = [null, mhvSeries(n, 1), loops > 2 ? mhvSeries(n, 2) : null];
  const lower = products.reduce(
    (sum, { factors }) => sum + factors.reduce((own, lines) => own + (integrands[lines.length]?.operations ?? 0), 0),
    0,
  );
  const regions = n * loops;
  const costly = overBudget(bench, regions);
  if (costly !== null) return costly;
  if (lower * regions > lowerBudget)
    return untested("The products of integrands of fewer loops are too large to evaluate.");
  for (let line = 0; line < loops; line++)
    for (let i = 1; i <= n; i++) {
      const order = atSomeGround(bench, mostAttempts, (ground) =>
        orderOfLog(bench, products, integrands, collinearRegion(ground, line, i), ground),
      );
      const where = `with line ${line + 1} near leg ${i} and in its plane`;
      if (order === "bad") return untested(`A denominator vanishes at every point tried ${where}.`);
      if (order < -1)
        return { state: "fails", evidence: `The logarithm goes as e^${order} ${where}, where it should go as e^-1.` };
    }
  return {
    state: "holds",
    evidence: `The integrand of the logarithm goes as e^-1 with each of the ${loops} lines near each of the ${n} legs and in its plane (an amplitude goes as e^-2): one Laurent series each, modulo the 31-bit prime ${bench.ground(0).prime}; lower loops are the local integrands of 1012.6032.`,
  };
}

/** A = Z_i + e R, B = Z_{i-1} + x Z_{i+1} + e R'. */
export function collinearRegion(ground: Ground, line: number, i: number) {
  const { field, point } = ground;
  const [x] = ground.numbers(`region ${i}`, 1) as [number];
  const [r, s] = directionsOf(ground, line);
  const [before, after] = [legTwistor(ground, i - 1), legTwistor(ground, i + 1)];
  const onPlane = before.map((c, at) => field.add(c, field.multiply(x, after[at]!)));
  return linePath(point, line, [
    { at: legTwistor(ground, i), by: r },
    { at: onPlane, by: s },
  ]);
}

/** The valuation of the logarithm along a path, -1 where it is known to be that or more. */
function orderOfLog(
  bench: Bench,
  products: Products,
  integrands: readonly (SeriesForm | null)[],
  path: (field: PrimeSeriesField) => Point<PrimeSeries>,
  ground: Ground,
): number | "bad" {
  const whole = bench.series.evaluate(ground.field, path, ({ sum }) => precisionOf(sum) >= 0);
  if (whole === null || precisionOf(whole.sum) < -1) return "bad";
  const { field } = whole;
  let log = whole.sum;
  for (const { coefficient, factors } of products) {
    let product: PrimeSeries = field.fromInteger(BigInt(coefficient));
    for (const lines of factors) {
      const value = integrands[lines.length]?.evaluate(
        ground.field,
        (series) => {
          const point = path(series);
          return { ...point, k: 0, loops: lines.length, lines: lines.map((line) => point.lines[line]!) };
        },
        ({ sum }) => precisionOf(sum) >= 1,
      );
      if (value === undefined || value === null) return "bad";
      product = field.multiply(product, value.sum);
    }
    log = field.add(log, product);
  }
  if (precisionOf(log) < -1) return "bad";
  return Math.min(-1, valuationOf(log) ?? -1);
}

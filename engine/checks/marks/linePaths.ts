/** Paths of a loop line: both its points approach given points while everything else stays. */
import { type PrimeSeries, type PrimeSeriesField, precisionOf, valuationOf } from "../../fields/primeSeries";
import type { Point, Twistor } from "../../kinematics";
import type { Bench } from "../bench";
import type { Ground } from "../ground";
import type { SeriesForm } from "../seriesEvaluator";
import { moved, withLine } from "./moves";

/** Where a point of a line goes: `at` + e `by`, + e^2 `curving` where it is given. */
export interface Approach {
  readonly at: Twistor<number>;
  readonly by: Twistor<number>;
  readonly curving?: Twistor<number>;
}

export const linePath =
  (point: Point<number>, line: number, ends: readonly [Approach, Approach]) =>
  (series: PrimeSeriesField): Point<PrimeSeries> => {
    const moving = ({ at, by, curving }: Approach): Twistor<PrimeSeries> =>
      curving === undefined ? moved(series, at, by) : at.map((x, i) => series.quadratic(x, by[i]!, curving[i]!));
    const [a, b] = [moving(ends[0]), moving(ends[1])];
    return withLine<PrimeSeries>(point, line, [a, b]);
  };

/**
 * The coefficient of e^order of a form along a path on which it may not have a higher pole: "bad" at a bad point, "higher" where it
 * has one.
 */
export function leadingCoefficient(
  series: SeriesForm,
  ground: Ground,
  path: (field: PrimeSeriesField) => Point<PrimeSeries>,
  order: number,
): number | "bad" | "higher" {
  const found = series.evaluate(ground.field, path, ({ sum }) => precisionOf(sum) > order);
  if (found === null || precisionOf(found.sum) <= order) return "bad";
  const valuation = valuationOf(found.sum);
  if (valuation !== null && valuation < order) return "higher";
  return found.field.coefficient(found.sum, order) ?? 0;
}

/** A point with a number for each leg, drawn once for a purpose: sum of number times leg. */
export function mixture(ground: Ground, labels: readonly number[], numbers: readonly number[]): Twistor<number> {
  const { field, point } = ground;
  const z = (label: number): Twistor<number> => point.twistors[(label - 1 + 2 * point.n) % point.n]!;
  return [0, 1, 2, 3].map((i) =>
    labels.reduce((sum, label, at) => field.add(sum, field.multiply(numbers[at]!, z(label)[i]!)), 0),
  );
}

/** Two directions in which the points of a line may leave where they are. */
export const directionsOf = (ground: Ground, line: number): readonly [Twistor<number>, Twistor<number>] =>
  ground.direction.lines[line]!;

export const legTwistor = ({ point }: Ground, label: number): Twistor<number> =>
  point.twistors[(label - 1 + 2 * point.n) % point.n]!;

/** Runs one comparison at one ground after the other until it is not a bad one. */
export function atSomeGround<R>(bench: Bench, attempts: number, compare: (ground: Ground) => R | "bad"): R | "bad" {
  for (let attempt = 0; attempt < attempts; attempt++) {
    const found = compare(bench.ground(attempt));
    if (found !== "bad") return found;
  }
  return "bad";
}

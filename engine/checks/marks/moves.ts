/** Supertwistors that are combined and moved: what the paths of limits and cuts are made of. */
import type { Field } from "../../fields";
import type { PrimeSeriesField } from "../../fields/primeSeries";
import type { GrassmannVectors, Point, Twistor } from "../../kinematics";
import type { Ground } from "../ground";

/** (Z | chi); four empty rows where there is no Grassmann part. */
export interface Leg<T> {
  readonly z: Twistor<T>;
  readonly chi: GrassmannVectors<T>;
}

/** Leg `label` (any integer, modulo n) of a point. */
export function legOf<T>(point: Point<T>, label: number): Leg<T> {
  const at = (((label - 1) % point.n) + point.n) % point.n;
  return { z: point.twistors[at]!, chi: point.chi[at] ?? [[], [], [], []] };
}

/** sum of coefficient times leg, the Grassmann parts likewise. */
export function combine<T>(field: Field<T>, parts: readonly (readonly [T, Leg<T>])[]): Leg<T> {
  const sum = (rows: readonly (readonly T[])[]): T[] =>
    rows[0]!.map((_, i) =>
      rows.reduce((total, row, part) => field.add(total, field.multiply(parts[part]![0], row[i]!)), field.zero),
    );
  return {
    z: sum(parts.map(([, leg]) => leg.z)),
    chi: [0, 1, 2, 3].map((flavour) => sum(parts.map(([, leg]) => leg.chi[flavour]!))),
  };
}

/** z + e r, coordinate by coordinate; `order` 2 for z + e^2 r. */
export const moved = (series: PrimeSeriesField, z: Twistor<number>, r: Twistor<number>, order: 1 | 2 = 1) =>
  z.map((x, i) => (order === 1 ? series.linear(x, r[i]!) : series.quadratic(x, 0, r[i]!)));

/** A leg that moves along another, Grassmann parts with it. */
export const movedLeg = (series: PrimeSeriesField, from: Leg<number>, along: Leg<number>) => ({
  z: moved(series, from.z, along.z),
  chi: from.chi.map((row, flavour) => moved(series, row, along.chi[flavour]!)),
});

/** The point with one leg replaced. */
export function withLeg<T>(point: Point<T>, label: number, { z, chi }: Leg<T>): Point<T> {
  const at = label - 1;
  return {
    ...point,
    twistors: point.twistors.map((old, i) => (i === at ? z : old)),
    chi: point.chi.map((old, i) => (i === at ? chi : old)),
  };
}

/** The point with one loop line replaced. */
export const withLine = <T>(point: Point<T>, line: number, pair: readonly [Twistor<T>, Twistor<T>]): Point<T> => ({
  ...point,
  lines: point.lines.map((old, i) => (i === line ? pair : old)),
});

/** The point without one leg. */
export const withoutLeg = <T>(point: Point<T>, label: number): Point<T> => ({
  ...point,
  n: point.n - 1,
  twistors: point.twistors.filter((_, a) => a !== label - 1),
  chi: point.chi.filter((_, a) => a !== label - 1),
});

/** The direction that belongs to a leg: a random supertwistor that has no part in the point. */
export const directionOf = (ground: Ground, label: number): Leg<number> => legOf(ground.direction, label);

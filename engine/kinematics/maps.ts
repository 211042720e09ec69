/** Maps on points that the checks compare values under. The Grassmann part of a leg goes with its twistor. */
import type { Field } from "../fields";
import { wrapLabel } from "./labels";
import type { GrassmannVectors, Point, Twistor } from "./point";

/**
 * Leg a of the new point is leg labels[a-1] of the old one.
 * @param labels n labels, 1..n, in any order and number (repetitions are allowed)
 */
export function relabelPoint<T>(point: Point<T>, labels: readonly number[]): Point<T> {
  if (labels.length !== point.n) throw new Error(`relabelPoint: expected ${point.n} labels, got ${labels.length}`);
  return {
    ...point,
    twistors: labels.map((a) => point.twistors[a - 1]!),
    chi: point.chi.length === 0 ? [] : labels.map((a) => point.chi[a - 1]!),
  };
}

const legs = (n: number): number[] => Array.from({ length: n }, (_, i) => i + 1);

/** Leg a of the new point is leg a+shift of the old one, around the circle. */
export const rotatePoint = <T>(point: Point<T>, shift: number): Point<T> =>
  relabelPoint(
    point,
    legs(point.n).map((a) => wrapLabel(point.n, a + shift)),
  );

/** Leg a of the new point is leg n+1-a of the old one. */
export const reflectPoint = <T>(point: Point<T>): Point<T> => relabelPoint(point, legs(point.n).reverse());

/** Loop line l (0..L-1) of the new point is line permutation[l] of the old one. */
export function exchangeLoops<T>(point: Point<T>, permutation: readonly number[]): Point<T> {
  if (permutation.length !== point.loops) {
    throw new Error(`exchangeLoops: expected ${point.loops} numbers, got ${permutation.length}`);
  }
  return { ...point, lines: permutation.map((l) => point.lines[l]!) };
}

/** The same point with the references `*` and `X` of another. */
export const replaceReferences = <T>(point: Point<T>, fresh: Point<T>): Point<T> => ({
  ...point,
  referenceTwistor: fresh.referenceTwistor,
  referenceChi: fresh.referenceChi,
  referenceLine: fresh.referenceLine,
});

/** Every twistor, those of the loop lines and of the references too, multiplied by a 4 x 4 matrix (rows) from the left. */
export function transformPoint<T>(field: Field<T>, point: Point<T>, matrix: readonly (readonly T[])[]): Point<T> {
  const image = (z: Twistor<T>): Twistor<T> =>
    matrix.map((row) => row.reduce((sum, x, i) => field.add(sum, field.multiply(x, z[i]!)), field.zero));
  return {
    ...point,
    twistors: point.twistors.map(image),
    lines: point.lines.map(([a, b]) => [image(a), image(b)] as const),
    referenceTwistor: image(point.referenceTwistor),
    referenceLine: [image(point.referenceLine[0]), image(point.referenceLine[1])],
  };
}

/** The points of loop line `loop` (0..L-1) mixed: A -> a A + b B, B -> c A + d B. The line stays where it is. */
export function mixLine<T>(
  field: Field<T>,
  point: Point<T>,
  loop: number,
  [[a, b], [c, d]]: readonly [readonly [T, T], readonly [T, T]],
): Point<T> {
  const line = point.lines[loop];
  if (line === undefined) throw new Error(`mixLine: expected a loop below ${point.loops}, got ${loop}`);
  const [first, second] = line;
  const mix = (x: T, y: T): Twistor<T> =>
    first.map((component, i) => field.add(field.multiply(x, component), field.multiply(y, second[i]!)));
  return {
    ...point,
    lines: point.lines.map((old, l) => (l === loop ? ([mix(a, b), mix(c, d)] as const) : old)),
  };
}

/** The point with every coordinate converted, as into another field. */
export function mapPoint<T, U>(point: Point<T>, convert: (x: T) => U): Point<U> {
  const twistor = (z: Twistor<T>): Twistor<U> => z.map(convert);
  const chi = (c: GrassmannVectors<T>): GrassmannVectors<U> => c.map((row) => row.map(convert));
  return {
    n: point.n,
    k: point.k,
    loops: point.loops,
    twistors: point.twistors.map(twistor),
    chi: point.chi.map(chi),
    lines: point.lines.map(([a, b]) => [twistor(a), twistor(b)] as const),
    referenceTwistor: twistor(point.referenceTwistor),
    referenceChi: chi(point.referenceChi),
    referenceLine: [twistor(point.referenceLine[0]), twistor(point.referenceLine[1])],
  };
}

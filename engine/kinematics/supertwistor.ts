/** Points with their Grassmann part, and meets that carry it along. */
import type { Field } from "../fields";
import { type Line, lineBracket, lineThrough, meetOfLineAndPlane, type Plane, planeAt } from "./incidence";
import type { GrassmannVectors, Point, Twistor } from "./point";

/** A point (Z | chi). `chi` is null for a point that has none, as the points of a loop line: it contributes zero. */
export interface Supertwistor<T> {
  readonly z: Twistor<T>;
  readonly chi: GrassmannVectors<T> | null;
}

/** A line, with two of its points where the line has a Grassmann part: null for a loop line, `X`, and a line from two planes. */
export interface Superline<T> {
  readonly line: Line<T>;
  readonly points: readonly [Supertwistor<T>, Supertwistor<T>] | null;
}

/** A plane, with three of its points; null where it is given by a line that has none. */
export interface Superplane<T> {
  readonly plane: Plane<T>;
  readonly points: readonly [Supertwistor<T>, Supertwistor<T>, Supertwistor<T>] | null;
}

/** External leg `label`, 1..n. */
export const leg = <T>(point: Point<T>, label: number): Supertwistor<T> => ({
  z: point.twistors[label - 1]!,
  chi: point.chi[label - 1] ?? null,
});

/** sum of coefficient * chi over the parts, four rows; null where no part has a chi. */
export function combineChi<T>(
  field: Field<T>,
  parts: readonly (readonly [coefficient: T, chi: GrassmannVectors<T> | null])[],
): GrassmannVectors<T> | null {
  let sum: T[][] | null = null;
  for (const [coefficient, chi] of parts) {
    if (chi === null) continue;
    const into: T[][] = sum ?? chi.map((row) => row.map(() => field.zero));
    chi.forEach((row, flavour) => {
      const target = into[flavour]!;
      row.forEach((x, j) => {
        target[j] = field.add(target[j]!, field.multiply(coefficient, x));
      });
    });
    sum = into;
  }
  return sum;
}

/**
 * The point where a line meets a plane, Z_a <b c d e> - Z_b <a c d e>, the same for either order of the operands. Its Grassmann
 * part is that of the line's points; where the line has none, that of the plane's points, by the equal expression
 * -(Z_c <d e a b> + Z_d <e c a b> + Z_e <c d a b>).
 */
export function meet<T>(field: Field<T>, line: Superline<T>, plane: Superplane<T>): Supertwistor<T> {
  const z = meetOfLineAndPlane(field, line.line, plane.plane);
  if (line.points !== null) {
    const [a, b] = line.points;
    return {
      z,
      chi: combineChi(field, [
        [planeAt(field, plane.plane, b.z), a.chi],
        [field.negate(planeAt(field, plane.plane, a.z)), b.chi],
      ]),
    };
  }
  if (plane.points === null) return { z, chi: null };
  const [c, d, e] = plane.points;
  const part = (p: Supertwistor<T>, q: Supertwistor<T>): T =>
    field.negate(lineBracket(field, lineThrough(field, p.z, q.z), line.line));
  return {
    z,
    chi: combineChi(field, [
      [part(d, e), c.chi],
      [part(e, c), d.chi],
      [part(c, d), e.chi],
    ]),
  };
}

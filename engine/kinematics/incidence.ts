/** Points, lines and planes of momentum twistor space: brackets and meets, in the conventions of the notation. */
import type { Field } from "../fields";
import type { Twistor } from "./point";

/** A line as its six Plücker coordinates a_i b_j - a_j b_i, in the order (12, 13, 14, 23, 24, 34). */
export type Line<T> = readonly [T, T, T, T, T, T];

/** A plane as the linear form Z -> <Z a b c>: four coefficients. */
export type Plane<T> = readonly [T, T, T, T];

/** The line through two points; it changes sign when they are exchanged. */
export function lineThrough<T>(field: Field<T>, a: Twistor<T>, b: Twistor<T>): Line<T> {
  const minor = (i: number, j: number): T => field.subtract(field.multiply(a[i]!, b[j]!), field.multiply(a[j]!, b[i]!));
  return [minor(0, 1), minor(0, 2), minor(0, 3), minor(1, 2), minor(1, 3), minor(2, 3)];
}

/** <L M>, the bracket of two lines: symmetric, zero where they meet. For lines (ab) and (cd) it is <a b c d>. */
export function lineBracket<T>(field: Field<T>, l: Line<T>, m: Line<T>): T {
  const { add, subtract, multiply } = field;
  let sum = subtract(multiply(l[0], m[5]), multiply(l[1], m[4]));
  sum = add(sum, add(multiply(l[2], m[3]), multiply(l[3], m[2])));
  return add(sum, subtract(multiply(l[5], m[0]), multiply(l[4], m[1])));
}

/** <a b c d>, the determinant of four twistors. */
export function bracket<T>(field: Field<T>, a: Twistor<T>, b: Twistor<T>, c: Twistor<T>, d: Twistor<T>): T {
  return lineBracket(field, lineThrough(field, a, b), lineThrough(field, c, d));
}

/** The plane of a line and a point, the form Z -> <Z q L> = <Z L q>. */
export function planeOf<T>(field: Field<T>, line: Line<T>, q: Twistor<T>): Plane<T> {
  const negated = line.map(field.negate) as unknown as Line<T>;
  // Row i holds the coefficients of q in <e_i q L>.
  const rows: readonly (readonly (T | null)[])[] = [
    [null, line[5], negated[4], line[3]],
    [negated[5], null, line[2], negated[1]],
    [line[4], negated[2], null, line[0]],
    [negated[3], line[1], negated[0], null],
  ];
  return rows.map((row) =>
    row.reduce<T>((sum, x, j) => (x === null ? sum : field.add(sum, field.multiply(x, q[j]!))), field.zero),
  ) as unknown as Plane<T>;
}

/** The plane of three points, the form Z -> <Z a b c>. */
export const planeThrough = <T>(field: Field<T>, a: Twistor<T>, b: Twistor<T>, c: Twistor<T>): Plane<T> =>
  planeOf(field, lineThrough(field, b, c), a);

/** The value of a plane's form at a point: <z a b c>. */
export function planeAt<T>(field: Field<T>, plane: Plane<T>, z: Twistor<T>): T {
  return plane.reduce<T>((sum, x, i) => field.add(sum, field.multiply(x, z[i]!)), field.zero);
}

/** Where line (ab) meets plane (cde): Z_a <b c d e> - Z_b <a c d e>. */
export function meetOfLineAndPlane<T>(field: Field<T>, line: Line<T>, plane: Plane<T>): Twistor<T> {
  const [l01, l02, l03, l12, l13, l23] = line;
  const [p0, p1, p2, p3] = plane;
  const { add, subtract, multiply } = field;
  return [
    add(add(multiply(l01, p1), multiply(l02, p2)), multiply(l03, p3)),
    subtract(add(multiply(l12, p2), multiply(l13, p3)), multiply(l01, p0)),
    subtract(multiply(l23, p3), add(multiply(l02, p0), multiply(l12, p1))),
    field.negate(add(add(multiply(l03, p0), multiply(l13, p1)), multiply(l23, p2))),
  ];
}

/** The line L where planes (abc) and (def) meet, <P Q L> = <P a b c><Q d e f> - <Q a b c><P d e f>. */
export function meetOfPlanes<T>(field: Field<T>, first: Plane<T>, second: Plane<T>): Line<T> {
  const dual = lineThrough(field, first, second);
  return [dual[5], field.negate(dual[4]), dual[3], dual[2], field.negate(dual[1]), dual[0]];
}

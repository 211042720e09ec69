/** Determinants modulo a 31-bit prime. */
import type { Modulus } from "./arithmetic";

/** Four canonical residues. */
export type Vector = ArrayLike<number>;

/** The four-bracket <a b c d>, the determinant with rows a, b, c, d: products of 2x2 minors of the first and last two components. */
export function bracket(m: Modulus, a: Vector, b: Vector, c: Vector, d: Vector): number {
  const front = (p: Vector, q: Vector) => m.cross(p[0]!, q[1]!, p[1]!, q[0]!);
  const back = (p: Vector, q: Vector) => m.cross(p[2]!, q[3]!, p[3]!, q[2]!);
  let sum = m.multiply(front(a, b), back(c, d));
  sum = m.subtract(sum, m.multiply(front(a, c), back(b, d)));
  sum = m.add(sum, m.multiply(front(a, d), back(b, c)));
  sum = m.add(sum, m.multiply(front(b, c), back(a, d)));
  sum = m.subtract(sum, m.multiply(front(b, d), back(a, c)));
  return m.add(sum, m.multiply(front(c, d), back(a, b)));
}

/** <P Q L> for the line L = (a b c) cap (d e f): <P a b c><Q d e f> - <Q a b c><P d e f>. Each plane is given by its covector. */
export function lineThroughPlanes(m: Modulus, p: Vector, q: Vector, first: Vector, second: Vector): number {
  return m.cross(contract(m, p, first), contract(m, q, second), contract(m, q, first), contract(m, p, second));
}

/** The covector w of the plane (a b c), for which sum_i x_i w_i = <x a b c>. */
export function plane(m: Modulus, a: Vector, b: Vector, c: Vector): number[] {
  const points = new Int32Array(12);
  for (const [row, point] of [a, b, c].entries()) for (let i = 0; i < 4; i++) points[4 * row + i] = point[i]!;
  const out = new Int32Array(4);
  planeAt(m, points, 0, 4, 8, out);
  return Array.from(out);
}

/** The same for three points that begin at a, b and c in one array, written to `out`. */
export function planeAt(m: Modulus, points: Int32Array, a: number, b: number, c: number, out: Int32Array): void {
  const b0 = points[b]!;
  const b1 = points[b + 1]!;
  const b2 = points[b + 2]!;
  const b3 = points[b + 3]!;
  const c0 = points[c]!;
  const c1 = points[c + 1]!;
  const c2 = points[c + 2]!;
  const c3 = points[c + 3]!;
  const m01 = m.cross(b0, c1, b1, c0);
  const m02 = m.cross(b0, c2, b2, c0);
  const m03 = m.cross(b0, c3, b3, c0);
  const m12 = m.cross(b1, c2, b2, c1);
  const m13 = m.cross(b1, c3, b3, c1);
  const m23 = m.cross(b2, c3, b3, c2);
  const a0 = points[a]!;
  const a1 = points[a + 1]!;
  const a2 = points[a + 2]!;
  const a3 = points[a + 3]!;
  out[0] = m.add(m.cross(a1, m23, a2, m13), m.multiply(a3, m12));
  out[1] = m.negate(m.add(m.cross(a0, m23, a2, m03), m.multiply(a3, m02)));
  out[2] = m.add(m.cross(a0, m13, a1, m03), m.multiply(a3, m01));
  out[3] = m.negate(m.add(m.cross(a0, m12, a1, m02), m.multiply(a2, m01)));
}

/** sum_i x_i w_i for the point x that begins at `at`. */
export function contractAt(m: Modulus, points: Int32Array, at: number, w: Vector): number {
  const front = m.add(m.multiply(points[at]!, w[0]!), m.multiply(points[at + 1]!, w[1]!));
  return m.add(front, m.add(m.multiply(points[at + 2]!, w[2]!), m.multiply(points[at + 3]!, w[3]!)));
}

/** sum_i x_i w_i over four components. */
export function contract(m: Modulus, x: Vector, w: Vector): number {
  const front = m.add(m.multiply(x[0]!, w[0]!), m.multiply(x[1]!, w[1]!));
  return m.add(front, m.add(m.multiply(x[2]!, w[2]!), m.multiply(x[3]!, w[3]!)));
}

/**
 * The determinant of the square matrix whose row r is data[offsets[r]], data[offsets[r] + 1], ...
 * Division-free expansion over subsets of columns, size 2^(size-1) products: meant for size <= 12.
 */
export function determinant(m: Modulus, data: Int32Array, offsets: readonly number[]): number {
  const size = offsets.length;
  if (size === 0) return 1;
  const [first, second] = [offsets[0]!, offsets[1] ?? 0];
  if (size === 1) return data[first]!;
  if (size === 2) return m.cross(data[first]!, data[second + 1]!, data[first + 1]!, data[second]!);
  const subsets = 1 << size;
  const minors = new Int32Array(subsets);
  minors[0] = 1;
  for (let set = 1; set < subsets; set++) {
    let row = -1;
    for (let rest = set; rest !== 0; rest &= rest - 1) row++;
    const start = offsets[row]!;
    let sum = 0;
    // Columns of the set from the last to the first: the sign alternates, starting with + for the last.
    let positive = true;
    for (let column = size - 1; column >= 0; column--) {
      if ((set & (1 << column)) === 0) continue;
      const term = m.multiply(data[start + column]!, minors[set & ~(1 << column)]!);
      sum = positive ? m.add(sum, term) : m.subtract(sum, term);
      positive = !positive;
    }
    minors[set] = sum;
  }
  return minors[subsets - 1]!;
}

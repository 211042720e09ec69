/**
 * Parity of whole superamplitudes by explicit fermionic components: the (n,k) superamplitude at E is the (n,n-4-k) one at the
 * parity image of the point and the orthogonal complement of E, up to a known factor.
 */
import type { Point } from "../../../engine/kinematics/point";
import type { Source } from "../../../engine/sources";
import { Modulus } from "../../../engine/sources/arithmetic";
import { bracket, determinant, plane } from "../../../engine/sources/determinants";
import { residues } from "../../support/randomPoint";
import { amplitude } from "./questions";

type Rows = readonly (readonly number[])[];

const determinantOf = (m: Modulus, rows: Rows): number =>
  determinant(
    m,
    Int32Array.from(rows.flat()),
    rows.map((row, r) => r * row.length),
  );

/** Solves A X = B by Cramer's rule. */
function solve(m: Modulus, a: Rows, b: Rows): number[][] {
  const whole = determinantOf(m, a);
  const replaced = (column: number, by: number) =>
    a.map((row, r) => row.map((x, c) => (c === column ? b[r]![by]! : x)));
  return a.map((_, i) => b[0]!.map((_, j) => m.divide(determinantOf(m, replaced(i, j)), whole)!));
}

/** The value at fermionic components E (one (k+2) x n matrix for each flavour), MHV factor included. */
function fullValue(source: Source, point: Point<number>, k: number, flavours: readonly Rows[], prime: number): number {
  const m = new Modulus(prime);
  const n = point.n;
  const two = (a: number, b: number) =>
    m.cross(point.twistors[a]![0]!, point.twistors[b]![1]!, point.twistors[a]![1]!, point.twistors[b]![0]!);
  let factor = 1;
  const chi: number[][][] = Array.from({ length: n }, () => []);
  for (const e of flavours) {
    const q = [0, 1].map((i) =>
      e.map((row) => row.reduce((sum, x, a) => m.add(sum, m.multiply(x, point.twistors[a]![i]!)), 0)),
    );
    const corner = q.map((row) => row.slice(0, 2));
    factor = m.multiply(factor, determinantOf(m, corner));
    for (let a = 0; a < n; a++) {
      const full = e.map((row) => {
        let sum = 0;
        for (let b = 0; b < a; b++) sum = m.subtract(sum, m.multiply(two(b, a), row[b]!));
        return sum;
      });
      // Subtract the combination of the two rows of q that clears the first two entries.
      const transposed = [0, 1].map((i) => corner.map((row) => row[i]!));
      const [[x], [y]] = solve(
        m,
        transposed,
        full.slice(0, 2).map((value) => [value]),
      ) as [[number], [number]];
      chi[a]!.push(
        full.map((v, i) => m.subtract(v, m.add(m.multiply(x, q[0]![i]!), m.multiply(y, q[1]![i]!)))).slice(2),
      );
    }
  }
  for (let a = 0; a < n; a++) factor = m.divide(factor, two(a, (a + 1) % n))!;
  const loops = point.lines.length;
  return m.multiply(factor, source.evaluate(amplitude(n, k, loops), { ...point, k, chi }, prime)!);
}

/** Both sides of the parity relation at a seeded choice of E: [the (n,n-4-k) side, the (n,k) side]. */
export function paritySides(source: Source, point: Point<number>, prime: number, seed: number): [number, number] {
  const m = new Modulus(prime);
  const { n, k } = point;
  const next = residues(seed, prime);
  const flavours = Array.from({ length: 4 }, () =>
    Array.from({ length: k + 2 }, () => Array.from({ length: n }, next)),
  );
  let factor = 1;
  const complements = flavours.map((e) => {
    // E = (A | B) has the null space (-(A^-1 B)^T | 1).
    const [a, b] = [e.map((row) => row.slice(0, k + 2)), e.map((row) => row.slice(k + 2))];
    const labels = ((k + 2) * (k + 1)) / 2;
    const scale = m.inverse(determinantOf(m, a))!;
    factor = m.multiply(factor, labels % 2 === 0 ? scale : m.negate(scale));
    const solution = solve(m, a, b);
    return b[0]!.map((_, i) => [
      ...solution.map((row) => m.negate(row[i]!)),
      ...b[0]!.map((_, j) => (i === j ? 1 : 0)),
    ]);
  });

  const { twistors } = point;
  const step = (a: number) => {
    const [p, q] = [twistors[a]!, twistors[(a + 1) % n]!];
    return m.cross(p[0]!, q[1]!, p[1]!, q[0]!);
  };
  // <x y z e_i> is minus entry i of the covector of (x y z).
  const image = (covector: readonly number[], scale: number) =>
    [m.negate(covector[3]!), covector[2]!, m.negate(covector[1]!), covector[0]!].map((x) => m.multiply(scale, x));
  const imageTwistors = twistors.map((z, a) => {
    const [before, after] = [(a + n - 1) % n, (a + 1) % n];
    return image(plane(m, twistors[before]!, z, twistors[after]!), m.inverse(m.multiply(step(before), step(a)))!);
  });
  const [e1, e2] = [
    [1, 0, 0, 0],
    [0, 1, 0, 0],
  ];
  const lines = point.lines.map(([a, b]) => [image(plane(m, a, b, e1), 1), image(plane(m, a, b, e2), 1)] as const);
  for (const [a, b] of point.lines) {
    // The image carries weight -4 in the line, made good on the image's side.
    factor = m.divide(factor, m.power(bracket(m, a, b, e1, e2), 4))!;
  }
  const there = fullValue(
    source,
    { ...point, k: n - 4 - k, twistors: imageTwistors, lines },
    n - 4 - k,
    complements,
    prime,
  );
  return [there, m.multiply(factor, fullValue(source, point, k, flavours, prime))];
}

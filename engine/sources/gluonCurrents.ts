/** Off-shell gluon currents over a prime field, as bispinors (Nucl. Phys. B306 (1988) 759). */
import type { Modulus } from "./arithmetic";
import { contractSpinors, type Spinor } from "./spinors";

/** A vector as the 2x2 matrix [v11, v12, v21, v22]; a null vector is the outer product of an angle and a square spinor. */
export type Bispinor = readonly [number, number, number, number];

const outer = (m: Modulus, angle: Spinor, square: Spinor): Bispinor => [
  m.multiply(angle[0], square[0]),
  m.multiply(angle[0], square[1]),
  m.multiply(angle[1], square[0]),
  m.multiply(angle[1], square[1]),
];

/** Twice the scalar product: 2 v.w = det(v + w) - det v - det w. */
const twiceDot = (m: Modulus, v: Bispinor, w: Bispinor): number =>
  m.add(m.cross(v[0], w[3], v[1], w[2]), m.cross(v[3], w[0], v[2], w[1]));

/** sum_i c_i v_i. */
const combine = (m: Modulus, ...parts: readonly (readonly [number, Bispinor])[]): Bispinor => {
  const component = (i: 0 | 1 | 2 | 3) => parts.reduce((sum, [c, v]) => m.add(sum, m.multiply(c, v[i])), 0);
  return [component(0), component(1), component(2), component(3)];
};

/**
 * e^- = lambda r~ / [lambdatilde r~] and e^+ = r lambdatilde / <r lambda>, with the same reference spinors r, r~ for all legs.
 * Null where a denominator vanishes.
 */
export function polarisations(
  m: Modulus,
  angles: readonly Spinor[],
  squares: readonly Spinor[],
  negativeLegs: readonly number[],
  reference: { angle: Spinor; square: Spinor },
): Bispinor[] | null {
  const vectors: Bispinor[] = [];
  for (let a = 0; a < angles.length; a++) {
    const negative = negativeLegs.includes(a + 1);
    const scale = m.inverse(
      negative ? contractSpinors(m, squares[a]!, reference.square) : contractSpinors(m, reference.angle, angles[a]!),
    );
    if (scale === null) return null;
    const vector = negative ? outer(m, angles[a]!, reference.square) : outer(m, reference.angle, squares[a]!);
    vectors.push(combine(m, [scale, vector]));
  }
  return vectors;
}

/**
 * The colour-ordered amplitude of n gluons: the amputated current of legs 1..n-1 contracted with the polarisation of leg n.
 * With every current of r legs scaled by 2^(r-1), so that no halves occur, the recursion is
 *   P^2 J = sum_two 2 (2 P2.J1) J2 - 2 (2 P1.J2) J1 + (2 J1.J2)(P1 - P2)
 *         + sum_three 4 (2 J1.J3) J2 - 2 (2 J2.J3) J1 - 2 (2 J1.J2) J3.
 * Null where an intermediate momentum is on its shell.
 */
export function currentAmplitude(
  m: Modulus,
  angles: readonly Spinor[],
  squares: readonly Spinor[],
  vectors: readonly Bispinor[],
): number | null {
  const n = angles.length;
  const [one, two, four] = [1, 2, 4];
  const minusOne = m.residue(-1);
  const minusTwo = m.residue(-2);
  const momenta = new Map<number, Bispinor>();
  const currents = new Map<number, Bispinor>();
  const at = (first: number, last: number): number => first * n + last;
  for (let length = 1; length < n; length++) {
    for (let first = 0; first + length < n; first++) {
      const last = first + length - 1;
      const leg = outer(m, angles[last]!, squares[last]!);
      const momentum = length === 1 ? leg : combine(m, [one, momenta.get(at(first, last - 1))!], [one, leg]);
      momenta.set(at(first, last), momentum);
      if (length === 1) {
        currents.set(at(first, last), vectors[first]!);
        continue;
      }
      let sum: Bispinor = [0, 0, 0, 0];
      for (let split = first; split < last; split++) {
        const [j1, j2] = [currents.get(at(first, split))!, currents.get(at(split + 1, last))!];
        const [p1, p2] = [momenta.get(at(first, split))!, momenta.get(at(split + 1, last))!];
        const overlap = twiceDot(m, j1, j2);
        sum = combine(
          m,
          [one, sum],
          [m.multiply(two, twiceDot(m, p2, j1)), j2],
          [m.multiply(minusTwo, twiceDot(m, p1, j2)), j1],
          [overlap, p1],
          [m.multiply(minusOne, overlap), p2],
        );
        for (let third = split + 1; third < last; third++) {
          const [middle, right] = [currents.get(at(split + 1, third))!, currents.get(at(third + 1, last))!];
          sum = combine(
            m,
            [one, sum],
            [m.multiply(four, twiceDot(m, j1, right)), middle],
            [m.multiply(minusTwo, twiceDot(m, middle, right)), j1],
            [m.multiply(minusTwo, twiceDot(m, j1, middle)), right],
          );
        }
      }
      if (length === n - 1) return twiceDot(m, sum, vectors[n - 1]!);
      const propagator = m.inverse(m.cross(momentum[0], momentum[3], momentum[1], momentum[2]));
      if (propagator === null) return null;
      currents.set(at(first, last), combine(m, [propagator, sum]));
    }
  }
  throw new Error("currentAmplitude: fewer than two legs");
}

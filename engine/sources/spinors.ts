/**
 * Spinors of the legs of a point. lambda_a and mu_a are the first and last two components of Z_a;
 * lambdatilde_a = (<a-1 a> mu_{a+1} + <a+1 a-1> mu_a + <a a+1> mu_{a-1}) / (<a-1 a><a a+1>).
 */
import type { Point } from "../kinematics/point";
import type { Modulus } from "./arithmetic";
import { cyclic } from "./question";

export type Spinor = readonly [number, number];

/** Components 0 and 1 of each twistor. */
export const anglesOf = (point: Point<number>, n: number): Spinor[] =>
  point.twistors.slice(0, n).map((z) => [z[0]!, z[1]!]);

/** <a b> or [a b], the 2x2 determinant. */
export const contractSpinors = (m: Modulus, a: Spinor, b: Spinor): number => m.cross(a[0], b[1], a[1], b[0]);

/** <1 2><2 3>...<n 1>, or the same of square spinors. */
export const cyclicProduct = (m: Modulus, spinors: readonly Spinor[]): number =>
  spinors.reduce((product, spinor, a) => {
    const next = spinors[(a + 1) % spinors.length]!;
    return m.multiply(product, contractSpinors(m, spinor, next));
  }, 1);

/** lambdatilde of every leg; null where a bracket <a a+1> vanishes. */
export function squaresOf(m: Modulus, point: Point<number>, n: number): Spinor[] | null {
  const angles = anglesOf(point, n);
  const steps = Int32Array.from(angles, (spinor, a) => contractSpinors(m, spinor, angles[(a + 1) % n]!));
  const inverses = steps.slice();
  if (!m.invertAll(inverses, n)) return null;
  return angles.map((_, a): Spinor => {
    const [before, after] = [cyclic(a - 1, n), cyclic(a + 1, n)];
    const across = contractSpinors(m, angles[after]!, angles[before]!);
    const scale = m.multiply(inverses[before]!, inverses[a]!);
    const component = (i: number): number => {
      const sides = m.add(
        m.multiply(steps[before]!, point.twistors[after]![i]!),
        m.multiply(steps[a]!, point.twistors[before]![i]!),
      );
      return m.multiply(scale, m.add(sides, m.multiply(across, point.twistors[a]![i]!)));
    };
    return [component(2), component(3)];
  });
}

/**
 * Four-momenta and their bispinors. All momenta are outgoing: an incoming particle has negative energy.
 *
 * p = (E, x, y, z) is the matrix [[E+z, x-uy], [x+uy, E-z]], rows the angle index and columns the square one, with u = i in
 * signature (1,3) and u = 1 in signature (2,2), so that p^2 = det p = E^2 - x^2 + u^2 y^2 - z^2.
 */
import {
  type Complex,
  type ComplexField,
  complexDoubles,
  type Field,
  gaussianRationals,
  type Rational,
  toComplexDouble,
} from "../fields";
import { type Momentum, momentumSquared } from "./spinors";

/** (E, x, y, z). */
export type FourMomentum<T> = readonly [E: T, x: T, y: T, z: T];

/** Signs of p^2 in E, x, y, z: + - - - in the physical one, + - + - in "2,2", where real spinors have real momenta. */
export type Signature = "1,3" | "2,2";

export const signatures: readonly Signature[] = ["1,3", "2,2"];

/** The numbers that momenta are made of. */
export interface Spacetime<T> {
  readonly signature: Signature;
  readonly field: Field<T>;
  /** u above, a number of square -1 or 1. */
  readonly unit: T;
  readonly approximate: (x: T) => Complex<number>;
  /** How far p^2 and the sum of momenta may be from zero, relative to the largest squares and momenta; 0 where numbers are exact. */
  readonly tolerance: number;
}

/** Relative deviation from p^2 = 0 and from conservation up to which momenta in double precision are taken. */
export const momentumTolerance = 1e-9;

const spacetime = <T>(
  field: ComplexField<T>,
  signature: Signature,
  approximate: (x: Complex<T>) => Complex<number>,
  tolerance: number,
): Spacetime<Complex<T>> => ({
  signature,
  field,
  unit: signature === "1,3" ? field.unit : field.one,
  approximate,
  tolerance,
});

/** Real or complex momenta in double precision. */
export const doubleSpacetime = (signature: Signature): Spacetime<Complex<number>> =>
  spacetime(complexDoubles, signature, (x) => x, momentumTolerance);

/** Momenta with rational components, real or complex: what is zero is zero exactly. */
export const exactSpacetime = (signature: Signature): Spacetime<Complex<Rational>> =>
  spacetime(gaussianRationals, signature, toComplexDouble, 0);

/** The matrix of a four-momentum. */
export function bispinorOf<T>({ field, unit }: Spacetime<T>, [E, x, y, z]: FourMomentum<T>): Momentum<T> {
  const { add, subtract, multiply } = field;
  const uy = multiply(unit, y);
  return [
    [add(E, z), subtract(x, uy)],
    [add(x, uy), subtract(E, z)],
  ];
}

/** The four-momentum of a matrix. The field must not have characteristic 2. */
export function fourMomentumOf<T>({ field, unit }: Spacetime<T>, [[a, b], [c, d]]: Momentum<T>): FourMomentum<T> {
  const { add, subtract, multiply } = field;
  const half = field.inverse(field.fromInteger(2n));
  const unitInverse = field.inverse(unit);
  if (half === null || unitInverse === null) throw new Error("fourMomentumOf: expected a field where 2 has an inverse");
  const halved = (x: T): T => multiply(half, x);
  return [halved(add(a, d)), halved(add(b, c)), multiply(unitInverse, halved(subtract(c, b))), halved(subtract(a, d))];
}

/** p^2. */
export const massSquared = <T>(space: Spacetime<T>, p: FourMomentum<T>): T =>
  momentumSquared(space.field, bispinorOf(space, p));

/** The sum of momenta; of none it is zero. */
export function addMomenta<T>(field: Field<T>, momenta: readonly FourMomentum<T>[]): FourMomentum<T> {
  const component = (i: 0 | 1 | 2 | 3): T => momenta.reduce((sum, p) => field.add(sum, p[i]), field.zero);
  return [component(0), component(1), component(2), component(3)];
}

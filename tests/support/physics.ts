/** Forms and points for the tests of physical numbers. */
import { type DeriveRequest, derive } from "../../engine/derive";
import type { FormAtN } from "../../engine/evaluate";
import { type Complex, complexDoubles, randomness } from "../../engine/fields";
import {
  balancedSpinors,
  doubleSpacetime,
  type FourMomentum,
  type Point,
  randomPoint,
  scatteringPoint,
  twistorsOfMomenta,
} from "../../engine/kinematics";
import { parse } from "../../engine/notation/parse";

/** A form of n legs from text; `component` names the negative legs where it is a component. */
export function formOf(text: string, n: number, k: number, component: readonly number[] | null = null): FormAtN {
  const parsed = parse(text);
  if (!parsed.ok) throw new Error(`${text}: ${parsed.diagnostics[0]?.message}`);
  return { n, k, loops: 0, negativeLegs: component, squareSign: 1, formula: parsed.value };
}

/** The superamplitude of (n, k) by recursion, as a form. */
export function treeForm(n: number, k: number, method: DeriveRequest["method"] = "recursion"): FormAtN {
  const derived = derive({ n, k, loops: 0, method });
  if (!derived.ok) throw new Error(`nothing was derived for (${n},${k})`);
  return { n, k, loops: 0, negativeLegs: null, squareSign: 1, formula: derived.value.formula };
}

export const physical = doubleSpacetime("1,3");

export const asComplex = (p: FourMomentum<number>): FourMomentum<Complex<number>> =>
  p.map(complexDoubles.real) as unknown as FourMomentum<Complex<number>>;

/** The point of momenta in double precision, with references that are drawn. */
export function pointOf(momenta: readonly FourMomentum<Complex<number>>[], k: number): Point<Complex<number>> {
  const size = { n: momenta.length, k, loops: 0 };
  const drawn = randomPoint(complexDoubles, size, randomness("references"));
  return { ...drawn, twistors: twistorsOfMomenta(physical, momenta, balancedSpinors) };
}

/** `count` scattering points of n legs at energy 1. */
export function scatteringPoints(n: number, count: number, seed: string): FourMomentum<number>[][] {
  const random = randomness(seed);
  return Array.from({ length: count }, () => scatteringPoint(n, 1, random));
}

/** (E,x,y,z).(E,x,y,z), + - - -. */
export const dot = (p: FourMomentum<number>, q: FourMomentum<number>): number =>
  p[0] * q[0] - p[1] * q[1] - p[2] * q[2] - p[3] * q[3];

/** s(a b) = 2 p_a.p_b of massless momenta, labels from 1. */
export const invariant = (momenta: readonly FourMomentum<number>[], a: number, b: number): number =>
  2 * dot(momenta[a - 1]!, momenta[b - 1]!);

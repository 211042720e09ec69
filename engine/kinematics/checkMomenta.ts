/** Whether momenta are those of massless particles that conserve energy and momentum, and how near they are to a singular place. */
import { type Complex, magnitude } from "../fields";
import type { Diagnostic } from "../result";
import { addMomenta, bispinorOf, type FourMomentum, massSquared, type Spacetime } from "./momenta";
import { momentumSquared } from "./spinors";

export const fewestMomenta = 4;

/** The length of (E, x, y, z) as a vector of numbers: what deviations are measured against. */
const length = <T>(space: Spacetime<T>, p: FourMomentum<T>): number =>
  Math.hypot(...p.map((x) => magnitude(space.approximate(x))));

const largestLength = <T>(space: Spacetime<T>, momenta: readonly FourMomentum<T>[]): number =>
  Math.max(0, ...momenta.map((p) => length(space, p)));

/** Four digits are enough to see what is wrong. */
const short = ({ re, im }: Complex<number>): string => {
  const digits = (x: number): string => String(Number(x.toPrecision(4)));
  return im === 0 ? digits(re) : `${digits(re)} ${im < 0 ? "-" : "+"} ${digits(Math.abs(im))} i`;
};

const beyond = <T>({ field, tolerance }: Spacetime<T>, exact: readonly T[], relative: number): boolean =>
  tolerance === 0 ? exact.some((x) => !field.isZero(x)) : !(relative <= tolerance);

const allowed = <T>({ tolerance }: Spacetime<T>): string =>
  tolerance === 0 ? "in exact numbers it must be 0" : `at most ${tolerance} is taken`;

/** Legs whose sign can be turned so that the momenta add up to zero: the first two, where they were given as incoming. */
function conservedWithIncoming<T>(space: Spacetime<T>, momenta: readonly FourMomentum<T>[]): boolean {
  const turned = momenta.map((p, a): FourMomentum<T> => {
    const [E, x, y, z] = p;
    const { negate } = space.field;
    return a < 2 ? [negate(E), negate(x), negate(y), negate(z)] : p;
  });
  const sum = addMomenta(space.field, turned);
  return !beyond(space, sum, length(space, sum) / largestLength(space, momenta));
}

/**
 * What is wrong with the momenta of one point: fewer than four legs, a leg that is zero or not massless, a sum that is not zero.
 * @param place of the point, for messages: "momenta[3]"
 * @returns no diagnostics where nothing is; `deviation` is then the largest relative one, 0 for exact numbers
 */
export function checkMomenta<T>(
  space: Spacetime<T>,
  momenta: readonly FourMomentum<T>[],
  place: string,
): { readonly diagnostics: readonly Diagnostic[]; readonly deviation: number } {
  if (momenta.length < fewestMomenta) {
    const message = `${place}: there are ${momenta.length} legs, and an amplitude has at least ${fewestMomenta}.`;
    return { diagnostics: [{ code: "momenta-count", message, help: "Give one momentum for each leg." }], deviation: 0 };
  }
  const found: Diagnostic[] = [];
  let deviation = 0;
  momenta.forEach((p, a) => {
    const size = length(space, p);
    if (p.every((x) => space.field.isZero(x))) {
      found.push({
        code: "momenta-zero",
        message: `${place}: leg ${a + 1} has no energy and no momentum.`,
        help: "Leave the leg out, or give it a small momentum for a soft limit.",
      });
      return;
    }
    const square = massSquared(space, p);
    const approximate = space.approximate(square);
    const relative = magnitude(approximate) / size / size;
    if (beyond(space, [square], relative)) {
      found.push({
        code: "momenta-mass",
        message: `${place}: leg ${a + 1} is not massless: p^2 = ${short(approximate)}, which is ${relative.toExponential(1)} of E^2 + x^2 + y^2 + z^2 (${allowed(space)}).`,
        help: "All legs are massless particles; give more digits, or set the energy to the length of the momentum.",
      });
    } else deviation = Math.max(deviation, relative);
  });
  const sum = addMomenta(space.field, momenta);
  const relative = length(space, sum) / largestLength(space, momenta);
  if (beyond(space, sum, relative)) {
    const components = sum.map((x) => short(space.approximate(x))).join(", ");
    found.push({
      code: "momenta-conservation",
      message: `${place}: the momenta do not add up to zero: their sum is (${components}), ${relative.toExponential(1)} of the largest momentum (${allowed(space)}).`,
      help: conservedWithIncoming(space, momenta)
        ? "They do when legs 1 and 2 are incoming: all legs are outgoing here, so give these two with the opposite sign."
        : "All legs are outgoing: an incoming one is given with the opposite sign, its energy negative.",
    });
  } else deviation = Math.max(deviation, relative);
  return { diagnostics: found, deviation: space.tolerance === 0 ? 0 : deviation };
}

/** Below these ratios a point is called near a singular place, where digits are lost. */
const SOFT = 1e-6;
const COLLINEAR = 1e-10;

/**
 * What of a point costs digits, in words: a leg that is soft (of at most 10^-6 of the largest momentum), and neighbours around the
 * circle that are nearly collinear (s(a a+1) of at most 10^-10 of the product of their sizes, a distance in angle of 10^-5).
 */
export function nearSingular<T>(space: Spacetime<T>, momenta: readonly FourMomentum<T>[]): string[] {
  const found: string[] = [];
  const largest = largestLength(space, momenta);
  momenta.forEach((p, a) => {
    const ratio = length(space, p) / largest;
    if (ratio <= SOFT) found.push(`leg ${a + 1} is soft, ${ratio.toExponential(1)} of the largest momentum`);
  });
  momenta.forEach((p, a) => {
    const b = (a + 1) % momenta.length;
    const next = momenta[b]!;
    const s = momentumSquared(space.field, bispinorOf(space, addMomenta(space.field, [p, next])));
    const ratio = magnitude(space.approximate(s)) / (length(space, p) * length(space, next));
    if (ratio <= COLLINEAR) {
      found.push(
        `legs ${a + 1} and ${b + 1} are nearly collinear, s(${a + 1} ${b + 1}) = ${ratio.toExponential(1)} of the product of their sizes`,
      );
    }
  });
  return found;
}

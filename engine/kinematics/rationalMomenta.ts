/** Exact points: random rational twistors have rational momenta in signature (2,2), massless and conserved without any equation to solve. */
import { gaussianRationals, type Randomness, type Rational, rationals } from "../fields";
import { momentaOfTwistors } from "./fromMomenta";
import { randomPoint } from "./makePoint";
import { exactSpacetime, type FourMomentum } from "./momenta";

/** Random twistors are bad (two neighbours parallel) with probability below n/1000; so many in a row are none that were random. */
const MOST_DRAWS = 1000;

/**
 * Exact rational momenta of n legs in signature (2,2): p = (E, x, y, z) with E^2 - x^2 + y^2 - z^2 = 0, adding up to zero.
 * @param n at least 4
 */
export function rationalMomenta(n: number, random: Randomness): FourMomentum<Rational>[] {
  if (!Number.isInteger(n) || n < 4) throw new Error(`rationalMomenta: expected n >= 4, got ${n}`);
  const space = exactSpacetime("2,2");
  for (let draw = 0; draw < MOST_DRAWS; draw++) {
    const { twistors } = randomPoint(rationals, { n, k: 0, loops: 0 }, random);
    const momenta = momentaOfTwistors(
      space,
      twistors.map((z) => z.map(gaussianRationals.real)),
    );
    if (momenta?.every((p) => p.some((x) => !space.field.isZero(x)))) {
      return momenta.map(([E, x, y, z]) => [E.re, x.re, y.re, z.re]);
    }
  }
  throw new Error(`rationalMomenta: no point without parallel neighbours in ${MOST_DRAWS} draws`);
}

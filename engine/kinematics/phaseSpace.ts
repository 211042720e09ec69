/** Points of massless phase space, every region of it with the weight of its volume (Comput. Phys. Commun. 40 (1986) 359). */
import type { Randomness } from "../fields";
import type { FourMomentum } from "./momenta";

const STEPS = 2n ** 53n;

/** Uniform in (0, 1], in steps of 2^-53. */
const uniform = (random: Randomness): number => (Number(random.below(STEPS)) + 1) / Number(STEPS);

/** A direction, uniform over the sphere (Ann. Math. Stat. 43 (1972) 645): square roots only, so that every machine draws the same. */
function direction(random: Randomness): [number, number, number] {
  for (;;) {
    const [u, v] = [2 * uniform(random) - 1, 2 * uniform(random) - 1];
    const square = u * u + v * v;
    if (square > 1) continue;
    const root = 2 * Math.sqrt(1 - square);
    return [u * root, v * root, 1 - 2 * square];
  }
}

/** Massless momenta boosted to the rest frame of their total and scaled to the given energy. */
function atRest(momenta: readonly FourMomentum<number>[], energy: number): FourMomentum<number>[] {
  const total = [0, 1, 2, 3].map((i) => momenta.reduce((sum, p) => sum + p[i]!, 0)) as unknown as FourMomentum<number>;
  const mass = Math.sqrt(total[0] ** 2 - total[1] ** 2 - total[2] ** 2 - total[3] ** 2);
  const boost = total.slice(1).map((x) => -x / mass) as [number, number, number];
  const gamma = total[0] / mass;
  const scale = energy / mass;
  return momenta.map(([E, ...vector]) => {
    const along = vector.reduce((sum, x, i) => sum + x * boost[i]!, 0);
    const factor = E + along / (1 + gamma);
    const [x, y, z] = vector.map((q, i) => scale * (q + boost[i]! * factor)) as [number, number, number];
    // The energy from the momentum: what is left of p^2 is then rounding alone.
    return [Math.hypot(x, y, z), x, y, z];
  });
}

/**
 * `count` massless momenta of total (energy, 0, 0, 0), positive energies, flat in phase space: each of weight
 * `phaseSpaceVolume(count, energy)` as an estimate of an integral over it.
 * The energies take logarithms, so another implementation of these may differ in the last digits.
 * @param count at least 2
 * @param energy positive, any unit
 */
export function flatMomenta(count: number, energy: number, random: Randomness): FourMomentum<number>[] {
  if (!Number.isInteger(count) || count < 2) throw new Error(`flatMomenta: expected a count >= 2, got ${count}`);
  if (!(energy > 0) || !Number.isFinite(energy)) {
    throw new Error(`flatMomenta: expected a positive energy, got ${energy}`);
  }
  const free = Array.from({ length: count }, (): FourMomentum<number> => {
    const [x, y, z] = direction(random);
    const E = -Math.log(uniform(random)) - Math.log(uniform(random));
    return [E, E * x, E * y, E * z];
  });
  // A large boost leaves rounding errors in the sum; the second one is tiny and takes them away.
  return atRest(atRest(free, energy), energy);
}

/**
 * The volume of the phase space of `count` massless particles of total energy W: the integral of the product of d^3p/(2E) times
 * delta^4(sum of p - (W,0,0,0)), (pi/2)^(count-1) W^(2 count-4) / ((count-1)! (count-2)!). No powers of 2 pi are included.
 */
export function phaseSpaceVolume(count: number, energy: number): number {
  if (!Number.isInteger(count) || count < 2) throw new Error(`phaseSpaceVolume: expected a count >= 2, got ${count}`);
  let volume = Math.PI / 2;
  for (let m = 3; m <= count; m++) volume *= (Math.PI / 2) * (energy ** 2 / ((m - 1) * (m - 2)));
  return volume;
}

/**
 * A scattering point of n legs, all outgoing: legs 1 and 2 are the incoming ones, of energy -W/2 each, along the z axis and against
 * it (so that particle 1 flies towards +z), legs 3..n are flat in phase space.
 * @param n at least 4
 */
export function scatteringPoint(n: number, energy: number, random: Randomness): FourMomentum<number>[] {
  if (!Number.isInteger(n) || n < 4) throw new Error(`scatteringPoint: expected n >= 4, got ${n}`);
  const half = energy / 2;
  return [[-half, 0, 0, -half], [-half, 0, 0, half], ...flatMomenta(n - 2, energy, random)];
}

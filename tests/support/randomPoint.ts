/** Seeded points modulo a 31-bit prime for the tests of the sources. */
import type { Point } from "../../engine/kinematics/point";

/** 2^31 - 1 and the largest and smallest primes between 2^30 and 2^31. */
export const primes = [2147483647, 2147483629, 1073741827] as const;

/** A small generator of residues (the linear congruence of ISO C's example with 64-bit state, upper bits). */
export function residues(seed: number, prime: number): () => number {
  let state = (BigInt(seed) * 2862933555777941757n + 3037000493n) & 0xffffffffffffffffn;
  return () => {
    state = (state * 6364136223846793005n + 1442695040888963407n) & 0xffffffffffffffffn;
    return Number((state >> 20n) % BigInt(prime));
  };
}

/** A point with every coordinate drawn. */
export function randomPoint(n: number, k: number, loops: number, seed: number, prime: number): Point<number> {
  const next = residues(seed, prime);
  const vector = (length: number) => Array.from({ length }, next);
  const flavours = () => Array.from({ length: 4 }, () => vector(k));
  return {
    n,
    k,
    loops,
    twistors: Array.from({ length: n }, () => vector(4)),
    chi: Array.from({ length: n }, flavours),
    lines: Array.from({ length: loops }, () => [vector(4), vector(4)] as const),
    referenceTwistor: vector(4),
    referenceChi: flavours(),
    referenceLine: [vector(4), vector(4)],
  };
}

/** The point with its legs moved: new leg a is old leg order[a]. */
export const moveLegs = (point: Point<number>, order: readonly number[]): Point<number> => ({
  ...point,
  twistors: order.map((leg) => point.twistors[leg]!),
  chi: order.map((leg) => point.chi[leg]!),
});

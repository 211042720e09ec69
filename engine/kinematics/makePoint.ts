/** Points whose coordinates come one by one from a rule: the public points, and random ones. */
import { type Field, MERSENNE_61, type Randomness } from "../fields";
import { sha256 } from "../sha256";
import type { GrassmannVectors, Point, Twistor } from "./point";

/** The amplitude that a point belongs to. */
export interface AmplitudeSize {
  readonly n: number;
  readonly k: number;
  readonly loops: number;
}

/** "n6k1L0", the key of an amplitude at one n. */
export const sizeKey = ({ n, k, loops }: AmplitudeSize): string => `n${n}k${k}L${loops}`;

const LOOP_LETTERS = "ABCDEFGH";
const range = (count: number): number[] => Array.from({ length: count }, (_, i) => i + 1);

/** A point with every coordinate given by its public name: `Z3.2`, `chi3.f.j`, `A.1`, `*.i`, `*chi.f.j`, `X1.i`, `X2.i`. */
function makePoint<T>({ n, k, loops }: AmplitudeSize, coordinate: (name: string) => T): Point<T> {
  if (loops > LOOP_LETTERS.length / 2) throw new Error(`makePoint: expected at most 4 loops, got ${loops}`);
  const twistor = (name: string): Twistor<T> => range(4).map((i) => coordinate(`${name}.${i}`));
  const chi = (name: string): GrassmannVectors<T> =>
    range(4).map((flavour) => range(k).map((j) => coordinate(`${name}.${flavour}.${j}`)));
  return {
    n,
    k,
    loops,
    twistors: range(n).map((a) => twistor(`Z${a}`)),
    chi: range(n).map((a) => chi(`chi${a}`)),
    lines: range(loops).map((l) => [twistor(LOOP_LETTERS[2 * l - 2]!), twistor(LOOP_LETTERS[2 * l - 1]!)] as const),
    referenceTwistor: twistor("*"),
    referenceChi: chi("*chi"),
    referenceLine: [twistor("X1"), twistor("X2")],
  };
}

/**
 * Public point number `m` of an amplitude, over the integers modulo 2^61-1: each coordinate is the first 16 bytes of SHA-256 of
 * `equiform-points-1|KEY|m|name`, read big-endian, modulo 2^61-1.
 */
export function publicPoint(size: AmplitudeSize, m: number): Point<bigint> {
  const encoder = new TextEncoder();
  return makePoint(size, (name) => {
    const digest = sha256(encoder.encode(`equiform-points-1|${sizeKey(size)}|${m}|${name}`));
    return digest.subarray(0, 16).reduce((x, byte) => (x << 8n) | BigInt(byte), 0n) % MERSENNE_61;
  });
}

/** Over the rationals, random coordinates are integers of at most this size: small enough to read. */
const LARGEST_RANDOM_INTEGER = 1000n;

/** A point with independent coordinates, uniform over a finite prime field; over fields of characteristic 0, integers up to 1,000. */
export function randomPoint<T>(field: Field<T>, size: AmplitudeSize, random: Randomness): Point<T> {
  const p = field.characteristic;
  return makePoint(size, () =>
    field.fromInteger(
      p > 0n ? random.below(p) : random.below(2n * LARGEST_RANDOM_INTEGER + 1n) - LARGEST_RANDOM_INTEGER,
    ),
  );
}

/** Deterministic randomness from a seed, so that whatever is drawn can be recorded and drawn again. */
import { sha256 } from "../sha256";
import { isPrime } from "./primality";

/** A stream of random bits. */
export interface Randomness {
  /** A uniform integer in 0..bound-1; bound >= 1. */
  below(bound: bigint): bigint;
}

const BLOCK_BITS = 256n;

/**
 * The stream of a seed: SHA-256 of `equiform-stream-1|seed|0`, `...|1`, ... read as big-endian numbers, as many blocks a draw as
 * the bound needs and 64 bits more; a draw above the largest multiple of the bound is thrown away, so that draws are uniform.
 */
export function randomness(seed: string): Randomness {
  const encoder = new TextEncoder();
  let counter = 0;
  const block = (): bigint => {
    const digest = sha256(encoder.encode(`equiform-stream-1|${seed}|${counter++}`));
    return digest.reduce((x, byte) => (x << 8n) | BigInt(byte), 0n);
  };
  return {
    below(bound) {
      if (bound < 1n) throw new Error(`randomness.below: expected a bound >= 1, got ${bound}`);
      for (;;) {
        let x = block();
        let range = 1n << BLOCK_BITS;
        while (range >> 64n < bound) {
          x = (x << BLOCK_BITS) | block();
          range <<= BLOCK_BITS;
        }
        if (x < range - (range % bound)) return x % bound;
      }
    },
  };
}

/** A prime drawn uniformly among those with 2^30 < p < 2^31. */
export function draw31BitPrime(random: Randomness): number {
  for (;;) {
    const candidate = (1n << 30n) + 1n + 2n * random.below(1n << 29n);
    if (isPrime(candidate)) return Number(candidate);
  }
}

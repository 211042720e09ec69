/** Deterministic randomness from a seed, so that whatever is drawn can be recorded and drawn again. */
import { sha256 } from "../sha256";
import { isPrime } from "./primality";

/** A stream of random bits. */
export interface Randomness {
  /** A uniform integer in 0..bound-1; bound >= 1. */
  below(bound: bigint): bigint;
}

const WORD = 2 ** 32;

/**
 * The stream of a seed: SHA-256 of `equiform-stream-1|seed|0`, `...|1`, ... read as big-endian words of 32 bits, eight a block. A draw
 * below a bound takes the fewest words that can hold bound - 1, the first one leading; a draw that is not below the largest multiple
 * of the bound that they can reach is thrown away, so that draws are uniform, and the remainder modulo the bound is the result.
 */
export function randomness(seed: string): Randomness {
  const encoder = new TextEncoder();
  let counter = 0;
  let block: DataView = new DataView(new ArrayBuffer(0));
  let at = 0;
  const word = (): number => {
    if (at === block.byteLength) {
      block = new DataView(sha256(encoder.encode(`equiform-stream-1|${seed}|${counter++}`)).buffer);
      at = 0;
    }
    at += 4;
    return block.getUint32(at - 4);
  };
  return {
    below(bound) {
      if (bound < 1n) throw new Error(`randomness.below: expected a bound >= 1, got ${bound}`);
      if (bound <= WORD) {
        // The general rule in machine numbers: nearly all draws are residues modulo primes of 31 bits.
        const small = Number(bound);
        const end = WORD - (WORD % small);
        for (;;) {
          const x = word();
          if (x < end) return BigInt(x % small);
        }
      }
      for (;;) {
        let x = BigInt(word());
        let range = BigInt(WORD);
        while (range < bound) {
          x = (x << 32n) | BigInt(word());
          range <<= 32n;
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

/** The integers modulo a prime: any prime up to 2^61-1 with big integers, primes of 31 bits with machine numbers. */
import type { Field } from "./field";
import { isPrime } from "./primality";

/** 2^61-1, the modulus of the public points. */
export const MERSENNE_61 = (1n << 61n) - 1n;

/** Inverse of `a` modulo the prime `p` by the extended Euclidean algorithm, 0 < a < p. */
function invert(a: bigint, p: bigint): bigint {
  let [r0, r1] = [p, a];
  let [s0, s1] = [0n, 1n];
  while (r1 !== 0n) {
    const q = r0 / r1;
    [r0, r1] = [r1, r0 - q * r1];
    [s0, s1] = [s1, s0 - q * s1];
  }
  return s0 < 0n ? s0 + p : s0;
}

/**
 * The integers modulo `p`, residues in 0..p-1 as big integers.
 * @param p a prime, 2 <= p <= 2^61-1
 * @throws Error when p is out of range or not prime
 */
export function primeField(p: bigint): Field<bigint> {
  if (p < 2n || p > MERSENNE_61) throw new Error(`primeField: expected 2 <= p <= 2^61-1, got ${p}`);
  if (!isPrime(p)) throw new Error(`primeField: expected a prime, got ${p}`);
  return {
    name: p === MERSENNE_61 ? "integers modulo 2^61-1" : `integers modulo ${p}`,
    characteristic: p,
    zero: 0n,
    one: 1n,
    fromInteger: (x) => {
      const r = x % p;
      return r < 0n ? r + p : r;
    },
    add: (a, b) => {
      const s = a + b;
      return s >= p ? s - p : s;
    },
    subtract: (a, b) => (a >= b ? a - b : a - b + p),
    multiply: (a, b) => (a * b) % p,
    negate: (a) => (a === 0n ? a : p - a),
    inverse: (a) => (a === 0n ? null : invert(a, p)),
    isZero: (a) => a === 0n,
    equals: (a, b) => a === b,
    toText: (a) => a.toString(),
  };
}

/**
 * a * b mod p in machine numbers, exact for 0 <= a, b < p < 2^31.
 *
 * The product needs 62 bits, but only its quotient by p (31 bits, from the rounded product, its error below 2^-19) and its low
 * 32 bits are used. The quotient is taken low by 2^-10, so that the remainder is never negative and below p + p/512 < 2^32.
 */
function multiplyModulo(a: number, b: number, p: number, inverseOfP: number): number {
  const quotient = Math.floor(a * b * inverseOfP - 0.0009765625);
  const remainder = (Math.imul(a, b) - Math.imul(quotient, p)) >>> 0;
  return remainder >= p ? remainder - p : remainder;
}

/**
 * The integers modulo a 31-bit prime, residues in 0..p-1 as machine numbers; exact, and several times faster than `primeField`.
 * @param p a prime, 2^30 < p < 2^31
 * @throws Error when p is out of range or not prime
 */
export function smallPrimeField(p: number): Field<number> {
  if (!Number.isInteger(p) || p <= 2 ** 30 || p >= 2 ** 31) {
    throw new Error(`smallPrimeField: expected an integer 2^30 < p < 2^31, got ${p}`);
  }
  if (!isPrime(BigInt(p))) throw new Error(`smallPrimeField: expected a prime, got ${p}`);
  const big = BigInt(p);
  const inverseOfP = 1 / p;
  return {
    name: `integers modulo ${p}`,
    characteristic: big,
    zero: 0,
    one: 1,
    fromInteger: (x) => {
      const r = Number(x % big);
      return r < 0 ? r + p : r;
    },
    add: (a, b) => {
      const s = a + b;
      return s >= p ? s - p : s;
    },
    subtract: (a, b) => (a >= b ? a - b : a - b + p),
    multiply: (a, b) => multiplyModulo(a, b, p, inverseOfP),
    negate: (a) => (a === 0 ? 0 : p - a),
    inverse: (a) => {
      if (a === 0) return null;
      let [r0, r1] = [p, a];
      let [s0, s1] = [0, 1];
      while (r1 !== 0) {
        const q = Math.floor(r0 / r1);
        [r0, r1] = [r1, r0 - q * r1];
        [s0, s1] = [s1, s0 - q * s1];
      }
      return s0 < 0 ? s0 + p : s0;
    },
    isZero: (a) => a === 0,
    equals: (a, b) => a === b,
    toText: (a) => a.toString(),
  };
}

// Integers modulo primes 2^30 < p < 2^31, a prime of its own in each of the four lanes, in Montgomery form with R = 2^32: x stands
// for x R mod p, in 0..p-1. `negateLazily` gives p for zero; every operation takes p for zero.

import { context, stride } from "../state";

export const LANES: i32 = 4;
export const BATCHED: bool = true;

@inline
export function modulus(context: usize): v128 {
  return v128.load(context);
}

/** 1/p modulo 2^32. */
@inline
export function helper(context: usize): v128 {
  return v128.load(context, 16);
}

/** R mod p. */
@inline
export function one(context: usize): v128 {
  return v128.load(context, 32);
}

@inline
export function isZero(a: v128): v128 {
  return i32x4.eq(a, i32x4.splat(0));
}

@inline
export function add(a: v128, b: v128, p: v128, q: v128): v128 {
  const r = i32x4.add(a, b);
  return i32x4.min_u(r, i32x4.sub(r, p));
}

@inline
export function subtract(a: v128, b: v128, p: v128, q: v128): v128 {
  const r = i32x4.sub(a, b);
  return i32x4.min_u(r, i32x4.add(r, p));
}

@inline
export function negateLazily(a: v128, p: v128): v128 {
  return i32x4.sub(p, a);
}

/** The high halves of m p, where m p has the low halves `low`: what is left of low / R. */
@inline
function quotient(low: v128, p: v128, q: v128): v128 {
  const m = i32x4.mul(low, q);
  return v128.shuffle<i32>(i64x2.extmul_low_i32x4_u(m, p), i64x2.extmul_high_i32x4_u(m, p), 1, 3, 5, 7);
}

/** Sums of at most four products (below 2^64, high half below 2p) divided by R. */
@inline
function reduce(low: v128, high: v128, p: v128, q: v128): v128 {
  const top = v128.shuffle<i32>(low, high, 1, 3, 5, 7);
  const t = i32x4.min_u(top, i32x4.sub(top, p));
  const r = i32x4.sub(t, quotient(v128.shuffle<i32>(low, high, 0, 2, 4, 6), p, q));
  return i32x4.min_u(r, i32x4.add(r, p));
}

@inline
export function multiply(a: v128, b: v128, p: v128, q: v128): v128 {
  const low = i64x2.extmul_low_i32x4_u(a, b);
  const high = i64x2.extmul_high_i32x4_u(a, b);
  const top = v128.shuffle<i32>(low, high, 1, 3, 5, 7);
  const r = i32x4.sub(top, quotient(v128.shuffle<i32>(low, high, 0, 2, 4, 6), p, q));
  return i32x4.min_u(r, i32x4.add(r, p));
}

@inline
export function dot2(a: v128, b: v128, c: v128, d: v128, p: v128, q: v128): v128 {
  const low = i64x2.add(i64x2.extmul_low_i32x4_u(a, b), i64x2.extmul_low_i32x4_u(c, d));
  const high = i64x2.add(i64x2.extmul_high_i32x4_u(a, b), i64x2.extmul_high_i32x4_u(c, d));
  return reduce(low, high, p, q);
}

@inline
export function dot3(a: v128, b: v128, c: v128, d: v128, e: v128, f: v128, p: v128, q: v128): v128 {
  const low = i64x2.add(
    i64x2.add(i64x2.extmul_low_i32x4_u(a, b), i64x2.extmul_low_i32x4_u(c, d)),
    i64x2.extmul_low_i32x4_u(e, f),
  );
  const high = i64x2.add(
    i64x2.add(i64x2.extmul_high_i32x4_u(a, b), i64x2.extmul_high_i32x4_u(c, d)),
    i64x2.extmul_high_i32x4_u(e, f),
  );
  return reduce(low, high, p, q);
}

@inline
export function dot5(
  a0: v128, b0: v128, a1: v128, b1: v128, a2: v128, b2: v128,
  a3: v128, b3: v128, a4: v128, b4: v128,
  p: v128, q: v128,
): v128 {
  return add(dot3(a0, b0, a1, b1, a2, b2, p, q), dot2(a3, b3, a4, b4, p, q), p, q);
}

@inline
export function dot6(
  a0: v128, b0: v128, a1: v128, b1: v128, a2: v128, b2: v128,
  a3: v128, b3: v128, a4: v128, b4: v128, a5: v128, b5: v128,
  p: v128, q: v128,
): v128 {
  return add(dot3(a0, b0, a1, b1, a2, b2, p, q), dot3(a3, b3, a4, b4, a5, b5, p, q), p, q);
}

/** a to the power p-2, bit by bit; bit 30 is set in every lane. */
export function inverse(a: v128, context: usize): v128 {
  const p = modulus(context);
  const q = helper(context);
  const exponent = i32x4.sub(p, i32x4.splat(2));
  let power = a;
  for (let bit = 29; bit >= 0; bit--) {
    power = multiply(power, power, p, q);
    const set = i32x4.shr_s(i32x4.shl(exponent, 31 - bit), 31);
    power = v128.bitselect(multiply(power, a, p, q), power, set);
  }
  return power;
}

/** Multiplies `count` slots from `at` by the vectors of `factor` and divides by R: to Montgomery form by R^2 mod p, and back by 1. */
export function convert(at: usize, factor: usize, count: i32): void {
  for (let i = 0; i < count; i++) {
    for (let j: usize = 0; j < stride; j += 16) {
      const c = context + 3 * j;
      const x = v128.load(at + j);
      v128.store(at + j, multiply(x, v128.load(factor + j), modulus(c), helper(c)));
    }
    at += stride;
  }
}

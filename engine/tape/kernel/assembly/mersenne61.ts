// Integers modulo 2^61-1, two to a vector, in 0..p-1. `negateLazily` gives p for zero; every operation takes p for zero.

export const LANES: i32 = 2;
export const BATCHED: bool = true;

// The constants are read from memory: engines build a vector constant anew wherever it is used.

@inline
export function modulus(context: usize): v128 {
  return v128.load(context);
}

/** 2^31-1. */
@inline
export function helper(context: usize): v128 {
  return v128.load(context, 16);
}

@inline
export function one(context: usize): v128 {
  return v128.load(context, 32);
}

@inline
export function isZero(a: v128): v128 {
  return i64x2.eq(a, i64x2.splat(0));
}

/** r - p where r is not below p; r below 2p. */
@inline
function settle(r: v128, p: v128): v128 {
  return i64x2.sub(r, v128.and(p, i64x2.ge_s(r, p)));
}

@inline
export function add(a: v128, b: v128, p: v128, q: v128): v128 {
  return settle(i64x2.add(a, b), p);
}

@inline
export function subtract(a: v128, b: v128, p: v128, q: v128): v128 {
  const r = i64x2.sub(a, b);
  return i64x2.add(r, v128.and(p, i64x2.shr_s(r, 63)));
}

@inline
export function negateLazily(a: v128, p: v128): v128 {
  return i64x2.sub(p, a);
}

/** a = a0 + 2^31 a1, so that a b = a0 b0 + 2^31 (a0 b1 + a1 b0) + 2^62 a1 b1, and 2^61 is 1. */
@inline
export function multiply(a: v128, b: v128, p: v128, q: v128): v128 {
  const a0 = v128.and(a, q);
  const a1 = i64x2.shr_u(a, 31);
  const b0 = v128.and(b, q);
  const b1 = i64x2.shr_u(b, 31);
  const x = v128.shuffle<i32>(a0, a1, 0, 2, 4, 6);
  const y = v128.shuffle<i32>(b0, b1, 0, 2, 4, 6);
  const z = v128.shuffle<i32>(b1, b0, 0, 2, 4, 6);
  const low = i64x2.extmul_low_i32x4_u(x, y);
  const high = i64x2.extmul_high_i32x4_u(x, y);
  const middle = i64x2.add(i64x2.extmul_low_i32x4_u(x, z), i64x2.extmul_high_i32x4_u(x, z));
  const t = i64x2.add(
    i64x2.add(low, i64x2.shl(high, 1)),
    i64x2.add(i64x2.shr_u(middle, 30), i64x2.shl(v128.and(middle, i64x2.shr_u(q, 1)), 31)),
  );
  return settle(i64x2.add(v128.and(t, p), i64x2.shr_u(t, 61)), p);
}

@inline
export function dot2(a: v128, b: v128, c: v128, d: v128, p: v128, q: v128): v128 {
  return add(multiply(a, b, p, q), multiply(c, d, p, q), p, q);
}

@inline
export function dot3(a: v128, b: v128, c: v128, d: v128, e: v128, f: v128, p: v128, q: v128): v128 {
  return add(dot2(a, b, c, d, p, q), multiply(e, f, p, q), p, q);
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

/** a to the power p-2 = 4 (2^59-1) + 1. */
export function inverse(a: v128, context: usize): v128 {
  const p = modulus(context);
  const q = helper(context);
  let power = a;
  for (let i = 0; i < 58; i++) power = multiply(multiply(power, power, p, q), a, p, q);
  power = multiply(power, power, p, q);
  return multiply(multiply(power, power, p, q), a, p, q);
}

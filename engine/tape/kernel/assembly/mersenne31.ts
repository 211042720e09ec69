// Integers modulo 2^31-1, four to a vector, in 0..p-1. `negateLazily` gives p for zero; every operation takes p for zero.

export const LANES: i32 = 4;
export const BATCHED: bool = true;

// The constants are read from memory: engines build a vector constant anew wherever it is used.

@inline
export function modulus(context: usize): v128 {
  return v128.load(context);
}

/** 2^31-1 in 64 bits. */
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

/** x modulo 2^31-1 but for multiples: below 2^31 + x / 2^31. */
@inline
function fold(x: v128, q: v128): v128 {
  return i64x2.add(v128.and(x, q), i64x2.shr_u(x, 31));
}

/** The residues of four sums of at most three products, each below 2^34 after one fold. */
@inline
function reduce(low: v128, high: v128, p: v128, q: v128): v128 {
  const r = v128.shuffle<i32>(fold(fold(low, q), q), fold(fold(high, q), q), 0, 2, 4, 6);
  return i32x4.min_u(r, i32x4.sub(r, p));
}

@inline
export function multiply(a: v128, b: v128, p: v128, q: v128): v128 {
  const r = v128.shuffle<i32>(
    fold(i64x2.extmul_low_i32x4_u(a, b), q),
    fold(i64x2.extmul_high_i32x4_u(a, b), q),
    0, 2, 4, 6,
  );
  return i32x4.min_u(r, i32x4.sub(r, p));
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

/** Five products: the first three are folded before the others come, so that 64 bits hold them. */
@inline
export function dot5(
  a0: v128, b0: v128, a1: v128, b1: v128, a2: v128, b2: v128,
  a3: v128, b3: v128, a4: v128, b4: v128,
  p: v128, q: v128,
): v128 {
  let low = i64x2.add(
    i64x2.add(i64x2.extmul_low_i32x4_u(a0, b0), i64x2.extmul_low_i32x4_u(a1, b1)),
    i64x2.extmul_low_i32x4_u(a2, b2),
  );
  let high = i64x2.add(
    i64x2.add(i64x2.extmul_high_i32x4_u(a0, b0), i64x2.extmul_high_i32x4_u(a1, b1)),
    i64x2.extmul_high_i32x4_u(a2, b2),
  );
  low = i64x2.add(
    fold(low, q),
    i64x2.add(i64x2.extmul_low_i32x4_u(a3, b3), i64x2.extmul_low_i32x4_u(a4, b4)),
  );
  high = i64x2.add(
    fold(high, q),
    i64x2.add(i64x2.extmul_high_i32x4_u(a3, b3), i64x2.extmul_high_i32x4_u(a4, b4)),
  );
  return reduce(low, high, p, q);
}

/** Six products: the first three are folded before the others come, so that 64 bits hold them. */
@inline
export function dot6(
  a0: v128, b0: v128, a1: v128, b1: v128, a2: v128, b2: v128,
  a3: v128, b3: v128, a4: v128, b4: v128, a5: v128, b5: v128,
  p: v128, q: v128,
): v128 {
  let low = i64x2.add(
    i64x2.add(i64x2.extmul_low_i32x4_u(a0, b0), i64x2.extmul_low_i32x4_u(a1, b1)),
    i64x2.extmul_low_i32x4_u(a2, b2),
  );
  let high = i64x2.add(
    i64x2.add(i64x2.extmul_high_i32x4_u(a0, b0), i64x2.extmul_high_i32x4_u(a1, b1)),
    i64x2.extmul_high_i32x4_u(a2, b2),
  );
  low = i64x2.add(
    i64x2.add(fold(low, q), i64x2.extmul_low_i32x4_u(a3, b3)),
    i64x2.add(i64x2.extmul_low_i32x4_u(a4, b4), i64x2.extmul_low_i32x4_u(a5, b5)),
  );
  high = i64x2.add(
    i64x2.add(fold(high, q), i64x2.extmul_high_i32x4_u(a3, b3)),
    i64x2.add(i64x2.extmul_high_i32x4_u(a4, b4), i64x2.extmul_high_i32x4_u(a5, b5)),
  );
  return reduce(low, high, p, q);
}

function squares(a: v128, times: i32, p: v128, q: v128): v128 {
  for (let i = 0; i < times; i++) a = multiply(a, a, p, q);
  return a;
}

/** a to the power p-2 = 4 (2^29-1) + 1; xn is a to the power 2^n-1. */
export function inverse(a: v128, context: usize): v128 {
  const p = modulus(context);
  const q = helper(context);
  const x2 = multiply(squares(a, 1, p, q), a, p, q);
  const x4 = multiply(squares(x2, 2, p, q), x2, p, q);
  const x8 = multiply(squares(x4, 4, p, q), x4, p, q);
  const x16 = multiply(squares(x8, 8, p, q), x8, p, q);
  const x24 = multiply(squares(x16, 8, p, q), x8, p, q);
  const x28 = multiply(squares(x24, 4, p, q), x4, p, q);
  const x29 = multiply(squares(x28, 1, p, q), a, p, q);
  return multiply(squares(x29, 2, p, q), a, p, q);
}

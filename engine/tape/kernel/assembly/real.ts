// Doubles, two to a vector.

export const LANES: i32 = 2;
export const BATCHED: bool = false;

@inline
export function modulus(context: usize): v128 {
  return f64x2.splat(0);
}

@inline
export function helper(context: usize): v128 {
  return f64x2.splat(0);
}

@inline
export function one(context: usize): v128 {
  return f64x2.splat(1);
}

@inline
export function isZero(a: v128): v128 {
  return f64x2.eq(a, f64x2.splat(0));
}

@inline
export function add(a: v128, b: v128, p: v128, q: v128): v128 {
  return f64x2.add(a, b);
}

@inline
export function subtract(a: v128, b: v128, p: v128, q: v128): v128 {
  return f64x2.sub(a, b);
}

@inline
export function negateLazily(a: v128, p: v128): v128 {
  return f64x2.neg(a);
}

@inline
export function multiply(a: v128, b: v128, p: v128, q: v128): v128 {
  return f64x2.mul(a, b);
}

@inline
export function dot2(a: v128, b: v128, c: v128, d: v128, p: v128, q: v128): v128 {
  return f64x2.add(f64x2.mul(a, b), f64x2.mul(c, d));
}

@inline
export function dot3(a: v128, b: v128, c: v128, d: v128, e: v128, f: v128, p: v128, q: v128): v128 {
  return f64x2.add(dot2(a, b, c, d, p, q), f64x2.mul(e, f));
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
  return f64x2.add(dot3(a0, b0, a1, b1, a2, b2, p, q), dot3(a3, b3, a4, b4, a5, b5, p, q));
}

export function inverse(a: v128, context: usize): v128 {
  return f64x2.div(f64x2.splat(1), a);
}

// The tape interpreter, written once for all fields: the build puts each field's file in the place of "./field".
// A run is [opcode, count, parameter, 0] and its entries; see opcodes.ts for what they hold.

import { BATCHED, LANES, add, dot2, dot3, dot5, dot6, helper, inverse, isZero, modulus, multiply, negateLazily, one, subtract } from "./field";
import { bad, context, nextTerm, scratch, slots, stride, sum, tables, terms } from "../state";

// Globals are read once into `base` and `s` at the beginning of each function: the engine would load them anew in every loop.

@inline
function slot(code: usize, word: i32, base: usize, s: usize): usize {
  return base + <usize>load<u32>(code + (<usize>word << 2)) * s;
}

/** Address of the context of the vector at byte j of a slot. */
@inline
function contextOf(j: usize): usize {
  return context + 3 * j;
}

function runLine(code: usize, count: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    let out = slot(code, 0, base, s);
    let a = slot(code, 1, base, s);
    let b = slot(code, 2, base, s);
    code += 12;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      const p = modulus(c);
      const q = helper(c);
      const a0 = v128.load(a);
      const a1 = v128.load(a + s);
      const a2 = v128.load(a + 2 * s);
      const a3 = v128.load(a + 3 * s);
      const b0 = v128.load(b);
      const b1 = v128.load(b + s);
      const b2 = v128.load(b + 2 * s);
      const b3 = v128.load(b + 3 * s);
      const m1 = negateLazily(a1, p);
      const m2 = negateLazily(a2, p);
      const m3 = negateLazily(a3, p);
      v128.store(out, dot2(a0, b1, m1, b0, p, q));
      v128.store(out + s, dot2(a0, b2, m2, b0, p, q));
      v128.store(out + 2 * s, dot2(a0, b3, m3, b0, p, q));
      v128.store(out + 3 * s, dot2(a1, b2, m2, b1, p, q));
      v128.store(out + 4 * s, dot2(a3, b1, m1, b3, p, q));
      v128.store(out + 5 * s, dot2(a2, b3, m3, b2, p, q));
      out += 16;
      a += 16;
      b += 16;
    }
  }
  return code;
}

function runBracket(code: usize, count: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    let out = slot(code, 0, base, s);
    let a = slot(code, 1, base, s);
    let b = slot(code, 2, base, s);
    code += 12;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      v128.store(
        out,
        dot6(
          v128.load(a), v128.load(b + 5 * s),
          v128.load(a + s), v128.load(b + 4 * s),
          v128.load(a + 2 * s), v128.load(b + 3 * s),
          v128.load(a + 3 * s), v128.load(b + 2 * s),
          v128.load(a + 4 * s), v128.load(b + s),
          v128.load(a + 5 * s), v128.load(b),
          modulus(c), helper(c),
        ),
      );
      out += 16;
      a += 16;
      b += 16;
    }
  }
  return code;
}

function runMinor(code: usize, count: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    let out = slot(code, 0, base, s);
    let a = slot(code, 1, base, s);
    let b = slot(code, 2, base, s);
    code += 12;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      const p = modulus(c);
      v128.store(out, dot2(v128.load(a), v128.load(b + s), negateLazily(v128.load(a + s), p), v128.load(b), p, helper(c)));
      out += 16;
      a += 16;
      b += 16;
    }
  }
  return code;
}

function runAdd(code: usize, count: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    const out = slot(code, 0, base, s);
    const a = slot(code, 1, base, s);
    const b = slot(code, 2, base, s);
    code += 12;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      v128.store(out + j, add(v128.load(a + j), v128.load(b + j), modulus(c), helper(c)));
    }
  }
  return code;
}

function runSubtract(code: usize, count: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    const out = slot(code, 0, base, s);
    const a = slot(code, 1, base, s);
    const b = slot(code, 2, base, s);
    code += 12;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      v128.store(out + j, subtract(v128.load(a + j), v128.load(b + j), modulus(c), helper(c)));
    }
  }
  return code;
}

function runMultiply(code: usize, count: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    const out = slot(code, 0, base, s);
    const a = slot(code, 1, base, s);
    const b = slot(code, 2, base, s);
    code += 12;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      v128.store(out + j, multiply(v128.load(a + j), v128.load(b + j), modulus(c), helper(c)));
    }
  }
  return code;
}

/** Remembers the denominator for the lanes of vector j that are zero, unless an earlier one of the source is remembered. */
function mark(j: usize, zeros: v128, denominator: u32): void {
  v128.store(scratch, zeros);
  const size: usize = 16 / <usize>LANES;
  for (let lane: usize = 0; lane < <usize>LANES; lane++) {
    if (load<i32>(scratch + lane * size) == 0) continue;
    const at = bad + (((j >> 4) * <usize>LANES + lane) << 2);
    store<u32>(at, min(load<u32>(at), denominator));
  }
}

/**
 * One batch: partial products forwards, one inverse, and backwards. Where a denominator is zero, one takes its place and the lane
 * is marked.
 */
function runInvert(code: usize, count: i32): usize {
  const s = stride;
  const base = slots;
  const partial = scratch + 16;
  for (let j: usize = 0; j < s; j += 16) {
    const c = contextOf(j);
    const p = modulus(c);
    const q = helper(c);
    const unit = one(c);
    let product = unit;
    let entry = code;
    for (let i = 0; i < count; i++) {
      let x = v128.load(slot(entry, 1, base, s) + j);
      const zeros = isZero(x);
      if (v128.any_true(zeros)) {
        mark(j, zeros, load<u32>(entry, 8));
        x = v128.bitselect(unit, x, zeros);
      }
      if (BATCHED) {
        v128.store(partial + (<usize>i << 4), product);
        product = multiply(product, x, p, q);
      } else v128.store(slot(entry, 0, base, s) + j, inverse(x, c));
      entry += 12;
    }
    if (!BATCHED) continue;
    let rest = inverse(product, c);
    for (let i = count - 1; i >= 0; i--) {
      entry -= 12;
      let x = v128.load(slot(entry, 1, base, s) + j);
      x = v128.bitselect(unit, x, isZero(x));
      v128.store(slot(entry, 0, base, s) + j, multiply(rest, v128.load(partial + (<usize>i << 4)), p, q));
      rest = multiply(rest, x, p, q);
    }
  }
  return code + 12 * count;
}

/** A scalar, or its negative where its bit of `signs` is set. */
@inline
function signed(x: v128, signs: u32, bit: u32, p: v128): v128 {
  return v128.bitselect(negateLazily(x, p), x, i32x4.splat(0 - ((signs >> bit) & 1)));
}

function runCombine2(code: usize, count: i32, width: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    const out = slot(code, 0, base, s);
    const signs = load<u32>(code, 4);
    const s0 = slot(code, 2, base, s);
    const v0 = slot(code, 3, base, s);
    const s1 = slot(code, 4, base, s);
    const v1 = slot(code, 5, base, s);
    code += 24;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      const p = modulus(c);
      const q = helper(c);
      const x0 = signed(v128.load(s0 + j), signs, 0, p);
      const x1 = signed(v128.load(s1 + j), signs, 1, p);
      let at = j;
      for (let w = 0; w < width; w++) {
        v128.store(out + at, dot2(x0, v128.load(v0 + at), x1, v128.load(v1 + at), p, q));
        at += s;
      }
    }
  }
  return code;
}

function runCombine3(code: usize, count: i32, width: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    const out = slot(code, 0, base, s);
    const signs = load<u32>(code, 4);
    const s0 = slot(code, 2, base, s);
    const v0 = slot(code, 3, base, s);
    const s1 = slot(code, 4, base, s);
    const v1 = slot(code, 5, base, s);
    const s2 = slot(code, 6, base, s);
    const v2 = slot(code, 7, base, s);
    code += 32;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      const p = modulus(c);
      const q = helper(c);
      const x0 = signed(v128.load(s0 + j), signs, 0, p);
      const x1 = signed(v128.load(s1 + j), signs, 1, p);
      const x2 = signed(v128.load(s2 + j), signs, 2, p);
      let at = j;
      for (let w = 0; w < width; w++) {
        v128.store(out + at, dot3(x0, v128.load(v0 + at), x1, v128.load(v1 + at), x2, v128.load(v2 + at), p, q));
        at += s;
      }
    }
  }
  return code;
}

function runCombine5(code: usize, count: i32, width: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    const out = slot(code, 0, base, s);
    const signs = load<u32>(code, 4);
    const s0 = slot(code, 2, base, s);
    const v0 = slot(code, 3, base, s);
    const s1 = slot(code, 4, base, s);
    const v1 = slot(code, 5, base, s);
    const s2 = slot(code, 6, base, s);
    const v2 = slot(code, 7, base, s);
    const s3 = slot(code, 8, base, s);
    const v3 = slot(code, 9, base, s);
    const s4 = slot(code, 10, base, s);
    const v4 = slot(code, 11, base, s);
    code += 48;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      const p = modulus(c);
      const q = helper(c);
      const x0 = signed(v128.load(s0 + j), signs, 0, p);
      const x1 = signed(v128.load(s1 + j), signs, 1, p);
      const x2 = signed(v128.load(s2 + j), signs, 2, p);
      const x3 = signed(v128.load(s3 + j), signs, 3, p);
      const x4 = signed(v128.load(s4 + j), signs, 4, p);
      let at = j;
      for (let w = 0; w < width; w++) {
        v128.store(
          out + at,
          dot5(
            x0, v128.load(v0 + at), x1, v128.load(v1 + at), x2, v128.load(v2 + at),
            x3, v128.load(v3 + at), x4, v128.load(v4 + at), p, q,
          ),
        );
        at += s;
      }
    }
  }
  return code;
}

/** The sum of `count` products of a table: byte offsets left and right, and all ones where the product is negative. */
@inline
function tableSum(table: usize, count: i32, left: usize, right: usize, p: v128, q: v128): v128 {
  let x = signedEntry(table, right, p);
  let total = multiply(v128.load(left + load<u32>(table)), x, p, q);
  let i = 1;
  if ((count & 1) == 0) {
    const y = signedEntry(table + 12, right, p);
    total = dot2(v128.load(left + load<u32>(table)), x, v128.load(left + load<u32>(table, 12)), y, p, q);
    i = 2;
  }
  table += 12 * i;
  for (; i < count; i += 2) {
    x = signedEntry(table, right, p);
    const y = signedEntry(table + 12, right, p);
    const pair = dot2(v128.load(left + load<u32>(table)), x, v128.load(left + load<u32>(table, 12)), y, p, q);
    total = add(total, pair, p, q);
    table += 24;
  }
  return total;
}

@inline
function signedEntry(table: usize, right: usize, p: v128): v128 {
  const x = v128.load(right + load<u32>(table, 4));
  return v128.bitselect(negateLazily(x, p), x, i32x4.splat(load<i32>(table, 8)));
}

/** Tables: [components, slots of one flavour left, right, 0], then the products of each component. */
function runWedge(code: usize, count: i32, degree: i32): usize {
  const s = stride;
  const base = slots;
  const head = load<u32>(tables + (<usize>degree << 2));
  const components = load<i32>(head);
  const leftWidth = <usize>load<u32>(head, 4) * s;
  const rightWidth = <usize>load<u32>(head, 8) * s;
  for (let i = 0; i < count; i++) {
    let out = slot(code, 0, base, s);
    let w = slot(code, 1, base, s);
    let r = slot(code, 2, base, s);
    code += 12;
    for (let flavour = 0; flavour < 4; flavour++) {
      let table: usize = head + 16;
      for (let component = 0; component < components; component++) {
        for (let j: usize = 0; j < s; j += 16) {
          const c = contextOf(j);
          v128.store(out + j, tableSum(table, degree + 1, w + j, r + j, modulus(c), helper(c)));
        }
        out += s;
        table += 12 * (degree + 1);
      }
      w += leftWidth;
      r += rightWidth;
    }
  }
  return code;
}

function runPair(code: usize, count: i32, degree: i32): usize {
  const s = stride;
  const base = slots;
  const head = load<u32>(tables + (<usize>(8 + degree) << 2));
  const products = load<i32>(head);
  const leftWidth = <usize>load<u32>(head, 4) * s;
  const rightWidth = <usize>load<u32>(head, 8) * s;
  const table: usize = head + 16;
  for (let i = 0; i < count; i++) {
    const out = slot(code, 0, base, s);
    const v = slot(code, 1, base, s);
    const w = slot(code, 2, base, s);
    code += 12;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      const p = modulus(c);
      const q = helper(c);
      let product: v128;
      if (degree == 0) {
        const x = multiply(v128.load(v + j), v128.load(v + j + s), p, q);
        const y = multiply(v128.load(v + j + 2 * s), v128.load(v + j + 3 * s), p, q);
        product = multiply(x, y, p, q);
      } else {
        product = tableSum(table, products, v + j, w + j, p, q);
        let left = v + j;
        let right = w + j;
        for (let flavour = 1; flavour < 4; flavour++) {
          left += leftWidth;
          right += rightWidth;
          product = multiply(product, tableSum(table, products, left, right, p, q), p, q);
        }
      }
      v128.store(out + j, product);
    }
  }
  return code;
}

function runTerm(code: usize, count: i32): usize {
  const s = stride;
  const base = slots;
  for (let i = 0; i < count; i++) {
    const a = slot(code, 0, base, s);
    const negative = load<i32>(code, 4) != 0;
    code += 12;
    for (let j: usize = 0; j < s; j += 16) {
      const c = contextOf(j);
      const p = modulus(c);
      const q = helper(c);
      let x = v128.load(a + j);
      if (negative) x = subtract(i32x4.splat(0), x, p, q);
      v128.store(sum + j, add(v128.load(sum + j), x, p, q));
      if (terms != 0) v128.store(terms + j, x);
    }
    if (terms != 0) nextTerm();
  }
  return code;
}

/** Runs the code between two addresses on the block that `place` has set. */
export function run(code: usize, end: usize): void {
  while (code < end) {
    const opcode = load<i32>(code);
    const count = load<i32>(code, 4);
    const parameter = load<i32>(code, 8);
    code += 16;
    switch (opcode) {
      case 1: code = runLine(code, count); break;
      case 2: code = runBracket(code, count); break;
      case 3: code = runMinor(code, count); break;
      case 4: code = runAdd(code, count); break;
      case 5: code = runSubtract(code, count); break;
      case 6: code = runMultiply(code, count); break;
      case 7: code = runInvert(code, count); break;
      case 8: code = runCombine2(code, count, parameter); break;
      case 9: code = runCombine3(code, count, parameter); break;
      case 10: code = runCombine5(code, count, parameter); break;
      case 11: code = runWedge(code, count, parameter); break;
      case 12: code = runPair(code, count, parameter); break;
      case 13: code = runTerm(code, count); break;
      default: unreachable();
    }
  }
}

/**
 * Complex doubles with an exponent of their own: products of hundreds of brackets pass through sizes of 10^400 and 10^-400 on the
 * way to an ordinary number, where plain doubles become infinite or silently zero.
 */
import type { Complex } from "./complex";
import { complexDoubles } from "./doubles";
import type { Field } from "./field";

/** (re + im i) 2^(256 limbs); the larger of |re|, |im| is between 2^-128 and 2^128, or both are zero and `limbs` is 0. */
export interface WideComplex {
  readonly re: number;
  readonly im: number;
  readonly limbs: number;
}

const LIMB = 2 ** 256;
const LIMB_INVERSE = 2 ** -256;
const LARGEST = 2 ** 128;
const SMALLEST = 2 ** -128;

/** The canonical form of a number whose parts are doubles of any size. NaN and infinity stay what they are. */
function wide(re: number, im: number, limbs: number): WideComplex {
  const size = Math.max(Math.abs(re), Math.abs(im));
  if (size < LARGEST && size >= SMALLEST) return { re, im, limbs };
  if (size === 0) return zero;
  if (size < SMALLEST) return wide(re * LIMB, im * LIMB, limbs - 1);
  return size < Number.POSITIVE_INFINITY ? wide(re * LIMB_INVERSE, im * LIMB_INVERSE, limbs + 1) : { re, im, limbs };
}

const zero: WideComplex = { re: 0, im: 0, limbs: 0 };

/** Nothing of a number survives beside one that is 2^256 larger, but for neighbours in `limbs` both sizes can be the same. */
function add(a: WideComplex, b: WideComplex): WideComplex {
  if (a.limbs === b.limbs) return wide(a.re + b.re, a.im + b.im, a.limbs);
  const [large, small] = a.limbs > b.limbs ? [a, b] : [b, a];
  if (isZero(large)) return small;
  if (isZero(small) || large.limbs - small.limbs > 1) return large;
  return wide(large.re + small.re * LIMB_INVERSE, large.im + small.im * LIMB_INVERSE, large.limbs);
}

const isZero = ({ re, im }: WideComplex): boolean => re === 0 && im === 0;

const negate = ({ re, im, limbs }: WideComplex): WideComplex => ({ re: -re, im: -im, limbs });

/** An integer of any length: its leading digits, and the power of 2^256 that is left. */
function fromInteger(x: bigint): WideComplex {
  let [rest, limbs] = [x, 0];
  // Two limbs are kept, so that what is cut off is far below the last bit of a double.
  for (; rest >= 1n << 512n || rest <= -(1n << 512n); limbs++) rest >>= 256n;
  return wide(Number(rest), 0, limbs);
}

/** Rounded arithmetic in the operations of a field, as `complexDoubles`, without its limits of range. */
export const wideComplex: Field<WideComplex> = {
  name: "complex double-precision numbers of any size",
  characteristic: 0n,
  zero,
  one: { re: 1, im: 0, limbs: 0 },
  fromInteger,
  add,
  subtract: (a, b) => add(a, negate(b)),
  multiply: (a, b) => wide(a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re, a.limbs + b.limbs),
  negate,
  inverse: (a) => {
    const inverse = complexDoubles.inverse(a);
    return inverse === null ? null : wide(inverse.re, inverse.im, -a.limbs);
  },
  isZero,
  equals: (a, b) => a.re === b.re && a.im === b.im && a.limbs === b.limbs,
  toText: (a) => {
    const mantissa = complexDoubles.toText(a);
    return a.limbs === 0 ? mantissa : `(${mantissa}) 2^${256 * a.limbs}`;
  },
};

export const toWide = ({ re, im }: Complex<number>): WideComplex => wide(re, im, 0);

/** The number as ordinary doubles; null where it is too large, too small to be told from zero, or no number. */
export function fromWide(a: WideComplex): Complex<number> | null {
  const { re, im, limbs } = a;
  const factor = 2 ** (128 * limbs);
  const value = { re: re * factor * factor, im: im * factor * factor };
  const lost = value.re === 0 && value.im === 0 && !isZero(a);
  return Number.isFinite(value.re) && Number.isFinite(value.im) && !lost ? value : null;
}

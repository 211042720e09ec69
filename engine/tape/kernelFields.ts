/** The fields of the kernel: how numbers of each lie in memory, and which of its interpreters runs them. */
import type { KernelExports } from "./kernel/kernel";

/** A number field as the kernel sees it. T is what callers hold, P what a lane is told: its prime, or nothing. */
export interface KernelField<T, P> {
  readonly name: string;
  /** Points in one vector of 16 bytes. */
  readonly lanes: number;
  run(kernel: KernelExports, code: number, end: number): void;
  /** Writes what the vectors of the context say of one lane: modulus, helper, one. */
  writeContext(memory: DataView, at: number, lane: number, parameter: P): void;
  write(memory: DataView, at: number, x: T): void;
  /** Writes numbers `stride` bytes apart. */
  writeRow(memory: DataView, at: number, stride: number, row: readonly T[]): void;
  read(memory: DataView, at: number): T;
  /** An exact constant, or null where its denominator vanishes. */
  constant(numerator: bigint, denominator: bigint, parameter: P): T | null;
  /** 0 and 1, for basis vectors. */
  readonly zero: T;
  readonly one: T;
  /** The factor that brings a given number into the form the interpreter wants, one a lane, or null where there is none. */
  readonly entry: ((parameter: P) => number) | null;
}

/** 2^31-1. */
export const MERSENNE_31 = 2147483647;

const residue = (x: bigint, p: bigint): bigint => {
  const r = x % p;
  return r < 0n ? r + p : r;
};

/** numerator / denominator modulo p, or null where the denominator vanishes. */
function quotient(numerator: bigint, denominator: bigint, p: bigint): bigint | null {
  const a = residue(denominator, p);
  if (a === 0n) return null;
  let [r0, r1, s0, s1] = [p, a, 0n, 1n];
  while (r1 !== 0n) {
    const q = r0 / r1;
    [r0, r1, s0, s1] = [r1, r0 - q * r1, s1, s0 - q * s1];
  }
  return residue(numerator * s0, p);
}

/** 1/p modulo 2^32, p odd: each step doubles the number of right bits. */
function inverseOfOdd(p: number): number {
  let x = p;
  for (let i = 0; i < 5; i++) x = Math.imul(x, 2 - Math.imul(p, x));
  return x >>> 0;
}

const words = {
  lanes: 4,
  write: (memory: DataView, at: number, x: number): void => memory.setUint32(at, x, true),
  writeRow: (memory: DataView, at: number, stride: number, row: readonly number[]): void => {
    for (let i = 0; i < row.length; i++) memory.setUint32(at + i * stride, row[i]!, true);
  },
  read: (memory: DataView, at: number): number => memory.getUint32(at, true),
  zero: 0,
  one: 1,
};

const constant31 = (numerator: bigint, denominator: bigint, prime: number): number | null => {
  const value = quotient(numerator, denominator, BigInt(prime));
  return value === null ? null : Number(value);
};

export const mersenne31: KernelField<number, number> = {
  ...words,
  name: "integers modulo 2^31-1",
  run: (kernel, code, end) => kernel.runMersenne31(code, end),
  writeContext: (memory, at, lane) => {
    memory.setUint32(at + 4 * lane, MERSENNE_31, true);
    // 64 bits wide: every other word is zero.
    memory.setUint32(at + 16 + 4 * lane, lane % 2 === 0 ? MERSENNE_31 : 0, true);
    memory.setUint32(at + 32 + 4 * lane, 1, true);
  },
  constant: constant31,
  entry: null,
};

export const montgomery31: KernelField<number, number> = {
  ...words,
  name: "integers modulo primes of 31 bits",
  run: (kernel, code, end) => kernel.runMontgomery31(code, end),
  writeContext: (memory, at, lane, prime) => {
    memory.setUint32(at + 4 * lane, prime, true);
    memory.setUint32(at + 16 + 4 * lane, inverseOfOdd(prime), true);
    memory.setUint32(at + 32 + 4 * lane, 2 ** 32 % prime, true);
  },
  constant: constant31,
  entry: (prime) => Number((1n << 64n) % BigInt(prime)),
};

const P61 = (1n << 61n) - 1n;

export const mersenne61: KernelField<bigint, null> = {
  name: "integers modulo 2^61-1",
  lanes: 2,
  run: (kernel, code, end) => kernel.runMersenne61(code, end),
  writeContext: (memory, at, lane) => {
    memory.setBigUint64(at + 8 * lane, P61, true);
    memory.setBigUint64(at + 16 + 8 * lane, BigInt(MERSENNE_31), true);
    memory.setBigUint64(at + 32 + 8 * lane, 1n, true);
  },
  write: (memory, at, x) => memory.setBigUint64(at, x, true),
  writeRow: (memory, at, stride, row) => {
    for (let i = 0; i < row.length; i++) memory.setBigUint64(at + i * stride, row[i]!, true);
  },
  read: (memory, at) => memory.getBigUint64(at, true),
  constant: (numerator, denominator) => quotient(numerator, denominator, P61),
  zero: 0n,
  one: 1n,
  entry: null,
};

/** A rational number as the nearest double or so, also where numerator and denominator are too large for one. */
function toDouble(numerator: bigint, denominator: bigint): number {
  const excess = Math.max(numerator.toString(2).length, denominator.toString(2).length) - 1000;
  if (excess <= 0) return Number(numerator) / Number(denominator);
  return Number(numerator >> BigInt(excess)) / Number(denominator >> BigInt(excess));
}

export const real: KernelField<number, null> = {
  name: "real numbers in double precision",
  lanes: 2,
  run: (kernel, code, end) => kernel.runReal(code, end),
  writeContext: () => {},
  write: (memory, at, x) => memory.setFloat64(at, x, true),
  writeRow: (memory, at, stride, row) => {
    for (let i = 0; i < row.length; i++) memory.setFloat64(at + i * stride, row[i]!, true);
  },
  read: (memory, at) => memory.getFloat64(at, true),
  constant: toDouble,
  zero: 0,
  one: 1,
  entry: null,
};

/** [real part, imaginary part] */
export type Complex = readonly [number, number];

export const complex: KernelField<Complex, null> = {
  name: "complex numbers in double precision",
  lanes: 1,
  run: (kernel, code, end) => kernel.runComplex(code, end),
  writeContext: () => {},
  write: (memory, at, [re, im]) => {
    memory.setFloat64(at, re, true);
    memory.setFloat64(at + 8, im, true);
  },
  writeRow: (memory, at, stride, row) => {
    row.forEach((x, i) => {
      memory.setFloat64(at + i * stride, x[0], true);
      memory.setFloat64(at + i * stride + 8, x[1], true);
    });
  },
  read: (memory, at) => [memory.getFloat64(at, true), memory.getFloat64(at + 8, true)],
  constant: (numerator, denominator) => [toDouble(numerator, denominator), 0],
  zero: [0, 0],
  one: [1, 0],
  entry: null,
};

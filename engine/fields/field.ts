/**
 * A field as a table of operations on values of type T. Values are canonical: equal elements are the same value.
 * Implementations live beside this file and all pass one table of laws (tests/engine/fields).
 */
export interface Field<T> {
  /** For people: "integers modulo 2^61-1", "rationals". */
  readonly name: string;
  /** 0n for the rationals, p for a prime field. */
  readonly characteristic: bigint;
  readonly zero: T;
  readonly one: T;
  fromInteger(x: bigint): T;
  add(a: T, b: T): T;
  subtract(a: T, b: T): T;
  multiply(a: T, b: T): T;
  negate(a: T): T;
  /** The multiplicative inverse, or null for zero. */
  inverse(a: T): T | null;
  isZero(a: T): boolean;
  equals(a: T, b: T): boolean;
  /** Decimal text: residue in 0..p-1, or `p/q` in lowest terms with positive q (`p` where q is 1). */
  toText(a: T): string;
}

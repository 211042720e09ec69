/** Exact arithmetic: prime fields, rationals, truncated Laurent series, and seeded randomness to draw from them. */
export { batchInverse } from "./batch";
export type { Field } from "./field";
export { isPrime, powerModulo } from "./primality";
export { MERSENNE_61, primeField, smallPrimeField } from "./primeField";
export { draw31BitPrime, type Randomness, randomness } from "./randomness";
export { fromRational, type Rational, rational, rationals } from "./rationals";
export { type Series, type SeriesField, series } from "./series";

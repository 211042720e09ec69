/** Arithmetic: prime fields, rationals, truncated Laurent series, exact and double-precision complex numbers, seeded randomness. */
export { batchInverse } from "./batch";
export { type Complex, type ComplexField, complexOver, gaussianRationals } from "./complex";
export { complexDoubles, fromDouble, magnitude, realDoubles, toComplexDouble, toDouble } from "./doubles";
export type { Field } from "./field";
export { isPrime, powerModulo } from "./primality";
export { MERSENNE_61, primeField, smallPrimeField } from "./primeField";
export { draw31BitPrime, type Randomness, randomness } from "./randomness";
export { fromRational, type Rational, rational, rationals } from "./rationals";
export { type Series, type SeriesField, series } from "./series";
export { fromWide, toWide, type WideComplex, wideComplex } from "./wideComplex";

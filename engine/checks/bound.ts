/**
 * How sure an agreement is (ENGINE section 2, DATA rule 5).
 *
 * Two rational functions over Q are compared at samples; a sample is a prime drawn uniformly among those between 2^30 and 2^31 and
 * a point drawn uniformly modulo that prime. If the cleared difference is not zero, one sample misses it when the prime divides all
 * its coefficients (a number of h bits has at most h/30 such primes), or when the point is a zero modulo p (at most d/p, J. ACM 27
 * (1980) 701). Points with a vanishing denominator are drawn again, which divides by the share of points that are kept.
 */
import type { SizeBound } from "../sources/source";

/** Number of primes between 2^30 and 2^31: pi(2^31) - pi(2^30) = 105,097,565 - 54,400,028 (tables of pi(2^n), common practice). */
export const primesOf31Bits = 50_697_537;

/** Accepted means that the probability of a wrong agreement is below 2^-certaintyBits. */
export const certaintyBits = 100;

/** No fewer samples than this, however small the forms: at least two primes are asked for, and a few more cost nothing. */
export const fewestSamples = 6;

const smallestPrime = 2 ** 30;

/** Probability, from above, that one sample does not see the difference of two unequal functions of these sizes; at most 1. */
export function missProbability(a: SizeBound, b: SizeBound): number {
  const degree = Math.max(a.degree + b.denominatorDegree, b.degree + a.denominatorDegree);
  const bits = 1 + Math.max(a.heightBits + b.denominatorHeightBits, b.heightBits + a.denominatorHeightBits);
  const missed = bits / 30 / primesOf31Bits + degree / smallestPrime;
  const denominatorDegree = a.denominatorDegree + b.denominatorDegree;
  const denominatorBits = a.denominatorHeightBits + b.denominatorHeightBits;
  const rejected = denominatorBits / 30 / primesOf31Bits + denominatorDegree / smallestPrime;
  return rejected >= 1 ? 1 : Math.min(1, missed / (1 - rejected));
}

/** Samples needed for a wrong agreement to be less probable than 2^-certaintyBits; null where no number of samples would do. */
export function samplesNeeded(miss: number): number | null {
  if (miss >= 0.9) return null;
  return Math.max(fewestSamples, Math.ceil(certaintyBits / -Math.log2(miss)));
}

/** "2^-108": the probability that all of `samples` independent samples miss, rounded up to a power of two. */
export function boundText(miss: number, samples: number): string {
  return `2^-${Math.max(0, Math.floor(-Math.log2(miss) * samples))}`;
}

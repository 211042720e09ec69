import { describe, expect, it } from "vitest";
import { draw31BitPrime, isPrime, randomness } from "../../../engine/fields";

describe("primality", () => {
  it("agrees with trial division up to 5,000", () => {
    for (let n = 0; n < 5000; n++) {
      let divisors = 0;
      for (let d = 1; d <= n; d++) if (n % d === 0) divisors++;
      expect(isPrime(BigInt(n))).toBe(divisors === 2);
    }
  });

  it("agrees with PARI/GP 2.15.2 (isprime) above 2^30 and below 2^61", () => {
    const above = [];
    for (let i = 1n; i < 400n; i++) if (isPrime((1n << 30n) + i)) above.push(Number(i));
    expect(above).toEqual([
      3, 7, 9, 15, 19, 33, 67, 85, 115, 129, 145, 147, 163, 169, 213, 229, 249, 253, 267, 289, 345, 379, 385, 399,
    ]);
    const below = [];
    for (let i = 401n; i > 0n; i--) if (isPrime((1n << 61n) - i)) below.push(Number(i));
    expect(below).toEqual([391, 339, 283, 259, 229, 45, 31, 1]);
    expect(isPrime(18446744073709551557n)).toBe(true);
  });

  it("is not taken in by numbers that pass for many bases", () => {
    // Carmichael numbers (OEIS A002997) and the least strong pseudoprimes to the first prime bases (OEIS A014233).
    const liars = [561n, 1729n, 41041n, 825265n, 321197185n, 5394826801n];
    const strong = [2047n, 1373653n, 25326001n, 3215031751n, 2152302898747n, 3474749660383n, 341550071728321n];
    for (const n of [...liars, ...strong, 3825123056546413051n]) expect(isPrime(n)).toBe(false);
  });

  it("says where it could not be certain", () => {
    expect(() => isPrime(1n << 64n)).toThrow("isPrime: expected n < 2^64");
  });
});

describe("randomness", () => {
  it("repeats itself from the seed, and differs from another's", () => {
    const draw = (seed: string) => {
      const random = randomness(seed);
      return [random.below(10n ** 30n), random.below(1n << 300n), random.below(2n)];
    };
    expect(draw("a")).toEqual(draw("a"));
    expect(draw("a")).not.toEqual(draw("b"));
  });

  it("stays below the bound and is spread evenly", () => {
    const random = randomness("spread");
    const counts = new Array<number>(7).fill(0);
    for (let i = 0; i < 7000; i++) counts[Number(random.below(7n))]!++;
    // Chi-squared with 6 degrees of freedom exceeds 33 with probability 10^-5; the seed is fixed.
    const chiSquared = counts.reduce((sum, c) => sum + (c - 1000) ** 2 / 1000, 0);
    expect(chiSquared).toBeLessThan(33);
    const wide = randomness("wide");
    const bound = (1n << 400n) + 1n;
    for (let i = 0; i < 50; i++) expect(wide.below(bound)).toBeLessThan(bound);
    expect(wide.below(1n)).toBe(0n);
    expect(() => wide.below(0n)).toThrow("expected a bound >= 1");
  });

  it("draws primes over the whole range of 31 bits", () => {
    const random = randomness("primes");
    const primes = Array.from({ length: 200 }, () => draw31BitPrime(random));
    expect(primes.every((p) => p > 2 ** 30 && p < 2 ** 31 && isPrime(BigInt(p)))).toBe(true);
    expect(new Set(primes).size).toBe(200);
    const upper = primes.filter((p) => p > 1.5 * 2 ** 30).length;
    expect(Math.abs(upper - 100)).toBeLessThan(40);
  });
});

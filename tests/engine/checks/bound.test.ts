import { describe, expect, it } from "vitest";
import { boundText, certaintyBits, missProbability, primesOf31Bits, samplesNeeded } from "../../../engine/checks/bound";
import { pari } from "../../support/pari";

const size = (degree: number, heightBits: number) => ({
  degree,
  denominatorDegree: degree,
  heightBits,
  denominatorHeightBits: heightBits,
});

describe("the bound of an agreement", () => {
  it("counts the primes between 2^30 and 2^31 as PARI/GP's primepi does", () => {
    expect(String(primesOf31Bits)).toBe(pari("print(primepi(2^31) - primepi(2^30))"));
  });

  it("follows the formula of Schwartz and Zippel (J. ACM 27 (1980) 701) with bad primes and rejected points", () => {
    // Degrees 10 + 10, heights of 30 + 30 bits and one bit for the difference, by hand:
    const missed = 61 / 30 / 50_697_537 + 20 / 2 ** 30;
    const rejected = 60 / 30 / 50_697_537 + 20 / 2 ** 30;
    expect(missProbability(size(10, 30), size(10, 30))).toBeCloseTo(missed / (1 - rejected), 15);
  });

  it("asks for more samples the larger the forms, each number enough for 2^-100", () => {
    let before = 0;
    for (const degree of [1, 10 ** 3, 10 ** 6, 10 ** 7]) {
      const miss = missProbability(size(degree, 10 * degree), size(degree, 10 * degree));
      const samples = samplesNeeded(miss);
      expect(samples).not.toBeNull();
      expect(miss ** (samples ?? 0)).toBeLessThanOrEqual(2 ** -certaintyBits);
      expect(samples).toBeGreaterThanOrEqual(before);
      before = samples ?? 0;
    }
  });

  it("gives up where no number of samples would do", () => {
    expect(samplesNeeded(missProbability(size(2 ** 31, 1), size(1, 1)))).toBeNull();
  });

  it("prints a power of two that is not below the true probability", () => {
    expect(boundText(2 ** -20.5, 5)).toBe("2^-102");
    expect(boundText(1, 5)).toBe("2^-0");
  });
});

import { describe, expect, it } from "vitest";
import { firstRoot, interpolate, squareRoot } from "../../../engine/checks/roots";
import { smallPrimeField } from "../../../engine/fields";
import { pari } from "../../support/pari";

const primes = [2147483647, 1073741827, 2113929217]; // the last is 63 2^25 + 1: many factors 2

describe("roots", () => {
  it("of squares are those of PARI/GP, up to the sign", () => {
    for (const prime of primes) {
      const field = smallPrimeField(prime);
      for (const x of [2, 3, 5, 7, 11, 13, 123456789]) {
        const expected = pari(`x=Mod(${x},${prime}); print(if(issquare(x), lift(sqrt(x)), -1))`);
        const found = squareRoot(field, x);
        if (expected === "-1") expect(found).toBeNull();
        else expect([Number(expected), prime - Number(expected)]).toContain(found);
      }
    }
  });

  it("of polynomials of degree 1 and 2 are found from values alone", () => {
    const field = smallPrimeField(primes[0]!);
    // (t - 5)(3 t - 21) = 3 t^2 - 36 t + 105
    const quadratic = interpolate(field, (t) => field.fromInteger(BigInt(3 * t * t - 36 * t + 105)), 6);
    expect(quadratic).toEqual([105, primes[0]! - 36, 3]);
    expect([5, 7]).toContain(firstRoot(field, quadratic!));
    expect(firstRoot(field, interpolate(field, (t) => field.subtract(t, 9), 6)!)).toBe(9);
    expect(interpolate(field, () => 4, 6)).toEqual([4]);
  });

  it("are not invented where the values are not those of a polynomial of low degree", () => {
    const field = smallPrimeField(primes[0]!);
    expect(interpolate(field, (t) => field.inverse(field.add(t, 3)), 6)).toBeNull();
  });
});

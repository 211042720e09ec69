import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { combineResidues, fractionText, reconstructFraction } from "../../../engine/solve/reconstruction";
import { pari } from "../../support/pari";

const primes = [1073741827n, 1073741831n, 1073741833n, 1073741839n, 1073741843n];

describe("rational reconstruction", () => {
  it("finds the fractions that PARI/GP's bestappr finds", () => {
    const cases = [
      [3n, 7n],
      [-22n, 7n],
      [123456789n, 987654321n],
      [-1n, 1n],
      [0n, 1n],
      [10n ** 18n + 9n, 10n ** 17n + 3n],
    ] as const;
    const modulus = primes.reduce((m, p) => m * p, 1n);
    const program = cases
      .map(([a, b]) => `r = lift(Mod(${a}/${b}, ${modulus})); print(r, " ", bestappr(Mod(r, ${modulus})))`)
      .join("\n");
    const lines = pari(program).split("\n");
    expect(lines).toHaveLength(cases.length);
    for (const line of lines) {
      const [residue = "", fraction = ""] = line.split(" ");
      const found = reconstructFraction(BigInt(residue), modulus);
      expect(found === null ? "none" : fractionText(found)).toBe(fraction);
    }
  });

  it("combines residues as PARI/GP's chinese does", () => {
    const residues = primes.map((p, i) => ({ residue: (BigInt(i + 1) * 715827882n) % p, modulus: p }));
    const program = `print(lift(chinese([${residues.map((r) => `Mod(${r.residue}, ${r.modulus})`).join(", ")}])))`;
    expect(String(combineResidues(residues).residue)).toBe(pari(program));
  });

  it("gives back every fraction small enough for the modulus, and nothing else with that residue", () => {
    const modulus = primes.reduce((m, p) => m * p, 1n);
    fc.assert(
      fc.property(fc.bigInt(-(10n ** 20n), 10n ** 20n), fc.bigInt(1n, 10n ** 20n), (a, b) => {
        const residues = primes.map((p) => {
          const inverse = power(b % p, p - 2n, p);
          return { residue: (((a % p) + p) * inverse) % p, modulus: p };
        });
        if (primes.some((p) => b % p === 0n)) return true;
        const { residue } = combineResidues(residues);
        const found = reconstructFraction(residue, modulus);
        return found !== null && found.numerator * b === a * found.denominator;
      }),
      { seed: 7, numRuns: 300 },
    );
  });
});

function power(base: bigint, exponent: bigint, p: bigint): bigint {
  let [result, square, left] = [1n, base % p, exponent];
  while (left > 0n) {
    if (left & 1n) result = (result * square) % p;
    square = (square * square) % p;
    left >>= 1n;
  }
  return result;
}

import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Fraction, fraction, fractions, signOf } from "../../../../engine/checks/marks/fractions";
import { positivePoint, totallyPositive } from "../../../../engine/checks/marks/positivity";
import { randomness, rational, rationals } from "../../../../engine/fields";
import { bracket, determinant } from "../../../../engine/kinematics";
import { published } from "../../../support/forms";
import { alone } from "./support";

const signs = (...args: Parameters<typeof alone>) => {
  const { marks } = alone(...args);
  return [marks.oneSign?.state, marks.termsOneSign?.state];
};
const box = "<1 2 3 4>^2 / (<AB 1 2><AB 2 3><AB 3 4><AB 1 4>)";

// 1412.8478: amplitudes are positive on positive kinematics; 1012.6032: chiral pentagons and double pentagons are so term by term.
describe("signs on positive kinematics", () => {
  it.each([
    ["the box, its only term too", box, { n: 4, loops: 1 }, ["holds", "holds"]],
    ["the six-leg NMHV form, whose terms change sign", published.nmhv6, { n: 6, k: 1 }, ["holds", "fails"]],
    [
      "chiral pentagons with X = (1 2)",
      published.pentagons.replaceAll("X", "1 2").replaceAll("1 <= i", "3 <= i"),
      { n: 5, loops: 1 },
      ["holds", "holds"],
    ],
    ["double pentagons", published.doublePentagons, { n: 5, loops: 2 }, ["holds", "holds"]],
    ["minus an amplitude: one sign all the same", "-[1 2 3 4 5]", { n: 5, k: 1 }, ["holds", "holds"]],
    [
      "the difference of an invariant and its reflection",
      "[1 2 3 4 5] - [2 3 4 5 6]",
      { n: 6, k: 1 },
      ["fails", "fails"],
    ],
  ])("of %s", (_, notation, size, expected) => {
    expect(signs(notation, size)).toEqual(expected);
  });

  it("say how many samples they rest on", () => {
    expect(alone(box, { n: 4, loops: 1 }).marks.oneSign?.evidence).toMatch(
      /positive at all \d+ samples .* not a proof/,
    );
  });

  it("are not asked of components", () => {
    const form = "<1 2>^4 / (<1 2><2 3><3 4><4 5><5 1>)";
    expect(signs(form, { n: 5 }, { component: "--+++" })).toEqual(["notApplicable", "notApplicable"]);
  });
});

describe("positive points", () => {
  it("come from matrices all of whose minors are positive", () => {
    const size = 4;
    const rows = totallyPositive(size, randomness("minors"));
    const sets = Array.from({ length: 2 ** size - 1 }, (_, set) =>
      [...Array(size).keys()].filter((i) => ((set + 1) >> i) & 1),
    );
    for (const r of sets)
      for (const c of sets.filter((set) => set.length === r.length)) {
        const minor = determinant(
          rationals,
          r.map((i) => c.map((j) => rational(rows[i]![j]!))),
        );
        expect(minor.numerator > 0n).toBe(true);
      }
  });

  // 1412.8478: <i i+1 j j+1> and <AB i i+1> are positive (with a sign (-1)^k for those that wrap around).
  it("have the brackets of amplituhedra positive", () => {
    const point = positivePoint(6, 1, 1, randomness("brackets"));
    const z = (a: number): readonly Fraction[] => point.twistors[a - 1]!;
    const [a, b] = point.lines[0]!;
    for (let i = 1; i < 6; i++) {
      expect(signOf(bracket(fractions, a, b, z(i), z(i + 1)))).toBe(1);
      for (let j = i + 2; j < 6; j++) expect(signOf(bracket(fractions, z(i), z(i + 1), z(j), z(j + 1)))).toBe(1);
    }
  });
});

describe("unreduced fractions", () => {
  const single = fc.tuple(fc.bigInt({ min: -(10n ** 40n), max: 10n ** 40n }), fc.bigInt({ min: 1n, max: 10n ** 40n }));

  it("have the signs of reduced ones, of sums that nearly cancel too", () => {
    fc.assert(
      fc.property(fc.array(single, { minLength: 1, maxLength: 6 }), fc.bigInt({ min: -3n, max: 3n }), (list, rest) => {
        const parts = [...list, ...list.map(([n, d]) => [-n, d] as const), [rest, 10n ** 90n] as const];
        const sum = parts.map(([n, d]): Fraction => fraction(n, d)).reduce(fractions.add);
        expect(signOf(sum)).toBe(rest > 0n ? 1 : rest < 0n ? -1 : 0);
        const half = list.map(([n, d]): Fraction => fraction(n, -d)).reduce(fractions.add);
        const exact = list.map(([n, d]) => rational(-n, d)).reduce(rationals.add);
        expect(signOf(half)).toBe(exact.numerator > 0n ? 1 : exact.numerator < 0n ? -1 : 0);
      }),
    );
  });
});

import { describe, expect, it } from "vitest";
import { evaluateForm, type FormAtN } from "../../../engine/evaluate";
import {
  type Field,
  fromRational,
  MERSENNE_61,
  primeField,
  type Rational,
  randomness,
  rationals,
  smallPrimeField,
} from "../../../engine/fields";
import { bracket, determinant, mapPoint, type Point, randomPoint, replaceReferences } from "../../../engine/kinematics";
import { form } from "./support";

const field = primeField(MERSENNE_61);
const { add, multiply } = field;

function value<T>(over: Field<T>, at: FormAtN, point: Point<T>): T {
  const evaluation = evaluateForm(over, at, point);
  if (evaluation.kind !== "value") throw new Error(`unexpected ${JSON.stringify(evaluation)}`);
  return evaluation.sum;
}

const pointFor = (key: readonly [number, number, number], seed = "evaluate"): Point<bigint> =>
  randomPoint(field, { n: key[0], k: key[1], loops: key[2] }, randomness(seed));

/** That formulas for one amplitude have one value at a random point of F_p. */
function expectEqual(key: readonly [number, number, number], ...formulas: readonly string[]): void {
  const point = pointFor(key);
  const values = formulas.map((formula) => value(field, form(key, formula), point));
  expect(new Set(values).size).toBe(1);
  expect(values[0]).not.toBe(0n);
}

const expectZero = (key: readonly [number, number, number], formula: string): void =>
  expect(value(field, form(key, formula), pointFor(key))).toBe(0n);

/** The rows of delta(a b c d e), one a flavour, by the definition on the notation's page. */
function deltaRows(point: Point<bigint>, labels: readonly number[]): bigint[][] {
  const z = (i: number) => point.twistors[labels[i % 5]! - 1]!;
  return [0, 1, 2, 3].map((flavour) =>
    point.chi[0]![flavour]!.map((_, entry) =>
      labels.reduce((sum, label, i) => {
        const c = bracket(field, z(i + 1), z(i + 2), z(i + 3), z(i + 4));
        return add(sum, multiply(c, point.chi[label - 1]![flavour]![entry]!));
      }, 0n),
    ),
  );
}
const invariantDenominator = (point: Point<bigint>, labels: readonly number[]): bigint =>
  labels.reduce((product, _, i) => {
    const z = (j: number) => point.twistors[labels[(i + j) % 5]! - 1]!;
    return multiply(product, bracket(field, z(0), z(1), z(2), z(3)));
  }, 1n);

describe("R-invariants", () => {
  it("are the product of the four rows over the five brackets (0905.1473, 1008.2958)", () => {
    const point = pointFor([6, 1, 0]);
    const labels = [2, 3, 4, 6, 1];
    const rows = deltaRows(point, labels);
    const numerator = rows.reduce((product, [x]) => multiply(product, x!), 1n);
    expect(value(field, form([6, 1, 0], "delta(2 3 4 6 1)"), point)).toBe(numerator);
    expect(value(field, form([6, 1, 0], "[2 3 4 6 1]"), point)).toBe(
      multiply(numerator, field.inverse(invariantDenominator(point, labels))!),
    );
  });

  it("multiply to products of determinants, one a flavour", () => {
    const point = pointFor([8, 3, 0]);
    const factors = [
      [1, 2, 3, 4, 5],
      [2, 3, 5, 7, 8],
      [1, 4, 5, 6, 8],
    ];
    const rows = factors.map((labels) => deltaRows(point, labels));
    const numerator = [0, 1, 2, 3].reduce(
      (product, flavour) =>
        multiply(
          product,
          determinant(
            field,
            rows.map((row) => row[flavour]!),
          ),
        ),
      1n,
    );
    expect(value(field, form([8, 3, 0], "delta(1 2 3 4 5) delta(2 3 5 7 8) delta(1 4 5 6 8)"), point)).toBe(numerator);
  });

  it("obey the six-term identity (0905.1473), and it fails with one sign changed", () => {
    const terms = ["[2 3 4 5 6]", "[1 3 4 5 6]", "[1 2 4 5 6]", "[1 2 3 5 6]", "[1 2 3 4 6]", "[1 2 3 4 5]"];
    const alternating = terms
      .map((term, i) => `${i % 2 === 0 ? "+" : "-"} ${term}`)
      .join(" ")
      .slice(2);
    expectZero([6, 1, 0], alternating);
    const changed = form([6, 1, 0], alternating.replace("- [1 2 3 4 5]", "+ [1 2 3 4 5]"));
    expect(value(field, changed, pointFor([6, 1, 0]))).not.toBe(0n);
  });

  it("are antisymmetric", () => {
    expectZero([6, 1, 0], "[1 2 3 4 5] + [2 1 3 4 5]");
    expectZero([6, 1, 0], "[1 2 3 4 5] - [2 3 4 5 1]");
  });
});

describe("products and sums of Grassmann degree", () => {
  const cases: [number, string, string][] = [
    [
      2,
      "([1 2 3 4 5] + [1 2 3 5 6]) ([2 3 4 5 6] - [1 3 4 6 7])",
      "[1 2 3 4 5][2 3 4 5 6] - [1 2 3 4 5][1 3 4 6 7] + [1 2 3 5 6][2 3 4 5 6] - [1 2 3 5 6][1 3 4 6 7]",
    ],
    [2, "([1 2 3 4 5] + [3 4 5 6 7])^2", "2 [1 2 3 4 5] [3 4 5 6 7]"],
    [
      3,
      "([1 2 3 4 5] + [1 2 3 5 6]) [2 4 5 6 7] ([3 4 5 6 7] + [1 2 4 6 7])",
      "[2 4 5 6 7] [1 2 3 4 5] [3 4 5 6 7] + [1 2 3 4 5] [2 4 5 6 7] [1 2 4 6 7] + [1 2 3 5 6] [2 4 5 6 7] [3 4 5 6 7] + [1 2 3 5 6] [1 2 4 6 7] [2 4 5 6 7]",
    ],
    [
      4,
      "([1 2 3 4 5][1 2 3 5 6] + [2 3 4 6 7][1 4 5 6 8]) ([3 4 5 6 7][1 2 6 7 8] - [1 3 5 7 8][2 4 6 7 8])",
      "[1 2 3 4 5][1 2 3 5 6][3 4 5 6 7][1 2 6 7 8] - [1 2 3 4 5][1 2 3 5 6][1 3 5 7 8][2 4 6 7 8] + [2 3 4 6 7][1 4 5 6 8][3 4 5 6 7][1 2 6 7 8] - [2 3 4 6 7][1 4 5 6 8][1 3 5 7 8][2 4 6 7 8]",
    ],
    [
      5,
      "([1 2 3 4 5] + [1 2 3 5 6])([2 3 4 6 7] + [1 4 5 6 8])[3 4 5 6 7]([1 2 6 7 8][1 3 5 7 9])",
      "[1 2 6 7 8][3 4 5 6 7][1 3 5 7 9] ([1 2 3 4 5][2 3 4 6 7] + [1 2 3 4 5][1 4 5 6 8] + [1 2 3 5 6][2 3 4 6 7] + [1 2 3 5 6][1 4 5 6 8])",
    ],
    [
      6,
      "([1 2 3 4 5] + [1 2 3 5 6])([2 3 4 6 7] + [1 4 5 6 8])([3 4 5 6 7] + [2 4 8 9 10])([1 2 6 7 8])[1 3 5 7 9][4 5 8 9 10]",
      "sum(a : 1 <= a <= 1) ([1 2 3 4 5][2 3 4 6 7] + [1 2 3 4 5][1 4 5 6 8] + [1 2 3 5 6][2 3 4 6 7] + [1 2 3 5 6][1 4 5 6 8]) [1 2 6 7 8] ([1 3 5 7 9][4 5 8 9 10][3 4 5 6 7] + [4 5 8 9 10][2 4 8 9 10][1 3 5 7 9])",
    ],
  ];
  it.each(cases)("k = %i: sums inside products are the products written out", (k, nested, expanded) => {
    expectEqual([10, k, 0], nested, expanded);
  });

  it("long sums, kept as components, multiply to the same as their double sums", () => {
    const S = "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]";
    const double = (rest: string) =>
      `sum(i, j, a, b : 1 < i, i+1 < j < n, 1 < a, a+1 < b < n) [1 i i+1 j j+1] [1 a a+1 b b+1] ${rest}`;
    expectEqual([10, 2, 0], `(${S}) (${S})`, double(""));
    expectEqual([10, 3, 0], `(${S}) (${S}) [2 3 4 5 6]`, `[2 3 4 5 6] (${S})^2`, double("[2 3 4 5 6]"));
    expectEqual([10, 4, 0], `((${S}) [2 3 4 5 6]) ([3 4 7 8 9] (${S}))`, double("[2 3 4 5 6] [3 4 7 8 9]"));
  });

  it("commute, and a square of one invariant vanishes", () => {
    expectEqual([7, 2, 0], "([1 2 3 4 5] + [1 2 3 5 6]) [2 4 5 6 7]", "[2 4 5 6 7] ([1 2 3 5 6] + [1 2 3 4 5])");
    expectZero([7, 2, 0], "[1 2 3 4 5]^2");
    expectEqual([7, 1, 0], "(2 [1 2 3 4 5] + 1)^3", "6 [1 2 3 4 5] + 1");
  });

  it("state their degrees, and a wrong one is not mistaken for zero", () => {
    const degrees = (k: number, formula: string) => {
      const at = form([8, k, 0], formula);
      const evaluation = evaluateForm(field, at, pointFor([8, k, 0]));
      return evaluation.kind === "value" ? [evaluation.degrees, evaluation.sum === 0n] : null;
    };
    expect(degrees(2, "[1 2 3 4 5][2 3 4 5 6]")).toEqual([[2], false]);
    expect(degrees(2, "[1 2 3 4 5]")).toEqual([[1], false]);
    expect(degrees(2, "1 + [1 2 3 4 5]")).toEqual([[0, 1], false]);
    expect(degrees(2, "[1 2 3 4 5][2 3 4 5 6][3 4 5 6 7]")).toEqual([[3], true]);
    expect(degrees(0, "[1 2 3 4 5]")).toEqual([[1], true]);
    expect(degrees(1, "[1 2 3 4 5] - [1 2 3 4 5]")).toEqual([[1], true]);
  });
});

describe("published forms have one value", () => {
  it("NMHV trees: recursion from any leg, and the vertex expansion with a reference (1008.2958, 1009.1854)", () => {
    for (const n of [6, 7, 9]) {
      const recursion = "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]";
      const other = "sum(i, j : 3 < i, i+1 < j < n+2) [3 i i+1 j j+1]";
      const vertex = "sum(i, j : 1 <= i, i+1 < j <= n, j != i+n-1) [* i i+1 j j+1]";
      expectEqual([n, 1, 0], recursion, other, vertex);
      const at = form([n, 1, 0], vertex);
      const [point, fresh] = [pointFor([n, 1, 0]), pointFor([n, 1, 0], "another")];
      expect(value(field, at, replaceReferences(point, fresh))).toBe(value(field, at, point));
    }
  });

  it("the six-leg tree as half its cyclic sum", () => {
    expectEqual([6, 1, 0], "1/2 cyc([1 2 3 4 5])", "[1 2 3 4 5] + [1 2 3 5 6] + [1 3 4 5 6]");
  });

  it("one-loop MHV: forward limits with leg 1 or a reference, and chiral pentagons (1008.2958, 1012.6032)", () => {
    const kermit = (a: string) =>
      `let K(i,j) = <AB (${a} i i+1) cap (${a} j j+1)>^2 / (<AB ${a} i><AB i i+1><AB i+1 ${a}><AB ${a} j><AB j j+1><AB j+1 ${a}>);`;
    const pentagons =
      "sum(i, j : 1 <= i < j <= n) <AB bar(i) cap bar(j)> <X i j> / (<AB X><AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>)";
    for (const n of [4, 5, 7]) {
      expectEqual(
        [n, 0, 1],
        `${kermit("1")} sum(i, j : 1 < i < j < n) K(i,j)`,
        `${kermit("*")} sum(i, j : 1 <= i < j <= n) K(i,j)`,
        pentagons,
      );
    }
    expectEqual([4, 0, 1], pentagons, "<1 2 3 4>^2 / (<AB 1 2><AB 2 3><AB 3 4><AB 1 4>)");
  });

  it("in brackets and in dual points, whose measure <AB>^-4 is supplied", () => {
    expectEqual(
      [4, 0, 1],
      "<1 2 3 4>^2 / (<AB 1 2><AB 2 3><AB 3 4><AB 1 4>)",
      "x2(1 3) x2(2 4) / (x2(1 AB) x2(2 AB) x2(3 AB) x2(4 AB))",
      "s(1 2) s(2 3) / (x2(1 AB) x2(2 AB) x2(3 AB) x2(4 AB))",
    );
    expectEqual(
      [4, 0, 2],
      "cyc(<1 2 3 4>^3 / (<AB 4 1><AB 1 2><AB 2 3><AB CD><CD 2 3><CD 3 4><CD 4 1>))",
      "cyc(x2(1 3)^2 x2(2 4) / (x2(1 AB) x2(2 AB) x2(3 AB) x2(AB CD) x2(3 CD) x2(4 CD) x2(1 CD)))",
    );
  });

  it("cyc and sym move the definitions used inside", () => {
    expectEqual([6, 1, 0], "let f(i) = [1 i i+1 i+2 i+3]; 1/2 cyc(f(2))", "1/2 cyc([1 2 3 4 5])");
    expectEqual(
      [5, 0, 2],
      "let f = <AB 1 2><CD 3 4>; let p = (A 1); let q = (1 2) cap (CD 3); sym(f) <AB 1 q>",
      "(<AB 1 2><CD 3 4> + <CD 1 2><AB 3 4>) <AB 1 (1 2) cap (C D 3)>",
    );
    expectEqual(
      [5, 0, 2],
      "let q = (1 2) cap (CD 3); sym(<A 1 4 q>)",
      "<A 1 4 (1 2) cap (CD 3)> + <C 1 4 (1 2) cap (AB 3)>",
    );
  });
});

describe("meets in brackets", () => {
  it("nest, stand in either order, and lines from planes are bilinear", () => {
    expectEqual(
      [9, 0, 0],
      "<(1 2) cap (3 4 5) 6 7 8>",
      "<(3 4 5) cap (1 2) 6 7 8>",
      "<1 6 7 8><2 3 4 5> - <2 6 7 8><1 3 4 5>",
    );
    expectEqual(
      [9, 0, 0],
      "<((1 2) cap (3 4 5) 6) cap (7 8 9) 1 2 3>",
      "let p = (1 2) cap (3 4 5); <p 1 2 3><6 7 8 9> - <6 1 2 3><p 7 8 9>",
    );
    expectEqual(
      [9, 0, 0],
      "<7 8 (1 2 3) cap (4 5 6)>",
      "<7 1 2 3><8 4 5 6> - <8 1 2 3><7 4 5 6>",
      "-<(4 5 6) cap (1 2 3) 7 8>",
    );
    expectEqual(
      [9, 0, 1],
      "<AB bar(2) cap bar(5)>",
      "<A 1 2 3><B 4 5 6> - <B 1 2 3><A 4 5 6>",
      "let L(i,j) = bar(i) cap bar(j); <AB L(2,5)>",
    );
    expectEqual(
      [9, 0, 0],
      "<(1 2 3) cap (4 5 6) (7 8 9) cap (1 5 9)>",
      "let L = (1 2 3) cap (4 5 6); let P = (7 8 9) cap (1 5 9); <P L>",
    );
    // A line from two planes that meets a plane: two points of it may be used in its place.
    expectZero([9, 0, 0], "let L = (1 2 3) cap (4 5 6); <(L) cap (7 8 9) 1 2 3>");
  });

  it("take the Grassmann part from the line, from the plane for a loop line", () => {
    // chi of (1 2) cap (3 4 5) is chi_1 <2 3 4 5> - chi_2 <1 3 4 5>: with the value, [p 1 2 3 4] vanishes' delta on the line (p 1 2).
    expectEqual([7, 1, 0], "delta((1 2) cap (3 4 5) 3 4 6 7)", "delta((3 4 5) cap (1 2) 3 4 6 7)");
    expectZero([7, 1, 0], "delta((1 2) cap (3 4 5) 1 2 6 7)");
    expectZero([7, 1, 1], "delta((AB) cap (3 4 5) 3 4 5 7)");
    expect(value(field, form([7, 1, 1], "delta((AB) cap (3 4 5) A B 6 7)"), pointFor([7, 1, 1]))).not.toBe(0n);
  });
});

describe("over every field", () => {
  it("the value modulo a prime is the rational value modulo that prime", () => {
    const at = form(
      [7, 2, 1],
      "[1 2 3 4 5]([2 3 4 5 6] + [* 3 4 6 7]) / (<AB 1 2> <AB X> <1 2>) + 1/3 [1 2 3 6 7][2 3 4 5 7] s(2 3)",
    );
    const point = randomPoint(rationals, { n: 7, k: 2, loops: 1 }, randomness("fields"));
    const exact = value(rationals, at, point);
    const small = smallPrimeField(2147483629);
    const into = <T>(over: Field<T>) =>
      value(
        over,
        at,
        mapPoint(point, (x: Rational) => fromRational(over, x)!),
      );
    expect(into(field)).toBe(fromRational(field, exact));
    expect(into(small)).toBe(fromRational(small, exact));
  });
});

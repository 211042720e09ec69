import { describe, expect, it } from "vitest";
import { evaluateForm, type FormAtN, fingerprint, formAt, inDualPoints, pointUse } from "../../../engine/evaluate";
import { MERSENNE_61, primeField, randomness, rationals, smallPrimeField } from "../../../engine/fields";
import { publicPoint, randomPoint } from "../../../engine/kinematics";
import { form } from "./support";

const field = primeField(MERSENNE_61);

const evaluate = (at: FormAtN, seed = "constructs") =>
  evaluateForm(field, at, randomPoint(field, at, randomness(seed)));

function valueAt(at: FormAtN): bigint {
  const evaluation = evaluate(at);
  if (evaluation.kind !== "value") throw new Error(`unexpected ${JSON.stringify(evaluation)}`);
  return evaluation.sum;
}

describe("components", () => {
  const component = (notation: string, squareSign: 1 | -1 = 1) =>
    valueAt(form([6, 1, 0], notation, { component: "---+++", squareSign }));

  it("conserve momentum in strings and s( )", () => {
    expect(component("<1|2..3|4] + <1|5..6|4]")).toBe(0n);
    expect(component("s(1..3) - s(4..6)")).toBe(0n);
    expect(component("s(1 3 5) - s(1 3) - s(3 5) - s(1 5)")).toBe(0n);
    expect(component("s(1 2) - <1 2>[1 2]")).toBe(0n);
    expect(component("<1|2+3|4+5|6> - <1 2>[2|4+5|6> - <1 3>[3|4+5|6>")).toBe(0n);
    expect(component("[1|2+4|3> - [1 2]<2 3> - [1 4]<4 3>")).toBe(0n);
    expect(component("x2(2 5) - s(2 3 4)")).toBe(0n);
  });

  it("two forms of the six-gluon amplitude A(1-2-3-4+5+6+) agree (hep-ph/0403047 with its momenta and signs)", () => {
    const split =
      "<1|2+3|4]^3 / ([2 3][3 4]<5 6><6 1> s(2 3 4) <5|3+4|2]) + <3|4+5|6]^3 / ([6 1][1 2]<3 4><4 5> s(3 4 5) <5|3+4|2])";
    const shifted =
      "-<3|1+2|6]^4 / (<3 4><4 5>[6 1][1 2] s(3 4 5) <3|4+5|6] <5|6+1|2]) - <1|2+3|4]^4 / (<5 6><6 1>[2 3][3 4] s(5 6 1) <5|6+1|2] <1|2+3|4])";
    expect(component(split)).toBe(component(shifted));
    expect(component(split)).not.toBe(0n);
  });

  it("the option s = <ab>[ba] turns every square bracket, one for each in a string, and leaves s( ) and x2( ) alone", () => {
    const kept = ["[1 2][3 4]", "<1|2+3|4]^2", "s(1 2 3)", "x2(1 3)", "[1|2+3|4+5|6]", "<1|2|3|4|5|6>"];
    const turned = ["[1 2]", "<1|2+3|4]", "[1|2+3|4>", "<1|2+3|4+5|6>", "[1 2]^3", "[* 1]", "[1|2|3|4|5|6]"];
    const before = (notation: string) => component(notation);
    expect(kept.map((notation) => component(notation, -1))).toEqual(kept.map(before));
    expect(turned.map((notation) => component(notation, -1))).toEqual(turned.map(before).map(field.negate));
    expect([...kept, ...turned].map(before)).not.toContain(0n);
  });

  it("* at a square end is the reference lambdatilde, the last two components of the twistor", () => {
    const at = form([5, 0, 0], "[* 3]", { component: "--+++" });
    const point = randomPoint(field, at, randomness("star"));
    const other = { ...point, referenceTwistor: [1n, 2n, ...point.referenceTwistor.slice(2)] };
    const [a, b] = [evaluateForm(field, at, point), evaluateForm(field, at, other)];
    expect(a).toEqual(b);
    const lower = { ...point, referenceTwistor: [...point.referenceTwistor.slice(0, 2), 1n, 2n] };
    expect(evaluateForm(field, at, lower)).not.toEqual(a);
  });
});

describe("numbers", () => {
  const number = (notation: string, key: [number, number, number] = [6, 0, 0]) => valueAt(form(key, notation));

  it("follow the precedence and index rules of the notation", () => {
    expect(number("-2^2")).toBe(field.fromInteger(-4n));
    expect(number("8 / 2 / 2 * 3")).toBe(6n);
    let sum = 0;
    for (let i = 1; i <= 6; i++) for (let j = i + 1; j <= 6; j++) sum += (-1) ** (i + j) * 3 * i;
    expect(number("sum(i, j : 1 <= i < j <= n) (-1)^(i+j) (n-3) i")).toBe(field.fromInteger(BigInt(sum)));
    expect(number("prod(i : 1 <= i <= 5) i")).toBe(120n);
    expect(number("prod(i : 2 <= i <= 1) i + sum(i : 2 <= i <= 1) i")).toBe(1n);
    expect(number("cyc(1)")).toBe(6n);
    expect(number("sym(1)", [4, 0, 3])).toBe(6n);
    expect(number("<7 8 9 4>".replace("7 8 9", "n+1 n+2 n+3"))).toBe(number("<1 2 3 4>"));
    expect(number("<0 1 2 3> - <6 1 2 3>")).toBe(0n);
    expect(number("<1 2 3 4>^0")).toBe(1n);
    expect(number("2^-3 * 8")).toBe(1n);
  });

  it("a quotient of integers that vanish modulo the prime is exact", () => {
    for (const p of [2147483647, 1073741827]) {
      const at = form([6, 0, 0], `${p}/${p} + (${p} * ${p} - 0)/(${p}^2) - ${p}^3/${p}^2 / ${p}`);
      const small = smallPrimeField(p);
      const evaluation = evaluateForm(small, at, randomPoint(small, at, randomness("p")));
      expect(evaluation).toMatchObject({ kind: "value", sum: 1 });
    }
    const bad = form([6, 0, 0], `1/${MERSENNE_61}`);
    expect(evaluate(bad)).toMatchObject({ kind: "zero-denominator" });
    const exact = evaluateForm(rationals, bad, randomPoint(rationals, bad, randomness("q")));
    expect(exact.kind === "value" && rationals.toText(exact.sum)).toBe(`1/${MERSENNE_61}`);
  });

  it("long integers and high powers stay within bounds", () => {
    const long = "7".repeat(1000);
    const reduced = BigInt(long) % MERSENNE_61;
    expect(number(long)).toBe(reduced);
    let power = 1n;
    for (let i = 0; i < 1000; i++) power = (power * reduced) % MERSENNE_61;
    expect(number(`${long}^1000`)).toBe(power);
    expect(number(`(${long}^1000)^1000 / (${long}^1000)^999 - ${long}^1000`)).toBe(0n);
  });
});

describe("terms", () => {
  it("are those written, signs included, and add up to the value", () => {
    const at = form([7, 1, 0], "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1] - (2 [1 2 3 4 5] - [2 3 4 5 6])");
    const evaluation = evaluate(at);
    if (evaluation.kind !== "value") throw new Error("unexpected");
    expect(evaluation.terms).toHaveLength(8);
    expect(evaluation.terms.reduce((a, b) => field.add(a, b), 0n)).toBe(evaluation.sum);
    expect(evaluation.terms[0]).toBe(valueAt(form([7, 1, 0], "[1 2 3 4 5]")));
    expect(evaluation.terms[6]).toBe(valueAt(form([7, 1, 0], "-2 [1 2 3 4 5]")));
    expect(evaluation.terms[7]).toBe(valueAt(form([7, 1, 0], "[2 3 4 5 6]")));
  });
});

describe("vanishing denominators", () => {
  const place = (key: [number, number, number], notation: string, component?: string) => {
    const evaluation = evaluate(form(key, notation, component === undefined ? {} : { component }));
    return evaluation.kind === "value" ? null : [notation.slice(...evaluation.span), evaluation.text];
  };

  it.each([
    ["[1 2 3 4 5] / <1 2 3 3>", "<1 2 3 3>"],
    ["[1 2 3 4 5] + [1 2 3 4 4]", "[1 2 3 4 4]"],
    ["1 / (<1 2 3 4> (<1 2 3 5> - <1 2 3 5>)^2 <2 3 4 5>)", "<1 2 3 5> - <1 2 3 5>"],
    ["<1 2 3 4>^-1 <1 2 2 3>^-2", "<1 2 2 3>"],
    ["let d(i) = <1 2 3 i>; 1 / (d(4) d(3))", "d(3)"],
    ["3 / (1 - 1)", "1 - 1"],
  ])("%s", (notation, culprit) => {
    expect(place([6, 1, 0], notation)).toEqual([culprit, undefined]);
  });

  it("of an R-invariant are explained", () => {
    expect(place([6, 1, 0], "[1 2 3 4 5] / [1 2 3 4 6]")).toEqual([
      "[1 2 3 4 6]",
      "an R-invariant or delta stands in a denominator, and has no inverse",
    ]);
  });

  it("of lambdatilde and dual distances are found at the point where they vanish", () => {
    const at = (notation: string, loops: number) => form([5, 0, loops], notation);
    const bad = (f: FormAtN) => {
      const point = randomPoint(field, f, randomness("bad"));
      const twistors = [...point.twistors];
      twistors[2] = [...twistors[1]!.slice(0, 2), 5n, 7n];
      const lines = point.lines.map(([a]) => [a, [...a.slice(0, 2), 1n, 2n]] as const);
      return evaluateForm(field, f, { ...point, twistors, lines }).kind;
    };
    expect(
      ["[2 4]", "<1|3|5]", "s(2 4)", "x2(3 5)", "x2(1 AB)", "<1 2 3 4>"].map((x, i) => bad(at(x, i === 4 ? 1 : 0))),
    ).toEqual([...new Array(5).fill("zero-denominator"), "value"]);
  });
});

describe("what a form reads", () => {
  it("is found through its definitions", () => {
    const use = (key: [number, number, number], notation: string) =>
      Object.entries(pointUse(form(key, notation)))
        .filter(([, used]) => used)
        .map(([name]) => name);
    expect(use([6, 1, 0], "3")).toEqual([]);
    expect(use([6, 1, 0], "let p = (1 2) cap (3 4 5); [p * 3 4 6]")).toEqual([
      "twistors",
      "chi",
      "referenceTwistor",
      "referenceChi",
    ]);
    expect(use([6, 0, 1], "let f = <AB X>; f")).toEqual(["lines", "referenceLine"]);
    expect(use([6, 0, 0], "s(1 2) [* 1]")).toEqual(["twistors", "referenceTwistor"]);
    expect(use([6, 0, 1], "let unused = <AB X>; <1 2 3 4>")).toEqual(["twistors"]);
  });

  it("tells dual points from brackets", () => {
    const dual = (notation: string) => inDualPoints(form([6, 0, 2], notation).formula);
    expect(dual("x2(1 AB) x2(AB CD)")).toBe(true);
    expect(dual("let f = x2(1 AB); f")).toBe(true);
    expect(dual("x2(1 3) <AB 1 2>")).toBe(false);
    expect(dual("x2(1 3)")).toBe(false);
  });

  it("must be a point of the same amplitude", () => {
    const at = form([6, 1, 0], "[1 2 3 4 5]");
    expect(() => evaluateForm(field, at, publicPoint({ n: 7, k: 1, loops: 0 }, 0))).toThrow(
      "expected a point for (6,1,0), got one for (7,1,0)",
    );
    const many = { amplitude: { k: 1, loops: 0 }, component: null, squareSign: 1 as const, formula: at.formula };
    expect(formAt(many, 9)).toEqual({ ...at, n: 9 });
  });
});

describe("fingerprints", () => {
  it("are the values at the public points, 16 hexadecimal digits each", () => {
    const print = fingerprint(form([6, 0, 0], "<1 2 3 4>"));
    if (print.kind !== "fingerprint") throw new Error("unexpected");
    const at = form([6, 0, 0], "<1 2 3 4>");
    const values = [0, 1, 2, 3].map((m) => evaluateForm(field, at, publicPoint({ n: 6, k: 0, loops: 0 }, m)));
    expect(print.text).toBe(
      values.map((v) => (v.kind === "value" ? v.sum.toString(16).padStart(16, "0") : "")).join(""),
    );
    expect(print.points).toEqual([0, 1, 2, 3]);
    expect(fingerprint(form([6, 0, 0], "0"))).toMatchObject({ text: "0".repeat(64) });
    expect(fingerprint(form([6, 0, 0], "255"))).toMatchObject({ text: "00000000000000ff".repeat(4) });
  });

  it("take the next but three point where a denominator vanishes", () => {
    // The value of <1 2 3 4> at public point 1, as an integer, makes this denominator vanish there and nowhere else.
    const first = evaluateForm(field, form([6, 0, 0], "<1 2 3 4>"), publicPoint({ n: 6, k: 0, loops: 0 }, 1));
    if (first.kind !== "value") throw new Error("unexpected");
    const print = fingerprint(form([6, 0, 0], `1 / (<1 2 3 4> - ${first.sum})`));
    expect(print).toMatchObject({ kind: "fingerprint", points: [0, 5, 2, 3] });
  });

  it("end with the place of a denominator that vanishes everywhere", () => {
    expect(fingerprint(form([6, 0, 0], "1 / <1 2 3 3>"))).toEqual({ kind: "zero-denominator", span: [4, 13] });
  });
});

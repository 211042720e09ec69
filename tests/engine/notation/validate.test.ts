import { describe, expect, it } from "vitest";
import { countTerms } from "../../../engine/notation/count";
import { expandTerms } from "../../../engine/notation/expand";
import { parse } from "../../../engine/notation/parse";
import type { Formula } from "../../../engine/notation/tree";
import { validate } from "../../../engine/notation/validate";

function tree(text: string): Formula {
  const parsed = parse(text);
  if (!parsed.ok) throw new Error(`${text}: ${parsed.diagnostics.map(({ message }) => message).join(" ")}`);
  return parsed.value;
}

const said = (text: string, n: readonly number[], loops: number): string[] =>
  validate(tree(text), { n, loops }).map(({ code, span, message }) => `${code} ${span} ${message}`);

describe("a formula and its amplitude", () => {
  it.each([
    ["[1 2 3 4 9]", [6], 0, ["label-beyond 9,10 There is no label 9 among 6 legs."]],
    ["[1 2 3 4 0] + [1 2 3 4 n+1]", [6], 0, []],
    ["s(1..9)", [6], 0, ["label-beyond 5,6 There is no label 9 among 6 legs."]],
    ["<1 2 3 6>", [5, 6, 7], 0, ["label-beyond 7,8 There is no label 6 among 5 legs."]],
    ["<AB 1 2>", [4], 0, ["loop-beyond 1,3 A tree amplitude has no loop line AB."]],
    [
      "<AB 1 2><C D 1 2>",
      [4],
      1,
      [
        "loop-beyond 9,10 An amplitude with 1 loop has no loop line CD.",
        "loop-beyond 11,12 An amplitude with 1 loop has no loop line CD.",
      ],
    ],
    ["x2(1 EF)", [4], 2, ["loop-beyond 5,7 An amplitude with 2 loops has no loop line EF."]],
    ["let L = (CD) cap (1 2 3); 1", [4], 1, ["loop-beyond 9,11 An amplitude with 1 loop has no loop line CD."]],
    ["let p = (1 2) cap bar(9); 1", [4], 1, ["label-beyond 22,23 There is no label 9 among 4 legs."]],
    ["<1|2+3+2|4]", [6], 0, ["repeated-momentum 3,8 The momentum of leg 2 is named twice in one sum at n = 6."]],
    ["<1|2..4+3|5]", [6], 0, ["repeated-momentum 3,9 The momentum of leg 3 is named twice in one sum at n = 6."]],
    ["s(5..1 n)", [6], 0, ["repeated-momentum 2,8 The momentum of leg 6 is named twice in one sum at n = 6."]],
    [
      "sum(i : 1 <= i <= n) s(1 i)",
      [4, 5],
      0,
      [
        "repeated-momentum 23,26 The momentum of leg 1 is named twice in one sum at n = 4.",
        "repeated-momentum 23,26 The momentum of leg 1 is named twice in one sum at n = 5.",
      ],
    ],
    ["sum(i : 2 <= i <= n) s(1 i)", [4, 5], 0, []],
    [
      "2^(n^1)".replace("n^1", "n*200"),
      [4, 5, 6],
      0,
      ["limit-exponent 3,8 This exponent is 1200 at n = 6; an exponent is at most 1,000 in size."],
    ],
    [
      "sum(i : 1 <= i <= 2) 2^(600*i)",
      [4],
      0,
      ["limit-exponent 24,29 This exponent is 1200 at n = 4; an exponent is at most 1,000 in size."],
    ],
    [
      "let f(i) = 2^(i*i); f(31) + f(32)",
      [4],
      0,
      ["limit-exponent 14,17 This exponent is 1024 at n = 4; an exponent is at most 1,000 in size."],
    ],
    ["f", [4], 0, []],
  ] as const)("%s at n = %j with %i loops", (text, n, loops, expected) => {
    const source = text === "f" ? "let f(i) = [i i+1 i+2 i+3 i+4]; f(9)" : text;
    expect(said(source, n, loops)).toEqual(expected);
  });

  const chain = (body: (before: string) => string, length: number): string =>
    [
      `let a0 = <1 2 3 4>;`,
      ...Array.from({ length }, (_, at) => `let a${at + 1} = ${body(`a${at}`)};`),
      `a${length}`,
    ].join("\n");
  const cycles = (depth: number, inner: string): string => "cyc(".repeat(depth) + inner + ")".repeat(depth);
  const far = "1 <= i <= 1000000000, 1 <= j <= 1000000000";

  it.each([
    ["sums of sums by definitions", chain((a) => `(${a} + ${a}) - ${a}`, 30), "limit-terms"],
    ["nested cyc", cycles(12, "<1 2 3 4>"), "limit-terms"],
    ["nested cyc in a product", `2 ${cycles(12, "<1 2 3 4>")}`, "limit-steps"],
    ["nested cyc of a definition", `let f = <1 2 3 4>; 2 ${cycles(12, "f")}`, "limit-steps"],
    ["a far sum", `sum(i, j : ${far}) <i j 1 2>`, "limit-terms"],
    ["a far sum in a product", `2 (sum(i, j : ${far}) <i j 1 2>)`, "limit-terms"],
    ["a far sum that is empty", `sum(i, j : ${far}, 2 i = 2 j + 1) <i j 1 2>`, "limit-terms"],
    [
      "many empty sums",
      `sum(k : 1 <= k <= 100000) sum(i, j : 1 <= i <= 30, 1 <= j <= 30, 2 i = 2 j + 1) <i j 1 2>`,
      "limit-terms",
    ],
    ["sums in sums of products", `sum(k : 1 <= k <= 2000) 2 (sum(i : 1 <= i <= 200000) <i k 1 2>)`, "limit-steps"],
    [
      "many arguments",
      `let f(i) = <i i+1 i+2 i+3>; 2 (sum(i : 1 <= i <= 300000) f(i)) (sum(i : 1 <= i <= 300000) f(-i)) (sum(i : 1 <= i <= 300000) f(2*i))(sum(i : 1 <= i <= 300000) f(-2*i))`,
      "limit-steps",
    ],
    ["powers of powers", "((<1 2>^1000)^1000)^1000", "limit-degree"],
    ["squares by definitions", chain((a) => `${a} ${a}`, 40), "limit-degree"],
    ["a product over far indices", "prod(i : 1 <= i <= 200000) <i i+1>", "limit-degree"],
  ])(
    "%s is refused without being written out",
    (_, text, code) => {
      expect(validate(tree(text), { n: [5], loops: 0 }).map((diagnostic) => diagnostic.code)).toEqual([code]);
    },
    30_000,
  );

  it("many uses of a definition with the same arguments are evaluated once", () => {
    expect(validate(tree(`${chain((a) => `1 (${a} - ${a} + 1)`, 60)}`), { n: [5], loops: 0 })).toEqual([]);
  });
});

describe("numbers of terms", () => {
  it.each([
    ["[1 2 3 4 5]", 5, 0, 1],
    ["sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]", 9, 0, 15],
    // ordered choices of 4 labels among 5, each with 4 rotations
    ["sum(i,j,k,l : i < j < k < l < i) <i j k l>", 5, 2, 20],
    ["cyc([1 2 3 4 5]) + [1 2 3 4 5]", 6, 0, 7],
    ["sym(<1 2 3 4> + <AB 1 2>) - <CD 1 2>", 4, 3, 13],
    ["1/2 cyc([1 2 3 4 5])", 6, 0, 1],
    ["-(1 + 2) - (3 - 4)", 6, 0, 4],
    ["let f = <1 2 3 4> + 1; let g = f + 1; f g + g", 6, 0, 4],
    ["sum(i : 1 <= i <= 3) (1 + sum(j : 1 <= j <= i) j)", 6, 0, 9],
    ["sum(i : n < i < n) i", 6, 0, 0],
  ])("%s at n = %i with %i loops has %i", (text, n, loops, terms) => {
    expect(countTerms(tree(text), { n, loops }, 1000)).toBe(terms);
    expect([...expandTerms(tree(text), { n, loops })]).toHaveLength(terms);
  });
});

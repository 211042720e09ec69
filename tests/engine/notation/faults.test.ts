import { describe, expect, it } from "vitest";
import { codes } from "../../../engine/notation/codes";
import { mostDiagnostics } from "../../../engine/notation/limits";
import { parse, read } from "../../../engine/notation/parse";
import type { Diagnostic } from "../../../engine/result";

/** What is wrong with a text, and exactly what is said about it: code, span, message. */
const faults: readonly (readonly [text: string, said: readonly string[]])[] = [
  ["[12345]", ["run-together 0,7 The labels of this bracket are written without spaces."]],
  ["<AB12>", ["run-together 0,6 The labels of this bracket are written without spaces."]],
  ["<AB 12>", ["run-together 0,7 The labels of this bracket are written without spaces."]],
  ["<A1 B2 3 4>", ["unknown-name 1,3 Nothing here is called A1.", "unknown-name 4,6 Nothing here is called B2."]],
  ["[1 2 3 4 ５]", ['look-alike 9,10 "５" (U+FF15) is not the "5" of the notation, though it looks like it.']],
  [
    "〈1 2 3 4〉",
    [
      'look-alike 0,1 "〈" (U+3008) is not the "<" of the notation, though it looks like it.',
      'look-alike 8,9 "〉" (U+3009) is not the ">" of the notation, though it looks like it.',
    ],
  ],
  ["<1 2 3 4> − 1", ['look-alike 10,11 "−" (U+2212) is not the "-" of the notation, though it looks like it.']],
  ["<А 1 2 3>", ['look-alike 1,2 "А" (U+0410) is not the "A" of the notation, though it looks like it.']],
  ["[1\u200b2 3 4 5]", ["invisible-character 2,3 There is an invisible character here (U+200B)."]],
  ["[1 2\u00a03 4 5]", ["look-alike 4,5 This space (U+00A0) is not the plain space of the notation."]],
  ["[1 2 3\u0000 4 5]", ["control-character 6,7 There is a control character here (U+0000)."]],
  ["[1 2 3 4 5] \ud800", ["lone-surrogate 12,13 Half of a surrogate pair (U+D800) is not a character."]],
  ["<1 2>²", ['look-alike 5,6 "²" (U+00B2) is not the "^2" of the notation, though it looks like it.']],
  ["<1 2> × 2", ['look-alike 6,7 "×" (U+00D7) is not the "*" of the notation, though it looks like it.']],
  ["1.5", ["decimal-point 0,3 Numbers in the notation are integers, without a decimal point."]],
  ["é", ['unknown-character 0,1 "é" (U+00E9) has no meaning in the notation.']],
  [
    "\\langle 1 2 \\rangle",
    [
      "latex-in-notation 0,7 \\langle is LaTeX; the notation is plain text.",
      "two-integers 9,11 Two integers stand side by side.",
      "latex-in-notation 12,19 \\rangle is LaTeX; the notation is plain text.",
    ],
  ],
  ["# nothing", ["empty 0,9 There is no formula here."]],
  ["let f = 1;", ["no-expression 9,10 There is no expression after the definitions."]],
  ["1 +", ["missing-operand 2,3 Nothing follows this + but the end."]],
  ["1 + * 2", ['missing-operand 2,3 Nothing follows this + but "*".', 'unexpected 6,7 "2" cannot stand here.']],
  [
    "* 2",
    ['expected-expression 0,1 An expression is expected here, not "*".', 'unexpected 2,3 "2" cannot stand here.'],
  ],
  ["(1", ["unclosed 0,1 This parenthesis is not closed."]],
  ["1)", ['unexpected 1,2 ")" cannot stand here.']],
  ["<1 2 3 4]", ["mixed-bracket 0,9 This bracket is opened with < and closed with ]."]],
  ["<1 2 3 4", ["unclosed 0,8 This bracket is not closed: > is missing."]],
  ["1 2", ["two-integers 1,3 Two integers stand side by side."]],
  [
    "1 / 2 3",
    ["ambiguous-division 2,7 It is not clear whether this factor is divided or divides: papers disagree on a / b c."],
  ],
  [
    "<1 2> / <2 3> <3 4>",
    ["ambiguous-division 6,19 It is not clear whether this factor is divided or divides: papers disagree on a / b c."],
  ],
  [
    "1 / sum(i : 1 <= i <= n) i",
    ["needs-parentheses 4,7 A sum in a denominator needs parentheses: it would take all that follows."],
  ],
  [
    "prod(i : 1 <= i <= n) sum(j : 1 <= j <= i) j",
    ["needs-parentheses 22,25 A sum after prod(...) needs parentheses."],
  ],
  ["sum(i : 1 <= i <= n) -i", ["needs-parentheses 21,22 What follows sum(...) cannot begin with a sign."]],
  ["2^3^2", ["double-power 3,4 A power of a power needs parentheses."]],
  ["2^(1/2)", ["exponent 1,7 An exponent is an integer made of numbers and indices with +, - and *."]],
  ["2^q", ['exponent 1,3 After ^ comes an integer, not "q".', "unknown-name 2,3 Nothing here is called q."]],
  ["2^1001", ["limit-exponent 1,6 An exponent is at most 1,000 in size."]],
  ["q", ["unknown-name 0,1 Nothing here is called q."]],
  ["let kermit = 1; kermet", ["unknown-name 16,22 Nothing here is called kermet."]],
  ["let f = g; let g = 1; f", ["defined-later 8,9 g is defined only further down."]],
  ["let f = f + 1; f", ["recursion 8,9 The definition of f uses f itself."]],
  ["let f = 1; let f = 2; f", ["redefined 15,16 f is defined twice."]],
  ["let sum = 1; 2", ["reserved-name 4,7 sum has a fixed meaning and cannot be defined."]],
  ["let s(i) = 1; 2", ["reserved-name 4,5 s before a parenthesis has a fixed meaning and cannot be defined."]],
  ["let = 1; 2", ['expected-name 4,5 After let comes a name, not "=".']],
  ["let f(i) = i; f", ["argument-count 14,15 f takes 1 argument, and none are given."]],
  ["let f(i) = i; f(1, 2)", ["argument-count 14,21 f takes 1 argument, and 2 are given."]],
  ["let p = (1 2); p", ["not-a-number 15,16 p is a line, and a number is needed here."]],
  ["let q = 3; [1 2 q 4 5]", ["not-a-point 16,17 q is defined as a number, not as a point, line or plane."]],
  ["let f = 1 let g = 2; f g", ["missing-semicolon 8,9 The definition of f does not end with a semicolon."]],
  [
    "?a [1 2 3 4 5]",
    ["unknown-outside-ansatz 0,2 ?a is an unknown, and unknowns stand only in an ansatz that is fitted."],
  ],
  ["<1 2 3>", ["slot-count 0,7 An angle bracket has two or four slots; this one has 3."]],
  ["[1 2 3 4]", ["slot-count 0,9 A square bracket has two slots, an R-invariant five; this one has 4."]],
  ["delta(1 2 3 4)", ["slot-count 0,14 delta has five slots; this one has 4."]],
  ["sum(i : 1 < i < n) [1 i i +1 5 6]", ["label-space 24,28 Label arithmetic is written without spaces."]],
  [
    "<1 2 (3 4)>",
    [
      "slot-count 0,11 An angle bracket has two or four slots; this one has 3.",
      "loose-group 5,10 A line or plane in parentheses stands only beside cap.",
    ],
  ],
  ["<A bar(3)>", ["plane-outside-cap 3,9 The plane bar(i) stands only beside cap."]],
  ["let P = (1 2 3); <A P>", ["plane-outside-cap 20,21 A plane stands only beside cap."]],
  [
    "<1 2 3 cap (1 2 3)>",
    [
      "slot-count 0,19 An angle bracket has two or four slots; this one has 3.",
      "cap-kinds 5,18 A meet is of a line and a plane or of two planes; here are a point and a plane.",
    ],
  ],
  [
    "<1 2 3 (1 2) cap (3 4)>",
    ["cap-kinds 7,22 A meet is of a line and a plane or of two planes; here are a line and a line."],
  ],
  ["<1 (1 2 3 4) cap (3 4 5) 2 3>", ["group-size 3,12 A line has two slots and a plane three; this has 4."]],
  [
    "<1 2 3 (1 2) cap (3 4 5) cap (4 5 6)>",
    ["cap-chain 25,36 A meet has two sides; a chain of them needs parentheses."],
  ],
  ["<1 2 3 (1 2) cap 4>", ['cap-operand 17,18 After cap comes a line or plane, not "4".']],
  [
    "[(1 2 3) cap (4 5 6) 1 2 3]",
    ["no-grassmann-part 1,20 (1 2 3) cap (4 5 6) has no Grassmann part and cannot stand in an R-invariant."],
  ],
  ["[X 1 2 3]", ["no-grassmann-part 1,2 X has no Grassmann part and cannot stand in an R-invariant."]],
  ["[AB]", ["square-item 0,4 A square bracket of two entries holds external legs only."]],
  ["[A 1]", ["square-item 0,5 A square bracket of two entries holds external legs only."]],
  ["<*|1+2|3]", ["string-end 1,2 A reference stands only at a square end of a string."]],
  ["<1|2+3|4>", ["string-parity 0,9 A string with one middle entry that begins with < ends with ]."]],
  ["<1|2-3|4]", ["string-entry 3,6 The middle of a spinor string is a sum of momenta, without other arithmetic."]],
  ["<1||4]", ["string-entry 2,4 There is no momentum between these bars."]],
  ["<1|4]", ["string-entry 0,5 A spinor string has momenta between its ends."]],
  ["<1|2..|4]", ["open-range 3,6 This range of momenta has no end."]],
  ["<1|2+3|4", ["unclosed 0,8 This spinor string is not closed."]],
  ["s(1..)", ["open-range 2,5 This range of momenta has no end."]],
  ["s(..2)", ["open-range 2,4 This range of momenta has no beginning."]],
  ["s()", ["expected-item 0,3 s( ) needs at least one momentum."]],
  ["s(1+2+3)", ["label-arithmetic 2,7 In s( ) momenta are separated by spaces; + between numbers would add labels."]],
  ["s(AB)", ["square-item 2,4 AB has no spinors of its own here; only external legs can stand in this place."]],
  ["x2(1 2 3)", ["distance-points 0,9 x2( ) takes two dual points, and 3 are given."]],
  ["x2(A 1)", ['distance-points 3,4 A dual point is a label or a loop line such as AB, not "A".']],
  [
    "x2(1 AB) <AB 1 2>",
    ["mixed-lines 5,7 Loop lines stand in x2( ) here and in brackets elsewhere; one form uses one of the two."],
  ],
  [
    "sum(i) i",
    [
      "missing-conditions 3,6 After the indices of sum comes a colon and their conditions.",
      "unknown-name 7,8 Nothing here is called i.",
    ],
  ],
  ["sum(i, i : 1 < i < n) i", ["duplicate-index 7,8 The index i is listed twice."]],
  ["sum(i, j : 1 < i < n) i", ["unbounded-index 7,8 The index j has no lower and no upper bound."]],
  ["sum(i : 1 < i) i", ["unbounded-index 4,5 The index i has no upper bound."]],
  [
    "sum(i : n > i > 1) i",
    [
      "relation 10,11 Conditions are written with < and <=, not with >.",
      "relation 14,15 Conditions are written with < and <=, not with >.",
    ],
  ],
  ["sum(i : 1 == i) i", ["relation 10,12 Relations are < <= = and !=."]],
  [
    "sum(i, j : i < j <= i) i",
    [
      "unbounded-index 4,5 The index i has no lower and no upper bound.",
      "unbounded-index 7,8 The index j has no lower and no upper bound.",
      "cyclic-order 11,21 A chain that returns to its first index is a cyclic order: distinct indices of this sum, joined by <.",
    ],
  ],
  [
    "sum(i : i) i",
    [
      "unbounded-index 4,5 The index i has no lower and no upper bound.",
      "relation 8,9 A condition compares index expressions.",
    ],
  ],
  [
    "sum(n : 1 < n < 3) 1",
    [
      "reserved-name 4,5 n cannot be the name of an index.",
      'expected-name 6,7 The name of an index is expected here, not ":".',
    ],
  ],
  ["sum(i : 1 < i i < n) i", ["not-index 12,15 A product of two indices is not linear."]],
  ["[1 2 3 4 5];", ['unexpected 11,12 ";" cannot stand here.']],
  ["[1 2 3 4 5] = 1", ["unexpected 12,13 An equals sign stands only in definitions and conditions."]],
  ["cyc [1 2 3 4 5]", ["missing-parenthesis 0,3 cyc is followed by an expression in parentheses: cyc(a)."]],
  ["delta", ["missing-parenthesis 0,5 delta is followed by five entries in parentheses: delta(1 2 3 4 5)."]],
  ["AB", ["not-a-number 0,2 AB stands for a point or line; it belongs inside a bracket."]],
  ["bar(1)", ["plane-outside-cap 0,3 A plane stands only beside cap, inside a bracket or definition."]],
  [
    "(1 2) cap (3 4 5)",
    [
      "not-a-number 0,17 A meet is a point or line, not a number; it stands inside a bracket.",
      "two-integers 2,4 Two integers stand side by side.",
    ],
  ],
  ["let p = (1 2 3 4); 1", ["group-size 8,17 A point has one slot, a line two and a plane three; this has 4."]],
  ["let P = bar(1); 1", ["plane-outside-cap 8,11 A plane stands only beside cap, inside a bracket or definition."]],
  ["let f() = 1; f", ["expected-name 5,7 A definition without parameters is written without parentheses."]],
];

const told = ({ code, span, message }: Diagnostic): string => `${code} ${span} ${message}`;

describe("faults", () => {
  it.each(faults)("are told exactly: %j", (text, said) => {
    expect(read(text).diagnostics.map(told)).toEqual(said);
    expect(parse(text).ok).toBe(false);
  });

  it("have known codes, one-line messages and spans inside the text", () => {
    for (const [text] of faults) {
      for (const { code, span, message } of read(text).diagnostics) {
        expect(Object.keys(codes)).toContain(code);
        expect(message).toMatch(/^\S.*[.)]$/);
        const [start, end] = span!;
        expect(start >= 0 && start <= end && end <= text.length).toBe(true);
      }
    }
  });

  it("are gone where the suggestion is taken", () => {
    let taken = 0;
    for (const [text] of faults) {
      const before = read(text).diagnostics;
      for (const { suggestion } of before) {
        if (suggestion === undefined) continue;
        const [start, end] = suggestion.span;
        const mended = text.slice(0, start) + suggestion.replacement + text.slice(end);
        expect(read(mended).diagnostics.length, mended).toBeLessThan(before.length);
        taken += 1;
      }
    }
    expect(taken).toBeGreaterThan(20);
  });

  it("are all found in one pass", () => {
    const { diagnostics } = read("[1 2 3 4 q] + <AB12> - foo / (<1 2 3> x) + [12345] ^ 2000;");
    expect(diagnostics.map(({ code }) => code)).toEqual([
      "unknown-name",
      "run-together",
      "unknown-name",
      "slot-count",
      "unknown-name",
      "run-together",
      "limit-exponent",
      "unexpected",
    ]);
  });
});

describe("large and hostile texts", () => {
  it.each([
    ["parentheses", "(".repeat(100_000), "limit-nesting"],
    ["terms", `${"1+".repeat(999_999)}1`, "limit-terms"],
    ["factors", `${"1*".repeat(900_000)}1`, "limit-terms"],
    ["quotients", `${"1/".repeat(900_000)}1`, "limit-nesting"],
    ["signs", "-".repeat(1_000_000), "limit-nesting"],
    ["plus signs", "+".repeat(1_000_000), "limit-nesting"],
    ["digits", "7".repeat(1_000_000), "limit-integer"],
    ["characters", " ".repeat(2_000_001), "limit-source"],
    ["meets", "<1 2 3 ((1 2) cap ".repeat(50_000), "unclosed"],
    ["definitions", "let ".repeat(200_000), "expected-name"],
    ["wrong terms", `${"[1 2 3 4] + foo + ".repeat(20_000)}1`, "slot-count"],
    ["open brackets", "<".repeat(1_000_000), "unclosed"],
    ["open strings", "<1|".repeat(600_000), "unclosed"],
    ["spinor sums", "s(".repeat(300_000), "unclosed"],
    ["invisible characters", "\u200b".repeat(1_000_000), "invisible-character"],
    ["look-alike letters", "\u0430".repeat(1_000_000), "look-alike"],
    [
      "deep definitions",
      `let a0 = 1; ${Array.from({ length: 2000 }, (_, at) => `let a${at + 1} = a${at} + 1;`).join(" ")} a2000`,
      "limit-nesting",
    ],
  ])(
    "%s end in a fault within seconds and a bounded number of faults",
    (_, text, code) => {
      const { diagnostics } = read(text);
      expect(diagnostics.length).toBeLessThanOrEqual(mostDiagnostics + 1);
      expect(diagnostics.map((diagnostic) => diagnostic.code)).toContain(code);
      if (diagnostics.length > mostDiagnostics) expect(diagnostics.at(-1)?.code).toBe("more-faults");
    },
    30_000,
  );

  it("never throw, whatever is cut out of a formula or put into it", () => {
    const good =
      "let L(i,j) = bar(i) cap bar(j); sum(i, j : 1 <= i < j <= n) <AB L(i,j)>^2 <1|2+3..4|5] s(1..3) / (<AB (1 2) cap (3 4 5) X> [1 2] x2(1 3))";
    const pieces = [
      "",
      "(",
      ")",
      "<",
      ">",
      "[",
      "]",
      "|",
      "cap",
      "..",
      "^",
      ",",
      ";",
      "let",
      "sum(",
      "\ud83d",
      "*",
      "1",
      "i",
      "#",
      ":",
      "=",
      "!=",
    ];
    for (let at = 0; at <= good.length; at += 3) {
      for (const piece of pieces) {
        expect(Array.isArray(read(good.slice(0, at) + piece + good.slice(at + 1)).diagnostics)).toBe(true);
        expect(Array.isArray(read(good.slice(at) + piece + good.slice(0, at)).diagnostics)).toBe(true);
      }
    }
  });
});

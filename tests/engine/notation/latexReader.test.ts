import { describe, expect, it } from "vitest";
import { withoutSpans } from "../../../engine/notation/digest";
import { latexLines } from "../../../engine/notation/latex";
import { fromLatex } from "../../../engine/notation/latexReader";
import { parse } from "../../../engine/notation/parse";
import { printFormula } from "../../../engine/notation/print";

function tree(text: string) {
  const parsed = parse(text);
  if (!parsed.ok) throw new Error(`${text}: ${parsed.diagnostics.map(({ message }) => message).join(" ")}`);
  return parsed.value;
}

function read(latex: string): string {
  const result = fromLatex(latex);
  if (!result.ok) throw new Error(result.diagnostics.map(({ message }) => message).join(" "));
  return result.value;
}

describe("LaTeX from papers", () => {
  it.each([
    ["\\langle 1\\,2\\,3\\,4\\rangle", "<1 2 3 4>"],
    ["\\langle 1234\\rangle", "<1 2 3 4>"],
    ["\\left\\langle AB\\,i{-}1\\,i\\right\\rangle".replaceAll("i{-}1\\,i", "1\\,2"), "<AB 1 2>"],
    ["\\langle AB12\\rangle", "<AB 1 2>"],
    ["\\langle 10\\,11\\,12\\,1\\rangle", "<10 11 12 1>"],
    ["[1,2,3,4,5]+[1,2,3,5,6]", "[1 2 3 4 5] + [1 2 3 5 6]"],
    ["\\mathcal{M} = [12345]".replace("\\mathcal{M}", "M"), "[1 2 3 4 5]"],
    ["\\frac{\\langle 12\\rangle^4}{\\langle 12\\rangle\\langle 23\\rangle}", "<1 2>^4 / (<1 2><2 3>)"],
    ["{\\langle 12\\rangle^4 \\over \\langle 23\\rangle}", "<1 2>^4 / <2 3>"],
    ["\\frac12 [1\\,2\\,3\\,4\\,5]", "1/2 [1 2 3 4 5]"],
    ["\\sum_{1<i<j<n} [1\\,i\\,i{+}1\\,j\\,j+1]", "sum(i, j : 1 < i < j < n) [1 i i+1 j j+1]"],
    ["\\sum_{i=1}^{n} \\langle i\\,i+1\\rangle", "sum(i : 1 <= i <= n) <i i+1>"],
    ["\\sum_{\\substack{1<i\\\\ i+1<j<n}} [1\\,i\\,i+1\\,j\\,j+1]", "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]"],
    ["\\langle AB\\,(1\\,2\\,3)\\cap(3\\,4\\,5)\\rangle", "<AB (1 2 3) cap (3 4 5)>"],
    ["\\langle AB\\,\\bar{2}\\cap\\bar 4\\rangle\\langle X 24\\rangle", "<AB bar(2) cap bar(4)><X 2 4>"],
    ["[1\\,2\\,3\\,(45)\\cap(612)\\,4]", "[1 2 3 (4 5) cap (6 1 2) 4]"],
    ["\\langle 1|2{+}3|4]^3 s_{234}", "<1|2+3|4]^3 s(2 3 4)"],
    ["\\langle 1|(2+3)|4]", "<1|2+3|4]"],
    ["s_{1\\ldots 3}\\, [6|1+\\cdots+3|4\\rangle", "s(1..3) [6|1..3|4>"],
    ["x_{13}^2 x^2_{24} / x_{13}^4", "x2(1 3) x2(2 4) / x2(1 3)^2"],
    ["\\left(\\langle 12\\rangle + 3 \\cdot 4\\right)^{-1}", "(<1 2> + 3 * 4)^(-1)"],
    ["$$ \\langle 1\\,2\\rangle % a comment\n $$", "<1 2>"],
  ])("%s is %s", (latex, notation) => {
    expect(printFormula(tree(read(latex)))).toBe(notation);
  });

  it.each([
    "[1 2 3 4 5] - [1 2 3 5 6]",
    "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]",
    "<1 2>^4 / prod(i : 1 <= i <= n) <i i+1>",
    "sum(i, j : 1 <= i < j <= n) <AB bar(i) cap bar(j)><X i j> / (<AB X><AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>)",
    "sum(i, j, k, l : i < j < k < l < i) <AB bar(i) cap bar(j)><CD bar(k) cap bar(l)><i j k l> / (<AB i-1 i><AB CD>)",
    "-<1|2+3..4|5]^4 / (<5 6><6 1>[2 3][3 4] s(5 6 1) <5|6+1|2])",
    "cyc(x2(1 3)^2 x2(2 4) / (x2(1 AB) x2(2 AB) x2(AB CD)))",
    "sym(<1 2 3 4>^3 / (<AB 4 1><A B C D>))",
    "[3 4 7 8 2] [4 5 7 (7 8) cap (2 3 4) (3 4) cap (7 8 2)]",
    "delta(1 2 3 4 5) / (<1 2 3 4><2 3 4 5>)",
    "[* 1 2 3 4] 1/2",
  ])("what is printed of %s is read back", (text) => {
    const formula = tree(text);
    expect(withoutSpans(tree(read(latexLines(formula).join(" "))))).toEqual(withoutSpans(formula));
  });

  it.each([
    ["\\langle 1\\,2\\rangle \\foo{3}", "latex-command 20,24 \\foo has no meaning in the notation."],
    ["\\frac{1}{2", "latex-braces 8,9 This brace is not closed."],
    ["1 }", "latex-braces 2,3 This brace closes nothing."],
    ["\\langle 1 2", "unclosed 0,7 This bracket is not closed."],
    ["\\sum [1\\,2\\,3\\,4\\,5]", "missing-conditions 0,4 This sum has no index under it."],
    ["x_{13}^3", "latex-command 0,1 x stands only in squared distances such as x_{13}^2."],
    ["{".repeat(100_000), "limit-nesting 200,201 Brackets and commands may lie at most 200 deep."],
    ["\\frac".repeat(100_000), "limit-nesting 1000,1005 Brackets and commands may lie at most 200 deep."],
    ["(".repeat(100_000), "limit-nesting 200,201 Brackets and commands may lie at most 200 deep."],
  ])("refuses %.30s with a place", (latex, said) => {
    const result = fromLatex(latex);
    expect(
      result.ok ? [] : result.diagnostics.map(({ code, span, message }) => `${code} ${span} ${message}`),
    ).toContain(said);
  });
});

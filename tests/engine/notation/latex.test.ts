import fc from "fast-check";
import katex from "katex";
import { describe, expect, it } from "vitest";
import { latexLines } from "../../../engine/notation/latex";
import { parse } from "../../../engine/notation/parse";
import { formulas } from "../../support/arbitraries";

/** What KaTeX in strict mode makes of a line; it throws at anything that is not LaTeX. */
const render = (line: string): string =>
  katex.renderToString(line, { strict: "error", throwOnError: true, trust: false, displayMode: true });

function lines(text: string): string[] {
  const parsed = parse(text, { ansatz: true });
  if (!parsed.ok) throw new Error(parsed.diagnostics.map(({ message }) => message).join(" "));
  return latexLines(parsed.value);
}

describe("LaTeX", () => {
  it.each([
    ["[1 2 3 4 5] - [1 2 3 i+1 n]".replace("i+1", "n-1"), ["[1\\,2\\,3\\,4\\,5]", "-[1\\,2\\,3\\,n{-}1\\,n]"]],
    [
      "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]",
      ["\\sum_{\\substack{1<i\\\\ i+1<j<n}} [1\\,i\\,i{+}1\\,j\\,j{+}1]"],
    ],
    [
      "let kermit(i,j) = <AB (1 i i+1) cap bar(j)>^2 / (<AB 1 i><AB X>); sum(i, j : 1 < i < j < n) kermit(i,j)",
      [
        "\\mathrm{kermit}(i,j) = \\frac{\\langle AB\\,(1\\,i\\,i{+}1)\\cap \\bar{j}\\rangle^{2}}{\\langle AB\\,1\\,i\\rangle\\,\\langle AB\\,X\\rangle}",
        "\\sum_{1<i<j<n} \\mathrm{kermit}(i,j)",
      ],
    ],
    [
      "<1|2+3|4]^3 s(1 2 3) / s(i..n)".replace("i..n", "3..n"),
      ["\\frac{\\langle 1|2{+}3|4]^{3}\\,s_{123}}{s_{3\\ldots n}}"],
    ],
    ["x2(1 3)^2 x2(2 AB)", ["\\left(x^{2}_{13}\\right)^{2}\\,x^{2}_{2,(AB)}"]],
    ["1/2 cyc([* 1 2 3 4]) 3", ["\\frac{1}{2}\\,\\operatorname{cyc}\\left([\\ast\\,1\\,2\\,3\\,4]\\right)\\cdot 3"]],
    [
      "<1 2>^4 / prod(i : 1 <= i <= n) <i i+1>",
      ["\\frac{\\langle 1\\,2\\rangle^{4}}{\\prod_{1\\le i\\le n} \\langle i\\,i{+}1\\rangle}"],
    ],
    ["-(<1 2> - 3) ?a", ["-\\left(\\langle 1\\,2\\rangle - 3\\right)\\,a^{?}"]],
    [
      "let p12 = (1 2); let a_b = <p12 3 4>; a_b",
      ["p_{12} = (1\\,2)", "\\mathrm{a\\_b} = \\langle p_{12}\\,3\\,4\\rangle", "\\mathrm{a\\_b}"],
    ],
  ])("prints %s", (text, expected) => {
    expect(lines(text)).toEqual(expected);
    for (const line of expected) render(line);
  });

  it("is accepted by KaTeX in strict mode for any formula", () => {
    fc.assert(
      fc.property(formulas, (formula) => {
        for (const line of latexLines(formula)) expect(render(line)).toContain("katex");
      }),
      { numRuns: 100, seed: 7 },
    );
  });

  it("is refused by that same check where it is not LaTeX", () => {
    expect(() => render("\\frac{1}")).toThrow();
    expect(() => render("∩ é")).toThrow();
  });
});

import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { withoutSpans } from "../../../engine/notation/digest";
import { parse } from "../../../engine/notation/parse";
import { printFormula } from "../../../engine/notation/print";
import { formulas } from "../../support/arbitraries";

/** The tree of a text that must be right. */
function tree(text: string) {
  const parsed = parse(text);
  if (!parsed.ok) throw new Error(`${text}: ${parsed.diagnostics.map(({ message }) => message).join(" ")}`);
  return parsed.value;
}

describe("printing", () => {
  it("gives back the tree that is printed", () => {
    fc.assert(
      fc.property(formulas, (formula) => {
        expect(withoutSpans(tree(printFormula(formula)))).toEqual(withoutSpans(formula));
      }),
      { numRuns: 250, seed: 20240607 },
    );
  });

  it.each([
    ["[ 1,2 ,3 4 5 ]  +  (  <1 2 3 4> )", "[1 2 3 4 5] + <1 2 3 4>"],
    ["1/2[1 2 3 4 5]", "1/2 [1 2 3 4 5]"],
    ["<AB 1 2> <AB 2 3>*3", "<AB 1 2><AB 2 3> * 3"],
    ["a / b * c".replaceAll(/[abc]/g, (x) => `<1 ${"abc".indexOf(x) + 2}>`), "<1 2> / <1 3> * <1 4>"],
    ["(<1 2>/<1 3>)/<1 4>", "<1 2> / <1 3> / <1 4>"],
    ["<1 2>/(<1 3>/<1 4>)", "<1 2> / (<1 3> / <1 4>)"],
    ["-2^2", "-2^2"],
    ["(-2)^2", "(-2)^2"],
    ["2^-1", "2^(-1)"],
    ["- (- 1)", "--1"],
    ["(sum(i:1<=i<=n)<i i+1>)<1 2>", "(sum(i : 1 <= i <= n) <i i+1>) <1 2>"],
    ["2 sum(i : 1 <= i<=n) <i i+1><1 2>", "2 sum(i : 1 <= i <= n) <i i+1><1 2>"],
    [
      "let L(i , j)=bar( i )∩ bar(j); ⟨AB L(i,j)⟩".replaceAll("L(i,j)", "L(1, 2)").replace("L(i , j)", "L(i,j)"),
      "let L(i, j) = bar(i) cap bar(j);\n<AB L(1, 2)>",
    ],
    [
      "let p=(1 2)cap(3 4 5);\n\n# the point\n[p 1 2 3 (AB) cap bar(2)]",
      "let p = (1 2) cap (3 4 5);\n[p 1 2 3 AB cap bar(2)]",
    ],
    ["sum(s : 1 <= s <= n) s * (n-3)", "sum(s : 1 <= s <= n) s * (n - 3)"],
    ["<1|2+3..5|4] s( 1..3 )x2(1 3)", "<1|2+3..5|4] s(1..3) x2(1 3)"],
    ["sum(i : 1 <= 2 i - 3 <= n) <3-i 2*i-1>", "sum(i : 1 <= 2*i-3 <= n) <3-i 2*i-1>"],
  ])("writes %s as %s", (given, printed) => {
    expect(printFormula(tree(given))).toBe(printed);
  });
});

import { describe, expect, it } from "vitest";
import { findPoles } from "../../../engine/checks/poles";
import { formOf, published } from "../../support/forms";

const spurious = (notation: string, size: { n: number; k: number; loops?: number }) =>
  findPoles(formOf(notation, size))
    .filter((p) => p.kind === "spurious")
    .map((p) => p.bracket)
    .sort();

describe("poles", () => {
  // 1008.2958 and 0905.1473: the three-term six-leg form has three spurious poles, each in two terms.
  it("of the six-leg NMHV form are nine physical ones and three spurious ones in two terms each", () => {
    const poles = findPoles(formOf(published.nmhv6, { n: 6, k: 1 }));
    expect(poles.filter((p) => p.kind === "physical")).toHaveLength(9);
    expect(poles.filter((p) => p.kind === "spurious").map((p) => [p.bracket, p.terms])).toEqual([
      ["<1 3 4 5>", [0, 2]],
      ["<1 2 3 5>", [0, 1]],
      ["<1 3 5 6>", [1, 2]],
    ]);
  });

  // 1012.6032: chiral pentagons have only <AB i i+1> and the reference line.
  it("of chiral pentagons are physical but for the reference line", () => {
    const poles = findPoles(formOf(published.pentagons, { n: 6, k: 0, loops: 1 }));
    expect(poles.filter((p) => p.kind === "spurious")).toMatchObject([{ bracket: "<AB X>", reference: true }]);
    expect(spurious(published.doublePentagons, { n: 5, k: 0, loops: 2 })).toEqual([]);
  });

  it("of recursion terms at one loop are the <AB 1 i> of leg 1", () => {
    expect(spurious(published.kermits, { n: 6, k: 0, loops: 1 })).toEqual(["<AB 1 3>", "<AB 1 4>", "<AB 1 5>"]);
  });

  it("behind meets are taken apart into plain brackets", () => {
    // <3 4 5 p> with p = (2 3) cap (5 6 1) is -<2 3 4 5><3 5 6 1>, so that nothing but plain brackets is left.
    const brackets = findPoles(formOf("1 / <3 4 5 (2 3) cap (5 6 1)>", { n: 7, k: 0 })).map((p) => p.bracket);
    expect(brackets.sort()).toEqual(["<1 3 5 6>", "<2 3 4 5>"]);
  });

  it("do not list a bracket that a numerator cancels", () => {
    expect(findPoles(formOf("<1 2 3 4> / (<1 2 3 4> <1 2 3 5>)", { n: 6, k: 0 })).map((p) => p.bracket)).toEqual([
      "<1 2 3 5>",
    ]);
  });
});

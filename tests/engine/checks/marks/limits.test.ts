import { describe, expect, it } from "vitest";
import { published } from "../../../support/forms";
import { alone } from "./support";

const states = (...args: Parameters<typeof alone>) => {
  const { marks } = alone(...args);
  return [marks.soft?.state, marks.collinear?.state];
};

describe("soft and collinear limits of superamplitudes", () => {
  // 1008.2958 and 0807.1095 (trees), 1012.6032 (loops).
  it.each([
    ["the six-leg NMHV form", published.nmhv6, { n: 6, k: 1 }],
    ["five legs, where the limit is zero", "[1 2 3 4 5]", { n: 5, k: 1 }],
    ["seven legs", published.nmhv, { n: 7, k: 1 }],
    ["recursion at one loop", published.kermits, { n: 6, loops: 1 }],
    ["chiral pentagons", published.pentagons, { n: 5, loops: 1 }],
    ["double pentagons", published.doublePentagons, { n: 5, loops: 2 }],
  ])("hold for %s", (_, notation, size) => {
    expect(states(notation, size)).toEqual(["holds", "holds"]);
  });

  it.each([
    ["a factor of two", `2(${published.nmhv6})`, { n: 6, k: 1 }],
    ["a missing term", "[1 2 3 4 5] + [1 3 4 5 6]", { n: 6, k: 1 }],
    ["one pentagon too few", published.pentagons.replace("j <= n", "j < n"), { n: 5, loops: 1 }],
  ])("fail for %s", (_, notation, size) => {
    expect(states(notation, size)).toContain("fails");
    expect(alone(notation, size).verdict).toBe("disagrees");
  });

  it("do not apply to four legs and to other targets", () => {
    expect(states(published.kermits, { n: 4, loops: 1 })).toEqual(["notApplicable", "notApplicable"]);
    const boxes =
      "1/2 sum(i, j : 1 <= i, i+1 < j <= n, j != i+n-1) <i-1 i i+1 j><i j-1 j j+1> / (<AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>)";
    expect(states(boxes, { n: 5, loops: 1 }, { target: "even" })).toEqual(["notApplicable", "notApplicable"]);
  });

  it("name the smaller amplitude that no source knows", () => {
    // Any integrand of (6,1,2) would do: what is missing is (5,1,2).
    const { marks } = alone("<1 2 3 4>^2 [1 2 3 4 5] / (<AB 1 2><AB 2 3><AB 3 4><AB CD><CD 3 4><CD 4 1><CD 1 2>)", {
      n: 6,
      k: 1,
      loops: 2,
    });
    expect(marks.soft?.state).toBe("untested");
    expect(marks.soft?.evidence).toContain("(5,1,2)");
  });
});

// The factors are textbook ones (Phys. Rept. 200 (1991) 301): eikonal <a-1 a+1>/(<a-1 a><a a+1>), splitting 1/(x y), x^3/y, y^3/x.
describe("soft and collinear limits of gluon components", () => {
  it.each([
    // Phys. Rev. Lett. 56 (1986) 2459
    ["MHV", "<1 3>^4 / (<1 2><2 3><3 4><4 5><5 6><6 1>)", 6, 0, "-+-+++"],
    ["conjugate MHV", "[4 5]^4 / ([1 2][2 3][3 4][4 5][5 1])", 5, 1, "---++"],
    // hep-th/0412308: two terms, split helicities
    [
      "the split-helicity component",
      "<1|2+3|4]^3 / ([2 3][3 4]<5 6><6 1> s(2 3 4) <5|3+4|2]) + <3|4+5|6]^3 / ([6 1][1 2]<3 4><4 5> s(3 4 5) <5|3+4|2])",
      6,
      1,
      "---+++",
    ],
  ])("hold for %s", (_, notation, n, k, component) => {
    expect(states(notation, { n, k }, { component })).toEqual(["holds", "holds"]);
  });

  it.each([
    ["the wrong legs in the numerator", "<1 2>^4 / (<1 2><2 3><3 4><4 5><5 1>)", 5, 0, "-+-++"],
    ["the other sign", "-[4 5]^4 / ([1 2][2 3][3 4][4 5][5 1])", 5, 1, "---++"],
    ["a denominator in another order", "<1 3>^4 / (<1 3><3 2><2 4><4 5><5 1>)", 5, 0, "-+-++"],
  ])("fail for %s", (_, notation, n, k, component) => {
    expect(states(notation, { n, k }, { component })).toContain("fails");
  });
});

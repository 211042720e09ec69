import { describe, expect, it } from "vitest";
import { derive } from "../../../../engine/derive";
import { printFormula } from "../../../../engine/notation";
import { published } from "../../../support/forms";
import { alone } from "./support";

function recursion(n: number, k: number, loops: number): string {
  const derived = derive({ n, k, loops, method: "recursion" });
  if (!derived.ok) throw new Error("nothing was derived");
  return printFormula(derived.value.formula);
}

const box = "<1 2 3 4>^2 / (<AB 1 2><AB 2 3><AB 3 4><AB 1 4>)";
const boxes =
  "sum(i, j : 1 <= i, i+1 < j <= n, j != i+n-1) <i-1 i i+1 j><i j-1 j j+1> / (<AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>)";
/** hep-th/0505205 and hep-th/9702424: the four-leg integrands at two and three loops in dual points. */
const doubleBox = "cyc(x2(1 3)^2 x2(2 4) / (x2(1 AB) x2(2 AB) x2(3 AB) x2(AB CD) x2(3 CD) x2(4 CD) x2(1 CD)))";
const threeLoops = (tennisCourt: number) => `
  sym(x2(1 3)^3 x2(2 4)/(x2(1 AB) x2(2 AB) x2(3 AB) x2(AB CD) x2(1 CD) x2(3 CD) x2(CD EF) x2(1 EF) x2(3 EF) x2(4 EF)))
  + sym(x2(2 4)^3 x2(1 3)/(x2(2 AB) x2(3 AB) x2(4 AB) x2(AB CD) x2(2 CD) x2(4 CD) x2(CD EF) x2(2 EF) x2(4 EF) x2(1 EF)))
  + ${tennisCourt} cyc(sym(x2(1 3) x2(2 4)^2 x2(3 AB)/(x2(4 AB) x2(1 AB) x2(2 AB) x2(AB CD) x2(AB EF) x2(2 CD) x2(3 CD) x2(CD EF) x2(4 EF) x2(3 EF))))`;

describe("two-particle cuts", () => {
  it.each([
    ["the one-loop box into trees", box, { n: 4, loops: 1 }, 2],
    ["chiral pentagons (1012.6032)", published.pentagons, { n: 6, loops: 1 }, 9],
    ["one loop at k = 1 by recursion (1008.2958)", recursion(5, 1, 1), { n: 5, k: 1, loops: 1 }, 5],
    ["one loop at k = 2", recursion(6, 2, 1), { n: 6, k: 2, loops: 1 }, 9],
    ["double pentagons (1012.6032)", published.doublePentagons, { n: 5, loops: 2 }, 5],
    ["three loops at n = 4 (hep-th/0505205)", threeLoops(1), { n: 4, loops: 3 }, 2],
  ])("hold for %s", (_, notation, size, cuts) => {
    const report = alone(notation, size);
    expect(report.marks.twoParticleCuts?.state).toBe("holds");
    expect(report.marks.twoParticleCuts?.evidence).toContain(`All ${cuts} two-particle cuts`);
    expect(report.marks.twoParticleCuts?.evidence).toContain("fixed by its cuts");
    // Fixed, and still for a curator to decide.
    expect(report.verdict).toBe("undecided");
  });

  it.each([
    ["the box with the other sign", `-${box}`, { n: 4, loops: 1 }],
    ["the sum of boxes, which is not the integrand at n = 5", boxes, { n: 5, loops: 1 }],
    ["twice the double box", `2 ${doubleBox}`, { n: 4, loops: 2 }],
    ["three loops with another coefficient", threeLoops(2), { n: 4, loops: 3 }],
  ])("fail for %s", (_, notation, size) => {
    const report = alone(notation, size);
    expect(report.marks.twoParticleCuts?.state).toBe("fails");
    expect(report.verdict).toBe("disagrees");
  });

  it("show every dropped pair of terms of the five-leg double pentagons", () => {
    // Each unordered pair of lines appears twice in the cyclic sum; a term is dropped by asking for i other than one label.
    for (let label = 1; label <= 5; label++) {
      const dropped = published.doublePentagons.replace("i < j < k < l < i)", `i < j < k < l < i, i != ${label})`);
      expect(alone(dropped, { n: 5, loops: 2 }).marks.twoParticleCuts?.state).toBe("fails");
    }
  });

  it("do not apply to trees", () => {
    expect(alone("[1 2 3 4 5]", { n: 5, k: 1 }).marks.twoParticleCuts?.state).toBe("notApplicable");
  });
});

// 1012.6032: chiral integrals have unit leading singularities on one solution of each pair and none on the other.
describe("unit leading singularities", () => {
  const state = (...args: Parameters<typeof alone>) => alone(...args).marks.unitLeadingSingularities;

  it.each([
    ["the box", box, { n: 4, loops: 1 }],
    ["chiral pentagons", published.pentagons, { n: 5, loops: 1 }],
    ["chiral pentagons of six legs", published.pentagons, { n: 6, loops: 1 }],
    ["recursion terms", published.kermits, { n: 6, loops: 1 }],
    ["double pentagons", published.doublePentagons, { n: 5, loops: 2 }],
    ["the double box", doubleBox, { n: 4, loops: 2 }],
  ])("hold for %s", (_, notation, size) => {
    expect(state(notation, size)?.state).toBe("holds");
  });

  it.each([
    // Boxes of unit normalisation are not chiral: both solutions of every pair have residue 1 at n > 4.
    ["the sum of boxes", boxes, { n: 5, loops: 1 }],
    ["half the sum of boxes", `1/2 ${boxes}`, { n: 6, loops: 1 }],
    ["a missing pentagon", published.pentagons.replace("j <= n", "j < n"), { n: 6, loops: 1 }],
    ["twice the double pentagons", `2 ${published.doublePentagons}`, { n: 5, loops: 2 }],
  ])("fail for %s", (_, notation, size) => {
    expect(state(notation, size)?.state).toBe("fails");
  });

  it("are for k = 0", () => {
    expect(state(recursion(5, 1, 1), { n: 5, k: 1, loops: 1 })?.state).toBe("notApplicable");
  });
});

// 1112.6432 and 1012.6032: the exponent of the cusp is one power milder than the amplitude.
describe("the log test", () => {
  const state = (...args: Parameters<typeof alone>) => alone(...args).marks.logTest?.state;

  it.each([
    ["four legs at two loops", doubleBox, { n: 4, loops: 2 }],
    ["five legs at two loops", published.doublePentagons, { n: 5, loops: 2 }],
    ["four legs at three loops", threeLoops(1), { n: 4, loops: 3 }],
  ])("holds for %s", (_, notation, size) => {
    expect(state(notation, size)).toBe("holds");
  });

  it.each([
    ["half the double box", `1/2 ${doubleBox}`, { n: 4, loops: 2 }],
    [
      "the square of one loop alone with a wrong coefficient",
      `2 (${box})(${box.replaceAll("AB", "CD")})`,
      { n: 4, loops: 2 },
    ],
    ["three loops with another coefficient", threeLoops(2), { n: 4, loops: 3 }],
  ])("fails for %s", (_, notation, size) => {
    expect(state(notation, size)).toBe("fails");
  });

  it("needs two loops", () => {
    expect(state(box, { n: 4, loops: 1 })).toBe("notApplicable");
  });
});

describe("the ratio test", () => {
  const state = (...args: Parameters<typeof alone>) => alone(...args).marks.ratioTest?.state;

  it("holds for one loop at k >= 1 by recursion (1008.2958)", () => {
    expect(state(recursion(5, 1, 1), { n: 5, k: 1, loops: 1 })).toBe("holds");
    expect(state(recursion(6, 1, 1), { n: 6, k: 1, loops: 1 })).toBe("holds");
  });

  it("fails for the tree times another integrand, and where a box is added", () => {
    const boxed = `${recursion(5, 1, 1)} + <1 2 3 4>^2 [1 2 3 4 5] / (<AB 1 2><AB 2 3><AB 3 4><AB 4 1>)`;
    expect(state(boxed, { n: 5, k: 1, loops: 1 })).toBe("fails");
    expect(state(`2 [1 2 3 4 5] (${published.kermits})`, { n: 5, k: 1, loops: 1 })).toBe("fails");
  });

  it("does not apply at k = 0", () => {
    expect(state(box, { n: 4, loops: 1 })).toBe("notApplicable");
  });
});

describe("logarithmic singularities", () => {
  const state = (...args: Parameters<typeof alone>) => alone(...args).marks.logarithmic;

  it.each([
    ["the box", box, { n: 4, loops: 1 }],
    ["chiral pentagons", published.pentagons, { n: 5, loops: 1 }],
    ["one loop at k = 1", recursion(5, 1, 1), { n: 5, k: 1, loops: 1 }],
    // 1412.8478: amplitudes have logarithmic singularities.
    ["double pentagons", published.doublePentagons, { n: 4, loops: 2 }],
    ["a tree", published.nmhv6, { n: 6, k: 1 }],
  ])("are all that %s has", (_, notation, size) => {
    expect(state(notation, size)?.state).toBe("holds");
  });

  it.each([
    ["a double propagator", "<1 2 3 4>^2 / (<AB 1 2>^2 <AB 3 4>^2)", { n: 4, loops: 1 }],
    ["a double pole of a tree", "[1 2 3 4 5] <1 2 3 5> / <1 2 3 4>", { n: 5, k: 1 }],
  ])("are not all that %s has", (_, notation, size) => {
    expect(state(notation, size)?.state).toBe("fails");
  });
});

import { describe, expect, it } from "vitest";
import { checkWeights } from "../../../engine/checks/weights";
import { formOf, published } from "../../support/forms";

const labelsAtFault = (notation: string, size: { n: number; k: number; loops?: number }, negativeLegs?: number[]) =>
  checkWeights(formOf(notation, size, negativeLegs ? { negativeLegs } : {}), "amplitude").faults.map((f) => f.label);

describe("weights", () => {
  it.each([
    ["R-invariants (1008.2958)", published.nmhv6, { n: 6, k: 1 }],
    ["vertex expansion (1009.1854)", published.vertex, { n: 7, k: 1 }],
    ["one-loop recursion (1008.2958)", published.kermits, { n: 7, k: 0, loops: 1 }],
    ["chiral pentagons (1012.6032)", published.pentagons, { n: 7, k: 0, loops: 1 }],
    ["double pentagons (1012.6032)", published.doublePentagons, { n: 5, k: 0, loops: 2 }],
    [
      "box in dual points (hep-ph/9403226)",
      "x2(1 3) x2(2 4) / (x2(1 AB) x2(2 AB) x2(3 AB) x2(4 AB))",
      { n: 4, k: 0, loops: 1 },
    ],
  ])("of %s are those of the amplitude", (_, notation, size) => {
    expect(labelsAtFault(notation, size)).toEqual([]);
  });

  // Phys. Rev. Lett. 56 (1986) 2459: a leg of helicity h scales as t^(-2h).
  it("of the MHV component and its conjugate are those of their helicities", () => {
    expect(labelsAtFault("<1 2>^4 / (<1 2><2 3><3 4><4 5><5 1>)", { n: 5, k: 0 }, [1, 2])).toEqual([]);
    expect(labelsAtFault("[4 5]^4 / ([1 2][2 3][3 4][4 5][5 1])", { n: 5, k: 1 }, [1, 2, 3])).toEqual([]);
    expect(labelsAtFault("<1 2>^4 / (<1 2><2 3><3 4><4 5><5 1>)", { n: 5, k: 0 }, [1, 3])).toEqual(["2", "3"]);
  });

  // hep-th/0412308: three spinor strings of two ends each; the infinity twistor counts mass dimensions and helicities together.
  it("of spinor strings and Mandelstam variables agree between the terms of the split-helicity form", () => {
    const notation =
      "<1|2+3|4]^3 / ([2 3][3 4]<5 6><6 1> s(2 3 4) <5|3+4|2]) + <3|4+5|6]^3 / ([6 1][1 2]<3 4><4 5> s(3 4 5) <5|3+4|2])";
    expect(labelsAtFault(notation, { n: 6, k: 1 }, [1, 2, 3])).toEqual([]);
  });

  it("that differ between summands name the two places", () => {
    const notation = "[1 2 3 4 5] + <1 2 3 4> [1 2 3 5 6]";
    const { faults } = checkWeights(formOf(notation, { n: 6, k: 1 }), "amplitude");
    expect(faults).toHaveLength(1);
    expect(faults[0]?.message).toBe("These summands differ in weight: in leg 1 the first has 0, the other 1.");
    expect(faults[0]?.spans.map(([a, b]) => notation.slice(a, b))).toEqual(["[1 2 3 4 5]", "<1 2 3 4> [1 2 3 5 6]"]);
  });

  it("of sums are found through cyc, definitions and powers", () => {
    expect(labelsAtFault("let f(i) = <1 2 i 4>; cyc(f(3) / <1 2 3 5>)", { n: 6, k: 0 })).not.toEqual([]);
    expect(labelsAtFault("(1/6) cyc(<1 2 3 4>^2 / <2 1 4 3>^2)", { n: 6, k: 0 })).toEqual([]);
  });

  it("say when summands differ in Grassmann degree, so that there is no value", () => {
    expect(checkWeights(formOf("1 + [1 2 3 4 5]", { n: 6, k: 1 }), "amplitude").homogeneousInEta).toBe(false);
    expect(checkWeights(formOf("1", { n: 6, k: 1 }), "amplitude").degree).toBe(0);
    expect(checkWeights(formOf("[1 2 3 4 5] - [1 2 3 4 5] 0", { n: 6, k: 1 }), "amplitude").faults).toEqual([]);
  });
});

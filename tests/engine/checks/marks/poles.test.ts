import { describe, expect, it } from "vitest";
import { published } from "../../../support/forms";
import { alone, poleOf } from "./support";

describe("orders of poles", () => {
  // 0905.1473 and 1008.2958: the three spurious poles of the six-leg NMHV form are in two terms each and cancel between them.
  it("of the six-leg NMHV form: nine simple physical poles, three spurious ones that cancel in pairs of terms", () => {
    const report = alone(published.nmhv6, { n: 6, k: 1 });
    const of = (kind: string) => report.poles.filter((p) => p.kind === kind);
    expect(of("physical").map((p) => [p.orderInTerms, p.order])).toEqual(new Array(9).fill([1, 1]));
    expect(of("spurious").map((p) => [p.bracket, p.orderInTerms, p.order, p.groups])).toEqual([
      ["<1 3 4 5>", 1, 0, [[0, 2]]],
      ["<1 2 3 5>", 1, 0, [[0, 1]]],
      ["<1 3 5 6>", 1, 0, [[1, 2]]],
    ]);
    expect(report.marks.spuriousCancel?.state).toBe("holds");
    expect(report.marks.localPoles?.state).toBe("fails");
  });

  it("are left where a term is missing, and name the pole", () => {
    const { marks, verdict } = alone("[1 2 3 4 5] + [1 2 3 5 6]", { n: 6, k: 1 });
    expect(marks.spuriousCancel?.state).toBe("fails");
    expect(marks.spuriousCancel?.evidence).toContain("<1 3 4 5> (order 1)");
    expect(marks.spuriousCancel?.evidence).not.toContain("<1 2 3 5>");
    expect(verdict).toBe("disagrees");
  });

  // 1009.1854: poles that hold the reference twistor cancel too. 1012.6032: so does <AB X>.
  it("that hold a reference are spurious and cancel", () => {
    for (const report of [alone(published.vertex, { n: 6, k: 1 }), alone(published.pentagons, { n: 5, loops: 1 })]) {
      const references = report.poles.filter((p) => p.reference);
      expect(references.length).toBeGreaterThan(0);
      for (const pole of references) expect(pole).toMatchObject({ kind: "spurious", order: 0, orderInTerms: 1 });
      expect(report.marks.spuriousCancel?.state).toBe("holds");
    }
  });

  // 1012.6032: double pentagons have only local poles.
  it("with local poles alone leave nothing to cancel", () => {
    const { marks } = alone(published.doublePentagons, { n: 4, loops: 2 });
    expect(marks.localPoles?.state).toBe("holds");
    expect(marks.spuriousCancel?.state).toBe("notApplicable");
  });

  it("are exact for higher powers, zeros and brackets that hold meets", () => {
    // By hand: each bracket appears to the power that the notation says.
    const report = alone("<1 2 3 4>^2 / (<1 2 3 5>^3 <2 3 (4 5) cap (6 7 1) 7>)", { n: 7 });
    expect(poleOf(report, "<1 2 3 5>")).toMatchObject({ orderInTerms: 3, order: 3 });
    const [meet] = report.poles.filter((p) => p.bracket.includes("cap"));
    expect(meet).toMatchObject({ orderInTerms: 1, order: 1 });
    const cancelled = alone("1/<1 2 3 5> - <1 2 3 4>/(<1 2 3 5><1 2 3 4>) + <1 2 3 5>/<1 3 5 6>", { n: 6 });
    expect(poleOf(cancelled, "<1 2 3 5>")).toMatchObject({ orderInTerms: 1, order: -1, groups: [[0, 1]] });
  });

  it("of a denominator that is a sum are found on the sum itself", () => {
    const report = alone("1 / (<1 2 3 4><1 2 5 6> + <1 2 3 5><1 2 4 6>)^2", { n: 6 });
    expect(report.poles).toHaveLength(1);
    expect(report.poles[0]).toMatchObject({ kind: "spurious", orderInTerms: 2, order: 2 });
  });

  // Phys. Rev. Lett. 56 (1986) 2459: MHV gluons have simple poles in neighbouring angle brackets, their conjugates in square ones.
  it("of components are those in spinors with conserved momentum", () => {
    const mhv = alone("<1 3>^4 / (<1 2><2 3><3 4><4 5><5 1>)", { n: 5 }, { component: "-+-++" });
    expect(mhv.poles.map((p) => [p.bracket, p.kind, p.order])).toEqual(
      ["<1 2>", "<2 3>", "<3 4>", "<4 5>", "<1 5>"].map((bracket) => [bracket, "physical", 1]),
    );
    const conjugate = alone("[4 5]^4 / ([1 2][2 3][3 4][4 5][5 1])", { n: 5, k: 1 }, { component: "---++" });
    expect(conjugate.poles.map((p) => [p.bracket, p.order])).toContainEqual(["[1 2]", 1]);
    // s(1 2) = <1 2>[1 2] with [1 2] above it: the square pole is no pole, the angle pole is.
    const mandelstam = alone("<1 2>^3 [1 2] / (s(1 2) <2 3><3 4><4 5><5 1>)", { n: 5 }, { component: "--+++" });
    expect(mandelstam.poles.map((p) => p.bracket)).not.toContain("[1 2]");
  });

  // 0907.4107 and hep-th/0412308: the split-helicity amplitude in two terms, each with the spurious <5|3+4|2].
  it("of the split-helicity component hold one spurious pole, which cancels between the two terms", () => {
    const split =
      "<1|2+3|4]^3 / ([2 3][3 4]<5 6><6 1> s(2 3 4) <5|3+4|2]) + <3|4+5|6]^3 / ([6 1][1 2]<3 4><4 5> s(3 4 5) <5|3+4|2])";
    const report = alone(split, { n: 6, k: 1 }, { component: "---+++" });
    const spurious = report.poles.filter((p) => p.kind === "spurious");
    expect(spurious).toMatchObject([{ bracket: "<5|3+4|2]", orderInTerms: 1, order: 0, groups: [[0, 1]] }]);
    for (const pole of report.poles.filter((p) => p.kind === "physical")) expect(pole.order).toBe(1);
    expect(report.marks.spuriousCancel?.state).toBe("holds");
  });
});

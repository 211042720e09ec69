import { describe, expect, it } from "vitest";
import { findPoles } from "../../../engine/checks/poles";
import { formOf } from "../../support/forms";

const brackets = (notation: string, size: { n: number; k: number; loops?: number }) =>
  findPoles(formOf(notation, size)).map((p) => p.bracket);

describe("divisors", () => {
  // By hand: (3 4) cap (7 8 q) is (3 4) cap (7 8 1) up to a factor for q = (2 3) cap (7 8 1), a point of that plane.
  it("written in two ways are one", () => {
    const two =
      "1/<5 6 7 (3 4) cap (1 2 8)> + 1/<7 5 6 (8 1 2) cap (4 3)> + 1/<5 6 7 (3 4) cap (8 1 (6 7) cap (8 1 2))>";
    expect(brackets(two, { n: 8, k: 0 }).filter((text) => text.includes("cap"))).toHaveLength(1);
  });

  it("are products of plain brackets wherever they can be", () => {
    // With p = (2 3) cap (1 7 8) and q = (7 8) cap (1 2 3): 7 q = -7 8 <7 1 2 3>, 7 8 p = -7 8 1 <7 8 2 3>, and so
    // <6 7 8 (3 4) cap (7 p q)> is <7 1 2 3><7 8 2 3> times <6 7 8 (3 4) cap (7 8 1)> = +-<1 6 7 8><3 4 7 8>.
    expect(brackets("1/<6 7 8 (3 4) cap (7 (2 3) cap (1 7 8) (7 8) cap (1 2 3))>", { n: 8, k: 0 }).sort()).toEqual([
      "<1 2 3 7>",
      "<1 6 7 8>",
      "<2 3 7 8>",
      "<3 4 7 8>",
    ]);
    expect(brackets("1/<2 3 (4 5) cap (A B 1) (A B) cap (1 4 5)>", { n: 5, k: 0, loops: 1 })).toEqual([
      "<AB 4 5>",
      "<2 3 (1 4 5) cap (AB 1)>",
    ]);
    // Two points of the line AB: the line itself, and what lies on it.
    expect(brackets("1/<3 4 (A B) cap (1 2 3) (A B) cap (1 4 5)>", { n: 5, k: 0, loops: 1 })).toEqual([
      "<AB 3 4>",
      "<AB (1 2 3) cap (1 4 5)>",
    ]);
  });

  it("of spinors are split at single legs and named alike on both sides of momentum conservation", () => {
    expect(brackets("1/(<1|2+3|4] <1|5+6|4])", { n: 6, k: 0 })).toEqual(["<1|2+3|4]"]);
    // <1|2+3|1] at n = 5 has nothing to shorten, <1|2+3|4] = -<1 5>[5 4] has.
    expect(brackets("1/<1|2+3|4]", { n: 5, k: 0 }).sort()).toEqual(["<1 5>", "[4 5]"]);
  });
});

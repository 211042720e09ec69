import { describe, expect, it } from "vitest";
import { derive } from "../../../../engine/derive";
import { printFormula } from "../../../../engine/notation";
import { published } from "../../../support/forms";
import { alone } from "./support";

const mark = (notation: string, size: Parameters<typeof alone>[1], more = {}) =>
  alone(notation, size, more).marks.factorisation;

function recursion(n: number, k: number, loops: number): string {
  const derived = derive({ n, k, loops, method: "recursion" });
  if (!derived.ok) throw new Error("nothing was derived");
  return printFormula(derived.value.formula);
}

describe("factorisation", () => {
  // 1008.2958, 0807.1095, 1009.1854: published trees; all poles, the collinear ones that lower k among them.
  it.each([
    ["the six-leg NMHV form", published.nmhv6, { n: 6, k: 1 }, 9],
    ["the vertex expansion", published.vertex, { n: 7, k: 1 }, 14],
    ["five legs, where it is the whole amplitude", "[1 2 3 4 5]", { n: 5, k: 1 }, 5],
    ["seven legs at k = 2", recursion(7, 2, 0), { n: 7, k: 2 }, 14],
    ["one loop", recursion(5, 1, 1), { n: 5, k: 1, loops: 1 }, 5],
  ])("holds for %s", (_, notation, size, poles) => {
    const found = mark(notation, size);
    expect(found?.state).toBe("holds");
    expect(found?.evidence).toContain(`all ${poles} poles`);
  });

  it.each([
    ["a wrong sign", "[1 2 3 4 5] + [1 2 3 5 6] - [1 3 4 5 6]", { n: 6, k: 1 }],
    ["a term of five legs in six", `${published.nmhv6} + [1 2 3 4 5]`, { n: 6, k: 1 }],
    [
      "a box too many at one loop",
      `${recursion(5, 1, 1)} + <1 2 3 4>^2 [1 2 3 4 5] / (<AB 1 2><AB 2 3><AB 3 4><AB 4 1>)`,
      { n: 5, k: 1, loops: 1 },
    ],
  ])("fails for %s", (_, notation, size) => {
    expect(mark(notation, size)?.state).toBe("fails");
  });

  it("does not apply at k = 0", () => {
    expect(mark(published.kermits, { n: 5, loops: 1 })?.state).toBe("notApplicable");
  });
});

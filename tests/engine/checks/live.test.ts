import { describe, expect, it } from "vitest";
import { checkForm, liveVerdict } from "../../../engine/checks";
import { readEntryValue } from "../../../engine/notation";
import { published } from "../../support/forms";

const read = (notation: string, n: number | { from: number }, k: number, loops = 0) => {
  const form = readEntryValue({ amplitude: { n, k, loops }, notation });
  if (!form.ok) throw new Error(form.diagnostics[0]?.message);
  return form.value;
};

const box = (line: string) => `(<1 2 3 4>^2 / (<${line} 1 2><${line} 2 3><${line} 3 4><${line} 1 4>))`;

describe("the verdict while typing", () => {
  it.each([
    ["1008.2958: six-leg NMHV", read(published.nmhv6, 6, 1), "agrees"],
    ["0807.1095: NMHV for every n", read(published.nmhv, { from: 5 }, 1), "agrees"],
    ["1012.6032: chiral pentagons", read(published.pentagons, 6, 0, 1), "agrees"],
    ["a wrong sign", read("[1 2 3 4 5] - [1 2 3 5 6] + [1 3 4 5 6]", 6, 1), "disagrees"],
    ["a wrong weight", read("[1 2 3 4 5] <1 2 3 4>", 5, 1), "disagrees"],
    [
      "a denominator that is zero everywhere",
      read("sum(i, j : 1 < i, i+1 < j <= n) [1 i i+1 j j+1]", 6, 1),
      "unreadable",
    ],
    [
      "two loops beyond MHV, which no source covers",
      read(`[1 2 3 4 5] ${box("AB")} ${box("CD")}`, 5, 1, 2),
      "undecided",
    ],
  ])("of %s is that of the check", (_, form, state) => {
    expect(liveVerdict(form, "typing").state).toBe(state);
    const { verdict } = checkForm(form, { seed: "typing" }).report;
    // Where there is no truth the check may still refuse, by a property that every amplitude has.
    if (state === "undecided") expect(["undecided", "disagrees"]).toContain(verdict);
    else expect(verdict).toBe(state);
  });

  it("is found by the compiled tape, as the check's is", () => {
    expect(checkForm(read(published.nmhv6, 6, 1), { seed: "a" }).report.evaluator).toContain("WebAssembly SIMD tape");
  });
});

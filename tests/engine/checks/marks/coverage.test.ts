import { describe, expect, it } from "vitest";
import { checkForm, markCodes } from "../../../../engine/checks";
import { coverage, coverageTable } from "../../../../engine/checks/marks/coverage";
import { type Example, examples } from "./examples";

/** One letter a mark: tested where one of the examples of a row is, untested where one says so. */
function lettersOf(row: readonly Example[]): string {
  const reports = row.map(({ form }) => checkForm(form, { seed: "coverage", sources: [] }).report);
  return markCodes
    .map((code) => {
      const states = reports.map(({ marks }) => marks[code]?.state);
      if (states.includes(undefined)) throw new Error(`${code} is missing from a report`);
      if (states.includes("holds") || states.includes("fails")) return "t";
      return states.includes("untested") ? "u" : ".";
    })
    .join("");
}

describe("the table of marks", () => {
  it("says for every kind of form, n, k and L what is tested", () => {
    const rows = new Map<string, Example[]>();
    for (const example of examples()) {
      const key = [example.kind, example.n, example.k, example.loops].join(" ");
      rows.set(key, [...(rows.get(key) ?? []), example]);
    }
    const found = [...rows].map(([key, row]) => `${key} ${lettersOf(row)}`);
    expect(coverageTable).toEqual(found);
  }, 300_000);

  it("has every mark tested in some row", () => {
    for (const code of markCodes) expect(coverage.some(({ marks }) => marks[code] === "tested")).toBe(true);
  });
});

import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { checkForm } from "../../../engine/checks";
import { derive } from "../../../engine/derive";
import { type Form, printFormula, readEntry, readEntryValue } from "../../../engine/notation";

function derived(n: number, k: number, loops: number, leg: number): Form {
  const made = derive({ n, k, loops, method: "recursion", leg });
  if (!made.ok) throw new Error(made.diagnostics[0]?.message);
  const { formula, ...entry } = made.value;
  const form = readEntryValue({ ...entry, notation: printFormula(formula) });
  if (!form.ok) throw new Error(form.diagnostics[0]?.message);
  return form.value;
}

function seed(file: string): Form {
  const form = readEntry(readFileSync(new URL(`../../../seed-data/${file}`, import.meta.url), "utf8"));
  if (!form.ok) throw new Error(form.diagnostics[0]?.message);
  return form.value;
}

describe("a recursion form in another rotation", () => {
  // 1008.2958: the recursion may shift any leg; its value is cyclic although no rotation maps its terms to each other.
  it("of (8,2) agrees with the truth and with the seed form of another leg, cyclic and not manifestly so", () => {
    const form = derived(8, 2, 0, 5);
    const accepted = [{ name: "n8k2L0-1v1", form: seed("trees/n2mhv-8-leg-3.json") }];
    const { report } = checkForm(form, { seed: "rotation", accepted });
    expect(report).toMatchObject({ verdict: "agrees", terms: 20 });
    expect(report.marks.cyclic).toMatchObject({ state: "holds", manifest: false });
    expect(report.comparisons.map((c) => c.with)).toEqual(
      expect.arrayContaining(["on-shell recursion", "vertex expansion", "n8k2L0-1v1"]),
    );
  });

  it("of one loop, (6,1), agrees with two lineages of truth", () => {
    const { report } = checkForm(derived(6, 1, 1, 3), { seed: "rotation" });
    expect(report).toMatchObject({ verdict: "agrees", terms: 16 });
    expect(new Set(report.comparisons.map((c) => c.lineage)).size).toBeGreaterThanOrEqual(2);
  });
});

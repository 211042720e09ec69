import { describe, expect, it } from "vitest";
import { type AcceptedForm, checkForm } from "../../../engine/checks";
import { type Form, readEntryValue } from "../../../engine/notation";
import { published } from "../../support/forms";

function entry(
  notation: string,
  n: number | { from: number; to?: number },
  k: number,
  loops = 0,
  more: Record<string, unknown> = {},
): Form {
  const form = readEntryValue({ amplitude: { n, k, loops }, notation, ...more });
  if (!form.ok) throw new Error(form.diagnostics.map((d) => d.message).join("\n"));
  return form.value;
}
const report = (form: Form, accepted: AcceptedForm[] = []) => checkForm(form, { seed: "test", accepted }).report;

describe("the check agrees with published forms", () => {
  it.each([
    ["1008.2958: six-leg NMHV", entry(published.nmhv6, 6, 1)],
    ["0807.1095: NMHV for every n", entry(published.nmhv, { from: 5, to: 8 }, 1)],
    ["1009.1854: vertex expansion", entry(published.vertex, 7, 1)],
    ["1008.2958: one loop by recursion", entry(published.kermits, 6, 0, 1)],
    ["1012.6032: chiral pentagons", entry(published.pentagons, 5, 0, 1)],
    ["1012.6032: double pentagons", entry(published.doublePentagons, 4, 0, 2)],
    // Phys. Rev. Lett. 56 (1986) 2459
    [
      "MHV gluons for every n",
      entry("<1 2>^4 / prod(i : 1 <= i <= n) <i i+1>", { from: 4, to: 7 }, 0, 0, { component: { minus: [1, 2] } }),
    ],
    ["conjugate MHV gluons", entry("[4 5]^4 / ([1 2][2 3][3 4][4 5][5 1])", 5, 1, 0, { component: "---++" })],
  ])("%s", (_, form) => {
    const found = report(form);
    expect(found.verdict).toBe("agrees");
    expect(found.comparisons.length).toBeGreaterThan(0);
    for (const c of found.comparisons) {
      expect(c.agrees).toBe(true);
      expect(c.primes).toBeGreaterThanOrEqual(2);
      expect(Number(c.bound?.slice(3))).toBeGreaterThanOrEqual(100);
    }
  });

  it("and finds the symmetries true and not manifest, as 1008.2958 says of recursion terms", () => {
    const { marks } = report(entry(published.nmhv6, 6, 1));
    expect(marks.cyclic).toMatchObject({ state: "holds", manifest: false });
    expect(marks.localPoles?.state).toBe("fails");
    expect(report(entry(published.vertex, 6, 1)).marks.cyclic).toMatchObject({ state: "holds", manifest: true });
  });

  it("at every n of a range and says which", () => {
    const found = report(entry(published.nmhv, { from: 5 }, 1));
    expect(found.range).toEqual([5, 6, 7, 8, 9, 10]);
    expect(found).toMatchObject({ verdict: "agrees", at: 6, terms: 3 });
  });
});

describe("the check refuses", () => {
  const wrong: readonly (readonly [string, Form, object])[] = [
    ["an overall sign", entry("-[1 2 3 4 5]", 5, 1), { code: "constant-factor", factor: "-1" }],
    [
      "a factor that floating point would not see",
      entry(`1${"0".repeat(29)}1/1${"0".repeat(30)} [1 2 3 4 5]`, 5, 1),
      { code: "constant-factor" },
    ],
    ["one sign", entry("[1 2 3 4 5] - [1 2 3 5 6] + [1 3 4 5 6]", 6, 1), { code: "terms", negate: [1] }],
    ["a term too many", entry(`${published.nmhv6} + [1 2 3 4 6]`, 6, 1), { code: "terms", remove: [3] }],
    ["a form of fewer legs", entry(published.nmhv6, 7, 1), { code: "other-amplitude", key: "n6k1L0" }],
    [
      "a bracket too many",
      entry("[1 2 3 4 5] <1 2 3 4>", 5, 1),
      { code: "bracket-factor", bracket: "<1 2 3 4>", power: 1 },
    ],
    ["summands of different weight", entry("[1 2 3 4 5] + <1 2 3 4>[1 2 3 5 6]", 6, 1), { code: "weight", label: "1" }],
    [
      "a missing vertex diagram",
      entry("sum(i, j : 1 <= i, i+1 < j < n) [* i i+1 j j+1]", 6, 1),
      { code: "reference-dependent" },
    ],
    // 1008.2958: each spurious pole of the three-term form stands in two terms, so that one term alone cannot cancel it.
    [
      "a missing term",
      entry("[1 2 3 4 5] + [1 2 3 5 6]", 6, 1),
      { code: "spurious-pole", brackets: ["<1 3 4 5>", "<1 3 5 6>"], terms: [0, 1] },
    ],
    [
      "a rotated component",
      entry("<2 3>^4 / (<1 2><2 3><3 4><4 5><5 1>)", 5, 0, 0, { component: "--+++" }),
      { code: "relabelled", shift: 4, reflected: false },
    ],
    ["exchanged labels", entry("[1 2 3 5 4] + [1 2 3 4 6] + [1 3 5 4 6]", 6, 1), { code: "relabelled" }],
    [
      "the other convention",
      entry("-[4 5]^4 / ([1 2][2 3][3 4][4 5][5 1])", 5, 1, 0, { component: "---++" }),
      { code: "other-convention" },
    ],
    [
      "a sum over the loop lines taken twice",
      entry(`sym(${published.doublePentagons})`, 4, 0, 2),
      { code: "constant-factor", factor: "2" },
    ],
    [
      "dependence on the points of a line",
      entry("<1 2 3 4>^2 <A 1 2 3><B 1 2 4> / (<AB 1 2>^2 <AB 2 3><AB 3 4><AB 1 4> <1 2 3 4>)", 4, 0, 1),
      {},
    ],
    ["zero", entry("[1 2 3 4 5] - [1 2 3 4 5]", 6, 1), {}],
  ];
  it.each(wrong)("%s", (_, form, finding) => {
    const found = report(form);
    expect(found.verdict).toBe("disagrees");
    if (Object.keys(finding).length > 0) expect(found.diagnosis).toContainEqual(expect.objectContaining(finding));
  });

  it("a form that is right modulo 2^31-1 and modulo 2^61-1 (DATA rule 5)", () => {
    const form = entry(`${published.nmhv6} + ${(2n ** 31n - 1n) * (2n ** 61n - 1n)} [1 2 3 4 6]`, 6, 1);
    expect(report(form).verdict).toBe("disagrees");
    // Its public fingerprint, modulo 2^61-1, is that of the right form: an index, never a reason.
    expect(report(form).fingerprint).toBe(report(entry(published.nmhv6, 6, 1)).fingerprint);
  });
});

describe("the check", () => {
  it("calls a denominator that is zero everywhere unreadable and names it", () => {
    const notation = "sum(i, j : 1 < i, i+1 < j <= n) [1 i i+1 j j+1]";
    const found = report(entry(notation, 6, 1));
    expect(found.verdict).toBe("unreadable");
    expect(found.diagnostics[0]).toMatchObject({ code: "denominator-vanishes" });
    const [start, end] = found.diagnostics[0]?.span ?? [0, 0];
    expect(notation.slice(start, end)).toContain("[1 i i+1 j j+1]");
  });

  it("compares with accepted forms, and with them alone where there is no source", () => {
    const six: AcceptedForm = { name: "n6k1L0-1v1", form: entry(published.nmhv6, 6, 1) };
    const found = report(entry("(1/2) cyc([1 2 3 4 5])", 6, 1), [
      six,
      { name: "n5k1L0-1v1", form: entry("[1 2 3 4 5]", 5, 1) },
    ]);
    expect(found.comparisons.map((c) => c.with)).toContain("n6k1L0-1v1");
    expect(found.comparisons.map((c) => c.with)).not.toContain("n5k1L0-1v1");
    const alone = checkForm(entry(published.nmhv6, 6, 1), { seed: "test", sources: [] });
    expect(alone.report).toMatchObject({ verdict: "undecided", reason: "nothing-to-compare", comparisons: [] });
  });

  it("refuses where there is nothing to compare with and a property of every amplitude fails", () => {
    const lopsided = checkForm(entry("[1 2 3 4 5] + [1 2 3 5 6]", 6, 1), { seed: "test", sources: [] });
    expect(lopsided.report.verdict).toBe("disagrees");
    expect(lopsided.report.marks.cyclic?.state).toBe("fails");
  });

  it("is a pure function of form and seed", () => {
    const form = entry(published.nmhv6, 6, 1);
    expect(JSON.stringify(checkForm(form, { seed: "a" }))).toBe(JSON.stringify(checkForm(form, { seed: "a" })));
    const primes = (seed: string) => checkForm(form, { seed }).evidence[0]?.samples.map((s) => s.prime);
    expect(primes("a")).not.toEqual(primes("b"));
  });

  it("stops when it is cancelled", () => {
    expect(() => checkForm(entry(published.nmhv6, 6, 1), { seed: "a", cancelled: () => true })).toThrow("cancelled");
  });
});

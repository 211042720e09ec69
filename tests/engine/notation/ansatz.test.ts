import { describe, expect, it } from "vitest";
import { parse } from "../../../engine/notation/parse";

const said = (text: string): string[] => {
  const parsed = parse(text, { ansatz: true });
  return parsed.ok ? [] : parsed.diagnostics.map(({ code, span, message }) => `${code} ${span} ${message}`);
};

describe("an ansatz", () => {
  it.each([
    ["?a [1 2 3 4 5] + ?b [1 2 3 5 6] - [1 3 4 5 6]"],
    ["sum(i, j : 1 < i, i+1 < j < n) ?c(i,j-i) [1 i i+1 j j+1]"],
    ["let f = ?a + 1; cyc(f [1 2 3 4 5]) / 2"],
    ["?a ([1 2 3 4 5] + 1)"],
  ])("may be %s", (text) => {
    expect(said(text)).toEqual([]);
    expect(parse(text).ok).toBe(false);
  });

  it.each([
    ["?a ?b", ["not-linear 0,5 Two factors of a product hold unknowns."]],
    ["1 / (1 + ?a)", ["not-linear 5,11 A denominator holds an unknown."]],
    ["?a^2", ["not-linear 0,4 A power holds an unknown."]],
    ["prod(i : 1 <= i <= n) ?a(i)", ["not-linear 0,27 A product over indices holds an unknown."]],
    ["let f = ?a; f f", ["not-linear 12,15 Two factors of a product hold unknowns."]],
    [
      "? a",
      ["expected-name 0,1 After ? comes the name of an unknown: ?a.", "unknown-name 2,3 Nothing here is called a."],
    ],
  ])("may not be %s", (text, expected) => {
    expect(said(text)).toEqual(expected);
  });
});

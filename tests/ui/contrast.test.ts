/** Contrast of the colour tokens by the formula of WCAG 2.2 (relative luminance, contrast ratio), for both schemes. */
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";

const css = readFileSync(new URL("../../app/_ui/tokens.css", import.meta.url), "utf8");

/** The colours that a block of the style sheet defines. */
function colours(block: string): Map<string, string> {
  return new Map(
    [...block.matchAll(/--([a-z-]+): (#[0-9a-f]{6});/g)].map(([, name, value]) => [name ?? "", value ?? ""]),
  );
}

const darkAt = css.indexOf("prefers-color-scheme: dark");
const light = colours(css.slice(0, darkAt));
const dark = colours(css.slice(darkAt, css.indexOf("@media print")));

function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const channel = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [low, high] = [luminance(a), luminance(b)].sort((x, y) => x - y) as [number, number];
  return (high + 0.05) / (low + 0.05);
}

it("computes the ratios that WCAG gives: black on white is 21, #767676 on white just passes 4.5", () => {
  expect(contrast("#000000", "#ffffff")).toBeCloseTo(21, 5);
  expect(contrast("#767676", "#ffffff")).toBeGreaterThanOrEqual(4.5);
  expect(contrast("#777777", "#ffffff")).toBeLessThan(4.5);
});

describe.each([
  ["light", light],
  ["dark", dark],
])("%s", (_scheme, tokens) => {
  const of = (name: string): string => {
    const value = tokens.get(name);
    if (value === undefined) throw new Error(`no colour named ${name}`);
    return value;
  };

  it.each(["ink", "ink-soft", "link", "link-strong", "fault", "word", "number", "name", "comment"])(
    "%s can be read on paper and on sunk paper",
    (name) => {
      expect(contrast(of(name), of("paper"))).toBeGreaterThanOrEqual(4.5);
      expect(contrast(of(name), of("paper-sunk"))).toBeGreaterThanOrEqual(4.5);
    },
  );

  it.each(["mark", "fault-wash"])("ink and coloured words can be read on %s", (ground) => {
    for (const name of ["ink", "ink-soft", "word", "name", "number"]) {
      expect(contrast(of(name), of(ground))).toBeGreaterThanOrEqual(4.5);
    }
  });

  it("paper can be read on the colour of a button", () => {
    for (const ground of ["link", "link-strong", "ink-soft"]) {
      expect(contrast(of("paper"), of(ground))).toBeGreaterThanOrEqual(4.5);
    }
  });

  it("borders of fields and the mark of focus stand out by 3 : 1", () => {
    expect(contrast(of("rule-strong"), of("paper"))).toBeGreaterThanOrEqual(3);
    expect(contrast(of("link"), of("paper"))).toBeGreaterThanOrEqual(3);
  });
});

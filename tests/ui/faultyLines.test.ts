import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { faultyLines } from "../../app/_ui/faultyLines";

const fault = (from: number, to: number, code = "x") => ({ code, message: code, span: [from, to] as const });

describe("faulty lines", () => {
  it("cuts a line at its faults and points at them from below", () => {
    const { lines, unplaced } = faultyLines("[1 2]\n+ <AB12> x", [fault(8, 14)]);
    expect(unplaced).toEqual([]);
    expect(lines).toEqual([
      {
        number: 2,
        pieces: [
          { text: "+ ", faulty: false, at: 0 },
          { text: "<AB12>", faulty: true, at: 2 },
          { text: " x", faulty: false, at: 8 },
        ],
        pointers: "  ^^^^^^  ",
        diagnostics: [{ diagnostic: fault(8, 14), column: 3 }],
      },
    ]);
  });

  it("points behind the end of the text where something is missing", () => {
    const { lines } = faultyLines("1 +", [fault(3, 3)]);
    expect(lines[0]?.pointers).toBe("   ^");
    expect(lines[0]?.diagnostics[0]?.column).toBe(4);
  });

  it("shows an excerpt of a very long line", () => {
    const source = `${"1+".repeat(500_000)}?${"+1".repeat(500_000)}`;
    const { lines } = faultyLines(source, [fault(1_000_000, 1_000_001)]);
    const text = lines[0]?.pieces.map((piece) => piece.text).join("") ?? "";
    expect(text.length).toBeLessThan(200);
    expect(lines[0]?.pieces.filter((piece) => piece.faulty).map((piece) => piece.text)).toEqual(["?"]);
    expect(lines[0]?.pointers.indexOf("^")).toBe(text.indexOf("?"));
  });

  it("keeps diagnostics without a place apart", () => {
    const lost = { code: "field-n", message: "m" };
    expect(faultyLines("1", [lost])).toEqual({ lines: [], unplaced: [lost] });
  });

  it("gives back every short line whole, with as many pointers as faulty characters, for any text and spans", () => {
    const text = fc.array(fc.constantFrom("a", "<", " ", "\n", "⟨"), { maxLength: 60 }).map((list) => list.join(""));
    const spans = fc.array(fc.tuple(fc.nat(70), fc.nat(8)), { minLength: 1, maxLength: 6 });
    fc.assert(
      fc.property(text, spans, (source, places) => {
        const { lines } = faultyLines(
          source,
          places.map(([from, length]) => fault(from, from + length)),
        );
        const all = source.split("\n");
        for (const line of lines) {
          expect(line.pieces.map((piece) => piece.text).join("")).toBe(all[line.number - 1]);
          const marked = line.pieces.filter((piece) => piece.faulty).reduce((sum, piece) => sum + piece.text.length, 0);
          const pointed = [...line.pointers].filter((character) => character === "^").length;
          expect(pointed === marked || pointed === marked + 1).toBe(true);
        }
        expect(lines.reduce((sum, line) => sum + line.diagnostics.length, 0)).toBe(places.length);
      }),
    );
  });
});

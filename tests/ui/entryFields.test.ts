import { describe, expect, it } from "vitest";
import { emptyFields, entryOf, exampleFields, readFields } from "../../app/_ui/editor/entryFields";
import { readEntryValue } from "../../engine/notation";

const base = { ...emptyFields, n: "6", k: "1", notation: "[1 2 3 4 5]" };

describe("entry document of the fields", () => {
  it("holds only what was filled in", () => {
    expect(entryOf(base)).toEqual({
      entry: { amplitude: { n: 6, k: 1, loops: 0 }, notation: "[1 2 3 4 5]" },
      diagnostics: [],
    });
  });

  it.each([
    ["7", 7],
    [" 12 ", 12],
    ["5..", { from: 5 }],
    ["5..12", { from: 5, to: 12 }],
    ["5 .. 12", { from: 5, to: 12 }],
  ])("reads %s legs", (n, expected) => {
    expect(entryOf({ ...base, n }).entry.amplitude).toEqual({ n: expected, k: 1, loops: 0 });
  });

  it.each([
    ["--+-++", "--+-++"],
    ["− − + + + +", "--++++"],
    ["1, 2", { minus: [1, 2] }],
    ["1 3", { minus: [1, 3] }],
  ])("reads the component %s", (component, expected) => {
    expect(entryOf({ ...base, component }).entry.component).toEqual(expected);
  });

  it.each([
    ["1008.2958 section 2", { arxiv: "1008.2958", where: "section 2" }],
    ["arXiv:0807.1095v3, equation (5)", { arxiv: "0807.1095", where: "equation (5)" }],
    ["hep-th/0505205", { arxiv: "hep-th/0505205" }],
    ["https://doi.org/10.1016/0550-3213(88)90442-7 (2.5)", { doi: "10.1016/0550-3213(88)90442-7", where: "(2.5)" }],
    ["Nucl. Phys. B306 (1988) 759", { journal: "Nucl. Phys. B306 (1988) 759" }],
  ])("reads the reference %s", (line, expected) => {
    expect(entryOf({ ...base, references: `\n${line}\n` }).entry.references).toEqual([expected]);
  });

  it.each([
    [{ n: "" }, ["field-n"], "The field n is empty."],
    [{ n: "six" }, ["field-n"], "The field n holds “six”, which is no number of legs."],
    [{ n: "6.5" }, ["field-n"], "The field n holds “6.5”, which is no number of legs."],
    [{ k: "-1" }, ["field-k"], "The field k holds “-1”, which is not a whole number."],
    [{ loops: "" }, ["field-loops"], "The field loops is empty."],
    [
      { component: "+0-" },
      ["field-component"],
      "The field for the component holds “+0-”, which is neither signs nor legs.",
    ],
  ])("says what it cannot read: %o", (changed, codes, message) => {
    const { diagnostics } = entryOf({ ...base, ...changed });
    expect(diagnostics.map((diagnostic) => diagnostic.code)).toEqual(codes);
    expect(diagnostics[0]?.message).toBe(message);
  });

  it("makes of the example a document that the engine reads", () => {
    expect(readEntryValue(entryOf(exampleFields).entry).ok).toBe(true);
  });

  it("takes only known fields from a form, with one kind of line end", () => {
    const given: Record<string, string> = { n: "6", notation: "1\r\n+ 2", other: "x" };
    expect(readFields((name) => given[name])).toEqual({ ...emptyFields, n: "6", notation: "1\n+ 2" });
  });
});

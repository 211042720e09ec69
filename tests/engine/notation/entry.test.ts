import { describe, expect, it } from "vitest";
import { digestOf } from "../../../engine/notation/digest";
import {
  amplitudeKey,
  entryOf,
  entrySchema,
  type Form,
  readEntry,
  readEntryValue,
  sizesOf,
} from "../../../engine/notation/entry";

const entry = { amplitude: { n: 6, k: 1, loops: 0 }, notation: "[1 2 3 4 5] + [1 2 3 5 6] + [1 3 4 5 6]" };
const mhv = {
  amplitude: { n: { from: 4 }, k: 0, loops: 0 },
  notation: "<1 2>^4 / prod(i : 1 <= i <= n) <i i+1>",
  component: { minus: [1, 2] },
};

function form(value: unknown): Form {
  const read = readEntryValue(value);
  if (!read.ok) throw new Error(read.diagnostics.map(({ message }) => message).join(" "));
  return read.value;
}

const said = (value: unknown): string[] => {
  const read = typeof value === "string" ? readEntry(value) : readEntryValue(value);
  return read.ok
    ? []
    : read.diagnostics.map(({ code, span, message }) => `${code}${span === undefined ? "" : ` ${span}`} ${message}`);
};

describe("an entry document", () => {
  it("is read with its defaults filled in", () => {
    const { formula, ...rest } = form(entry);
    expect(formula.expression.kind).toBe("add");
    expect(rest).toEqual({
      amplitude: { n: 6, k: 1, loops: 0 },
      component: null,
      target: "amplitude",
      squareSign: 1,
      notation: entry.notation,
      title: null,
      method: null,
      references: [],
      note: null,
    });
    expect(amplitudeKey(form(entry))).toBe("n6k1L0");
    expect(amplitudeKey(form(mhv))).toBe("nXk0L0");
    expect(form(mhv).amplitude.n).toEqual({ from: 4, to: null });
    expect(form({ ...entry, s: "<ab>[ba]", component: "---+++" })).toMatchObject({
      squareSign: -1,
      component: [1, 2, 3],
    });
  });

  it("is written back as the same form", () => {
    const full = {
      ...mhv,
      title: "MHV",
      method: "closed form",
      target: "zero",
      s: "<ab>[ba]",
      note: "n",
      references: [{ arxiv: "1008.2958", where: "section 2" }],
    };
    expect(form(entryOf(form(full)))).toEqual(form(full));
    expect(entryOf(form(full))).toEqual(full);
  });

  it("tells which n are checked", () => {
    expect(sizesOf(form(entry), 9)).toEqual([6]);
    expect(sizesOf(form(mhv), 6)).toEqual([4, 5, 6, 7]);
    expect(sizesOf(form(mhv), 9)).toEqual([4, 5, 6, 7, 8, 9]);
    expect(sizesOf(form({ ...mhv, amplitude: { n: { from: 4, to: 5 }, k: 0, loops: 0 } }), 9)).toEqual([4, 5]);
    expect(sizesOf(form({ ...mhv, amplitude: { n: { from: 63 }, k: 0, loops: 0 } }), 9)).toEqual([63, 64]);
  });

  it.each([
    ["n = 3", { ...entry, amplitude: { n: 3, k: 0, loops: 0 } }, "amplitude-legs"],
    ["n = 65", { ...entry, amplitude: { n: 65, k: 0, loops: 0 } }, "limit-legs"],
    ["a range to 65", { ...mhv, amplitude: { n: { from: 4, to: 65 }, k: 0, loops: 0 } }, "limit-legs"],
    ["a long notation", { ...entry, notation: " ".repeat(2_000_001) }, "limit-source"],
    ["a fraction for n", { ...entry, amplitude: { n: 5.5, k: 0, loops: 0 } }, "amplitude-legs"],
    ["a text for n", { ...entry, amplitude: { n: "6", k: 0, loops: 0 } }, "amplitude-legs"],
    ["an empty range", { ...mhv, amplitude: { n: { from: 8, to: 5 }, k: 0, loops: 0 } }, "amplitude-range"],
    ["k beyond n-4", { ...entry, amplitude: { n: 6, k: 3, loops: 0 } }, "amplitude-degree"],
    [
      "k beyond the smallest n-4",
      { ...entry, amplitude: { n: { from: 5, to: 9 }, k: 2, loops: 0 }, notation: "1" },
      "amplitude-degree",
    ],
    ["negative k", { ...entry, amplitude: { n: 6, k: -1, loops: 0 } }, "amplitude-degree"],
    ["negative loops", { ...entry, amplitude: { n: 6, k: 1, loops: -1 } }, "amplitude-loops"],
    ["five loops", { ...entry, amplitude: { n: 6, k: 1, loops: 5 } }, "limit-loops"],
    ["no notation", { amplitude: entry.amplitude }, "entry-missing"],
    ["no amplitude", { notation: "1" }, "entry-missing"],
    ["no k", { ...entry, amplitude: { n: 6, loops: 0 } }, "entry-missing"],
    ["an unknown field", { ...entry, colour: "red" }, "entry-unknown-field"],
    ["an unknown field of the amplitude", { ...entry, amplitude: { ...entry.amplitude, p: 1 } }, "entry-unknown-field"],
    ["an unknown target", { ...entry, target: "odd" }, "entry-value"],
    ["a list for a target", { ...entry, target: ["even"] }, "entry-value"],
    ["a number for a title", { ...entry, title: 7 }, "entry-type"],
    ["a long title", { ...entry, title: "x".repeat(301) }, "entry-value"],
    ["half a surrogate pair in the title", { ...entry, title: "\ud800" }, "json-text"],
    ["NUL in a reference", { ...entry, references: [{ doi: "a\0b" }] }, "json-text"],
    ["a reference to nothing", { ...entry, references: [{ title: "x" }] }, "entry-value"],
    ["too few minus signs", { ...entry, component: "--++++" }, "component-count"],
    ["too few helicities", { ...entry, component: "---++" }, "component-legs"],
    ["a helicity 0", { ...entry, component: "---++0" }, "component-legs"],
    ["a word for a range", { ...mhv, component: "--++" }, "component-legs"],
    ["a leg beyond the smallest n", { ...mhv, component: { minus: [1, 5] } }, "component-legs"],
    ["a leg twice", { ...mhv, component: { minus: [1, 1] } }, "component-legs"],
    ["null", null, "entry-type"],
    ["a list", [], "entry-type"],
  ])("refuses %s", (_, value, code) => {
    expect(said(value).map((line) => line.split(" ")[0])).toContain(code);
  });

  it.each([
    ["{", "json-syntax"],
    ["", "json-syntax"],
    ["\ufeff{}", "json-syntax"],
    ["[".repeat(100_000), "json-syntax"],
    ["[".repeat(5_000) + "]".repeat(5_000), "entry-type"],
    ["null", "entry-type"],
  ])("refuses the text %.12s", (text, code) => {
    expect(said(text).map((line) => line.split(" ")[0])).toEqual([code]);
  });

  it("tells faults of the notation with their places, those of syntax and of the amplitude together", () => {
    expect(said({ ...entry, notation: "[1 2 3 4 9] + foo" })).toEqual([
      "label-beyond 9,10 There is no label 9 among 6 legs.",
      "unknown-name 14,17 Nothing here is called foo.",
    ]);
    expect(said({ ...entry, amplitude: { n: 6, k: 3, loops: 0 }, notation: "[1 2" })).toEqual([
      "amplitude-degree There is no amplitude with n = 6 and k = 3: k is at most n-4.",
      "unclosed 0,4 This bracket is not closed: ] is missing.",
    ]);
  });

  it("is checked at several n where its range is open", () => {
    expect(said({ ...mhv, notation: "2^(200*n)" })).toEqual([
      "limit-exponent 3,8 This exponent is 1200 at n = 6; an exponent is at most 1,000 in size.",
      "limit-exponent 3,8 This exponent is 1400 at n = 7; an exponent is at most 1,000 in size.",
    ]);
  });

  it("has a JSON Schema that allows no other fields", () => {
    const schema = entrySchema();
    expect(schema.$schema).toBe("https://json-schema.org/draft/2020-12/schema");
    const entrySchemaItself = (schema.$defs as Record<string, { required: string[]; additionalProperties: boolean }>)
      .Entry;
    expect(schema.$ref).toBe("#/$defs/Entry");
    expect(entrySchemaItself).toMatchObject({ required: ["amplitude", "notation"], additionalProperties: false });
  });
});

describe("the digest", () => {
  const digest = (changes: object): string => digestOf(form({ ...entry, ...changes }));

  it("is that of the canonical JSON of the content, as sha256sum gives it", () => {
    // printf %s '{"component":null,"k":0,"loops":0,"n":4,"s":"<ab>[ab]","schema":"equiform-form-1","target":"amplitude",
    //   "tree":{"definitions":[],"expression":{"kind":"integer","value":"1"}}}' (on one line) | sha256sum
    expect(digestOf(form({ amplitude: { n: 4, k: 0, loops: 0 }, notation: "1" }))).toBe(
      "sha256:8916ac18c6bb7a597ad7f95a35dbc38879bed797caa9fb4d8207969f9d93532d",
    );
  });

  it("does not see spaces, comments, titles, or how a component is written", () => {
    const first = digest({});
    expect(first).toMatch(/^sha256:[0-9a-f]{64}$/);
    expect(
      digest({
        notation: `# three terms\n ${entry.notation.replaceAll(" ", "  ")}`,
        title: "T",
        note: "N",
        method: "M",
      }),
    ).toBe(first);
    expect(digest({ component: "--+-++" })).toBe(digest({ component: { minus: [4, 2, 1] } }));
    expect(digest({ s: "<ab>[ab]", target: "amplitude" })).toBe(first);
  });

  it("sees everything else", () => {
    const digests = [
      digest({}),
      digest({ amplitude: { n: 7, k: 1, loops: 0 } }),
      digest({ amplitude: { n: 6, k: 2, loops: 0 } }),
      digest({ amplitude: { n: 6, k: 1, loops: 1 } }),
      digest({ amplitude: { n: { from: 6, to: 6 }, k: 1, loops: 0 } }),
      digest({ amplitude: { n: { from: 6 }, k: 1, loops: 0 } }),
      digest({ target: "zero" }),
      digest({ s: "<ab>[ba]" }),
      digest({ component: "---+++" }),
      digest({ component: "--+-++" }),
      digest({ notation: "[1 2 3 5 6] + [1 2 3 4 5] + [1 3 4 5 6]" }),
      digest({ notation: `let f = 1; ${entry.notation}` }),
    ];
    expect(new Set(digests).size).toBe(digests.length);
  });
});

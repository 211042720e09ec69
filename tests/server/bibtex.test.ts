/** BibTeX entries: whatever a title holds, the entry stays one entry with balanced braces (read back by a small reader of the format). */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { FormView } from "../../app/_contract";
import { bibtexOf, escapeBibtex } from "../../app/_server/citations/bibtex";

const form = (more: Partial<FormView> = {}): FormView => ({
  kind: "form",
  id: "n6k1L0-3",
  version: "n6k1L0-3v2",
  no: 2,
  state: "accepted",
  amplitude: { key: "n6k1L0", n: 6, range: null, k: 1, loops: 0 },
  component: null,
  target: "amplitude",
  s: "<ab>[ab]",
  title: "Three terms",
  notation: "[1 2 3 4 5]",
  latex: [],
  method: null,
  note: null,
  references: [],
  digest: "sha256:00ff",
  terms: 3,
  check: "a".repeat(26),
  report: null,
  hasCertificate: true,
  equalForms: [],
  versions: [],
  group: { id: "local", name: "Local group" },
  visibility: "public",
  createdAt: "2026-03-09T10:00:00.000Z",
  ...more,
});

/** Reads one entry as BibTeX does: `@type{key, name = {value}, ...}`, braces matched, a backslash before a brace not hiding it. */
function readEntry(text: string): { key: string; fields: Map<string, string> } {
  const head = /^@misc\{([^,\s]+),\n/.exec(text);
  if (!head) throw new Error("no head");
  const fields = new Map<string, string>();
  let at = head[0].length;
  for (;;) {
    const name = /^\s*(\w+) = \{/.exec(text.slice(at));
    if (!name) break;
    at += name[0].length;
    const start = at;
    for (let depth = 1; depth > 0; at++) {
      if (at >= text.length) throw new Error("unbalanced");
      if (text[at] === "{") depth++;
      if (text[at] === "}") depth--;
    }
    fields.set(name[1] as string, text.slice(start, at - 1));
    if (text[at] === ",") at++;
  }
  expect(text.slice(at)).toBe("\n}\n");
  return { key: head[1] as string, fields };
}

describe("a BibTeX entry", () => {
  it("names version, address, year and the papers it follows", () => {
    const references = [{ arxiv: "1008.2958", where: "section 2" }, { doi: "10.1000/x_y" }];
    const { key, fields } = readEntry(bibtexOf(form({ references }), "https://forms.example"));
    expect(key).toBe("n6k1L0-3v2");
    expect(Object.fromEntries(fields)).toEqual({
      title: "{Three terms}",
      author: "{Local group}",
      howpublished: "Equiform, library of amplitude forms",
      year: "2026",
      month: "3",
      version: "n6k1L0-3v2",
      url: "https://forms.example/n6k1L0-3v2",
      note: "n6k1L0-3v2, sha256:00ff; formula after arXiv:1008.2958, section 2; doi:10.1000/x\\_y",
    });
  });

  it("escapes what TeX would take for itself", () => {
    expect(escapeBibtex('50% of $x_1^2$ & {#1} ~\\ "q"\n<a>')).toBe(
      "50\\% of \\$x\\_1\\textasciicircum{}2\\$ \\& \\textbraceleft{}\\#1\\textbraceright{} \\textasciitilde{}\\textbackslash{} {''}q{''} \\textless{}a\\textgreater{}",
    );
  });

  it("stays one entry whatever the title is", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 60 }), (title) => {
        const { fields } = readEntry(bibtexOf(form({ title }), "https://forms.example"));
        expect(fields.size).toBe(8);
        expect(fields.get("title")).not.toMatch(/[\n\r]|(?<!\\)[$&#%_]/);
      }),
    );
  });
});

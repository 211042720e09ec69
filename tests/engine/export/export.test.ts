import katex from "katex";
import { describe, expect, it } from "vitest";
import { exporters } from "../../../engine/export";
import { escapedText } from "../../../engine/export/latex";
import { digestOf, type Form, formulaSchema, readEntryValue, withoutSpans } from "../../../engine/notation";

function form(changes: object = {}): Form {
  const read = readEntryValue({
    amplitude: { n: 6, k: 1, loops: 0 },
    title: "Sum of 100% & more_{1}\n\\input{x}",
    notation: "let r(i,j) = [1 i i+1 j j+1];\nsum(i, j : 1 < i, i+1 < j < n) r(i,j)",
    ...changes,
  });
  if (!read.ok) throw new Error(read.diagnostics.map(({ message }) => message).join(" "));
  return read.value;
}

const write = (name: string, value: Form, snippet = false): string =>
  exporters.find((exporter) => exporter.name === name)!.write(value, { snippet });

describe("export", () => {
  it("lists each language once", () => {
    expect(exporters.map(({ name }) => name)).toEqual(expect.arrayContaining(["latex", "json"]));
    expect(new Set(exporters.map(({ name }) => name)).size).toBe(exporters.length);
  });

  it("writes a LaTeX document in which a title is only text", () => {
    const text = write("latex", form());
    expect(text.split("\n").slice(0, 3)).toEqual([
      "% Sum of 100% & more_{1} \\input{x}",
      "% amplitude n6k1L0, target amplitude",
      `% ${digestOf(form())}`,
    ]);
    expect(text).toContain("\\section*{Sum of 100\\% \\& more\\_\\{1\\} \\textbackslash{}input\\{x\\}}");
    expect(text).toContain(
      "  r(i,j) &= [1\\,i\\,i{+}1\\,j\\,j{+}1] \\\\\n  &\\sum_{\\substack{1<i\\\\ i+1<j<n}} r(i,j)\n",
    );
    expect(text.startsWith("%")).toBe(true);
    expect(text.endsWith("\\end{document}\n")).toBe(true);
  });

  it("writes a snippet that KaTeX sets in strict mode", () => {
    const text = write("latex", form({ title: undefined }), true);
    expect(text).not.toContain("documentclass");
    const body = text.slice(text.indexOf("\\begin{align*}"));
    expect(katex.renderToString(body, { strict: "error", throwOnError: true, displayMode: true })).toContain("katex");
  });

  it("escapes every character that is special in LaTeX", () => {
    const special = "\\{}$&#%_^~<>|";
    const html = katex.renderToString(`\\text{${escapedText("a_b % c & d # e $ f { g }")}}`, {
      strict: "error",
      throwOnError: true,
    });
    expect(html.replaceAll("\u00a0", " ")).toContain("a_b % c &amp; d # e $ f { g }");
    expect(escapedText(special)).toBe(
      "\\textbackslash{}\\{\\}\\$\\&\\#\\%\\_\\textasciicircum{}\\textasciitilde{}\\textless{}\\textgreater{}\\textbar{}",
    );
    expect(escapedText("a\u2028b\u0000c\r\nd")).toBe("a b c d");
  });

  it("writes the syntax tree as JSON that its schema accepts, with the digest", () => {
    const value = form({ component: "---+++", s: "<ab>[ba]" });
    const document = JSON.parse(write("json", value));
    expect(document).toMatchObject({
      digest: digestOf(value),
      component: [1, 2, 3],
      target: "amplitude",
      s: "<ab>[ba]",
      amplitude: { n: 6, k: 1, loops: 0 },
    });
    expect(formulaSchema.safeParse(document.tree).success).toBe(true);
    expect(document.tree).toEqual(withoutSpans(value.formula));
  });
});

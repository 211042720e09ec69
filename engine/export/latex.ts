/** LaTeX: a document that compiles on its own, one summand to a line. */
import { amplitudeKey, digestOf, type Form, latexLines } from "../notation";
import type { Exporter, ExportOptions } from "./exporter";

export const latex: Exporter = {
  name: "latex",
  fileExtension: "tex",
  mediaType: "application/x-tex",
  summary: "a LaTeX document with the formula broken into lines by term",
  write: latexDocument,
};

/** Summands in one `align*`: longer formulas are cut, since TeX sets a display as one box. */
const linesPerDisplay = 30;

function latexDocument(form: Form, { identifier, snippet = false }: ExportOptions = {}): string {
  const definitions = form.formula.definitions.length;
  const lines = latexLines(form.formula).map((line, at) =>
    at < definitions ? line.replace(" = ", " &= ") : `&${line}`,
  );
  const displays: string[] = [];
  for (let start = 0; start < lines.length; start += linesPerDisplay)
    displays.push(display(lines.slice(start, start + linesPerDisplay)));
  const references = form.references.map((r) =>
    [r.title, r.arxiv && `arXiv:${r.arxiv}`, r.journal, r.doi && `doi:${r.doi}`, r.where].filter(Boolean).join(", "),
  );
  const comments = [
    `% ${commentText(form.title ?? "A form of a scattering amplitude")}`,
    `% amplitude ${amplitudeKey(form)}, target ${form.target}${identifier === undefined ? "" : `, form ${identifier}`}`,
    `% ${digestOf(form)}`,
    ...references.map((r) => `% reference: ${commentText(r)}`),
  ];
  if (snippet) return [...comments, ...displays, ""].join("\n");
  return [
    ...comments,
    "\\documentclass{article}",
    "\\usepackage{amsmath}",
    "\\allowdisplaybreaks",
    "\\begin{document}",
    ...(form.title === null ? [] : [`\\section*{${escapedText(form.title)}}`]),
    ...displays,
    "\\end{document}",
    "",
  ].join("\n");
}

const display = (lines: readonly string[]): string =>
  `\\begin{align*}\n${lines.map((line) => `  ${line}`).join(" \\\\\n")}\n\\end{align*}`;

/** Text that cannot leave a comment line. */
const commentText = (text: string): string => text.replace(/[\p{Cc}\u2028\u2029]+/gu, " ");

const special: Readonly<Record<string, string>> = {
  "\\": "\\textbackslash{}",
  "{": "\\{",
  "}": "\\}",
  $: "\\$",
  "&": "\\&",
  "#": "\\#",
  "%": "\\%",
  _: "\\_",
  "^": "\\textasciicircum{}",
  "~": "\\textasciitilde{}",
  "<": "\\textless{}",
  ">": "\\textgreater{}",
  "|": "\\textbar{}",
};

/** Text as text: every character with a meaning in TeX is spelled out. */
export const escapedText = (text: string): string =>
  commentText(text).replace(/[\\{}$&#%_^~<>|]/g, (character) => special[character] ?? character);

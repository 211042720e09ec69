/** KaTeX as every page and the preview use it: no trust, strict, HTML for the eye and MathML for everyone else. */
import katex from "katex";

const options = {
  output: "htmlAndMathml",
  trust: false,
  strict: "error",
  throwOnError: true,
  maxSize: 40,
  maxExpand: 1000,
} as const;

/**
 * HTML of one piece of LaTeX, or null where KaTeX refuses it; the caller then shows the LaTeX itself.
 * A leading sign is set as a binary one, as between the terms of a sum that is broken into lines.
 */
export function renderLatex(latex: string): string | null {
  const source = /^\s*[+-]/.test(latex) ? `{}${latex}` : latex;
  try {
    return katex.renderToString(`\\displaystyle ${source}`, options);
  } catch (error) {
    if (error instanceof katex.ParseError) return null;
    throw error;
  }
}

/** LaTeX of a bracket as the report prints it: `<1 2 (3 4) cap (5 6 7)>`, `<AB 1 2>`, `x2(1 AB)`. */
export function bracketLatex(bracket: string): string {
  return bracket
    .replaceAll(/\bbar\(([^()]*)\)/g, "\\overline{$1}")
    .replaceAll("x2(", "x^2(")
    .replaceAll(/ *\bcap\b */g, "\\cap{}")
    .replaceAll("*", "{\\ast}")
    .replaceAll(" ", "\\,")
    .replaceAll("<", "\\langle ")
    .replaceAll(">", "\\rangle ")
    .replaceAll("|", "\\vert ")
    .trim();
}

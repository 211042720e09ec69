/** Cuts LaTeX into tokens and drops what only sets the appearance. */
import type { Span } from "../result";

/** A command with its backslash, a run of digits, a single character, or a space that separates (`\,`, a blank ...). */
export interface LatexToken {
  readonly kind: "command" | "digits" | "character" | "space";
  readonly text: string;
  readonly span: Span;
}

const spaces: ReadonlySet<string> = new Set([
  "\\,",
  "\\;",
  "\\:",
  "\\!",
  "\\ ",
  "\\quad",
  "\\qquad",
  "\\thinspace",
  "~",
  "&",
  "$",
]);

/** Commands without meaning for the value. `\left.` and `\right.` are dropped with their dot. */
const appearance =
  /^\\(left|right|middle|big|Big|bigg|Bigg|bigl|bigr|Bigl|Bigr|biggl|biggr|Biggl|Biggr|displaystyle|textstyle|scriptstyle|limits|nolimits|nonumber|notag|allowbreak|hfill|phantom|mathrm|mathit|mathbf|mathsf|mathop|operatorname|text|textrm|textit|rm)$/;

/** Commands whose argument in braces is a name of several letters. */
export const naming: ReadonlySet<string> = new Set([
  "\\mathrm",
  "\\mathit",
  "\\mathbf",
  "\\mathsf",
  "\\operatorname",
  "\\text",
  "\\textrm",
  "\\textit",
]);

/** The tokens of a LaTeX text; comments and appearance are left out, commands that name something are kept. */
export function latexTokens(source: string): LatexToken[] {
  const tokens: LatexToken[] = [];
  /** Whether \left or \right came last, whose invisible delimiter is a dot. */
  let afterSide = false;
  const pattern = /%[^\n]*|\\(?:begin|end|label|tag)\s*\{[^{}]*\}|\\[A-Za-z]+|\\[\s\S]|\d+|\s+|[\s\S]/gu;
  for (const match of source.matchAll(pattern)) {
    const text = match[0];
    const span: Span = [match.index, match.index + text.length];
    if (text.startsWith("%") || /^\\(begin|end|label|tag)\b/.test(text)) continue;
    const previous = tokens.at(-1);
    if (text === "." && afterSide) continue;
    afterSide = text === "\\left" || text === "\\right" || (afterSide && /^\s/.test(text));
    if (spaces.has(text) || /^\s/.test(text)) {
      if (previous !== undefined && previous.kind !== "space") tokens.push({ kind: "space", text: " ", span });
    } else if (text.startsWith("\\")) {
      if (!appearance.test(text) || naming.has(text)) tokens.push({ kind: "command", text, span });
    } else if (/^\d/.test(text)) tokens.push({ kind: "digits", text, span });
    else tokens.push({ kind: "character", text, span });
  }
  return tokens;
}

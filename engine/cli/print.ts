/** How results look on a terminal. */
import type { Diagnostic, Report } from "../index";
import type { Call } from "./command";

export function printJson(call: Call, value: unknown): void {
  call.io.stdout.write(`${JSON.stringify(value, null, 1)}\n`);
}

/** Diagnostics with the source line and a mark under the place, as text. */
export function diagnosticsText(diagnostics: readonly Diagnostic[], source: string | null): string {
  return diagnostics
    .map((d) => {
      const lines = [`${d.code}: ${d.message}`];
      if (d.span !== undefined && source !== null) lines.push(...excerpt(source, d.span));
      if (d.help !== undefined) lines.push(`  ${d.help}`);
      if (d.suggestion !== undefined) lines.push(`  Try: ${d.suggestion.replacement}`);
      return lines.join("\n");
    })
    .join("\n");
}

/** A line of more characters than this is cut around the place. */
const widest = 100;

function excerpt(source: string, [start, end]: readonly [number, number]): string[] {
  const lineStart = source.lastIndexOf("\n", Math.max(0, start - 1)) + 1;
  const newline = source.indexOf("\n", start);
  const lineEnd = newline < 0 ? source.length : newline;
  const from = Math.max(lineStart, start - widest / 2);
  const text = source.slice(from, Math.min(lineEnd, from + widest));
  const width = Math.max(1, Math.min(end, from + text.length) - start);
  const number = source.slice(0, start).split("\n").length;
  const margin = `${number} | `;
  return [`  ${margin}${text}`, `  ${" ".repeat(margin.length + start - from)}${"^".repeat(width)}`];
}

/** A report as a person reads it. */
export function reportText(report: Report, source: string | null): string {
  const lines = [report.summary];
  if (report.diagnostics.length > 0)
    lines.push(diagnosticsText(report.diagnostics.map((d) => ({ ...d })) as Diagnostic[], source));
  if (report.amplitude !== undefined) {
    const range =
      report.range !== undefined && report.range.length > 1 ? `, n = ${report.range[0]} to ${report.range.at(-1)}` : "";
    lines.push(
      `  amplitude ${report.amplitude.key}${range}, target ${report.target}, ${report.terms} ${report.terms === 1 ? "term" : "terms"}, ${report.digest}`,
    );
  }
  for (const c of report.comparisons) {
    const at = c.n === undefined ? "" : ` at n = ${c.n}`;
    lines.push(
      `  ${c.agrees ? "agrees with" : "DISAGREES with"} ${c.with}${at}: ${c.points} points, ${c.primes} primes${c.bound === undefined ? "" : `, bound ${c.bound}`}`,
    );
  }
  for (const [code, mark] of Object.entries(report.marks)) {
    if (mark !== undefined && mark.state !== "notApplicable") lines.push(`  ${code}: ${mark.state}. ${mark.evidence}`);
  }
  for (const d of report.diagnosis) lines.push(`  ${d.code}: ${d.message}`);
  return `${lines.join("\n")}\n`;
}

/** Links through a formula too long for one page; nothing where one page holds it. */
export function FormulaPages({ id, lines, from, step }: { id: string; lines: number; from: number; step: number }) {
  if (lines <= step) return null;
  const to = Math.min(from + step, lines);
  return (
    <nav aria-label="Pages of the formula">
      <p>
        Lines {from + 1} to {to} of {lines.toLocaleString("en")}.{" "}
        {from > 0 && <a href={`/${id}?line=${Math.max(1, from + 1 - step)}#formula`}>Earlier lines</a>}{" "}
        {to < lines && <a href={`/${id}?line=${to + 1}#formula`}>Further lines</a>}
      </p>
    </nav>
  );
}

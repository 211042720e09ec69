import styles from "./Formula.module.css";
import { bracketLatex, renderLatex } from "./latex";

/** One piece of LaTeX, rendered; where KaTeX refuses it the LaTeX itself is shown, never nothing. */
export function Latex({ latex, className }: { latex: string; className?: string }) {
  const html = renderLatex(latex);
  if (html === null) return <code className={`${styles.source} ${className ?? ""}`}>{latex}</code>;
  // biome-ignore lint/security/noDangerouslySetInnerHtml: KaTeX escapes what it prints, and trust is off
  return <span className={className} dangerouslySetInnerHTML={{ __html: html }} />;
}

/** A bracket as the report prints it, rendered. */
export function Bracket({ text }: { text: string }) {
  return <Latex latex={bracketLatex(text)} />;
}

/** The first line of a formula, for a table; scrolls in its own box when it is wide. */
export function FormulaLine({ latex, label }: { latex: string; label: string }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard
    <section className={styles.inline} aria-label={label} tabIndex={0}>
      <Latex latex={latex} />
    </section>
  );
}

/** Terms shown before the rest is folded, and in each fold. */
const SHOWN = 12;
const FOLD = 24;

/**
 * A whole formula. `lines` are its definitions and terms in LaTeX (notation's `latexLines`), `first` the number of the first of
 * them among all. The formula breaks between terms; a term wider than the page scrolls in the formula's own box; after a dozen
 * terms the rest is folded.
 */
export function Formula({ lines, label, first = 0 }: { lines: readonly string[]; label: string; first?: number }) {
  const shown = lines.length <= SHOWN + 4 ? lines : lines.slice(0, SHOWN);
  const folds: (readonly string[])[] = [];
  for (let at = shown.length; at < lines.length; at += FOLD) folds.push(lines.slice(at, at + FOLD));
  return (
    <div className={styles.more}>
      <Terms lines={shown} label={label} />
      {folds.map((fold, index) => {
        const from = first + shown.length + index * FOLD + 1;
        return (
          <details key={from}>
            <summary>
              Lines {from} to {from + fold.length - 1}
            </summary>
            <Terms lines={fold} label={`${label}, lines ${from} to ${from + fold.length - 1}`} />
          </details>
        );
      })}
    </div>
  );
}

function Terms({ lines, label }: { lines: readonly string[]; label: string }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard
    <section className={styles.box} aria-label={label} tabIndex={0}>
      <div className={styles.terms}>
        {lines.map((line, index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: terms may repeat and never move
          <Latex key={index} latex={line} className={isDefinition(line) ? styles.definition : styles.term} />
        ))}
      </div>
    </section>
  );
}

/** A definition of the formula stands on a line of its own. */
const isDefinition = (line: string): boolean => /\s(=|:=|\\equiv|\\coloneqq)\s/.test(withoutGroups(line));

/** The line without what stands in braces, so that a condition under a sum is not taken for a definition. */
function withoutGroups(line: string): string {
  let depth = 0;
  let rest = "";
  for (const character of line) {
    if (character === "{") depth++;
    else if (character === "}") depth--;
    else if (depth === 0) rest += character;
  }
  return rest;
}

import type { Diagnostic } from "../../engine/result";
import styles from "./Diagnostics.module.css";
import { type FaultyLine, faultyLines } from "./faultyLines";

/**
 * Faults of a formula as one reads a marked manuscript: each line of the source that has one, the characters underlined
 * and pointed at from below, and beneath it what is wrong and what to do.
 */
export function Diagnostics({ source, diagnostics }: { source: string; diagnostics: readonly Diagnostic[] }) {
  const { lines, unplaced } = faultyLines(source, diagnostics);
  return (
    <div className={styles.list}>
      {lines.map((line) => (
        <Line key={line.number} line={line} />
      ))}
      {unplaced.map((diagnostic, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: the list is made once
        <Message key={index} diagnostic={diagnostic} />
      ))}
    </div>
  );
}

function Line({ line }: { line: FaultyLine }) {
  return (
    <div className={styles.line}>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard */}
      <section className={styles.source} aria-label={`Line ${line.number} of the formula`} tabIndex={0}>
        <pre>
          {line.pieces.map((piece) =>
            piece.faulty ? (
              <mark key={piece.at}>{piece.text}</mark>
            ) : (
              <span key={piece.at}>{piece.text}</span>
            ),
          )}
        </pre>
        <pre aria-hidden="true" className={styles.pointers}>
          {line.pointers}
        </pre>
      </section>
      {line.diagnostics.map(({ diagnostic, column }) => (
        <Message key={`${column} ${diagnostic.code}`} diagnostic={diagnostic} line={line.number} column={column} />
      ))}
    </div>
  );
}

function Message({ diagnostic, line, column }: { diagnostic: Diagnostic; line?: number; column?: number }) {
  return (
    <p className={styles.message}>
      <strong>{diagnostic.message}</strong>
      {diagnostic.help !== undefined && <> {diagnostic.help}</>}
      {diagnostic.suggestion !== undefined && (
        <>
          {" "}
          Perhaps <code>{diagnostic.suggestion.replacement}</code>?
        </>
      )}
      <span className={styles.place}>
        {line !== undefined && ` Line ${line}, column ${column}.`} <a href={`/reference#${diagnostic.code}`}>{diagnostic.code}</a>
      </span>
    </p>
  );
}

import type { Diagnostic, Suggestion } from "../../engine/result";
import styles from "./Diagnostics.module.css";
import { type FaultyLine, faultyLines } from "./faultyLines";

/**
 * Faults of a formula as one reads a marked manuscript: each line of the source that has one, the characters underlined
 * and pointed at from below, and beneath it what is wrong and what to do. `apply`, where given, puts a suggestion into the text.
 */
export function Diagnostics({
  source,
  diagnostics,
  apply,
}: {
  source: string;
  diagnostics: readonly Diagnostic[];
  apply?: (suggestion: Suggestion) => void;
}) {
  const { lines, unplaced } = faultyLines(source, diagnostics);
  return (
    <div className={styles.list}>
      {lines.map((line) => (
        <Line key={line.number} line={line} apply={apply} />
      ))}
      {unplaced.map((diagnostic, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: the list is made once
        <Message key={index} diagnostic={diagnostic} apply={apply} />
      ))}
    </div>
  );
}

type Apply = ((suggestion: Suggestion) => void) | undefined;

function Line({ line, apply }: { line: FaultyLine; apply: Apply }) {
  return (
    <div className={styles.line}>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard */}
      <section className={styles.source} aria-label={`Line ${line.number} of the formula`} tabIndex={0}>
        <pre>
          {line.pieces.map((piece) =>
            piece.faulty ? <mark key={piece.at}>{piece.text}</mark> : <span key={piece.at}>{piece.text}</span>,
          )}
        </pre>
        <pre aria-hidden="true" className={styles.pointers}>
          {line.pointers}
        </pre>
      </section>
      {line.diagnostics.map(({ diagnostic, column }, index) => (
        <Message
          // biome-ignore lint/suspicious/noArrayIndexKey: two faults may share place and code
          key={index}
          diagnostic={diagnostic}
          place={`Line ${line.number}, column ${column}.`}
          apply={apply}
        />
      ))}
    </div>
  );
}

function Message({ diagnostic, place, apply }: { diagnostic: Diagnostic; place?: string; apply: Apply }) {
  const { message, help, suggestion, code } = diagnostic;
  return (
    <div className={styles.message}>
      <p>
        <strong>{message}</strong>
        {help !== undefined && <> {help}</>}
        {suggestion !== undefined && apply === undefined && (
          <>
            {" "}
            Suggested instead: <code>{suggestion.replacement}</code>
          </>
        )}
      </p>
      {suggestion !== undefined && apply !== undefined && (
        <p>
          <button type="button" onClick={() => apply(suggestion)}>
            Put <code>{suggestion.replacement === "" ? "nothing" : suggestion.replacement}</code> there
          </button>
        </p>
      )}
      <p className={styles.place}>
        {place} <a href={`/reference#${code}`}>{code}</a>
      </p>
    </div>
  );
}

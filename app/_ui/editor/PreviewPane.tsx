"use client";

import { memo } from "react";
import formula from "../Formula.module.css";
import { numbered } from "../words";
import styles from "./SubmitForm.module.css";
import type { PreviewState } from "./usePreview";

/** The formula as a paper prints it, while it is typed. */
export const PreviewPane = memo(function PreviewPane({ state }: { state: PreviewState }) {
  const { preview, verdict, tooSlow } = state;
  return (
    <section className={styles.preview} aria-labelledby="preview-head">
      <h3 id="preview-head">As a paper prints it</h3>
      {preview.kind === "formula" ? (
        <>
          {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard */}
          <section className={formula.box} aria-label="Formula" tabIndex={0}>
            <div className={formula.terms}>
              {preview.lines.map((line, index) =>
                line.html === null ? (
                  // biome-ignore lint/suspicious/noArrayIndexKey: terms may repeat
                  <code key={index}>{line.latex}</code>
                ) : (
                  <span
                    // biome-ignore lint/suspicious/noArrayIndexKey: terms may repeat
                    key={index}
                    className={formula.term}
                    // biome-ignore lint/security/noDangerouslySetInnerHtml: KaTeX escapes what it prints, and trust is off
                    dangerouslySetInnerHTML={{ __html: line.html }}
                  />
                ),
              )}
            </div>
          </section>
          <p className={styles.help} aria-live="polite">
            {numbered(preview.terms, "term")} at n = {preview.at}
            {preview.allLines > preview.lines.length &&
              `; ${preview.allLines - preview.lines.length} more lines not shown`}
          </p>
          <p
            className={styles.verdict}
            aria-live="polite"
            data-state={verdict?.state}
            data-milliseconds={verdict?.milliseconds.toFixed(1)}
          >
            {verdict === null
              ? "Looking at a few random points …"
              : `${verdict.message} ${verdict.state === "undecided" ? "" : "Found in this browser; submitting checks it."}`}
          </p>
        </>
      ) : (
        <p className={styles.help}>
          {preview.kind === "empty"
            ? "The rendered formula appears here as you type; this needs script. Submitting does not."
            : "The formula cannot be read yet; what is wrong is said above."}
        </p>
      )}
      {tooSlow && (
        <p className={styles.help}>
          The formula is too long to preview while typing. The server checks it all the same.
        </p>
      )}
    </section>
  );
});

import { CopyButton } from "./CopyButton";
import styles from "./SourceText.module.css";

/** Text to be read as typed (notation, BibTeX, a command), in a box that scrolls, with a way to copy it. */
export function SourceText({ text, label, copy }: { text: string; label: string; copy: string }) {
  return (
    <div className={styles.source}>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard */}
      <section aria-label={label} tabIndex={0} className={styles.box}>
        <pre>{text}</pre>
      </section>
      <CopyButton text={text} what={copy} />
    </div>
  );
}

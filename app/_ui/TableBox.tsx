import type { ReactNode } from "react";
import styles from "./TableBox.module.css";

/** A table in a box of its own that scrolls sideways where the page is narrow. */
export function TableBox({ label, children }: { label: string; children: ReactNode }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard
    <section className={styles.box} aria-label={label} tabIndex={0}>
      <table>{children}</table>
    </section>
  );
}

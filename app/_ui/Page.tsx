import type { ReactNode } from "react";
import styles from "./Page.module.css";

/** One sheet: an opening, then sections one under the other. */
export function Page({ children }: { children: ReactNode }) {
  return <div className={styles.page}>{children}</div>;
}

/** The head of a page: a title, what kind of thing it is above it, and a first sentence below. */
export function Opening({ kicker, title, children }: { kicker?: ReactNode; title: ReactNode; children?: ReactNode }) {
  return (
    <div className={styles.opening}>
      {kicker !== undefined && <p className={styles.kicker}>{kicker}</p>}
      <h1>{title}</h1>
      {children}
    </div>
  );
}

/** The sentence under a title, set larger. */
export function Lead({ children }: { children: ReactNode }) {
  return <p className={styles.lead}>{children}</p>;
}

/** A section whose head hangs in the margin where there is room, or stands above what is `wide`. `id` names it for links. */
export function Section(props: { id: string; head: string; wide?: boolean; children: ReactNode }) {
  const { id, head, wide = false, children } = props;
  return (
    <section className={wide ? `${styles.section} ${styles.broad}` : styles.section} aria-labelledby={id}>
      <h2 id={id}>{head}</h2>
      <div className={styles.body}>{children}</div>
    </section>
  );
}

import styles from "./Page.module.css";

/** Says on every page who can read and write here, until there are accounts. */
export function PageFoot() {
  return (
    <footer className={styles.foot}>
      <p>
        This server is local: it listens on this machine’s loopback address only and has one group and one user. Whoever
        can use this machine can read and submit here.
      </p>
    </footer>
  );
}

import styles from "./Page.module.css";

/** Name of the place and the ways to go; plain links, so that it works without script. */
export function PageHead() {
  return (
    <header className={styles.head}>
      <a className={styles.name} href="/">
        Equiform
      </a>
      <nav aria-label="Main">
        <ul className={styles.ways}>
          <li>
            <a href="/">Amplitudes</a>
          </li>
          <li>
            <a href="/submit">Submit a form</a>
          </li>
          <li>
            <a href="/derive">Derive</a>
          </li>
          <li>
            <a href="/evaluate">Evaluate</a>
          </li>
          <li>
            <a href="/reference">Notation</a>
          </li>
        </ul>
      </nav>
    </header>
  );
}

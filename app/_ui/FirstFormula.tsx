import { exampleFields } from "./editor/entryFields";
import styles from "./FirstFormula.module.css";
import { Latex } from "./Formula";

/** A formula box that already holds a published example; works without script and leads to the submit page. */
export function FirstFormula() {
  return (
    <form action="/submit" method="get" className={styles.first}>
      <p>
        For example the tree amplitude with <i>n</i>&nbsp;=&nbsp;7, <i>k</i>&nbsp;=&nbsp;1 as a sum of R-invariants:
      </p>
      <p className={styles.formula}>
        <Latex latex="\sum_{1<i,\; i+1<j<n} [1\,i\,i{+}1\,j\,j{+}1]" />
      </p>
      <label className="visually-hidden" htmlFor="first-notation">
        Formula in the notation
      </label>
      <textarea
        id="first-notation"
        name="notation"
        rows={3}
        spellCheck={false}
        autoCapitalize="off"
        defaultValue={exampleFields.notation}
      />
      <input type="hidden" name="n" value={exampleFields.n} />
      <input type="hidden" name="k" value={exampleFields.k} />
      <input type="hidden" name="loops" value={exampleFields.loops} />
      <p className={styles.send}>
        <button type="submit">Take it to the editor</button>
        <span>
          Change it first if you like; the <a href="/reference">notation</a> is the field’s own.
        </span>
      </p>
    </form>
  );
}

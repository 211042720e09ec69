import styles from "../editor/SubmitForm.module.css";
import type { DeriveFields } from "./deriveQuery";

const methods = [
  ["recursion", "on-shell recursion"],
  ["vertex", "vertex expansion"],
  ["local", "local integrals"],
] as const;

const directions = [
  ["forward", "towards the leg before"],
  ["backward", "towards the leg after"],
] as const;

/** A plain form whose address can be kept. */
export function DeriveFieldsForm({ fields }: { fields: DeriveFields }) {
  const number = (name: "n" | "k" | "loops" | "leg", label: string, help: string) => (
    <p className={`${styles.field} ${styles.short}`}>
      <label htmlFor={name}>{label}</label>
      <input id={name} name={name} inputMode="numeric" defaultValue={fields[name]} aria-describedby={`${name}-help`} />
      <span id={`${name}-help`} className={styles.help}>
        {help}
      </span>
    </p>
  );
  const choice = (
    name: "method" | "direction",
    label: string,
    help: string,
    options: readonly (readonly [string, string])[],
  ) => (
    <p className={`${styles.field} ${styles.middle}`}>
      <label htmlFor={name}>{label}</label>
      <select id={name} name={name} defaultValue={fields[name]} aria-describedby={`${name}-help`}>
        {options.map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </select>
      <span id={`${name}-help`} className={styles.help}>
        {help}
      </span>
    </p>
  );
  return (
    <form action="/derive" method="get" className={styles.form}>
      <fieldset className={styles.fields}>
        <legend>The amplitude</legend>
        {number("n", "Legs n", "4 to 64")}
        {number("k", "Degree k", "0 to n − 4")}
        {number("loops", "Loops", "0 for a tree")}
      </fieldset>
      <fieldset className={styles.fields}>
        <legend>The method</legend>
        {choice(
          "method",
          "Method",
          "recursion: trees and one loop, every k; vertices: trees with k = 1, one loop with k = 0; local: one and two loops with k = 0",
          methods,
        )}
        {number("leg", "Shifted leg", "n where it is empty")}
        {choice("direction", "Shifted", "leg and direction are of the recursion only", directions)}
      </fieldset>
      <p className={styles.send}>
        <button type="submit">Derive</button>
      </p>
    </form>
  );
}

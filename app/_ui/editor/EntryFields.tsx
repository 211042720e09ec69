"use client";

import type { FieldName, Fields } from "./entryFields";
import styles from "./SubmitForm.module.css";

interface Props {
  readonly fields: Fields;
  readonly change: (name: FieldName, value: string) => void;
  /** Which fields: those that say what the formula is of, or those that say where it comes from. */
  readonly part: "amplitude" | "about";
}

/** The fields around the formula, in the order of a sentence. */
export function EntryFields({ fields, change, part }: Props) {
  const text = (name: FieldName, label: string, help: string, size: string) => (
    <p className={`${styles.field} ${styles[size] ?? ""}`}>
      <label htmlFor={name}>{label}</label>
      <input
        id={name}
        name={name}
        value={fields[name]}
        onChange={(event) => change(name, event.target.value)}
        aria-describedby={`${name}-help`}
        autoComplete="off"
      />
      <span id={`${name}-help`} className={styles.help}>
        {help}
      </span>
    </p>
  );
  const lines = (name: FieldName, label: string, help: string) => (
    <p className={`${styles.field} ${styles.wide}`}>
      <label htmlFor={name}>{label}</label>
      <textarea
        id={name}
        name={name}
        rows={3}
        value={fields[name]}
        onChange={(event) => change(name, event.target.value)}
        aria-describedby={`${name}-help`}
      />
      <span id={`${name}-help`} className={styles.help}>
        {help}
      </span>
    </p>
  );
  const choice = (name: FieldName, label: string, options: readonly (readonly [string, string])[]) => (
    <p className={`${styles.field} ${styles.middle}`}>
      <label htmlFor={name}>{label}</label>
      <select id={name} name={name} value={fields[name]} onChange={(event) => change(name, event.target.value)}>
        {options.map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </select>
    </p>
  );
  if (part === "amplitude") {
    const plain = fields.component === "" && fields.target === "amplitude" && fields.square === "<ab>[ab]";
    return (
      <fieldset className={styles.fields}>
        <legend>The amplitude</legend>
        {text("n", "Legs n", "7, or 5..12, or 5.. for all", "short")}
        {text("k", "Degree k", "0 for MHV, 1 for NMHV", "short")}
        {text("loops", "Loops", "0 for a tree", "short")}
        <details className={styles.rest} open={!plain}>
          <summary>Component, target, convention</summary>
          <div className={styles.fields}>
            {text(
              "component",
              "Component",
              "--+-++, or the negative legs 1, 2; empty for the superamplitude",
              "middle",
            )}
            {choice("target", "What the formula is", [
              ["amplitude", "the amplitude itself"],
              ["even", "its parity-even part"],
              ["log", "the integrand of its logarithm"],
              ["zero", "an identity: it is zero"],
            ])}
            {choice("square", "Square brackets: s(a b) is", [
              ["<ab>[ab]", "<ab>[ab]"],
              ["<ab>[ba]", "<ab>[ba]"],
            ])}
          </div>
        </details>
      </fieldset>
    );
  }
  return (
    <fieldset className={styles.fields}>
      <legend>Where it comes from (optional)</legend>
      {text("title", "Title", "one line, as in a list of contents", "wide")}
      {text("method", "Method", "for example: on-shell recursion", "wide")}
      {lines("references", "References", "one a line: arXiv number or DOI, then the equation or section")}
      {lines("note", "Note", "what a reader should know")}
    </fieldset>
  );
}

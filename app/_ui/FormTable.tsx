import type { FormSummary } from "../_contract";
import styles from "./FormTable.module.css";
import { FormulaLine } from "./Formula";
import { manifestWords } from "./marks";
import { ReferenceLink } from "./ReferenceList";
import { stateWords } from "./StateSentence";
import { listed } from "./words";

/** Forms of one amplitude, one row each; on a narrow page a row becomes a short entry with its facts named. */
export function FormTable({ forms, label }: { forms: readonly FormSummary[]; label: string }) {
  return (
    <table className={styles.table} aria-label={label}>
      <thead>
        <tr>
          <th scope="col">Form</th>
          <th scope="col">Formula</th>
          <th scope="col">Terms</th>
          <th scope="col">Spurious poles</th>
          <th scope="col">Manifest</th>
          <th scope="col">Method, reference</th>
        </tr>
      </thead>
      <tbody>
        {forms.map((form) => (
          <Row key={form.version} form={form} />
        ))}
      </tbody>
    </table>
  );
}

function Row({ form }: { form: FormSummary }) {
  const manifest = manifestWords(
    Object.fromEntries(form.marks.map(({ code, state, manifest }) => [code, { state, manifest }])),
  );
  const waiting = form.state === "checking" || form.state === "draft";
  return (
    <tr>
      <th scope="row" className={styles.form}>
        <a href={waiting ? `/checks/${form.check}` : `/${form.id}`}>{form.id}</a>
        {form.title !== null && <span className={styles.title}>{form.title}</span>}
        <span className={styles.state}>{stateWords[form.state]}</span>
      </th>
      <td className={styles.formula}>
        <FormulaLine latex={form.firstLine} label={`First line of ${form.id}`} />
        {form.lines > 1 && <span className={styles.state}>first of {form.lines} lines</span>}
      </td>
      <td data-name="Terms">{form.terms?.toLocaleString("en") ?? "–"}</td>
      <td data-name="Spurious poles">
        {form.spuriousPoles === null ? "–" : form.spuriousPoles === 0 ? "none" : form.spuriousPoles}
      </td>
      <td data-name="Manifest">{manifest.length === 0 ? "–" : listed(manifest)}</td>
      <td data-name="Method, reference" className={styles.origin}>
        {form.method ?? (form.references.length === 0 ? "–" : "")}
        {form.references.map((reference) => (
          <span key={JSON.stringify(reference)} className={styles.reference}>
            <ReferenceLink reference={reference} />
          </span>
        ))}
      </td>
    </tr>
  );
}

import type { EvaluateReply } from "../../_contract";
import { CopyButton } from "../CopyButton";
import { SourceText } from "../SourceText";
import { TableBox } from "../TableBox";
import { capital, numbered } from "../words";
import styles from "./Evaluate.module.css";
import { decimalOf, type ValueRow, valueRows, valuesAsCsv } from "./valueRows";

/** Rows on the page; what is downloaded has all. */
const SHOWN = 200;

const signs = (helicities: string): string => [...helicities.replaceAll("-", "−")].join("\u2009");

/** Values as a table, to copy and to download. `name` names table and files, `address` gives the same values again. */
export function ValueResult({ reply, name, address }: { reply: EvaluateReply; name: string; address: string | null }) {
  const rows = valueRows(reply);
  const csv = valuesAsCsv(rows);
  const json = `${JSON.stringify(reply, null, 1)}\n`;
  const points = new Set(rows.map(({ point }) => point)).size;
  const columns = points === 0 ? 0 : rows.length / points;
  return (
    <>
      <p>
        {capital(numbered(points, "point"))}
        {columns > 1 && <>, {numbered(columns, "component")} each</>}.{" "}
        {reply.signature !== undefined && <>Momenta in signature ({reply.signature}). </>}
        {reply.seed !== undefined && (
          <>
            Seed: <code>{reply.seed}</code>.{" "}
          </>
        )}
        {address !== null && <a href={address}>Address of these values</a>}
      </p>
      {reply.warnings?.map(({ point, message }) => (
        <p key={`${point} ${message}`}>
          Point {point}: {message}.
        </p>
      ))}
      <ValueTable rows={rows.slice(0, SHOWN)} name={name} />
      {rows.length > SHOWN && (
        <p>
          The first {SHOWN} of {rows.length.toLocaleString("en")} values; the files have all.
        </p>
      )}
      <p className={styles.files}>
        <a href={dataAddress("text/csv", csv)} download={`${name}.csv`}>
          Download as CSV
        </a>
        <a href={dataAddress("application/json", json)} download={`${name}.json`}>
          Download as JSON
        </a>
        <CopyButton text={csv} what="the table" />
      </p>
      {reply.momenta !== undefined && (
        <details>
          <summary>The momenta, all outgoing, as (E, x, y, z)</summary>
          <SourceText
            text={JSON.stringify({ momenta: reply.momenta, signature: reply.signature }, null, 1)}
            label="Momenta of these points"
            copy="the momenta"
          />
        </details>
      )}
    </>
  );
}

/** A file in an address of its own, so that it can be had without script and without asking again. */
const dataAddress = (type: string, text: string): string => `data:${type};charset=utf-8,${encodeURIComponent(text)}`;

function ValueTable({ rows, name }: { rows: readonly ValueRow[]; name: string }) {
  const has = (part: keyof ValueRow): boolean => rows.some((row) => row[part] !== "");
  const [components, complex, approximate] = [has("helicities"), has("im"), has("digits")];
  const fractions = !complex && rows.some(({ re }) => re.includes("/"));
  return (
    <TableBox label={`Table of ${name}`}>
      <thead>
        <tr>
          <th scope="col">Point</th>
          {components && <th scope="col">Helicities</th>}
          <th scope="col">{complex ? "Real part" : "Value"}</th>
          {complex && <th scope="col">Imaginary part</th>}
          {fractions && <th scope="col">As a decimal</th>}
          {approximate && <th scope="col">Error</th>}
          {approximate && <th scope="col">Digits</th>}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={`${row.point} ${row.helicities}`}>
            <th scope="row">{row.point}</th>
            {components && <td className={styles.short}>{signs(row.helicities)}</td>}
            {row.reason === "" ? (
              <>
                <td className={styles.number}>
                  <code>{row.re}</code>
                </td>
                {complex && (
                  <td className={styles.number}>
                    <code>{row.im}</code>
                  </td>
                )}
                {fractions && (
                  <td className={styles.short}>
                    <code>{decimalOf(row.re)}</code>
                  </td>
                )}
                {approximate && (
                  <td className={styles.short}>
                    <code>{row.error}</code>
                  </td>
                )}
                {approximate && <td>{row.digits}</td>}
              </>
            ) : (
              <td colSpan={1 + Number(complex) + Number(fractions) + 2 * Number(approximate)}>
                No value: {row.reason}.
              </td>
            )}
          </tr>
        ))}
      </tbody>
    </TableBox>
  );
}

import type { Metadata } from "next";
import { sources } from "../../../../engine/sources";
import { Lead, Opening, Page, Section } from "../../../_ui/Page";
import { SourceText } from "../../../_ui/SourceText";
import { TableBox } from "../../../_ui/TableBox";
import { capital, degree, loopName } from "../../../_ui/words";
import { coverageOf } from "./coverage";
import { type CostTable, costTable, machine, notes, reaches, timeOf } from "./timings";

export const metadata: Metadata = { title: "What forms are compared with" };

/** The sources of truth: what each covers, what it costs, and how long a check takes; asked of the engine or measured by the bench. */
export default function Sources() {
  return (
    <Page>
      <Opening title="What forms are compared with">
        <Lead>
          A form is compared with amplitudes computed by published methods that share nothing with the notation or with
          the evaluation of forms. Methods of one lineage share their derivation; two lineages are independent of each
          other.
        </Lead>
        <p>
          A check asks the cheapest source of each lineage first, then the others, then the accepted forms, as far as
          its budget of operations goes; its report says which it asked and which it left out.
        </p>
      </Opening>
      <Section id="methods" head="Methods" wide>
        <TableBox label="Sources of truth and what they cover">
          <thead>
            <tr>
              <th scope="col">Source</th>
              <th scope="col">Lineage</th>
              <th scope="col">Covers</th>
              <th scope="col">Published in</th>
            </tr>
          </thead>
          <tbody>
            {sources.map((source) => (
              <tr key={source.name}>
                <th scope="row">{source.name}</th>
                <td>{source.lineage}</td>
                <td>{coverageOf(source).map(capital).join(". ")}</td>
                <td>{source.reference}</td>
              </tr>
            ))}
          </tbody>
        </TableBox>
      </Section>
      <Section id="reach" head="Ten seconds">
        <p>
          The largest n at which a whole check (values, poles, marks) of a derived form took less than ten seconds, of
          those that were tried; the next one tried in brackets. Seconds of processor time, measured on {machine}.
        </p>
        <TableBox label="Largest n checked in ten seconds">
          <thead>
            <tr>
              <th scope="col">Amplitude</th>
              <th scope="col">Form by</th>
              <th scope="col">Largest n</th>
              <th scope="col">Time</th>
            </tr>
          </thead>
          <tbody>
            {reaches().map(({ k, loops, below, above }) => (
              <tr key={`${k} ${loops}`}>
                <th scope="row">
                  {degree(k)}, {loopName(loops)}
                </th>
                <td>{(below ?? above)?.method}</td>
                <td>{below === null ? "none" : below.n}</td>
                <td>
                  {below !== null && `${below.seconds} s`}
                  {above !== null && ` (n = ${above.n}: ${above.seconds} s)`}
                </td>
              </tr>
            ))}
          </tbody>
        </TableBox>
        {notes.length > 0 && <p>Not timed: {notes.join("; ")}.</p>}
        <p>The same command measures again; it takes some minutes:</p>
        <SourceText
          text="npm run -s bench -- --only checks --json > 'app/(pages)/reference/sources/timings.json'"
          label="Command that measures the times again"
          copy="the command"
        />
      </Section>
      {[0, 1, 2, 3].map((loops) => (
        <Section key={loops} id={`costs-${loops}`} head={capital(loopName(loops))} wide>
          <Costs table={costTable(loops)} />
        </Section>
      ))}
    </Page>
  );
}

/** Operations at one point for each amplitude and source, and the time of a whole check. */
function Costs({ table: { loops, columns, rows } }: { table: CostTable }) {
  return (
    <>
      <p>Operations of each source at one point, for few legs; a dash where it does not apply.</p>
      <TableBox label={`Sources and costs, ${loopName(loops)}`}>
        <thead>
          <tr>
            <th scope="col">n</th>
            <th scope="col">k</th>
            {columns.map((name) => (
              <th key={name} scope="col">
                {name}
              </th>
            ))}
            <th scope="col">Lineages</th>
            <th scope="col">A check takes</th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ n, k, costs, lineages }) => (
            <tr key={`${n} ${k}`}>
              <th scope="row">{n}</th>
              <td>{k}</td>
              {costs.map((cost, at) => (
                <td key={columns[at]}>{cost === null ? "–" : Math.round(cost).toLocaleString("en")}</td>
              ))}
              <td>{lineages}</td>
              <td>{timed(n, k, loops)}</td>
            </tr>
          ))}
        </tbody>
      </TableBox>
    </>
  );
}

function timed(n: number, k: number, loops: number): string {
  const timing = timeOf(n, k, loops);
  return timing === null ? "not measured" : `${timing.seconds} s`;
}

import type { FormView } from "../../_contract";
import { CiteBox } from "../../_ui/CiteBox";
import { Comparisons, LeftOutSentences } from "../../_ui/ComparisonTable";
import { Diagnosis } from "../../_ui/Diagnosis";
import { Formula } from "../../_ui/Formula";
import { Marks } from "../../_ui/MarkSentence";
import { Lead, Opening, Page, Section } from "../../_ui/Page";
import { Poles } from "../../_ui/PoleTable";
import { ReferenceList } from "../../_ui/ReferenceList";
import { SourceText } from "../../_ui/SourceText";
import { StateSentence, stateWords } from "../../_ui/StateSentence";
import { amplitudeName, componentName, dated, numbered, targetNames } from "../../_ui/words";
import { FormulaPages } from "./FormulaPages";

/** Lines of a formula on one page; more are on further pages. */
const LINES = 120;

/** One version of a form, as a short article. `from` is the index of the first line of the formula that is shown. */
export function FormArticle({ form, bibtex, from }: { form: FormView; bibtex: string; from: number }) {
  const { report } = form;
  const lines = form.latex.slice(from, from + LINES);
  return (
    <Page>
      <Opening
        kicker={
          <>
            <code>{form.version}</code>, a form of{" "}
            <a href={`/amplitudes/${form.amplitude.key}`}>{amplitudeName(form.amplitude)}</a>
          </>
        }
        title={form.title ?? form.id}
      >
        <Lead>
          <StateSentence state={form.state} report={report} />
        </Lead>
        <p>{subject(form)}</p>
        {form.state === "checking" && (
          <p>
            <a href={`/checks/${form.check}`}>Follow the check</a>
          </p>
        )}
      </Opening>

      <Section id="formula" head="Formula">
        <Formula lines={lines} first={from} label={`Formula of ${form.version}`} />
        <FormulaPages id={form.version} lines={form.latex.length} from={from} step={LINES} />
        <p>
          <a href={`/evaluate?form=${form.version}&random=4`}>Evaluate this form</a> at points
        </p>
        <details>
          <summary>In the notation</summary>
          <SourceText text={form.notation} label={`Notation of ${form.version}`} copy="the notation" />
        </details>
        <details>
          <summary>In LaTeX</summary>
          <SourceText text={form.latex.join(" \\\\\n")} label={`LaTeX of ${form.version}`} copy="the LaTeX" />
        </details>
      </Section>

      {report !== null && form.state === "refused" && (
        <Section id="wrong" head="What is wrong">
          <Diagnosis report={report} source={form.notation} />
        </Section>
      )}

      {report !== null && Object.keys(report.marks).length > 0 && (
        <Section id="marks" head="What it shows">
          <Marks marks={report.marks} />
          {report.at !== undefined && <p>Poles and numbers of terms on this page are those at n = {report.at}.</p>}
        </Section>
      )}

      {report !== null && report.poles.length > 0 && (
        <Section id="poles" head="Poles">
          <p>Brackets in the denominators, the terms that hold them, and the order of the pole there and in the sum.</p>
          <Poles poles={report.poles} label={`Poles of ${form.version}`} />
        </Section>
      )}

      {report !== null && report.comparisons.length > 0 && (
        <Section id="comparisons" head="Compared with">
          <p>
            Values at random points over prime fields, with primes drawn after the form was submitted. Two different
            forms agree at all of these points with a probability below the bound; it is not a symbolic proof.
          </p>
          <Comparisons comparisons={report.comparisons} label={`What ${form.version} was compared with`} />
          <LeftOutSentences leftOut={report.leftOut} />
        </Section>
      )}

      {form.equalForms.length > 0 && (
        <Section id="equal" head="Equal forms">
          <ul>
            {form.equalForms.map((equal) => (
              <li key={equal.id}>
                <a href={`/${equal.id}`}>{equal.id}</a>
                {equal.title !== null && <>: {equal.title}</>}
                {equal.terms !== null && <> ({numbered(equal.terms, "term")})</>}
              </li>
            ))}
          </ul>
        </Section>
      )}

      {form.hasCertificate && (
        <Section id="certificate" head="Certificate">
          <p>
            The certificate records what was compared, with primes, points and values.{" "}
            <a href={`/api/v1/forms/${form.version}/certificate`} download={`${form.version}.certificate.json`}>
              Download the certificate
            </a>
            . It can be replayed without this server; the command computes everything anew and says where it differs:
          </p>
          <SourceText
            text={`npm run -s equiform -- replay ${form.version}.certificate.json`}
            label="Command that replays the certificate"
            copy="the command"
          />
        </Section>
      )}

      {form.references.length > 0 && (
        <Section id="references" head="References">
          <ReferenceList references={form.references} />
        </Section>
      )}

      {form.note !== null && (
        <Section id="note" head="Note">
          {form.note.split(/\n\s*\n/).map((paragraph) => (
            <p key={paragraph}>{paragraph}</p>
          ))}
        </Section>
      )}

      {form.state === "accepted" && (
        <Section id="cite" head="Cite">
          <CiteBox version={form.version} bibtex={bibtex} />
        </Section>
      )}

      <Section id="history" head="History">
        <ol>
          {form.versions.map((version) => (
            <li key={version.version} value={version.no}>
              <a href={`/${version.version}`}>{version.version}</a>, {dated(version.createdAt)},{" "}
              {stateWords[version.state]}
            </li>
          ))}
        </ol>
        <p>
          Digest of this version: <code>{form.digest}</code>
        </p>
      </Section>
    </Page>
  );
}

/** What the formula is, in a sentence: superamplitude or component, target, terms, method, group. */
function subject(form: FormView): string {
  const component = componentName(form.component);
  const { range } = form.amplitude;
  const what = component === null ? "The superamplitude" : `The component with ${component}`;
  const target = form.target === "amplitude" ? "" : `, ${targetNames[form.target]}`;
  const terms = form.terms === null ? "" : `, in ${numbered(form.terms, "term")}`;
  const sizes =
    range === null
      ? ""
      : `, for ${range.to === null ? `every n from ${range.from}` : `n = ${range.from} to ${range.to}`}`;
  const method = form.method === null ? "" : ` Method: ${form.method}.`;
  const convention =
    form.s === "<ab>[ba]" ? " Square brackets are those of papers that write s(a b) = <a b>[b a]." : "";
  return `${what}${target}${sizes}${terms}.${method}${convention} Submitted on ${dated(form.createdAt)} to ${form.group.name}.`;
}

import { Formula, Latex } from "../Formula";
import { Section } from "../Page";
import { ReferenceList } from "../ReferenceList";
import { SourceText } from "../SourceText";
import { amplitudeLatex, amplitudeName, capital, numbered } from "../words";
import { type DeriveFields, deriveParameters } from "./deriveQuery";

/** Lines of a formula that are rendered; the notation has all. */
const LINES = 120;

interface Derived {
  readonly document: {
    readonly amplitude: { readonly n: number; readonly k: number; readonly loops: number };
    readonly title: string;
    readonly notation: string;
    readonly method: string;
    readonly references: { readonly arxiv: string; readonly title: string }[];
  };
  readonly terms: number;
  readonly latex: readonly string[];
}

/** A derived form: rendered, in the notation, with what can be done with it. */
export function DerivedArticle({ fields, derived }: { fields: DeriveFields; derived: Derived }) {
  const { document, terms, latex } = derived;
  const parameters = deriveParameters(fields, "derived");
  const file = `data:application/json;charset=utf-8,${encodeURIComponent(`${JSON.stringify(document, null, 1)}\n`)}`;
  return (
    <>
      <Section id="formula" head={document.title}>
        <p>
          <Latex latex={amplitudeLatex(document.amplitude)} />: {amplitudeName(document.amplitude)}.{" "}
          {capital(numbered(terms, "term"))}. Method: {document.method}.
        </p>
        <Formula lines={latex.slice(0, LINES)} label="The derived formula" />
        {latex.length > LINES && (
          <p>
            The first {LINES} of {latex.length.toLocaleString("en")} lines; the notation has all.
          </p>
        )}
        <details>
          <summary>In the notation</summary>
          <SourceText text={document.notation} label="The derived formula in the notation" copy="the notation" />
        </details>
      </Section>
      <Section id="next" head="With this form">
        <ul>
          <li>
            <a href={`/submit?${parameters}`}>Submit it</a>, to have it checked and kept
          </li>
          <li>
            <a href={`/evaluate?${parameters}&random=4`}>Evaluate it</a> at points
          </li>
          <li>
            <a href={file} download="derived.json">
              Download the entry document
            </a>
            , for the command line
          </li>
        </ul>
      </Section>
      <Section id="references" head="References">
        <ReferenceList references={document.references} />
      </Section>
    </>
  );
}

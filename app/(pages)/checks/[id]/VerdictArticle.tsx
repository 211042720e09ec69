import type { CheckView } from "../../../_contract";
import { Comparisons, LeftOutSentences } from "../../../_ui/ComparisonTable";
import { Diagnosis } from "../../../_ui/Diagnosis";
import { Marks } from "../../../_ui/MarkSentence";
import { Lead, Opening, Page, Section } from "../../../_ui/Page";
import { Prose } from "../../../_ui/Prose";
import { SourceText } from "../../../_ui/SourceText";
import { DifferenceSentence, StateSentence } from "../../../_ui/StateSentence";

type Report = NonNullable<CheckView["report"]>;

const titles: Record<Report["verdict"], string> = {
  agrees: "It is right",
  disagrees: "It is not right",
  undecided: "It could not be decided",
  unreadable: "It could not be read",
};

/** The verdict of a check with its reasons, and the way on from there. */
export function VerdictArticle({ check, report }: { check: CheckView; report: Report }) {
  const accepted = check.versionState === "accepted" && check.form !== null;
  const wrong = report.verdict === "disagrees" || report.verdict === "unreadable";
  return (
    <Page>
      <Opening kicker={check.title ?? check.version} title={accepted ? "Accepted" : titles[report.verdict]}>
        <Lead>
          {accepted ? (
            <StateSentence state="accepted" report={report} />
          ) : report.verdict === "disagrees" ? (
            <DifferenceSentence report={report} />
          ) : (
            <Prose text={report.summary} />
          )}
        </Lead>
        <p>{nextSteps(check, report)}</p>
      </Opening>
      {wrong && (
        <Section id="wrong" head="What is wrong">
          <Diagnosis report={report} source={check.notation} />
          {check.notation !== null && <p>{editorLink(check)}</p>}
        </Section>
      )}
      {Object.keys(report.marks).length > 0 && !wrong && (
        <Section id="marks" head="What it shows">
          <Marks marks={report.marks} />
        </Section>
      )}
      {report.comparisons.length + report.leftOut.length > 0 && (
        <Section id="comparisons" head="Compared with">
          {report.comparisons.length > 0 && (
            <Comparisons comparisons={report.comparisons} label="What it was compared with" />
          )}
          <LeftOutSentences leftOut={report.leftOut} />
        </Section>
      )}
      {check.notation !== null && (
        <Section id="notation" head="As submitted">
          <SourceText text={check.notation} label="The formula as submitted" copy="the formula" />
        </Section>
      )}
    </Page>
  );
}

/** Where the form is now and what can be done, in a sentence with links. */
function nextSteps(check: CheckView, report: Report) {
  if (check.form === null) return "This was a check only; nothing was added to the library.";
  const form = <a href={`/${check.form}`}>{check.form}</a>;
  if (check.versionState === "accepted") {
    return (
      <>
        The form is kept as {form}, where it can be cited and its certificate downloaded
        {report.amplitude !== undefined && (
          <>
            ; it stands among <a href={`/amplitudes/${report.amplitude.key}`}>the forms of its amplitude</a>
          </>
        )}
        .
      </>
    );
  }
  if (check.versionState === "held")
    return <>The form is kept as {form} and waits until there is something to compare it with.</>;
  return <>It is kept as {form}, not accepted; it is no part of what is counted, found or cited.</>;
}

/** The way back to the editor: with the kept form's fields, or with the formula where nothing was kept and an address can hold it. */
function editorLink(check: CheckView) {
  if (check.form !== null) return <a href={`/submit?form=${check.form}`}>Mend it in the editor</a>;
  const address = `/submit?${new URLSearchParams({ notation: check.notation ?? "" })}`;
  return <a href={address.length > 6000 ? "/submit" : address}>Mend it in the editor</a>;
}

import { Fragment } from "react";
import type { Comparison, Report } from "../../engine/checks/report";
import { formIdPattern, type VersionState } from "../_contract";
import { Bound } from "./Bound";
import { Prose } from "./Prose";
import { decapital, numbered } from "./words";

/** The state of a version in words, for a table. */
export const stateWords: Record<VersionState, string> = {
  draft: "draft",
  checking: "being checked",
  accepted: "accepted",
  refused: "not accepted",
  held: "held, undecided",
};

/** The exponent of a bound 2^-e, 0 where it has another shape. */
const exponent = (bound: string): number => Number(/^2\^-(\d+)$/.exec(bound)?.[1] ?? 0);

/** The weakest bound among comparisons that agree: what may be claimed of all of them. */
export const weakestBound = (comparisons: readonly Comparison[]): string | null =>
  comparisons
    .flatMap(({ agrees, bound }) => (agrees && bound !== undefined ? [bound] : []))
    .sort((a, b) => exponent(a) - exponent(b))[0] ?? null;

/** The state of a version in a sentence, with what it rests on and how far that goes. */
export function StateSentence({ state, report }: { state: VersionState; report: Report | null }) {
  if (state === "draft") return <>This is a draft; it has not been checked.</>;
  if (state === "checking") return <>Its check is under way; until it ends nothing is known of this form.</>;
  if (report === null) return <>There is no report of its check.</>;
  if (state === "accepted") {
    const agreeing = report.comparisons.filter((comparison) => comparison.agrees);
    const bound = weakestBound(agreeing);
    return (
      <>
        Accepted: it agrees with <Names names={few(agreeing)} />
        {report.range !== undefined && report.range.length > 1 && <> for n = {report.range.join(", ")}</>}
        {bound !== null && (
          <>
            , by a probabilistic identity check with bound <Bound bound={bound} />, not a symbolic proof
          </>
        )}
        .
      </>
    );
  }
  if (state === "held")
    return (
      <>
        Held: <Prose text={reason(report.summary)} />
      </>
    );
  return (
    <>
      Not accepted: <Prose text={reason(report.summary)} />
    </>
  );
}

/** The names in a sentence, at most four: the rest is counted. */
function few(comparisons: readonly Comparison[]): readonly string[] {
  const names = [...new Set(comparisons.map((comparison) => comparison.with))];
  return names.length > 4 ? [...names.slice(0, 3), numbered(names.length - 3, "other")] : names;
}

/** Why a form is wrong, in a sentence that does not repeat the diagnosis: what it differs from, or the report's own words. */
export function DifferenceSentence({ report }: { report: Report }) {
  const differing = report.comparisons.filter((comparison) => !comparison.agrees);
  if (differing.length === 0 || report.diagnosis.length === 0) return <Prose text={report.summary} />;
  return (
    <>
      It differs from <Names names={few(differing)} />.
    </>
  );
}

/** A list of names in a sentence; identifiers of forms are links. */
function Names({ names }: { names: readonly string[] }) {
  return names.map((name, index) => (
    <Fragment key={name}>
      {index > 0 && (index === names.length - 1 ? " and " : ", ")}
      {formIdPattern.test(name) ? <a href={`/${name}`}>{name}</a> : name}
    </Fragment>
  ));
}

/** The report's sentence as the second half of one: without the verdict at its head, or with it as a verb. */
function reason(summary: string): string {
  const without = summary.replace(/^(Disagrees|Undecided): /, "");
  return without.startsWith("Disagrees") ? `it ${decapital(without)}` : decapital(without);
}

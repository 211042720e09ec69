import type { Report } from "../../engine/checks/report";
import { Diagnostics } from "./Diagnostics";
import { Prose } from "./Prose";

/** What is wrong with a form: the sentences of the diagnosis, then the places in its source. */
export function Diagnosis({ report, source }: { report: Report; source: string | null }) {
  const places = report.diagnosis.flatMap((found) =>
    [...(found.span === undefined ? [] : [found.span]), ...(found.spans ?? [])].map((span) => ({
      code: found.code,
      message: found.message,
      span,
      ...(found.span !== undefined && found.replacement !== undefined
        ? { suggestion: { span: found.span, replacement: found.replacement } }
        : {}),
    })),
  );
  const sentences = report.diagnosis.filter((found) => found.span === undefined && (found.spans ?? []).length === 0);
  const diagnostics = [...report.diagnostics, ...places];
  return (
    <>
      {sentences.map((found) => (
        <p key={`${found.code} ${found.message}`}>
          <Prose text={found.message} />
        </p>
      ))}
      {diagnostics.length > 0 && <Diagnostics source={source ?? ""} diagnostics={diagnostics} />}
      {report.diagnosis.length === 0 && report.diagnostics.length === 0 && report.verdict === "disagrees" && (
        <p>No simple cause was found: it is not off by a constant, a relabelling or a convention that was tried.</p>
      )}
    </>
  );
}

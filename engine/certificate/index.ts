/** Certificates: the replayable record of a check. */
import { type CheckOptions, checkForm, type Report } from "../checks";
import type { Form } from "../notation";
import { certify } from "./certificate";

export { type Certificate, certificateFormat, certificateSchema, certify } from "./certificate";
export { type Difference, type Replay, replay } from "./replay";

/** The check of a form with its certificate in the report. */
export function checkWithCertificate(form: Form, options: CheckOptions): Report {
  const record = checkForm(form, options);
  if (record.report.verdict === "unreadable") return record.report;
  return { ...record.report, certificate: { ...certify(form, options.seed, record) } };
}

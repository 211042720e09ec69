/** The engine's public face: read a form, check it, certify and replay the check, derive and export forms. Pure: no input or output. */
export {
  type AcceptedForm,
  CheckCancelled,
  type CheckOptions,
  checkForm,
  defaultBudget,
  engineVersion,
  markChecks,
  pointsVersion,
  protocolVersion,
  unreadable,
} from "./checks";
export * from "./checks/report";
export { type Certificate, certificateSchema, checkWithCertificate, replay } from "./certificate";
export { derive } from "./derive";
export { exporters } from "./export";
export { amplitudeKey, digestOf, type EntryDocument, entrySchema, type Form, readEntry, readEntryValue } from "./notation";
export type { Diagnostic, Result, Span } from "./result";

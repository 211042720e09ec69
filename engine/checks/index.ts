/** What a submission goes through: weights, values against the truth, marks, and a diagnosis where it disagrees. */
export {
  type AcceptedForm,
  CheckCancelled,
  type CheckOptions,
  type CheckRecord,
  checkForm,
  defaultBudget,
  unreadable,
} from "./check";
export { type LiveVerdict, liveVerdict } from "./live";
export { markChecks } from "./marks";
export * from "./report";
export type { SizeEvidence } from "./size";
export { engineVersion, pointsVersion, protocolVersion } from "./versions";

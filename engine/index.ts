/** The engine's public face: read a form, check it, certify and replay the check, evaluate, derive and export forms. Pure: no input or output. */
export {
  type Certificate,
  certificateSchema,
  certify,
  checkWithCertificate,
  type Difference,
  replay,
} from "./certificate";
export {
  type AcceptedForm,
  CheckCancelled,
  type CheckOptions,
  type CheckRecord,
  checkForm,
  defaultBudget,
  engineVersion,
  type LiveVerdict,
  liveVerdict,
  markChecks,
  pointsVersion,
  protocolVersion,
  unreadable,
} from "./checks";
export * from "./checks/report";
export { type DeriveRequest, derive, deriveMethods } from "./derive";
export {
  allHelicities,
  countHelicities,
  evaluateForm,
  helicityPattern,
  mostValues,
  type NumberKind,
  numberKinds,
  type PointRemark,
  type PointSource,
  readHelicities,
  seedUsed,
  type ValueColumn,
  type ValueRequest,
  type ValueTable,
  valueReply,
  valuesOf,
  type WrittenNumber,
} from "./evaluate";
export { fingerprint } from "./evaluate/fingerprint";
export { type FormAtN, formAt, pointUse } from "./evaluate/form";
export { exporters } from "./export";
export { randomness, rationals, realDoubles } from "./fields";
export { phaseSpaceVolume, rationalMomenta, scatteringPoint } from "./kinematics";
export {
  amplitudeKey,
  canonicalJson,
  digestOf,
  type EntryDocument,
  entrySchema,
  type Form,
  printFormula,
  readEntry,
  readEntryValue,
  sizesOf,
} from "./notation";
export { type Diagnostic, failure, type Result, type Span, success } from "./result";

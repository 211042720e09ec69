/** The tree walker: values of forms by their definition, the oracle for every faster evaluator, bounds on their size, and physical numbers. */
export { type Evaluation, evaluateForm } from "./evaluate";
export { type Fingerprint, fingerprint } from "./fingerprint";
export { type FormAtN, type FormSource, formAt, inDualPoints, pointUse } from "./form";
export { type NumberKind, numberKinds, type PointRemark, type PointSource, type WrittenNumber } from "./givenPoints";
export { allHelicities, type HelicityPoint, helicityPattern, helicityPoint, readHelicities } from "./helicity";
export { type Approximation, evaluateApproximately, type NoValue } from "./precision";
export { countHelicities, seedUsed, valueReply } from "./reply";
export { type FormSize, sizeBound } from "./size";
export { mostValues, type ValueColumn, type ValueRequest, type ValueTable, valuesOf } from "./table";

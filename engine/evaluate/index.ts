/** The tree walker: values of forms by their definition, the oracle for every faster evaluator, and bounds on their size. */
export { type Evaluation, evaluateForm } from "./evaluate";
export { type Fingerprint, fingerprint } from "./fingerprint";
export { type FormAtN, type FormSource, formAt, inDualPoints, pointUse } from "./form";
export { type FormSize, sizeBound } from "./size";

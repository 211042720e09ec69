/** The domain: every call takes a principal first, decides itself what that one may do, and answers plain data. */
export { entrySchema as entryJsonSchema } from "../../engine/notation";
export { getAmplitude, getTriangle, listAmplitudes } from "./amplitudes";
export { cancelCheck, getCheck, startCheck, watchCheck } from "./checks";
export { bibtexOf, citationFormats } from "./citations";
export { deriveForm } from "./derive";
export { environment } from "./env";
export { evaluate } from "./evaluate";
export { getCertificate, getForm, listForms, submitForm } from "./forms";
export { health } from "./health";
export { seedProgress } from "./library";
export type { Outcome } from "./outcome";
export { localUser, type Principal } from "./principal";

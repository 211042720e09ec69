/** Forms: submitted, read, listed. */
export { listForms } from "./list";
export { getCertificate, getEntry, getForm } from "./read";
export { submitForm } from "./submit";

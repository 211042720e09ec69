/** Forms: submitted, read, listed. */
export { listForms } from "./list";
export { getCertificate, getForm } from "./read";
export { submitForm } from "./submit";

// The kernel: one interpreter for each field, and what the host needs around them.

export { place, placeTerms } from "./state";
export { run as runMersenne31 } from "./mersenne31/interpreter";
export { run as runMontgomery31 } from "./montgomery31/interpreter";
export { convert as convertMontgomery31 } from "./montgomery31/field";
export { run as runMersenne61 } from "./mersenne61/interpreter";
export { run as runReal } from "./real/interpreter";
export { run as runComplex } from "./complex/interpreter";

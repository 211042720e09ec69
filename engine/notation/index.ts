/** The notation: text to syntax tree and back, entry documents, and the digest that identifies a form. */
export { canonicalJson, canonicalPieces } from "./canonical";
export { type Code, codes } from "./codes";
export { countTerms } from "./count";
export { digestOf, withoutSpans } from "./digest";
export {
  amplitudeKey,
  componentText,
  type EntryDocument,
  entryDocumentSchema,
  entryOf,
  entrySchema,
  type Form,
  type Reference,
  readEntry,
  readEntryValue,
  sizesOf,
} from "./entry";
export { expandTerms } from "./expand";
export { latexExpression, latexLines } from "./latex";
export { fromLatex } from "./latexReader";
export { type ParseOptions, parse, type Reading, read } from "./parse";
export { printExpression, printFormula, printItem } from "./print";
export { formulaSchema, treeSchema } from "./schema";
export type * from "./tree";
export { type ValidationContext, validate, validatePlaces } from "./validate";

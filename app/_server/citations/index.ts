/** Citations: one file for each format, all listed here. */
import type { FormView } from "../../_contract";
import { bibtexOf } from "./bibtex";

export { bibtexOf } from "./bibtex";

export interface CitationFormat {
  readonly style: string;
  readonly mediaType: string;
  readonly extension: string;
  readonly write: (form: FormView, baseUrl: string) => string;
}

export const citationFormats: readonly CitationFormat[] = [
  { style: "bibtex", mediaType: "application/x-bibtex; charset=utf-8", extension: "bib", write: bibtexOf },
];

/** What an exporter is: one target language, one file. */
import type { Form } from "../notation";

export interface Exporter {
  /** As callers name it: "latex". */
  readonly name: string;
  readonly fileExtension: string;
  readonly mediaType: string;
  /** For people: what is written. */
  readonly summary: string;
  /** The whole file as text, with a newline at its end. */
  write(form: Form, options?: ExportOptions): string;
}

export interface ExportOptions {
  /** The form's identifier in a library, where it has one: "n6k1L0-3v1". */
  readonly identifier?: string;
  /** LaTeX: only the comments and displays, to be put into a document of one's own. */
  readonly snippet?: boolean;
}

/** The syntax tree as JSON, without places in the source, with everything that belongs to the form's identity. */
import { amplitudeKey, digestOf, type Form, withoutSpans } from "../notation";
import type { Exporter, ExportOptions } from "./exporter";

export const json: Exporter = {
  name: "json",
  fileExtension: "json",
  mediaType: "application/json",
  summary: "the syntax tree as JSON, with digest and conventions",
  write: (form: Form, { identifier }: ExportOptions = {}) =>
    `${JSON.stringify(
      {
        format: "equiform-tree-1",
        ...(identifier === undefined ? {} : { identifier }),
        amplitude: { key: amplitudeKey(form), ...form.amplitude },
        component: form.component,
        target: form.target,
        s: form.squareSign === 1 ? "<ab>[ab]" : "<ab>[ba]",
        digest: digestOf(form),
        ...(form.title === null ? {} : { title: form.title }),
        tree: withoutSpans(form.formula),
      },
      null,
      1,
    )}\n`,
};

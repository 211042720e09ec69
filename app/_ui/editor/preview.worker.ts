/** The preview and the verdict off the page's own thread, so that typing never waits for them. */
import type { Fields } from "./entryFields";
import { type Preview, previewOf } from "./preview";
import { type Verdict, verdictOf } from "./verdict";

export interface PreviewRequest {
  readonly id: number;
  readonly fields: Fields;
}

/** The verdict comes in a reply of its own, after the preview of the same request; null where there is nothing to compare. */
export type PreviewReply =
  | { readonly id: number; readonly kind: "preview"; readonly preview: Preview }
  | { readonly id: number; readonly kind: "verdict"; readonly verdict: Verdict | null };

addEventListener("message", (event: MessageEvent<PreviewRequest>) => {
  const { id, fields } = event.data;
  const reply = (message: PreviewReply) => postMessage(message);
  reply({ id, kind: "preview", preview: previewOf(fields) });
  reply({ id, kind: "verdict", verdict: verdictOf(fields) });
});

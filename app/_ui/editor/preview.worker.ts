/** The preview off the page's own thread, so that typing never waits for it. */
import type { Fields } from "./entryFields";
import { type Preview, previewOf } from "./preview";

export interface PreviewRequest {
  readonly id: number;
  readonly fields: Fields;
}

export interface PreviewReply {
  readonly id: number;
  readonly preview: Preview;
}

addEventListener("message", (event: MessageEvent<PreviewRequest>) => {
  const reply: PreviewReply = { id: event.data.id, preview: previewOf(event.data.fields) };
  postMessage(reply);
});

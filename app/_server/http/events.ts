/** Server-sent events (WHATWG HTML, section "Server-sent events"). */
import type { CheckEvent } from "../../_contract";

/** Milliseconds between two comments that keep idle connections open. */
const silence = 15_000;

/** The number in `Last-Event-ID`; -1 where there is none or it is not one of ours. */
export function lastEventId(request: Request): number {
  const text = request.headers.get("last-event-id") ?? "";
  return /^\d{1,9}$/.test(text) ? Number(text) : -1;
}

/** Streams `events` as they come; the source is told by `stop` when the reader goes away. */
export function eventStream(events: AsyncIterable<CheckEvent>, stop: () => void): Response {
  const encoder = new TextEncoder();
  let timer: NodeJS.Timeout | undefined;
  const stream = new ReadableStream<Uint8Array>({
    async start(controller) {
      timer = setInterval(() => controller.enqueue(encoder.encode(": waiting\n\n")), silence);
      controller.enqueue(encoder.encode("retry: 1000\n\n"));
      try {
        for await (const event of events) {
          const name = event.state === "done" || event.state === "cancelled" ? "end" : "progress";
          controller.enqueue(encoder.encode(`id: ${event.seq}\nevent: ${name}\ndata: ${JSON.stringify(event)}\n\n`));
        }
        clearInterval(timer);
        controller.close();
      } catch (error) {
        clearInterval(timer);
        stop();
        controller.error(error);
      }
    },
    cancel() {
      clearInterval(timer);
      stop();
    },
  });
  return new Response(stream, {
    headers: {
      "content-type": "text/event-stream; charset=utf-8",
      "cache-control": "no-store, no-transform",
      "x-accel-buffering": "no",
    },
  });
}

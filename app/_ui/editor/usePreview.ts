"use client";

import { useEffect, useRef, useState } from "react";
import type { Fields } from "./entryFields";
import type { Preview } from "./preview";
import type { PreviewReply, PreviewRequest } from "./preview.worker";
import type { Verdict } from "./verdict";

/** A pause in typing after which the formula is read, and the time after which a reading is given up. */
const PAUSE = 200;
const PATIENCE = 30_000;

export interface PreviewState {
  readonly preview: Preview;
  /** What the engine in this browser says of it; null while it is at work, and where there is nothing to say. */
  readonly verdict: Verdict | null;
  /** The formula the preview is of: spans count in it. */
  readonly notation: string;
  /** Set when the last reading was given up. */
  readonly tooSlow: boolean;
}

/** The preview of the fields, read in a worker after each pause; a reading that takes too long is stopped, not waited for. */
export function usePreview(fields: Fields): PreviewState {
  const [state, setState] = useState<PreviewState>({
    preview: { kind: "empty" },
    verdict: null,
    notation: "",
    tooSlow: false,
  });
  const worker = useRef<Worker | null>(null);
  const last = useRef(0);

  useEffect(() => {
    const stop = () => {
      worker.current?.terminate();
      worker.current = null;
    };
    return stop;
  }, []);

  useEffect(() => {
    let patience: ReturnType<typeof setTimeout> | undefined;
    const pause = setTimeout(() => {
      worker.current ??= new Worker(new URL("./preview.worker.ts", import.meta.url), { type: "module" });
      const reader = worker.current;
      const request: PreviewRequest = { id: ++last.current, fields };
      reader.onmessage = (event: MessageEvent<PreviewReply>) => {
        const reply = event.data;
        if (reply.id !== last.current) return;
        if (reply.kind === "preview") {
          setState({ preview: reply.preview, verdict: null, notation: fields.notation, tooSlow: false });
          return;
        }
        clearTimeout(patience);
        setState((before) => ({ ...before, verdict: reply.verdict }));
      };
      patience = setTimeout(() => {
        reader.terminate();
        worker.current = null;
        setState((before) => ({ ...before, tooSlow: true }));
      }, PATIENCE);
      reader.postMessage(request);
    }, PAUSE);
    return () => {
      clearTimeout(pause);
      clearTimeout(patience);
    };
  }, [fields]);

  return state;
}

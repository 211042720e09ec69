/** One place in which one check runs at a time: a thread that is kept between checks and replaced when it had to be stopped. */
import { Worker } from "node:worker_threads";
import type { CheckTask, Progress, ThreadMessage } from "./engine";

export type RunResult =
  | Extract<ThreadMessage, { kind: "report" | "failed" }>
  /** Stopped because it was asked for, or because its time was up. */
  | { readonly kind: "stopped"; readonly why: "asked" | "time" };

export interface SlotOptions {
  /** Path of the bundled thread. */
  readonly program: string;
  /** Megabytes of heap; a check that needs more ends in a failure, not in the end of the process. */
  readonly memory: number;
  /** Milliseconds after which a check is stopped. */
  readonly time: number;
  /** Milliseconds that a check gets to stop by itself before its thread is ended. */
  readonly grace: number;
}

export class Slot {
  #thread: Worker | undefined;
  readonly #options: SlotOptions;

  constructor(options: SlotOptions) {
    this.#options = options;
  }

  /** Runs `task`; never rejects. When `signal` aborts, the check is told to stop and its thread is ended if it doesn't. */
  run(
    task: Omit<CheckTask, "stop">,
    onProgress: (progress: Progress) => void,
    signal: AbortSignal,
  ): Promise<RunResult> {
    return new Promise((resolve) => {
      const thread = this.#thread ?? this.#start();
      const stop = new SharedArrayBuffer(4);
      const timers: NodeJS.Timeout[] = [];
      const settle = (result: RunResult): void => {
        for (const timer of timers) clearTimeout(timer);
        signal.removeEventListener("abort", onAbort);
        thread.removeAllListeners();
        resolve(result);
      };
      const abandon = (result: RunResult): void => {
        this.#thread = undefined;
        settle(result);
        void thread.terminate();
      };
      const halt = (why: "asked" | "time"): void => {
        Atomics.store(new Int32Array(stop), 0, 1);
        timers.push(setTimeout(() => abandon({ kind: "stopped", why }), this.#options.grace));
        // What it still says after this is not a result, however complete it looks.
        thread.removeAllListeners("message");
        thread.on("message", (message: ThreadMessage) => {
          if (message.kind !== "progress") settle({ kind: "stopped", why });
        });
      };
      const onAbort = (): void => halt("asked");
      thread.on("message", (message: ThreadMessage) => {
        if (message.kind === "progress") onProgress(message);
        else settle(message);
      });
      thread.on("error", (error) => abandon({ kind: "failed", message: error.message }));
      thread.on("exit", () => abandon({ kind: "failed", message: "the thread ended" }));
      timers.push(setTimeout(() => halt("time"), this.#options.time));
      if (signal.aborted) {
        settle({ kind: "stopped", why: "asked" });
        return;
      }
      signal.addEventListener("abort", onAbort);
      thread.postMessage({ ...task, stop } satisfies CheckTask);
    });
  }

  async close(): Promise<void> {
    const thread = this.#thread;
    this.#thread = undefined;
    thread?.removeAllListeners();
    await thread?.terminate();
  }

  #start(): Worker {
    const thread = new Worker(this.#options.program, {
      resourceLimits: { maxOldGenerationSizeMb: this.#options.memory },
    });
    this.#thread = thread;
    return thread;
  }
}

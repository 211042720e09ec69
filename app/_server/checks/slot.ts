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

type ThreadEvent = ThreadMessage | { readonly kind: "ended"; readonly message: string };

export class Slot {
  #thread: Worker | undefined;
  /** Takes what the thread says about the check that is running; null between checks. */
  #listener: ((event: ThreadEvent) => void) | null = null;
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
      if (signal.aborted) {
        resolve({ kind: "stopped", why: "asked" });
        return;
      }
      const stop = new SharedArrayBuffer(4);
      const timers: NodeJS.Timeout[] = [];
      let halted: "asked" | "time" | null = null;
      const settle = (result: RunResult): void => {
        for (const timer of timers) clearTimeout(timer);
        signal.removeEventListener("abort", onAbort);
        this.#listener = null;
        resolve(result);
      };
      const halt = (why: "asked" | "time"): void => {
        if (halted !== null) return;
        halted = why;
        Atomics.store(new Int32Array(stop), 0, 1);
        const end = (): void => {
          void this.close();
          settle({ kind: "stopped", why });
        };
        timers.push(setTimeout(end, this.#options.grace));
      };
      const onAbort = (): void => halt("asked");
      this.#listener = (event) => {
        if (event.kind === "progress") {
          if (halted === null) onProgress(event);
          return;
        }
        // What it still says after it was told to stop is not a result, however complete it looks.
        if (halted !== null) settle({ kind: "stopped", why: halted });
        else if (event.kind === "ended") settle({ kind: "failed", message: event.message });
        else settle(event);
      };
      signal.addEventListener("abort", onAbort);
      timers.push(setTimeout(() => halt("time"), this.#options.time));
      this.#thread ??= this.#start();
      this.#thread.postMessage({ ...task, stop } satisfies CheckTask);
    });
  }

  /** Ends the thread; the next check gets a new one. */
  async close(): Promise<void> {
    const thread = this.#thread;
    this.#thread = undefined;
    await thread?.terminate();
  }

  #start(): Worker {
    const thread = new Worker(this.#options.program, {
      resourceLimits: { maxOldGenerationSizeMb: this.#options.memory },
    });
    // A thread that was replaced may still end; only the present one is listened to.
    const tell = (event: ThreadEvent): void => {
      if (this.#thread === thread) this.#listener?.(event);
    };
    const gone = (message: string): void => {
      if (this.#thread !== thread) return;
      this.#thread = undefined;
      this.#listener?.({ kind: "ended", message });
    };
    thread.on("message", tell);
    thread.on("error", (error) => gone(error.message));
    thread.on("exit", () => gone("the thread ended"));
    return thread;
  }
}

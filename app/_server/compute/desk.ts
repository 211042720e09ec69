/** One thread beside the server and the line of those who wait for it: requests are computed one after the other, each in bounded time. */
import { Worker } from "node:worker_threads";
import type { Answer, Task } from "./task";

export interface DeskOptions {
  /** Path of the bundled thread. */
  readonly program: string;
  /** Megabytes of heap. */
  readonly memory: number;
  /** Milliseconds after which a computation is ended. */
  readonly time: number;
  /** How many may wait while one is computed. */
  readonly waiting: number;
}

/** `time`: ended after its time was up; `memory`: it needed more than there is; `busy`: too many wait already. */
export type Settled = Answer | { readonly kind: "time" | "memory" | "busy" };

export class Desk {
  readonly #options: DeskOptions;
  #thread: Worker | undefined;
  /** Takes what becomes of the task that is computed; null between tasks. */
  #listener: ((settled: Settled) => void) | null = null;
  #line: Promise<unknown> = Promise.resolve();
  #waiting = 0;

  constructor(options: DeskOptions) {
    this.#options = options;
  }

  /** Computes `task` when its turn comes; never rejects. */
  run(task: Task): Promise<Settled> {
    if (this.#waiting > this.#options.waiting) return Promise.resolve({ kind: "busy" });
    this.#waiting++;
    const done = this.#line.then(() => this.#compute(task));
    this.#line = done.finally(() => {
      this.#waiting--;
    });
    return done;
  }

  /** Ends the thread; the next task gets a new one. */
  async close(): Promise<void> {
    const thread = this.#thread;
    this.#thread = undefined;
    await thread?.terminate();
  }

  #compute(task: Task): Promise<Settled> {
    return new Promise((resolve) => {
      this.#thread ??= this.#start();
      const thread = this.#thread;
      // The thread keeps the process alive only while somebody waits for it.
      thread.ref();
      const timer = setTimeout(() => {
        void this.close();
        this.#listener?.({ kind: "time" });
      }, this.#options.time);
      this.#listener = (settled) => {
        clearTimeout(timer);
        this.#listener = null;
        thread.unref();
        resolve(settled);
      };
      thread.postMessage(task);
    });
  }

  #start(): Worker {
    const thread = new Worker(this.#options.program, {
      resourceLimits: { maxOldGenerationSizeMb: this.#options.memory },
    });
    // A thread that was replaced may still end; only the present one is listened to.
    const gone = (settled: Settled): void => {
      if (this.#thread !== thread) return;
      this.#thread = undefined;
      this.#listener?.(settled);
    };
    thread.on("message", (answer: Answer) => {
      if (this.#thread === thread) this.#listener?.(answer);
    });
    thread.on("error", (error: NodeJS.ErrnoException) =>
      gone(error.code === "ERR_WORKER_OUT_OF_MEMORY" ? { kind: "memory" } : { kind: "failed", message: error.message }),
    );
    thread.on("exit", () => gone({ kind: "failed", message: "the thread ended" }));
    return thread;
  }
}

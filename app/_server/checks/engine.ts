/** The one function that the queue asks of the engine, and what goes to the thread that runs it and back. */
import type { Report } from "../../../engine/checks/report";

/** A task as it is sent to a thread: plain data. `accepted` are the forms it is compared with. */
export interface CheckTask {
  readonly entry: unknown;
  readonly seed: string;
  readonly accepted: readonly { readonly name: string; readonly entry: unknown }[];
  /** One 32-bit word, not 0 once the check is to stop. */
  readonly stop: SharedArrayBuffer;
}

export interface Progress {
  readonly stage: string;
  readonly done: number;
  readonly total: number;
}

export type ThreadMessage =
  | ({ readonly kind: "progress" } & Progress)
  | { readonly kind: "report"; readonly report: Report; readonly protocol: string; readonly engine: string }
  | { readonly kind: "failed"; readonly message: string };

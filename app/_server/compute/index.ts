/** Computes for somebody who waits: in a thread of its own, in bounded time and memory, so that the server goes on answering. */
import { join } from "node:path";
import { answer, type Outcome, refuse } from "../outcome";
import { Desk } from "./desk";
import type { Computed, Task } from "./task";

export type { Derived, EvaluateTask } from "./task";

/** Seconds that one request may compute. */
const seconds = 20;

let desk: Desk | undefined;

const open = (): Desk =>
  new Desk({
    program: join(process.cwd(), "build", "compute-thread.mjs"),
    memory: 512,
    time: 1000 * seconds,
    waiting: 20,
  });

/** What a task comes to, or why it was not brought to its end. */
export async function compute(task: Task): Promise<Outcome<Computed>> {
  desk ??= open();
  const settled = await desk.run(task);
  switch (settled.kind) {
    case "busy":
      return refuse("busy", "Too many computations wait already. Try again in a minute.");
    case "time":
      return refuse(
        "too-costly",
        `The computation took longer than ${seconds} seconds and was ended. Ask for fewer points, helicities or legs, or use the command line, which has no such limit.`,
      );
    case "memory":
      return refuse("too-costly", "The computation needed too much memory. Ask for less, or use the command line.");
    case "failed":
      throw new Error(`a computation failed: ${settled.message}`);
    default:
      return answer(settled);
  }
}

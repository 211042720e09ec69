/** The thread that computes what somebody waits for; it can be ended at any moment without harm. */
import { parentPort } from "node:worker_threads";
import type { Answer, Task } from "./task";
import { work } from "./work";

function answer(task: Task): Answer {
  try {
    return work(task);
  } catch (error) {
    return { kind: "failed", message: error instanceof Error ? (error.stack ?? error.message) : String(error) };
  }
}

parentPort?.on("message", (task: Task) => parentPort?.postMessage(answer(task)));

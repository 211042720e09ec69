/** The thread in which checks run: it can be stopped at any moment without harm, because it touches nothing but its messages. */
import { parentPort } from "node:worker_threads";
import { checkWithCertificate } from "../../../engine/certificate";
import { engineVersion, protocolVersion } from "../../../engine/checks";
import { readEntryValue } from "../../../engine/notation";
import type { CheckTask, ThreadMessage } from "./engine";

/** Milliseconds between two reports of progress. */
const interval = 100;

const send = (message: ThreadMessage): void => parentPort?.postMessage(message);

function run(task: CheckTask): ThreadMessage {
  const stop = new Int32Array(task.stop);
  const read = readEntryValue(task.entry);
  // Only documents that were read before are queued; one that no longer can be read is the program's fault.
  if (!read.ok)
    return { kind: "failed", message: `the stored document is unreadable: ${read.diagnostics[0]?.message ?? ""}` };
  const accepted = task.accepted.flatMap(({ name, entry }) => {
    const other = readEntryValue(entry);
    if (!other.ok) throw new Error(`the accepted form ${name} is unreadable`);
    return [{ name, form: other.value }];
  });
  let last = 0;
  let lastStage = "";
  const report = checkWithCertificate(read.value, {
    seed: task.seed,
    accepted,
    progress: ({ stage, done, total }) => {
      const now = Date.now();
      if (stage === lastStage && now - last < interval) return;
      last = now;
      lastStage = stage;
      send({ kind: "progress", stage, done, total });
    },
    cancelled: () => Atomics.load(stop, 0) !== 0,
  });
  return { kind: "report", report, protocol: protocolVersion, engine: engineVersion };
}

parentPort?.on("message", (task: CheckTask) => {
  try {
    send(run(task));
  } catch (error) {
    send({
      kind: "failed",
      message: error instanceof Error ? `${error.message}\n${error.stack ?? ""}` : String(error),
    });
  }
});

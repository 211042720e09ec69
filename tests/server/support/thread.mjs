// Stands for the check thread where the queue and its processes are tested, not the engine: what it does stands in the document's note.
import { parentPort } from "node:worker_threads";

const sleep = (milliseconds) => Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, milliseconds);

const report = (task) => ({
  verdict: "agrees",
  fingerprint: "0123456789abcdef".repeat(4),
  terms: 4,
  comparisons: task.accepted.map(({ name }) => ({
    with: name,
    kind: "form",
    agrees: true,
    points: 12,
    primes: 12,
    bound: "2^-180",
  })),
  marks: { cyclic: { state: "holds", manifest: false, evidence: "For a test." } },
  poles: [],
  diagnosis: [],
  diagnostics: [],
  summary: "For a test.",
});

parentPort.on("message", (task) => {
  const stopped = () => Atomics.load(new Int32Array(task.stop), 0) !== 0;
  const [what, amount] = (task.entry.note ?? "wait 0").split(" ");
  if (what === "throw") throw new Error("thrown in the thread");
  if (what === "exit") process.exit(3);
  if (what === "hang") for (;;) sleep(1000);
  if (what === "fail") return parentPort.postMessage({ kind: "failed", message: "the engine failed" });
  if (what === "memory") {
    const held = [];
    for (;;) held.push(new Array(100_000).fill(held.length));
  }
  if (what === "listen") {
    parentPort.postMessage({ kind: "progress", stage: "listening", done: 0, total: 1 });
    while (!stopped()) sleep(5);
  }
  for (let done = 0; done < 3; done++) {
    parentPort.postMessage({ kind: "progress", stage: "values", done, total: 3 });
    sleep(Number(amount) / 3 || 0);
  }
  parentPort.postMessage({ kind: "report", report: report(task), protocol: "1", engine: "1" });
});

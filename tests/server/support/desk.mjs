// Stands for the compute thread where the desk is tested, not the engine: does what the task's word says.
import { parentPort } from "node:worker_threads";

parentPort.on("message", ({ what }) => {
  if (what === "throw") throw new Error("thrown in the thread");
  if (what === "exit") process.exit(3);
  if (what === "hang") for (;;) Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 1000);
  if (what === "memory") {
    const held = [];
    for (;;) held.push(new Array(100_000).fill(held.length));
  }
  parentPort.postMessage({ kind: "refused", diagnostics: [] });
});

/** The worker process: checks on threads, outside the server, any number of such processes on one database. */
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { database } from "../db";
import { environmentOrExit } from "../env";
import { performAll } from "./perform";
import { Slot } from "./slot";

const { workers, leaseMilliseconds, checkMilliseconds, checkMemory } = environmentOrExit();
const shutdown = new AbortController();
for (const signal of ["SIGINT", "SIGTERM"] as const) process.on(signal, () => shutdown.abort());
// Started by another process with a channel to it: without that process there is nobody to work for.
process.on("disconnect", () => shutdown.abort());

const program = process.env.EQUIFORM_CHECK_THREAD ?? join(dirname(fileURLToPath(import.meta.url)), "check-thread.mjs");
const options = {
  lease: leaseMilliseconds,
  mostFailures: 3,
  mostAttempts: 100,
  idle: 200,
  log: (line: string) => console.error(`equiform: ${line}`),
};
const slots = Array.from(
  { length: workers },
  () => new Slot({ program, memory: checkMemory, time: checkMilliseconds, grace: 2000 }),
);
await Promise.all(slots.map((slot) => performAll(slot, options, shutdown.signal)));
await database().close();
process.exit(0);

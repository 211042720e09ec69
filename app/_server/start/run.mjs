// Runs the server, the check worker and the seeding as children that live and die together.
import { spawn } from "node:child_process";
import { join } from "node:path";
import { childEnvironment, root } from "./prepare.mjs";

/** Milliseconds before a dead worker is started again, and for which the server may take to answer. */
const restartAfter = 500;
const patience = 120_000;

const children = new Set();
let ending = false;

function start(name, args) {
  // The channel tells a child that this process is gone even if it was killed.
  const child = spawn(process.execPath, args, {
    cwd: root,
    env: childEnvironment(),
    stdio: ["ignore", "inherit", "inherit", "ipc"],
  });
  children.add(child);
  child.on("exit", () => children.delete(child));
  child.on("error", (error) => console.error(`equiform: ${name} could not be started: ${error.message}`));
  return child;
}

function end(status) {
  if (ending) return;
  ending = true;
  process.exitCode = status;
  for (const child of children) child.kill("SIGTERM");
  const hard = setTimeout(() => {
    for (const child of children) child.kill("SIGKILL");
  }, 10_000);
  hard.unref();
}

function keepWorker() {
  const child = start("the check worker", [join(root, "build", "worker.mjs")]);
  child.on("exit", (code, signal) => {
    if (ending) return;
    console.error(
      `equiform: the check worker ended (${signal ?? code}); starting another. Its checks are taken up again.`,
    );
    setTimeout(() => !ending && keepWorker(), restartAfter);
  });
}

async function answers(port) {
  const until = Date.now() + patience;
  while (Date.now() < until && !ending) {
    try {
      const reply = await fetch(`http://127.0.0.1:${port}/api/v1/health`);
      if (reply.ok) return true;
      // Something that is not this server answers, or this server says what is wrong in its log.
      if (reply.status !== 503) await new Promise((resolve) => setTimeout(resolve, 500));
    } catch {
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  }
  return false;
}

/** Serves until a signal; `mode` is Next's: "start" or "dev". */
export async function run(mode, { port, workers }) {
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(signal, () => end(0));
  const server = start("the server", [join(root, "app", "_server", "start", "serve.mjs"), mode, String(port)]);
  server.on("exit", (code) => {
    if (!ending) console.error("equiform: the server ended; its messages are above.");
    end(code ?? 1);
  });
  if (workers > 0) keepWorker();
  if (!(await answers(port))) {
    if (!ending) console.error(`equiform: the server did not answer on port ${port}.`);
    return end(1);
  }
  console.log(`equiform: http://localhost:${port}`);
  const seed = start("the seed library", [join(root, "build", "seed.mjs")]);
  seed.on("exit", (code) => {
    if (code !== 0 && !ending)
      console.error("equiform: the seed library could not be submitted; its messages are above.");
  });
}

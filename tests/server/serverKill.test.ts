/**
 * The whole program (start script, web server, worker, seeding) is killed with SIGKILL at random moments while forms are submitted over HTTP:
 * nothing is lost and nothing is doubled. Twenty kills in `npm run test:long`, one in `npm test`; the pages must be built (the start does it).
 */
import { type ChildProcess, spawn } from "node:child_process";
import { cpSync, mkdirSync, mkdtempSync, readdirSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, expect, it } from "vitest";
import { checkViewSchema, formListSchema, seedProgressSchema, submitReplySchema } from "../../app/_contract";
import { openDatabase, setDatabase } from "../../app/_server/db";
import { seedProgress } from "../../app/_server/library";
import { entry } from "./support/examples";
import { random } from "./support/random";

const long = process.env.EQUIFORM_LONG === "1";
const kills = long ? 20 : 1;
const documents = long ? 40 : 6;
const folder = mkdtempSync(join(tmpdir(), "equiform-kill-"));
let running: ChildProcess | null = null;
afterAll(async () => {
  running?.kill("SIGTERM");
  setDatabase(undefined);
  rmSync(folder, { recursive: true, force: true });
});

const pause = (milliseconds: number) => new Promise((resolve) => setTimeout(resolve, milliseconds));

async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const address = server.address();
  await new Promise((resolve) => server.close(resolve));
  return typeof address === "object" && address ? address.port : 0;
}

it(`the program loses and doubles nothing in ${kills} kills`, { timeout: 1_800_000 }, async () => {
  const port = await freePort();
  const base = `http://127.0.0.1:${port}/api/v1`;
  const seeds = join(folder, "seed");
  mkdirSync(seeds);
  const examples = fileURLToPath(new URL("../../e2e/seed", import.meta.url));
  for (const name of readdirSync(examples)) cpSync(join(examples, name), join(seeds, name), { recursive: true });
  const start = () => {
    running = spawn(process.execPath, ["app/_server/start/start.mjs"], {
      env: {
        ...process.env,
        PORT: String(port),
        EQUIFORM_DATA: folder,
        EQUIFORM_SEED: seeds,
        EQUIFORM_LEASE_SECONDS: "2",
        EQUIFORM_CHECK_THREAD: fileURLToPath(new URL("./support/thread.mjs", import.meta.url)),
      },
      stdio: ["ignore", "ignore", "inherit"],
    });
    return running;
  };

  /** Asks until the server answers: while it is down, and again after it died in the middle of an answer. */
  const ask = async (path: string, init: RequestInit = {}): Promise<unknown> => {
    for (;;) {
      try {
        const reply = await fetch(`${base}/${path}`, { ...init, signal: AbortSignal.timeout(20_000) });
        if (reply.ok) return await reply.json();
        if (reply.status < 500) throw new Error(`${path}: ${reply.status} ${await reply.text()}`);
      } catch (error) {
        if (!(error instanceof TypeError) && (error as Error).name !== "TimeoutError") throw error;
      }
      await pause(100);
    }
  };
  const submitAll = async () => {
    const replies = [];
    for (let variant = 1; variant <= documents; variant++) {
      const reply = await ask("forms", {
        method: "POST",
        headers: { "content-type": "application/json", "idempotency-key": `document-${variant}` },
        body: JSON.stringify(entry(variant, { note: `wait ${(variant * 97) % 700}` })),
      });
      replies.push(submitReplySchema.parse(reply));
    }
    return replies;
  };

  start();
  await ask("health");
  const submitting = submitAll();
  const draw = random(7);
  for (let kill = 0; kill < kills; kill++) {
    await pause(300 + draw() * 3000);
    running?.kill("SIGKILL");
    start();
    await ask("health");
  }
  const replies = await submitting;
  expect(new Set(replies.map((reply) => reply.form)).size).toBe(documents);
  for (const { check, form } of replies) {
    let view = checkViewSchema.parse(await ask(`checks/${check}`));
    while (view.state !== "done") {
      await pause(200);
      view = checkViewSchema.parse(await ask(`checks/${check}`));
    }
    expect(view).toMatchObject({ form, versionState: "accepted" });
  }
  // The seed library holds forms of the same amplitude: each title of ours is there once all the same.
  const list = formListSchema.parse(await ask("forms?amplitude=n6k1L0&limit=200"));
  const ours = list.items.map((item) => item.title).filter((title) => title?.startsWith("Variant "));
  expect(ours.sort()).toEqual(Array.from({ length: documents }, (_, i) => `Variant ${i + 1}`).sort());

  setDatabase(openDatabase(`file:${join(folder, "equiform.db")}`));
  let progress = await seedProgress();
  while (!progress.finished) {
    await pause(200);
    progress = await seedProgress();
  }
  expect(seedProgressSchema.parse(progress).accepted).toBe(progress.total);
  expect(progress.total).toBeGreaterThan(0);
  const all = formListSchema.parse(await ask("forms?limit=200"));
  expect(all.items).toHaveLength(documents + progress.total);
});

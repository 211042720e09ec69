/**
 * Worker and submitting process are killed with SIGKILL at random moments (seeded): nothing is lost and nothing is doubled. `npm test` takes
 * six kills on each database, `npm run test:long` forty.
 */
import { type ChildProcess, spawn } from "node:child_process";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";
import { beforeAll, expect, it } from "vitest";
import { getForm, localUser } from "../../app/_server";
import { read } from "../../app/_server/db";
import { onEachDatabase } from "./support/databases";
import { random } from "./support/random";

const long = process.env.EQUIFORM_LONG === "1";
const kills = long ? 40 : 6;
const documents = long ? 60 : 16;
const folder = join(process.cwd(), "build", "tests");
const programs = { worker: join(folder, "worker.mjs"), submitter: join(folder, "submitter.mjs") };

beforeAll(async () => {
  const source = (path: string) => fileURLToPath(new URL(path, import.meta.url));
  await build({
    entryPoints: [
      { in: source("../../app/_server/checks/worker.ts"), out: "worker" },
      { in: source("./support/submitter.ts"), out: "submitter" },
    ],
    outdir: folder,
    outExtension: { ".js": ".mjs" },
    bundle: true,
    platform: "node",
    format: "esm",
    external: ["better-sqlite3", "@prisma/*", "pg"],
    banner: {
      js: 'import { createRequire as makeRequire } from "node:module"; const require = makeRequire(import.meta.url);',
    },
  });
});

const pause = (milliseconds: number) => new Promise((resolve) => setTimeout(resolve, milliseconds));
const exited = (child: ChildProcess) =>
  new Promise<number | null>((resolve) =>
    child.exitCode !== null || child.signalCode !== null ? resolve(child.exitCode) : child.on("exit", resolve),
  );

onEachDatabase("killed processes", (url) => {
  it(`lose and double nothing in ${kills} kills`, async () => {
    const environment = {
      ...process.env,
      EQUIFORM_DATABASE_URL: url(),
      EQUIFORM_WORKERS: "2",
      EQUIFORM_LEASE_SECONDS: "1",
      EQUIFORM_CHECK_THREAD: fileURLToPath(new URL("./support/thread.mjs", import.meta.url)),
    };
    const start = (program: string, ...words: string[]) =>
      spawn(process.execPath, [program, ...words], { env: environment, stdio: ["ignore", "inherit", "inherit"] });
    const draw = random(20_260_101);
    let worker = start(programs.worker);
    let submitter = start(programs.submitter, String(documents));
    for (let kill = 0; kill < kills; kill++) {
      await pause(200 + draw() * 1500);
      if (draw() < 0.6) {
        worker.kill("SIGKILL");
        await exited(worker);
        worker = start(programs.worker);
      } else {
        submitter.kill("SIGKILL");
        await exited(submitter);
        submitter = start(programs.submitter, String(documents));
      }
    }
    expect(await exited(submitter)).toBe(0);
    while ((await read().job.count({ where: { state: { not: "done" } } })) > 0) await pause(100);
    worker.kill("SIGTERM");
    expect(await exited(worker)).toBe(0);

    const forms = await read().form.findMany({ include: { versions: true }, orderBy: { number: "asc" } });
    expect(forms.map((form) => form.number)).toEqual(Array.from({ length: documents }, (_, i) => i + 1));
    expect(new Set(forms.flatMap((form) => form.versions.map((version) => version.digest))).size).toBe(documents);
    expect(await read().check.count()).toBe(documents);
    expect(await read().job.count()).toBe(documents);
    expect(await read().idempotency.count()).toBe(documents);
    expect(await read().mark.count()).toBe(documents);
    expect(await read().fingerprint.count()).toBe(documents);
    // Of any two equal forms exactly one was compared with the other: the later accepted with the earlier.
    expect(await read().comparison.count()).toBe((documents * (documents - 1)) / 2);
    for (const form of forms) {
      const view = await getForm(localUser, `n6k1L0-${form.number}`);
      expect(view?.state).toBe("accepted");
    }
  });
});

// Bundles the programs that run outside Next with esbuild: the command line, the check worker and its thread.
import { existsSync, mkdirSync, readdirSync, renameSync, rmSync, statSync, utimesSync } from "node:fs";
import { join } from "node:path";
import { root } from "./install.mjs";

const server = ["engine", "app/_server", "app/_contract", "generated", "prisma"];

/** The programs: their entry point, what they are made of, and their name under build/. */
export const programs = {
  equiform: { entry: "app/_server/cli/main.ts", sources: ["engine", "app/_server/cli"] },
  worker: { entry: "app/_server/checks/worker.ts", sources: server },
  "check-thread": { entry: "app/_server/checks/thread.ts", sources: ["engine", "app/_server/checks"] },
  "compute-thread": { entry: "app/_server/compute/thread.ts", sources: ["engine", "app/_server/compute"] },
  env: { entry: "app/_server/env.ts", sources: ["app/_server/env.ts"] },
  bench: { entry: "app/_server/bench/main.ts", sources: ["engine", "app/_server/bench"] },
  seed: { entry: "prisma/seed.ts", sources: server },
};

/** Newest modification time of a folder and everything in it, in milliseconds; a removed file counts through its folder. */
function newest(path) {
  if (!existsSync(path)) return 0;
  const own = statSync(path);
  let latest = own.mtimeMs;
  if (!own.isDirectory()) return latest;
  for (const entry of readdirSync(path, { withFileTypes: true })) {
    const child = join(path, entry.name);
    latest = Math.max(latest, entry.isDirectory() ? newest(child) : statSync(child).mtimeMs);
  }
  return latest;
}

const target = (name) => join(root, "build", `${name}.mjs`);

/** True when build/NAME.mjs is newer than its sources, the lockfile and this file. */
export function isFresh(name) {
  if (!existsSync(target(name))) return false;
  const built = statSync(target(name)).mtimeMs;
  const inputs = [...programs[name].sources, "package-lock.json", "app/_server/start/bundle.mjs"];
  return inputs.every((path) => newest(join(root, path)) < built);
}

/** Builds build/NAME.mjs if it is older than its sources. Written under another name first, so that a running command never reads half a file. */
export async function bundle(name) {
  if (isFresh(name)) return;
  const { ensureKernel } = await import("../../../engine/tape/kernel/build.mjs");
  await ensureKernel();
  const started = new Date();
  const { build } = await import("esbuild");
  mkdirSync(join(root, "build"), { recursive: true });
  const temporary = join(root, "build", `.${name}.${process.pid}.mjs`);
  try {
    await build({
      entryPoints: [join(root, programs[name].entry)],
      absWorkingDir: root,
      outfile: temporary,
      bundle: true,
      platform: "node",
      target: "node20",
      format: "esm",
      // Native and generated-code packages are loaded from node_modules; the command line needs none of them.
      external: ["better-sqlite3", "@prisma/*", "pg", "server-only"],
      loader: { ".wasm": "binary" },
      banner: {
        js: '#!/usr/bin/env node\nimport { createRequire as makeRequire } from "node:module";\nconst require = makeRequire(import.meta.url);',
      },
      logLevel: "warning",
    });
    // Dated at the start: a source saved while the bundle was being made is newer than it.
    utimesSync(temporary, started, started);
    renameSync(temporary, target(name));
  } finally {
    rmSync(temporary, { force: true });
  }
}

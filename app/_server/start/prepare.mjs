// What has to be there before the server runs: packages, database clients, bundles, an up-to-date database, a build of the pages.
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { checkNode, exclusively, install, root } from "./install.mjs";

export { root } from "./install.mjs";

export const childEnvironment = () => ({ ...process.env, NEXT_TELEMETRY_DISABLED: "1" });

/** Runs one step in a child process and ends this one if it fails; says what takes long. */
function step(name, args, quiet) {
  const started = Date.now();
  const done = spawnSync(process.execPath, args, {
    cwd: root,
    env: childEnvironment(),
    stdio: quiet ? ["ignore", "pipe", "pipe"] : "inherit",
    encoding: "utf8",
  });
  if (done.status !== 0) {
    if (quiet) process.stderr.write(`${done.stdout}${done.stderr}`);
    console.error(`equiform: ${name} failed.`);
    process.exit(1);
  }
  const seconds = (Date.now() - started) / 1000;
  if (seconds > 1) console.error(`equiform: ${name} (${seconds.toFixed(0)} s)`);
}

/** The environment, validated; ends the process with one clear line where it cannot be used. */
export async function settings() {
  const { bundle } = await import("./bundle.mjs");
  await bundle("env");
  const { parseEnvironment } = await import(pathToFileURL(join(root, "build", "env.mjs")).href);
  try {
    return parseEnvironment(process.env);
  } catch (error) {
    console.error(`equiform: ${error.message}`);
    process.exit(2);
  }
}

const pageSources = [
  "app",
  "engine",
  "public",
  "prisma/schema.prisma",
  "next.config.js",
  "proxy.ts",
  "instrumentation.ts",
  "package-lock.json",
  "tsconfig.json",
];

/** Hash over everything that the pages are built from. */
function hashOfPages() {
  const hash = createHash("sha256");
  const add = (path) => {
    for (const entry of readdirSync(path, { withFileTypes: true }).sort((a, b) => (a.name < b.name ? -1 : 1))) {
      const child = join(path, entry.name);
      if (entry.isDirectory()) add(child);
      else hash.update(child.slice(root.length)).update("\0").update(readFileSync(child)).update("\0");
    }
  };
  for (const name of pageSources) {
    const path = join(root, name);
    if (!existsSync(path)) continue;
    if (/\.[a-z]+$/.test(name)) hash.update(name).update("\0").update(readFileSync(path)).update("\0");
    else add(path);
  }
  return hash.digest("hex");
}

/** Packages, clients, and the bundles named. */
export async function prepareCode(programs) {
  checkNode();
  install();
  exclusively("generate", () => step("database clients", ["prisma/generate.mjs"], true));
  exclusively("kernel", () => step("kernel", ["engine/tape/kernel/build.mjs"], true));
  // The pages hold the kernel too, so it is made even where no bundle is.
  const { ensureKernel } = await import("../../../engine/tape/kernel/build.mjs");
  await ensureKernel();
  const { bundle } = await import("./bundle.mjs");
  for (const name of programs) await bundle(name);
}

export const migrate = (url) => step("database", ["prisma/migrate-deploy.mjs", url], false);

/** Builds the pages unless they are those of today's sources. */
export function buildPages() {
  const stamp = join(root, ".next", "equiform-sources");
  exclusively("pages", () => {
    const hash = hashOfPages();
    if (existsSync(join(root, ".next", "BUILD_ID")) && existsSync(stamp) && readFileSync(stamp, "utf8") === hash)
      return;
    console.error("equiform: building the pages (about half a minute)");
    step("pages", ["node_modules/next/dist/bin/next", "build"], true);
    writeFileSync(stamp, hash);
  });
}

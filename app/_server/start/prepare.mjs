// What has to be there before the server runs: packages, database clients, bundles, an up-to-date database, a build of the pages.
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { checkNode, exclusively, install, root } from "./install.mjs";

export { root } from "./install.mjs";

export const childEnvironment = () => ({ ...process.env, NEXT_TELEMETRY_DISABLED: "1" });

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

/** Does one part in this process and ends it with a clear line if that fails. */
async function part(name, work) {
  try {
    return await work();
  } catch (error) {
    // What a child said is on its own streams; an error of ours says everything in its message.
    console.error(`equiform: ${name} failed: ${error.stderr?.toString().trim() || error.message}`);
    process.exit(1);
  }
}

/** Packages, clients, and the bundles named. */
export async function prepareCode(programs) {
  checkNode();
  install();
  // Imported only now: these need the packages.
  const { generate } = await import("../../../prisma/generate.mjs");
  await part("database clients", () => exclusively("generate", generate));
  // The pages hold the kernel too, so it is made even where no bundle is.
  const { ensureKernel } = await import("../../../engine/tape/kernel/build.mjs");
  await part("kernel", ensureKernel);
  const { bundle } = await import("./bundle.mjs");
  for (const name of programs) await part(`bundle ${name}`, () => bundle(name));
}

/** Brings the database to today's schema. */
export async function migrate(url) {
  const { migrate: deploy } = await import("../../../prisma/migrate-deploy.mjs");
  for (const name of await part("database", () => deploy(url))) console.error(`equiform: database: applied ${name}`);
}

/** Builds the pages unless they are those of today's sources. */
export function buildPages() {
  const stamp = join(root, ".next", "equiform-sources");
  exclusively("pages", () => {
    const hash = hashOfPages();
    if (existsSync(join(root, ".next", "BUILD_ID")) && existsSync(stamp) && readFileSync(stamp, "utf8") === hash)
      return;
    console.error("equiform: building the pages (about half a minute)");
    const started = Date.now();
    const done = spawnSync(process.execPath, ["node_modules/next/dist/bin/next", "build"], {
      cwd: root,
      env: childEnvironment(),
      encoding: "utf8",
    });
    if (done.status !== 0) {
      process.stderr.write(`${done.stdout}${done.stderr}`);
      console.error("equiform: the pages could not be built; the messages are above.");
      process.exit(1);
    }
    writeFileSync(stamp, hash);
    console.error(`equiform: pages built (${((Date.now() - started) / 1000).toFixed(0)} s)`);
  });
}

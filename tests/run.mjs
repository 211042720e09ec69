// `npm test`: installs what it needs, then format and lint, import table, types, unit and property tests, browser tests. Nothing else decides.
// --long (npm run test:long) takes full counts of fuzz and kill tests. The last line is "N passed, N failed"; the status is 0 only without failures.
import { spawnSync } from "node:child_process";
import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import { delimiter, join } from "node:path";
import { checkNode, install, root } from "../app/_server/start/install.mjs";
import { prepareCode } from "../app/_server/start/prepare.mjs";

const env = { ...process.env, CI: process.env.CI ?? "1", NEXT_TELEMETRY_DISABLED: "1" };
if (process.argv.includes("--long")) env.EQUIFORM_LONG = "1";
const results = join(root, "build", "results");

/** Debian packages that tests use, and how to see that they are there. */
const tools = [
  { name: "chromium", found: () => browser() !== null, why: "browser tests" },
  { name: "pari-gp", found: () => onPath("gp") !== null, why: "comparisons with PARI/GP" },
  { name: "postgresql", found: () => existsSync("/usr/lib/postgresql"), why: "the database tests on PostgreSQL" },
];

function onPath(command) {
  for (const folder of (process.env.PATH ?? "").split(delimiter)) {
    const path = join(folder, command);
    if (folder !== "" && existsSync(path)) return path;
  }
  return null;
}

const browser = () =>
  process.env.EQUIFORM_CHROMIUM ?? onPath("chromium") ?? onPath("chromium-browser") ?? onPath("google-chrome");

function installTools() {
  const missing = tools.filter((tool) => !tool.found());
  if (missing.length === 0) return;
  const names = missing.map((tool) => tool.name);
  if (process.getuid?.() === 0 && onPath("apt-get")) {
    console.error(`tests: installing ${names.join(", ")}`);
    const quiet = {
      stdio: ["ignore", "ignore", "inherit"],
      env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" },
    };
    spawnSync("apt-get", ["update", "-q"], quiet);
    // One by one: one that the system does not know must not keep the others away.
    for (const name of names) spawnSync("apt-get", ["install", "-y", "-q", "--no-install-recommends", name], quiet);
  }
  for (const tool of missing.filter((other) => !other.found()))
    console.error(
      `tests: ${tool.name} is not installed and could not be; needed for ${tool.why}. On Debian: apt-get install ${tool.name}`,
    );
}

let passed = 0;
let failed = 0;

/** Runs one step; `count` reads passed and failed tests from its results, otherwise the step counts as one. */
function step(name, args, count) {
  const started = Date.now();
  console.log(`\n=== ${name}`);
  const done = spawnSync(process.execPath, args, { cwd: root, env, stdio: "inherit" });
  let counts = count?.() ?? { passed: done.status === 0 ? 1 : 0, failed: 0 };
  // A step that fails without a failed test has failed all the same: a suite that did not load, a server that did not start.
  if (done.status !== 0 && counts.failed === 0) counts = { ...counts, failed: 1 };
  passed += counts.passed;
  failed += counts.failed;
  console.log(
    `=== ${name}: ${done.status === 0 ? "passed" : "FAILED"} (${((Date.now() - started) / 1000).toFixed(0)} s)`,
  );
}

function readResults(name) {
  try {
    return JSON.parse(readFileSync(join(results, name), "utf8"));
  } catch {
    return null;
  }
}

/** Tests that were skipped count as failed: nothing may pass by not running. */
function vitestCounts() {
  const report = readResults("vitest.json");
  return report
    ? { passed: report.numPassedTests, failed: report.numTotalTests - report.numPassedTests }
    : { passed: 0, failed: 1 };
}

function playwrightCounts() {
  const stats = readResults("playwright.json")?.stats;
  return stats
    ? { passed: stats.expected, failed: stats.unexpected + stats.flaky + stats.skipped }
    : { passed: 0, failed: 1 };
}

checkNode();
install();
installTools();
await prepareCode(["equiform", "worker", "check-thread", "compute-thread", "seed"]);
rmSync(results, { recursive: true, force: true });
mkdirSync(results, { recursive: true });
const modules = (path) => join("node_modules", path);

step("format and lint", [modules("@biomejs/biome/bin/biome"), "check", "--error-on-warnings", "."]);
step("import table", [
  modules("dependency-cruiser/bin/dependency-cruise.mjs"),
  "--config",
  ".dependency-cruiser.cjs",
  ...["engine", "app", "prisma", "e2e", "proxy.ts"].filter((path) => existsSync(join(root, path))),
]);
// Types of routes and style sheets, which the compiler needs and the repository does not hold.
spawnSync(process.execPath, [modules("next/dist/bin/next"), "typegen"], {
  cwd: root,
  env,
  stdio: ["ignore", "ignore", "inherit"],
});
step("types", [modules("typescript/bin/tsc"), "--noEmit", "-p", "."]);
step(
  "unit and property tests",
  [
    modules("vitest/vitest.mjs"),
    "run",
    "--reporter=default",
    "--reporter=json",
    `--outputFile.json=${join(results, "vitest.json")}`,
  ],
  vitestCounts,
);
if (browser()) env.EQUIFORM_CHROMIUM = browser();
env.PLAYWRIGHT_JSON_OUTPUT_NAME = join(results, "playwright.json");
step("browser tests", [modules("@playwright/test/cli.js"), "test", "--reporter=line,json"], playwrightCounts);

console.log(`\n${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);

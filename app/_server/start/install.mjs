// Makes sure that the packages of package-lock.json are installed. Plain JavaScript without dependencies: it runs before anything is installed.
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

export const root = join(dirname(fileURLToPath(import.meta.url)), "..", "..", "..");

const oldestNode = [20, 19, 0];

/** Ends the process with a clear message where Node is older than what the packages need. */
export function checkNode() {
  const have = process.versions.node.split(".").map(Number);
  for (let i = 0; i < 3; i++) {
    if (have[i] > oldestNode[i]) return;
    if (have[i] < oldestNode[i]) {
      console.error(`equiform: Node.js ${oldestNode.join(".")} or newer is needed; this is ${process.versions.node}.`);
      process.exit(1);
    }
  }
}

const sleep = (milliseconds) => Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, milliseconds);

const isAlive = (pid) => {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === "EPERM";
  }
};

/** Runs `work` while no other process of this checkout does: two commands started at once must not install or build over each other. */
export function exclusively(name, work) {
  mkdirSync(join(root, "build"), { recursive: true });
  const lock = join(root, "build", `.${name}.lock`);
  for (;;) {
    try {
      writeFileSync(lock, String(process.pid), { flag: "wx" });
      break;
    } catch (error) {
      if (error.code !== "EEXIST") throw error;
      let owner = Number.NaN;
      try {
        owner = Number(readFileSync(lock, "utf8"));
        // A lock file that is still empty after a second belongs to a process that died between creating and writing it.
        if (owner === 0 && Date.now() - statSync(lock).mtimeMs < 1000) owner = process.ppid;
      } catch {
        continue;
      }
      if (!isAlive(owner)) rmSync(lock, { force: true });
      else sleep(100);
    }
  }
  try {
    return work();
  } finally {
    rmSync(lock, { force: true });
  }
}

const lockDigest = () =>
  createHash("sha256")
    .update(readFileSync(join(root, "package-lock.json")))
    .digest("hex");
const stamp = join(root, "node_modules", ".equiform-lock");

/** True when node_modules holds what package-lock.json asks for. */
export function isInstalled() {
  if (!existsSync(join(root, "node_modules", ".package-lock.json"))) return false;
  if (existsSync(stamp)) return readFileSync(stamp, "utf8") === lockDigest();
  // Installed by hand: npm writes its own record after the packages, so one newer than the lockfile is up to date.
  const fresh =
    statSync(join(root, "node_modules", ".package-lock.json")).mtimeMs >=
    statSync(join(root, "package-lock.json")).mtimeMs;
  if (fresh) writeFileSync(stamp, lockDigest());
  return fresh;
}

const has = (command) => spawnSync(command, ["--version"], { stdio: "ignore" }).error === undefined;

/** Installs the packages if they are missing or the lockfile changed. Everything said goes to standard error. */
export function install() {
  if (isInstalled()) return;
  exclusively("install", () => {
    if (isInstalled()) return;
    const missing = ["python3", "make", "c++"].filter((tool) => !has(tool));
    console.error("equiform: installing packages (once; one to three minutes)");
    const done = spawnSync("npm", ["ci", "--no-audit", "--no-fund"], {
      cwd: root,
      stdio: ["ignore", 2, 2],
      shell: process.platform === "win32",
      // Set by a test run or a production shell, it would leave out the packages that build the program.
      env: { ...process.env, NODE_ENV: "" },
    });
    if (done.status !== 0) {
      console.error("equiform: npm ci failed; its messages are above.");
      if (missing.length > 0)
        console.error(
          `equiform: ${missing.join(", ")} not found. The database module is compiled where no prebuilt one fits: install python3, make and a C++ compiler.`,
        );
      process.exit(1);
    }
    writeFileSync(stamp, lockDigest());
  });
}

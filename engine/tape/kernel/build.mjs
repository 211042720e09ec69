/**
 * Builds the kernel: AssemblyScript to one WebAssembly module, and that to `engine/tape/kernel/module.ts` (base64, ignored by git),
 * so that Node, workers and browsers load it the same way. Does nothing while the sources have the hash of the last build.
 * `node engine/tape/kernel/build.mjs`, or `ensureKernel()`.
 */
import { createHash } from "node:crypto";
import {
  copyFileSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";

const here = dirname(fileURLToPath(import.meta.url));
const sources = join(here, "assembly");
const output = join(here, "module.ts");
const root = join(here, "..", "..", "..");

/** Files that stand in the place of "./field" for a copy of the interpreter each. */
const fields = ["mersenne31", "montgomery31", "mersenne61", "real", "complex"];

function hashOfSources() {
  const hash = createHash("sha256");
  const files = readdirSync(sources).sort();
  for (const file of files) hash.update(`${file}\0`).update(readFileSync(join(sources, file)));
  hash.update(readFileSync(fileURLToPath(import.meta.url)));
  return hash.digest("hex");
}

/** Builds when needed. Returns whether it did. */
export async function ensureKernel() {
  const hash = hashOfSources();
  if (existsSync(output) && readFileSync(output, "utf8").includes(hash)) return false;
  const work = join(root, "build", "kernel", String(process.pid));
  mkdirSync(work, { recursive: true });
  try {
    for (const file of ["state.ts", "index.ts"]) copyFileSync(join(sources, file), join(work, file));
    for (const field of fields) {
      mkdirSync(join(work, field), { recursive: true });
      copyFileSync(join(sources, `${field}.ts`), join(work, field, "field.ts"));
      copyFileSync(join(sources, "interpreter.ts"), join(work, field, "interpreter.ts"));
    }
    const asc = (await import("assemblyscript/asc")).default;
    const { error, stderr } = await asc.main([
      "index.ts",
      "--baseDir",
      work,
      "--outFile",
      "kernel.wasm",
      "-O3",
      "--enable",
      "simd",
      "--runtime",
      "stub",
      "--maximumMemory",
      "16384",
    ]);
    if (error) throw new Error(`building the kernel failed: ${error.message}\n${stderr.toString()}`);
    const wasm = readFileSync(join(work, "kernel.wasm"));
    const text = `/** Made by build.mjs from the sources with this hash; do not edit. */
export const KERNEL_SOURCES = "${hash}";
export const KERNEL_WASM = "${wasm.toString("base64")}";
`;
    // Written aside and renamed, so that nobody reads half a file.
    writeFileSync(join(work, "module.ts"), text);
    renameSync(join(work, "module.ts"), output);
  } finally {
    rmSync(work, { recursive: true, force: true });
  }
  return true;
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  const built = await ensureKernel();
  console.log(built ? "kernel built" : "kernel is up to date");
}

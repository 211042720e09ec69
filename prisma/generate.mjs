// Generates the two database clients: SQLite from prisma/schema.prisma, PostgreSQL from the same text with another provider.
import { execFileSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";

const root = join(dirname(fileURLToPath(import.meta.url)), "..");
const master = join(root, "prisma", "schema.prisma");
export const derived = join(root, "generated", "schema.postgresql.prisma");
const stamp = join(root, "generated", ".schema-hash");

/** The PostgreSQL schema as text. */
export function postgresqlSchema() {
  const source = readFileSync(master, "utf8");
  const text = source
    .replace('provider = "sqlite"', 'provider = "postgresql"')
    .replace('"../generated/sqlite"', '"./postgresql"');
  if (!text.includes('provider = "postgresql"') || !text.includes('"./postgresql"'))
    throw new Error("prisma/schema.prisma no longer holds the lines from which the PostgreSQL schema is derived");
  return text;
}

/** Generates both clients into generated/ unless they are those of today's schema and Prisma version. */
export function generate() {
  const version = JSON.parse(readFileSync(join(root, "node_modules", "prisma", "package.json"), "utf8")).version;
  const text = postgresqlSchema();
  const hash = createHash("sha256").update(version).update(text).digest("hex");
  const complete = ["sqlite", "postgresql"].every((name) => existsSync(join(root, "generated", name, "client.ts")));
  if (complete && existsSync(stamp) && readFileSync(stamp, "utf8") === hash) return;
  mkdirSync(join(root, "generated"), { recursive: true });
  rmSync(stamp, { force: true });
  writeFileSync(derived, text);
  // Prisma wants the name of an engine that it never runs here; any existing file keeps it from trying to download one.
  // Only for this child: with the variable set, Prisma's own migrate command would do nothing and report success.
  const env = {
    ...process.env,
    PRISMA_SCHEMA_ENGINE_BINARY: process.execPath,
    CHECKPOINT_DISABLE: "1",
    PRISMA_HIDE_UPDATE_MESSAGE: "1",
  };
  for (const schema of [master, derived]) {
    execFileSync(process.execPath, [join(root, "node_modules/prisma/build/index.js"), "generate", "--schema", schema], {
      cwd: root,
      env,
      // Its messages go to standard error, which is printed only where it fails.
      stdio: ["ignore", "pipe", "pipe"],
    });
  }
  writeFileSync(stamp, hash);
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? "").href) generate();

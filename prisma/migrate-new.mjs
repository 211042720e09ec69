// node prisma/migrate-new.mjs NAME: writes the migrations from the schema kept beside the last one to today's, for both databases.
// What Prisma cannot express (full-text indexes, rows that must exist) is written by hand into the new migration.sql before it is committed.
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { postgresqlSchema } from "./generate.mjs";
import { diff } from "./schema-engine.mjs";

const name = process.argv[2];
if (!/^[a-z0-9_]+$/.test(name ?? "")) {
  console.error("usage: node prisma/migrate-new.mjs NAME (lower-case letters, digits and _)");
  process.exit(2);
}
const here = dirname(fileURLToPath(import.meta.url));
const schemas = { sqlite: readFileSync(join(here, "schema.prisma"), "utf8"), postgresql: postgresqlSchema() };
const time = new Date().toISOString().replace(/\D/g, "").slice(0, 14);
for (const [provider, schema] of Object.entries(schemas)) {
  const folder = join(here, "migrations", provider);
  const last = existsSync(folder)
    ? readdirSync(folder)
        .filter((entry) => /^\d{14}_/.test(entry))
        .sort()
        .at(-1)
    : undefined;
  const before = last ? readFileSync(join(folder, last, "schema.prisma"), "utf8") : null;
  const sql = await diff(provider, before, schema);
  if (sql === null) {
    console.log(`${provider}: no change`);
    continue;
  }
  const made = join(folder, `${time}_${name}`);
  mkdirSync(made, { recursive: true });
  writeFileSync(join(made, "migration.sql"), sql);
  writeFileSync(join(made, "schema.prisma"), schema);
  writeFileSync(join(folder, "migration_lock.toml"), `provider = "${provider}"\n`);
  console.log(`${provider}: wrote ${made}`);
}
// The WebAssembly engine keeps timers of its own.
process.exit(0);

// Applies prisma/migrations to a database, without Prisma's engine but with its bookkeeping table, so that Prisma's tools read it as theirs.
// node prisma/migrate-deploy.mjs URL (file:PATH or postgresql://...)
import { createHash, randomUUID } from "node:crypto";
import { mkdirSync, readdirSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";

const here = dirname(fileURLToPath(import.meta.url));

/** Prisma's own key of the advisory lock that keeps two deployments apart. */
const advisoryLock = 72707369;

const bookkeeping = {
  sqlite: `CREATE TABLE IF NOT EXISTS "_prisma_migrations" ("id" TEXT PRIMARY KEY NOT NULL, "checksum" TEXT NOT NULL, "finished_at" DATETIME,
    "migration_name" TEXT NOT NULL, "logs" TEXT, "rolled_back_at" DATETIME, "started_at" DATETIME NOT NULL DEFAULT current_timestamp,
    "applied_steps_count" INTEGER UNSIGNED NOT NULL DEFAULT 0)`,
  postgresql: `CREATE TABLE IF NOT EXISTS "_prisma_migrations" ("id" VARCHAR(36) PRIMARY KEY NOT NULL, "checksum" VARCHAR(64) NOT NULL,
    "finished_at" TIMESTAMPTZ, "migration_name" VARCHAR(255) NOT NULL, "logs" TEXT, "rolled_back_at" TIMESTAMPTZ,
    "started_at" TIMESTAMPTZ NOT NULL DEFAULT now(), "applied_steps_count" INTEGER NOT NULL DEFAULT 0)`,
};
const insert =
  'INSERT INTO "_prisma_migrations" ("id", "checksum", "migration_name", "started_at", "finished_at", "applied_steps_count") VALUES ($1, $2, $3, $4, $5, 1)';
const select =
  'SELECT "migration_name", "checksum" FROM "_prisma_migrations" WHERE "rolled_back_at" IS NULL AND "finished_at" IS NOT NULL';

function migrationsOf(provider) {
  const folder = join(here, "migrations", provider);
  return readdirSync(folder)
    .filter((name) => /^\d{14}_/.test(name))
    .sort()
    .map((name) => {
      const sql = readFileSync(join(folder, name, "migration.sql"), "utf8");
      return { name, sql, checksum: createHash("sha256").update(sql).digest("hex") };
    });
}

async function openSqlite(url) {
  const path = url.replace(/^file:/, "");
  mkdirSync(dirname(path), { recursive: true });
  const { default: Database } = await import("better-sqlite3");
  const database = new Database(path, { timeout: 15_000 });
  database.pragma("journal_mode = WAL");
  database.pragma("synchronous = FULL");
  return {
    exec: async (sql) => void database.exec(sql),
    rows: async (sql) => database.prepare(sql).all(),
    run: async (sql, values) => void database.prepare(sql.replace(/\$\d/g, "?")).run(...values),
    begin: async () => {
      // This pragma does nothing inside a transaction; the keys are verified before the commit instead.
      database.pragma("foreign_keys = OFF");
      database.exec("BEGIN IMMEDIATE");
    },
    commit: async () => {
      const broken = database.pragma("foreign_key_check");
      if (broken.length > 0) throw new Error(`foreign key broken: ${JSON.stringify(broken[0])}`);
      database.exec("COMMIT");
    },
    rollback: async () => {
      if (database.inTransaction) database.exec("ROLLBACK");
    },
    close: async () => void database.close(),
  };
}

async function openPostgresql(url) {
  const { default: pg } = await import("pg");
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  await client.query(`SELECT pg_advisory_lock(${advisoryLock})`);
  return {
    exec: async (sql) => void (await client.query(sql)),
    rows: async (sql) => (await client.query(sql)).rows,
    run: async (sql, values) => void (await client.query(sql, values)),
    begin: async () => void (await client.query("BEGIN")),
    commit: async () => void (await client.query("COMMIT")),
    rollback: async () => void (await client.query("ROLLBACK")),
    close: async () => void (await client.end()),
  };
}

/** Applies what is missing and returns the names of the migrations applied; throws if one fails or was edited after it was applied. */
export async function migrate(url) {
  const provider = /^postgres(ql)?:/.test(url) ? "postgresql" : "sqlite";
  const database = provider === "sqlite" ? await openSqlite(url) : await openPostgresql(url);
  const applied = [];
  try {
    await database.exec(bookkeeping[provider]);
    for (const { name, sql, checksum } of migrationsOf(provider)) {
      await database.begin();
      try {
        // Read inside the transaction: another process may be migrating the same file.
        const done = (await database.rows(select)).find((row) => row.migration_name === name);
        if (done && done.checksum !== checksum) throw new Error("it was edited after it was applied");
        if (!done) {
          await database.exec(sql);
          const now = new Date().toISOString();
          await database.run(insert, [randomUUID(), checksum, name, now, now]);
          applied.push(name);
        }
        await database.commit();
      } catch (error) {
        await database.rollback();
        throw new Error(`migration ${name} failed: ${error.message}`);
      }
    }
  } finally {
    await database.close();
  }
  return applied;
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? "").href) {
  const url = process.argv[2];
  if (!url) {
    console.error("usage: node prisma/migrate-deploy.mjs URL (file:PATH or postgresql://...)");
    process.exit(2);
  }
  try {
    for (const name of await migrate(url)) console.log(`applied ${name}`);
  } catch (error) {
    console.error(`equiform: ${error.message}`);
    process.exit(1);
  }
}

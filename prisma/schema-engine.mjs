// Prisma's schema engine as WebAssembly, used in development only: it diffs two schemas without a database and without a download.
import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { pathToFileURL } from "node:url";
import { bindMigrationAwareSqlAdapterFactory, ColumnTypeEnum } from "@prisma/driver-adapter-utils";

const require = createRequire(import.meta.url);

/** An adapter that is no database: it answers the engine's greeting, which is all that a diff of two schemas asks of PostgreSQL. */
const noDatabase = () => ({
  provider: "postgres",
  adapterName: "none",
  queryRaw: async ({ sql }) =>
    /version\(\)/i.test(sql)
      ? {
          columnNames: ["namespace_exists", "version", "numeric_version"],
          columnTypes: [ColumnTypeEnum.Boolean, ColumnTypeEnum.Text, ColumnTypeEnum.Int32],
          rows: [[true, "PostgreSQL 15.0", 150000]],
        }
      : { columnNames: [], columnTypes: [], rows: [] },
  executeRaw: async () => 0,
  executeScript: async () => undefined,
  startTransaction: async () => {
    throw new Error("there is no database behind this adapter");
  },
  getConnectionInfo: () => ({ schemaName: "public", supportsRelationJoins: true }),
  dispose: async () => undefined,
});

async function adapterFor(provider) {
  if (provider === "postgresql")
    return {
      provider: "postgres",
      adapterName: "none",
      connect: async () => noDatabase(),
      connectToShadowDb: async () => noDatabase(),
    };
  const { PrismaBetterSqlite3 } = await import("@prisma/adapter-better-sqlite3");
  return new PrismaBetterSqlite3({ url: ":memory:" }, { shadowDatabaseUrl: ":memory:" });
}

let loaded;

/** Once for each process: the glue code keeps views of one instance's memory. */
function load() {
  loaded ??= instantiate();
  return loaded;
}

async function instantiate() {
  const folder = dirname(require.resolve("@prisma/schema-engine-wasm"));
  const glue = await import(pathToFileURL(join(folder, "schema_engine_bg.js")).href);
  const { instance } = await WebAssembly.instantiate(readFileSync(join(folder, "schema_engine_bg.wasm")), {
    "./schema_engine_bg.js": glue,
  });
  glue.__wbg_set_wasm(instance.exports);
  instance.exports.__wbindgen_start();
  return glue;
}

/** The SQL that turns a database of schema `from` (null: an empty one) into one of schema `to`; null when there is nothing to do. */
export async function diff(provider, from, to) {
  globalThis.PRISMA_WASM_PANIC_REGISTRY ??= { set_message: (message) => console.error(message) };
  const glue = await load();
  const file = (content) => ({ tag: "schemaDatamodel", files: [{ path: "schema.prisma", content }] });
  const engine = await glue.SchemaEngine.new(
    { datamodels: [["schema.prisma", to]] },
    () => undefined,
    bindMigrationAwareSqlAdapterFactory(await adapterFor(provider)),
  );
  const out = await engine.diff({
    from: from === null ? { tag: "empty" } : file(from),
    to: file(to),
    script: true,
    exitCode: true,
    filters: { externalTables: [], externalEnums: [] },
  });
  return out.exitCode === 2 ? out.stdout : null;
}

/** SQLite: one file, one writer at a time across all processes, durable at every commit. */
import { PrismaBetterSqlite3 } from "@prisma/adapter-better-sqlite3";
import type Database from "better-sqlite3";
import { PrismaClient } from "../../../generated/sqlite/client";
import type { Adapter } from "./adapter";

/** Milliseconds that a statement waits for another process's transaction. */
const busyTimeout = 15_000;

/**
 * Prisma begins transactions with a plain BEGIN, which takes the write lock only at the first write and then fails at once if another
 * process wrote after the first read. BEGIN IMMEDIATE takes it at the start and waits for it.
 */
class DurableSqlite extends PrismaBetterSqlite3 {
  override async connect() {
    const connection = await super.connect();
    const database = (connection as unknown as { client: Database.Database }).client;
    database.pragma("journal_mode = WAL");
    database.pragma("synchronous = FULL");
    database.pragma("foreign_keys = ON");
    const prepare = database.prepare.bind(database);
    database.prepare = ((sql: string) => prepare(sql === "BEGIN" ? "BEGIN IMMEDIATE" : sql)) as typeof database.prepare;
    return connection;
  }
}

export function openSqlite(url: string): Adapter {
  const client = () => new PrismaClient({ adapter: new DurableSqlite({ url, timeout: busyTimeout }) });
  const reader = client();
  const writer = client();
  return {
    kind: "sqlite",
    reader,
    writer,
    close: async () => {
      await reader.$disconnect();
      await writer.$disconnect();
    },
  };
}

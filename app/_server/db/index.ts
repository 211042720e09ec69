/** The database of this process: opened once from the environment, read freely, written only in short transactions. */
import { environment } from "../env";
import type { Adapter, Client, Transaction } from "./adapter";
import { openPostgresql } from "./postgresql";
import { openSqlite } from "./sqlite";

export type { Adapter, Client, Transaction } from "./adapter";

export const openDatabase = (url: string): Adapter =>
  /^postgres(ql)?:/.test(url) ? openPostgresql(url) : openSqlite(url);

/** Next loads modules more than once in one process; a second SQLite writer in it would wait for the first for ever. */
const shared = globalThis as typeof globalThis & { equiformDatabase?: Adapter | undefined };

export function database(): Adapter {
  shared.equiformDatabase ??= openDatabase(environment().databaseUrl);
  return shared.equiformDatabase;
}

/** Puts another database in place (tests run one suite over both kinds); undefined closes nothing and reopens from the environment. */
export function setDatabase(adapter: Adapter | undefined): void {
  shared.equiformDatabase = adapter;
}

export const read = (): Client => database().reader;

/**
 * Milliseconds that a transaction waits for its turn, and that it may take. A transaction that begins after Prisma gave up waiting for it
 * would never end, so the first is longer than any adapter waits.
 */
const limits = { maxWait: 600_000, timeout: 30_000 };

/** PostgreSQL's serialisation failure, deadlock and unique violation under a race, as Prisma names them. */
const raced = new Set(["P2034", "P2002"]);

/**
 * Runs `work` in one transaction: all of it is stored or nothing. Nothing may be computed in it. A transaction that lost a race is run
 * again, so `work` must read what it decides by.
 */
export async function write<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await database().writer.$transaction(work, limits);
    } catch (error) {
      if (attempt >= 5 || !raced.has((error as { code?: string }).code ?? "")) throw error;
    }
  }
}

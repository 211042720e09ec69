/** SQLite: one file, one writer at a time across all processes, durable at every commit. */
import { PrismaBetterSqlite3 } from "@prisma/adapter-better-sqlite3";
import type Database from "better-sqlite3";
import { PrismaClient } from "../../../generated/sqlite/client";
import type { Adapter } from "./adapter";

/** Milliseconds that a transaction waits for its turn; Prisma's own limit must be longer (see `limits` in index.ts). */
const usualPatience = 30_000;

/** Milliseconds between two attempts to take the write lock from another process. */
const pause = 15;

type Connection = Awaited<ReturnType<PrismaBetterSqlite3["connect"]>>;

/**
 * Transactions as this library needs them. Prisma's adapter begins them with a plain BEGIN, which takes the write lock only at the first
 * write and then fails at once if another process wrote after the first read; it waits for a lock by blocking the whole process; and a
 * BEGIN that fails leaves its mutex locked for ever. Here BEGIN IMMEDIATE is tried again and again without blocking, until patience ends.
 */
class PatientSqlite extends PrismaBetterSqlite3 {
  readonly #patience: number;

  constructor(url: string, patience: number) {
    super({ url });
    this.#patience = patience;
  }

  override async connect(): Promise<Connection> {
    const connection = await super.connect();
    const database = (connection as unknown as { client: Database.Database }).client;
    database.pragma("journal_mode = WAL");
    database.pragma("synchronous = FULL");
    database.pragma("foreign_keys = ON");
    // Readers never wait in this mode; only opening and checkpoints do, for a moment.
    database.pragma("busy_timeout = 1000");
    const begin = database.prepare("BEGIN IMMEDIATE");
    const prepare = database.prepare.bind(database);
    const nothing = prepare("SELECT 1");
    // The transaction has begun already when the adapter begins it.
    database.prepare = ((sql: string) => (sql === "BEGIN" ? { run: () => nothing.get() } : prepare(sql))) as never;
    const turns = new Turns();
    const start = connection.startTransaction.bind(connection);
    connection.startTransaction = async (level) => {
      const deadline = Date.now() + this.#patience;
      const leave = await turns.enter(deadline);
      try {
        await untilFree(database, begin, deadline);
      } catch (error) {
        leave();
        throw error;
      }
      const transaction = await start(level);
      const commit = transaction.commit.bind(transaction);
      const rollback = transaction.rollback.bind(transaction);
      transaction.commit = () => commit().finally(leave);
      transaction.rollback = () => rollback().finally(leave);
      return transaction;
    };
    return connection;
  }
}

/** Takes the write lock. SQLITE_BUSY: another process has it. */
async function untilFree(database: Database.Database, begin: Database.Statement, deadline: number): Promise<void> {
  // The lock is tried for, not waited for: waiting would block the process.
  database.pragma("busy_timeout = 0");
  try {
    for (;;) {
      try {
        begin.run();
        return;
      } catch (error) {
        if (!String((error as { code?: string }).code).startsWith("SQLITE_BUSY") || Date.now() > deadline) throw error;
      }
      await new Promise((resolve) => setTimeout(resolve, pause));
    }
  } finally {
    database.pragma("busy_timeout = 1000");
  }
}

/** Lets one transaction after the other onto a connection, in the order in which they came. */
class Turns {
  #last: Promise<void> = Promise.resolve();

  /** Resolves to the function that ends the turn; rejects when the turn has not come by `deadline`. */
  async enter(deadline: number): Promise<() => void> {
    let leave: () => void = () => undefined;
    const turn = new Promise<void>((resolve) => {
      leave = resolve;
    });
    const before = this.#last;
    this.#last = before.then(() => turn);
    let timer: NodeJS.Timeout | undefined;
    const late = new Promise<"late">((resolve) => {
      timer = setTimeout(() => resolve("late"), deadline - Date.now());
    });
    const came = await Promise.race([before, late]);
    clearTimeout(timer);
    if (came === "late") {
      leave();
      throw new Error("the database is busy: other transactions took too long");
    }
    return leave;
  }
}

export function openSqlite(url: string, patience = usualPatience): Adapter {
  const client = () => new PrismaClient({ adapter: new PatientSqlite(url, patience) });
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

/** The two databases behind one client type: all that differs between SQLite and PostgreSQL. */
import type { Prisma, PrismaClient } from "../../../generated/sqlite/client";

export type Client = PrismaClient;
export type Transaction = Prisma.TransactionClient;

export interface Adapter {
  readonly kind: "sqlite" | "postgresql";
  /** For reads outside transactions. */
  readonly reader: Client;
  /** For transactions only: on SQLite a query outside would join whatever transaction is open on the connection. */
  readonly writer: Client;
  readonly close: () => Promise<void>;
}

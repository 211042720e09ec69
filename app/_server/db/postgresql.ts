/** PostgreSQL: any number of processes on any number of machines. */
import { PrismaPg } from "@prisma/adapter-pg";
import { PrismaClient } from "../../../generated/postgresql/client";
import type { Adapter, Client } from "./adapter";

/** Milliseconds that a query waits for a free connection. */
const connectionPatience = 30_000;

export function openPostgresql(url: string): Adapter {
  // Both clients come from one set of models: same methods, same rows.
  const client = new PrismaClient({
    adapter: new PrismaPg({ connectionString: url, connectionTimeoutMillis: connectionPatience }),
  }) as unknown as Client;
  return {
    kind: "postgresql",
    reader: client,
    writer: client,
    close: () => client.$disconnect(),
  };
}

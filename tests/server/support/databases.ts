/** One suite over both databases: each test starts from an empty, migrated one. */
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, afterEach, beforeAll, beforeEach, describe } from "vitest";
import { openDatabase, setDatabase } from "../../../app/_server/db";
import { findPostgresql, type Server, startPostgresql } from "./postgresql";

interface Migrations {
  readonly migrate: (url: string) => Promise<string[]>;
}

export async function migrateDatabase(url: string): Promise<string[]> {
  const { migrate } = (await import("../../../prisma/migrate-deploy.mjs" as string)) as Migrations;
  return migrate(url);
}

/** Declares `body` once for SQLite and once for PostgreSQL; `url()` is the address of the current test's database. */
export function onEachDatabase(name: string, body: (url: () => string) => void): void {
  const programs = findPostgresql();
  if (programs === null) console.error(`PostgreSQL is not installed here: "${name}" runs on SQLite only.`);
  const kinds: [string, () => Maker][] = [["SQLite", sqliteMaker]];
  if (programs !== null) kinds.push(["PostgreSQL", () => postgresqlMaker(programs)]);
  describe.each(kinds)(`${name} on %s`, (_kind, makerOf) => {
    let maker: Maker;
    let url = "";
    beforeAll(() => {
      maker = makerOf();
    });
    afterAll(() => maker.stop());
    beforeEach(async () => {
      url = maker.make();
      await migrateDatabase(url);
      setDatabase(openDatabase(url));
    });
    afterEach(async () => {
      const { database } = await import("../../../app/_server/db");
      await database().close();
      setDatabase(undefined);
    });
    body(() => url);
  });
}

interface Maker {
  readonly make: () => string;
  readonly stop: () => void;
}

function sqliteMaker(): Maker {
  const folder = mkdtempSync(join(tmpdir(), "equiform-sqlite-"));
  let count = 0;
  return {
    make: () => `file:${join(folder, `test${++count}.db`)}`,
    stop: () => rmSync(folder, { recursive: true, force: true }),
  };
}

function postgresqlMaker(programs: string): Maker {
  const server: Server = startPostgresql(programs);
  let count = 0;
  return { make: () => server.makeDatabase(`test${++count}`), stop: server.stop };
}

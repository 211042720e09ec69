/** Transactions on SQLite: durable settings, one after the other, patient with other processes, and never stuck after a failure. */
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import Database from "better-sqlite3";
import { afterEach, beforeEach, expect, it } from "vitest";
import type { Adapter } from "../../app/_server/db";
import { openSqlite } from "../../app/_server/db/sqlite";
import { migrateDatabase } from "./support/databases";

let folder: string;
let adapter: Adapter;
let other: Database.Database;

beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), "equiform-sqlite-"));
  await migrateDatabase(`file:${join(folder, "a.db")}`);
  adapter = openSqlite(`file:${join(folder, "a.db")}`, 600);
  other = new Database(join(folder, "a.db"), { timeout: 0 });
});
afterEach(async () => {
  await adapter.close();
  other.close();
  rmSync(folder, { recursive: true, force: true });
});

const addGroup = (id: string) => adapter.writer.$transaction((t) => t.group.create({ data: { id, name: id } }));
const pause = (milliseconds: number) => new Promise((resolve) => setTimeout(resolve, milliseconds));

it("writes ahead, synchronises at every commit and keeps foreign keys", async () => {
  const pragma = async (name: string) =>
    Object.values((await adapter.writer.$queryRawUnsafe<object[]>(`PRAGMA ${name}`))[0] ?? {})[0];
  expect(await pragma("journal_mode")).toBe("wal");
  expect(Number(await pragma("synchronous"))).toBe(2);
  expect(Number(await pragma("foreign_keys"))).toBe(1);
  await expect(
    adapter.writer.$transaction((t) =>
      t.mark.create({ data: { versionId: "none", code: "a", state: "b", evidence: "c" } }),
    ),
  ).rejects.toThrow(/[Ff]oreign key/);
});

it("takes the write lock when a transaction begins", async () => {
  await adapter.writer.$transaction(async (t) => {
    await t.group.count();
    expect(() => other.exec("BEGIN IMMEDIATE")).toThrow(/locked/);
  });
  other.exec("BEGIN IMMEDIATE; COMMIT");
});

it("waits for another process without blocking this one, then goes on", async () => {
  other.exec("BEGIN IMMEDIATE");
  const writing = addGroup("patient");
  let ticks = 0;
  const timer = setInterval(() => ticks++, 10);
  await pause(300);
  clearInterval(timer);
  expect(ticks).toBeGreaterThan(5);
  expect(await adapter.reader.group.count()).toBe(1);
  other.exec("COMMIT");
  await writing;
  expect(await adapter.reader.group.count()).toBe(2);
});

it("fails when patience ends, and works again afterwards", async () => {
  other.exec("BEGIN IMMEDIATE");
  const results = await Promise.allSettled([addGroup("a"), addGroup("b"), addGroup("c")]);
  expect(results.map((result) => result.status)).toEqual(["rejected", "rejected", "rejected"]);
  other.exec("COMMIT");
  await addGroup("d");
  expect((await adapter.reader.group.findMany({ orderBy: { id: "asc" } })).map((row) => row.id)).toEqual([
    "d",
    "local",
  ]);
});

it("stores nothing of a transaction that throws, and the next one is whole", async () => {
  const failing = adapter.writer.$transaction(async (t) => {
    await t.group.create({ data: { id: "half", name: "half" } });
    throw new Error("on purpose");
  });
  await expect(failing).rejects.toThrow("on purpose");
  await Promise.all(["x", "y", "z"].map(addGroup));
  expect((await adapter.reader.group.findMany({ orderBy: { id: "asc" } })).map((row) => row.id)).toEqual([
    "local",
    "x",
    "y",
    "z",
  ]);
});

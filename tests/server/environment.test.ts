/** The environment: defaults, and one clear line for each variable that cannot be used. */
import { resolve } from "node:path";
import { expect, it } from "vitest";
import { parseEnvironment } from "../../app/_server/env";

it("has a default for everything", () => {
  const environment = parseEnvironment({});
  expect(environment).toMatchObject({ port: 3000, baseUrl: "http://localhost:3000", leaseMilliseconds: 20_000 });
  expect(environment.databaseUrl).toBe(`file:${resolve("data/equiform.db")}`);
  expect(environment.workers).toBeGreaterThanOrEqual(1);
  expect(parseEnvironment({ PORT: "", EQUIFORM_DATABASE_URL: "" })).toEqual(environment);
});

it("takes what is given", () => {
  expect(
    parseEnvironment({
      PORT: "4000",
      EQUIFORM_DATABASE_URL: "postgresql://u@h/d",
      EQUIFORM_BASE_URL: "https://forms.example/",
    }),
  ).toMatchObject({ port: 4000, databaseUrl: "postgresql://u@h/d", baseUrl: "https://forms.example" });
  expect(parseEnvironment({ EQUIFORM_DATA: "/var/lib/x" }).databaseUrl).toBe("file:/var/lib/x/equiform.db");
});

it.each([
  ["PORT", "http"],
  ["PORT", "70000"],
  ["PORT", "0"],
  ["EQUIFORM_WORKERS", "-1"],
  ["EQUIFORM_WORKERS", "1.5"],
  ["EQUIFORM_DATABASE_URL", "mysql://x"],
  ["EQUIFORM_BASE_URL", "forms.example"],
  ["EQUIFORM_LEASE_SECONDS", "1e9"],
])("names %s=%s as unusable", (name, value) => {
  expect(() => parseEnvironment({ [name]: value })).toThrow(`${name}: `);
  expect(() => parseEnvironment({ [name]: value, EQUIFORM_CHECK_MINUTES: "x" })).toThrow("EQUIFORM_CHECK_MINUTES: ");
});

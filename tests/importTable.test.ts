/** The import table is enforced: each planted violation must be found by the linter, so that the rules cannot pass silently. */
import { spawnSync } from "node:child_process";
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join, relative } from "node:path";
import { afterEach, describe, expect, it } from "vitest";

const made: string[] = [];
afterEach(() => {
  for (const path of made.splice(0)) rmSync(path, { recursive: true, force: true });
});

/** Plants files in a small tree with the project's layout, outside the project, and lints it with the project's rules. */
function lint(files: Record<string, string>): { status: number | null; output: string } {
  const root = mkdtempSync(join(process.cwd(), "build", "lint-"));
  made.push(root);
  for (const [name, text] of Object.entries({ "tsconfig.json": "{}", "package.json": '{"type":"module"}', ...files })) {
    mkdirSync(dirname(join(root, name)), { recursive: true });
    writeFileSync(join(root, name), text);
  }
  const folders = [...new Set(Object.keys(files).map((name) => name.split("/")[0] as string))];
  const run = spawnSync(
    process.execPath,
    [
      join(process.cwd(), "node_modules/dependency-cruiser/bin/dependency-cruise.mjs"),
      "--config",
      join(process.cwd(), ".dependency-cruiser.cjs"),
      ...folders,
    ],
    { cwd: root, encoding: "utf8" },
  );
  return { status: run.status, output: run.stdout + run.stderr };
}

mkdirSync("build", { recursive: true });
const value = "export const value = 1;\n";

/** [rule that must speak, importing file, imported file] */
const violations = [
  ["only-what-sources-may-import", "engine/sources/a.ts", "engine/notation/plain.ts"],
  ["only-what-sources-may-import", "engine/sources/b.ts", "engine/tape/plain.ts"],
  ["only-what-sources-may-import", "engine/sources/c.ts", "engine/evaluate/plain.ts"],
  ["only-what-sources-may-import", "engine/sources/d.ts", "engine/derive/plain.ts"],
  ["only-what-derive-may-import", "engine/derive/a.ts", "engine/sources/plain.ts"],
  ["only-what-notation-may-import", "engine/notation/a.ts", "engine/fields/plain.ts"],
  ["only-what-checks-may-import", "engine/checks/a.ts", "app/_contract/plain.ts"],
  ["only-what-contract-may-import", "app/_contract/a.ts", "app/_server/plain.ts"],
  ["only-what-ui-may-import", "app/_ui/a.ts", "app/_server/plain.ts"],
  ["only-what-api-may-import", "app/api/v1/forms/route.ts", "prisma/plain.ts"],
  ["e2e-speaks-http", "e2e/a.spec.ts", "engine/fields/plain.ts"],
] as const;

const importing = (from: string, to: string, what = "{ value }") =>
  `import ${what} from "${relative(dirname(from), to).replace(/\.ts$/, "")}";\nexport { value };\n`;

describe("the import table", () => {
  it("accepts what it allows", () => {
    const { status, output } = lint({
      "engine/result.ts": value,
      "engine/fields/a.ts": importing("engine/fields/a.ts", "engine/result.ts"),
      "engine/sources/b.ts": importing("engine/sources/b.ts", "engine/fields/a.ts"),
    });
    expect(output).toContain("no dependency violations found");
    expect(status).toBe(0);
  });

  it("names every planted violation", () => {
    const files: Record<string, string> = {};
    for (const [, from, to] of violations) {
      files[to] = value;
      files[from] = importing(from, to);
    }
    const { status, output } = lint(files);
    for (const [rule, from, to] of violations) expect(output).toContain(`${rule}: ${from} → ${to}`);
    expect(status).toBe(violations.length + 1); // the browser test breaks two rules at once
  });

  it("refuses a type-only import across the table, cycles, and Node modules in the engine", () => {
    const { output, status } = lint({
      "engine/notation/a.ts": "export type A = 1;\n",
      "engine/sources/b.ts": 'import type { A } from "../notation/a";\nexport const b: A = 1;\n',
      "engine/fields/c.ts": 'export { d } from "./d";\nexport const c = 1;\n',
      "engine/fields/d.ts": 'export { c } from "./c";\nexport const d = 1;\n',
      "engine/fields/e.ts": 'import { readFileSync } from "node:fs";\nexport { readFileSync };\n',
    });
    expect(output).toContain("only-what-sources-may-import: engine/sources/b.ts → engine/notation/a.ts");
    expect(output).toContain("no-cycles");
    expect(output).toContain("engine-is-pure: engine/fields/e.ts");
    expect(status).toBeGreaterThan(0);
  });
});

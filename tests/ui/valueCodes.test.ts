/** Every fault that points, momenta, helicities and derivations can have is explained on the reference page, and nothing else is. */
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { expect, it } from "vitest";
import { valueCodes } from "../../app/(pages)/reference/valueCodes";

const root = join(__dirname, "..", "..", "engine");
const prefix = /"((?:derive|helicities|momenta|points|values)-[a-z-]+)"/g;

it("explains the codes that the engine's sources name", () => {
  const named = ["derive", "evaluate", "kinematics"].flatMap((folder) =>
    readdirSync(join(root, folder)).flatMap((file) =>
      [...readFileSync(join(root, folder, file), "utf8").matchAll(prefix)].map(([, code]) => code),
    ),
  );
  expect(Object.keys(valueCodes).sort()).toEqual([...new Set(named)].sort());
});

/** Submits the entry documents of the seed library through the normal door. Started beside the server; it may be stopped and started again. */
import { readdirSync, readFileSync } from "node:fs";
import { join, relative, sep } from "node:path";
import { database } from "../app/_server/db";
import { environmentOrExit } from "../app/_server/env";
import { type SeedFile, submitSeeds } from "../app/_server/library";

function documentsIn(folder: string): SeedFile[] {
  let names: string[];
  try {
    names = readdirSync(folder, { recursive: true }) as string[];
  } catch {
    console.error(`equiform: there is no folder ${folder}; the library starts empty.`);
    return [];
  }
  return names
    .filter((name) => name.endsWith(".json"))
    .sort()
    .map((name) => ({
      path: relative(folder, join(folder, name)).split(sep).join("/"),
      text: readFileSync(join(folder, name), "utf8"),
    }));
}

// Started by another process with a channel to it: without that process nobody waits for the library.
process.on("disconnect", () => process.exit(0));
await submitSeeds(documentsIn(environmentOrExit().seedFolder));
await database().close();
if (process.connected) process.disconnect();

// `npm run equiform -- ...`: installs and bundles when needed, then runs the command line in this process.
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { checkNode, install, root } from "../start/install.mjs";

checkNode();
install();
// Imported only now: bundling needs the packages.
const { bundle } = await import("../start/bundle.mjs");
try {
  await bundle("equiform");
} catch {
  // esbuild has printed what is wrong and where.
  console.error("equiform: the command line could not be built.");
  process.exit(1);
}
// npm runs scripts in the package's folder; file names are meant from where the person is.
if (process.env.npm_lifecycle_event === "equiform" && process.env.INIT_CWD) process.chdir(process.env.INIT_CWD);
await import(pathToFileURL(join(root, "build", "equiform.mjs")).href);

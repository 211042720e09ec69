// `npm run bench -- [--json] [--only NAME]`: bundles the bench and runs it.
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { bundle } from "./bundle.mjs";
import { checkNode, install, root } from "./install.mjs";

checkNode();
install();
await bundle("bench");
const { main } = await import(pathToFileURL(join(root, "build", "bench.mjs")).href);
process.exit(main(process.argv.slice(2), root));

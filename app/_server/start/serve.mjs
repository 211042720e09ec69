// The web process: Next on the loopback address. It ends when the process that started it does, however that one ended.
import { createRequire } from "node:module";
import { pathToFileURL } from "node:url";

process.on("disconnect", () => process.exit(0));
const next = createRequire(import.meta.url).resolve("next/dist/bin/next");
const [mode, port] = process.argv.slice(2);
process.argv = [process.execPath, next, mode, "--port", port, "--hostname", "127.0.0.1"];
await import(pathToFileURL(next).href);

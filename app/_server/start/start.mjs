// `npm start`: from a fresh clone to a served page, with nothing to configure.
import { buildPages, migrate, prepareCode, settings } from "./prepare.mjs";
import { run } from "./run.mjs";

process.env.NODE_ENV = "production";
await prepareCode(["worker", "check-thread", "compute-thread", "seed"]);
const environment = await settings();
await migrate(environment.databaseUrl);
buildPages();
await run("start", environment);

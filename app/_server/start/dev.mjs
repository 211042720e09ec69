// `npm run dev`: the same with pages that follow their sources. The worker's bundle is made at the start.
import { migrate, prepareCode, settings } from "./prepare.mjs";
import { run } from "./run.mjs";

await prepareCode(["worker", "check-thread", "compute-thread", "seed"]);
const environment = await settings();
await migrate(environment.databaseUrl);
await run("dev", environment);

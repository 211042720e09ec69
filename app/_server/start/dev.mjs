// `npm run dev`: the same with pages that follow their sources. The worker's bundle is made at the start.
import { migrate, prepareCode } from "./prepare.mjs";
import { run } from "./run.mjs";

await prepareCode(["worker", "check-thread", "seed"]);
migrate();
await run("dev");

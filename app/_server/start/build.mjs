// `npm run build`: everything that can be made ahead, without starting anything.
import { buildPages, prepareCode } from "./prepare.mjs";

process.env.NODE_ENV = "production";
await prepareCode(["equiform", "worker", "check-thread", "compute-thread", "seed"]);
buildPages();

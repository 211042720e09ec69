/** Whether the server can do its work, for people and monitors. */
import { engineVersion, protocolVersion } from "../../engine/checks/versions";
import type { Health } from "../_contract";
import { database, read } from "./db";

export async function health(): Promise<Health> {
  const [queued, running] = await Promise.all([
    read().job.count({ where: { state: "queued" } }),
    read().job.count({ where: { state: "running" } }),
  ]);
  return {
    status: "ok",
    database: database().kind,
    protocol: protocolVersion,
    engine: engineVersion,
    jobs: { queued, running },
  };
}

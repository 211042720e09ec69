/** How a check comes into being. */
import { randomBytes } from "node:crypto";
import type { Transaction } from "../db";

/** 256 random bits from which the engine draws primes and points: drawn after the document has arrived, so nobody can fit a formula to them. */
const drawSeed = (): string => randomBytes(32).toString("hex");

/** Writes a check and its job: from here on it is not lost. `source` is the document of a check without keeping. */
export async function queueCheck(
  transaction: Transaction,
  check: {
    readonly id: string;
    readonly versionId?: string;
    readonly source?: string;
    readonly userId: string;
    readonly priority: number;
  },
): Promise<void> {
  const { priority, ...row } = check;
  await transaction.check.create({ data: { ...row, seed: drawSeed() } });
  await transaction.job.create({ data: { checkId: check.id, state: "queued", priority } });
}

/** A check without keeping, and how a check is stopped. */

import type { Report } from "../../../engine/checks/report";
import type { Diagnostic } from "../../../engine/result";
import { type CheckView, checkIdPattern, type StartCheckReply } from "../../_contract";
import { type Transaction, write } from "../db";
import { bodyHash, readStoredEntry } from "../forms/entry";
import { faultOfKey, once } from "../idempotency";
import { randomId } from "../identifiers";
import { answer, type Outcome, plainDiagnostic, refuse } from "../outcome";
import type { Principal } from "../principal";
import { queueCheck } from "./enqueue";
import { requestCancel } from "./queue";
import { getCheck } from "./read";

/**
 * Queues a check of the entry document `value` that keeps no form. A document that cannot be read is answered as the command line does: by
 * a finished check whose report says `unreadable` and why.
 */
export async function startCheck(
  principal: Principal,
  value: unknown,
  options: { readonly idempotencyKey?: string | undefined } = {},
): Promise<Outcome<StartCheckReply>> {
  const fault = faultOfKey(options.idempotencyKey);
  if (fault) return fault;
  const read = readStoredEntry(value);
  const id = randomId();
  const userId = principal.userId;
  const repeatable = { principal, route: "POST checks", key: options.idempotencyKey, bodyHash: bodyHash(value) };
  return write((transaction) =>
    once(transaction, repeatable, async () => {
      const source = read.ok ? read.value.source : (JSON.stringify(value) ?? "null");
      // Ahead of the library's own checks: somebody is waiting for this one.
      await queueCheck(transaction, { id, source, userId, priority: 10 });
      if (!read.ok) await endUnreadable(transaction, id, read.diagnostics);
      return { check: id };
    }),
  );
}

async function endUnreadable(transaction: Transaction, id: string, faults: readonly Diagnostic[]): Promise<void> {
  const report: Report = {
    verdict: "unreadable",
    comparisons: [],
    leftOut: [],
    marks: {},
    poles: [],
    diagnosis: [],
    diagnostics: faults.map(plainDiagnostic),
    summary: "The entry document cannot be read.",
  };
  await transaction.check.update({
    where: { id },
    data: { verdict: "unreadable", report: JSON.stringify(report), finishedAt: new Date() },
  });
  await transaction.job.update({
    where: { checkId: id },
    data: { state: "done", stage: "done", seq: { increment: 1 } },
  });
}

/** Stops a check. Of a form's check: the version becomes a draft. A check that has ended is not changed. */
export async function cancelCheck(principal: Principal, id: string): Promise<Outcome<CheckView>> {
  const before = checkIdPattern.test(id) ? await getCheck(principal, id) : null;
  if (!before) return refuse("not-found", `There is no check ${id} that you may see.`);
  if (before.state !== "cancelled" && !(await requestCancel(id)))
    return refuse("already-finished", "The check has already ended; its result stands.");
  const after = await getCheck(principal, id);
  return after ? answer(after) : refuse("not-found", `There is no check ${id} that you may see.`);
}

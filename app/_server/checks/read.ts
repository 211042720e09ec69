/** Reads checks, and follows one while it runs. */

import { type Report, reportSchema } from "../../../engine/checks/report";
import { type CheckEvent, type CheckState, type CheckView, checkIdPattern, type VersionState } from "../../_contract";
import { read } from "../db";
import { formIdOf } from "../identifiers";
import { type Principal, visibleTo } from "../principal";

/** Whose check it is: the caller's own, or that of a form of one of its groups. */
const seenBy = (principal: Principal, id: string) => ({
  id,
  OR: [
    { userId: principal.userId, versionId: null },
    { version: { form: { groupId: { in: [...principal.groups] } } } },
    { version: { state: "accepted", form: visibleTo(principal) } },
  ],
});

/** A stored report; null for one that was written under rules which today's schema no longer reads: it has to be checked again. */
export function reportOf(text: string | null): Report | null {
  if (text === null) return null;
  const parsed = reportSchema.safeParse(JSON.parse(text));
  return parsed.success ? parsed.data : null;
}

/**
 * The check `id`, or null if there is none that `principal` may see. The job is read after the check's own row: where the check ends in
 * between, the job is done and the report seems missing, so both are read again.
 */
export async function getCheck(principal: Principal, id: string): Promise<CheckView | null> {
  if (!checkIdPattern.test(id)) return null;
  const find = () =>
    read().check.findFirst({
      where: seenBy(principal, id),
      include: { job: true, version: { include: { form: true } } },
    });
  let row = await find();
  if (row?.job?.state === "done" && row.report === null) row = await find();
  if (!row?.job) return null;
  const { job, version } = row;
  const form = version ? formIdOf(version.form) : null;
  const entry = JSON.parse(version?.source ?? row.source ?? "null") as { title?: unknown; notation?: unknown } | null;
  const text = (value: unknown) => (typeof value === "string" ? value : null);
  return {
    id,
    state: job.state as CheckState,
    progress: { stage: job.stage, done: job.done, total: job.total },
    report: reportOf(row.report),
    form,
    version: version && form ? `${form}v${version.no}` : null,
    versionState: (version?.state as VersionState | undefined) ?? null,
    title: text(entry?.title),
    notation: text(entry?.notation),
    createdAt: row.createdAt.toISOString(),
    seq: job.seq,
  };
}

/** Milliseconds between two looks at the row: at most four events in a second. */
const interval = 250;

/**
 * The events of check `id` after event `afterSeq` (-1: from the first on), until the check has ended or `signal` aborts. The row is the
 * record: events between two looks are one event, and the last one always arrives. Nothing for a check that `principal` may not see.
 */
export async function* watchCheck(
  principal: Principal,
  id: string,
  afterSeq: number,
  signal: AbortSignal,
): AsyncGenerator<CheckEvent> {
  let last = afterSeq;
  while (!signal.aborted) {
    const find = () => read().check.findFirst({ where: seenBy(principal, id), select: { verdict: true, job: true } });
    let row = checkIdPattern.test(id) ? await find() : null;
    if (row?.job?.state === "done" && row.verdict === null) row = await find();
    if (!row?.job) return;
    const { job } = row;
    const state = job.state as CheckState;
    const over = state === "done" || state === "cancelled";
    // The last event is sent even to a caller that has it already: its connection broke before it could know that it was the last.
    if (job.seq > last || over) {
      last = job.seq;
      yield {
        seq: job.seq,
        state,
        progress: { stage: job.stage, done: job.done, total: job.total },
        verdict: row.verdict as CheckEvent["verdict"],
      };
    }
    if (over) return;
    await pause(interval, signal);
  }
}

function pause(milliseconds: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const timer = setTimeout(end, milliseconds);
    function end(): void {
      clearTimeout(timer);
      signal.removeEventListener("abort", end);
      resolve();
    }
    signal.addEventListener("abort", end);
  });
}

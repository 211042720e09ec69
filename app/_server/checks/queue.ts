/**
 * The queue of checks on the Job rows. A worker holds a job by a lease; each taking up raises `attempt`, and whoever comes with an older
 * attempt is ignored. So a worker may die at any moment, or be thought dead and come back late, and nothing is lost or done twice.
 */
import { read, type Transaction, write } from "../db";
import { readStoredEntry } from "../forms/entry";
import { acceptedBeside, type Place } from "./beside";
import type { Progress } from "./engine";

/** A job in hand. `compared` maps names to the digests of the forms that the check is compared with. */
export interface Claim {
  readonly checkId: string;
  readonly attempt: number;
  readonly failures: number;
  readonly entry: unknown;
  readonly seed: string;
  readonly accepted: readonly {
    readonly name: string;
    readonly versionId: string;
    readonly digest: string;
    readonly entry: unknown;
  }[];
}

/** Jobs that may be taken up: waiting, or held by a worker that has been silent for longer than its lease. */
const available = (now: Date) => [{ state: "queued" }, { state: "running", leaseUntil: { lt: now } }];

/** What a worker's right to a job is tested by. */
export const heldBy = ({ checkId, attempt }: Pick<Claim, "checkId" | "attempt">) => ({
  checkId,
  attempt,
  state: "running",
});

/** Takes up the most urgent job for `lease` milliseconds; null when there is none. `now` is the clock. */
export async function claimNext(lease: number, now: () => Date = () => new Date()): Promise<Claim | null> {
  for (;;) {
    const candidate = await read().job.findFirst({
      where: { OR: available(now()) },
      orderBy: [{ priority: "desc" }, { createdAt: "asc" }, { checkId: "asc" }],
    });
    if (!candidate) return null;
    const { checkId } = candidate;
    const attempt = candidate.attempt + 1;
    const taken = await write(async (transaction) => {
      const from = { checkId, attempt: candidate.attempt, OR: available(now()) };
      if (candidate.cancel) {
        // Cancelled, but its worker died before it could say so.
        const closed = await transaction.job.updateMany({ where: from, data: ended("cancelled") });
        if (closed.count === 1) await putBack(transaction, checkId);
        return false;
      }
      const { count } = await transaction.job.updateMany({
        where: from,
        data: {
          state: "running",
          attempt,
          leaseUntil: new Date(now().getTime() + lease),
          stage: "reading",
          done: 0,
          total: 0,
          seq: { increment: 1 },
        },
      });
      return count === 1;
    });
    // Somebody else was faster: look for the next one.
    if (taken) return { checkId, attempt, failures: candidate.failures, ...(await gather(checkId)) };
  }
}

/** The document of a check, its seed, and the forms it is compared with. */
async function gather(checkId: string): Promise<Pick<Claim, "entry" | "seed" | "accepted">> {
  const check = await read().check.findUniqueOrThrow({
    where: { id: checkId },
    include: { version: { include: { form: { include: { amplitude: true } } } } },
  });
  const source = check.version?.source ?? check.source ?? "null";
  const entry: unknown = JSON.parse(source);
  const place = check.version ? placeOf(check.version) : placeOfEntry(entry);
  const beside = place ? await acceptedBeside(read(), place) : [];
  const sources = await read().version.findMany({
    where: { id: { in: beside.map((other) => other.versionId) } },
    select: { id: true, source: true },
  });
  const sourceOf = new Map(sources.map((row) => [row.id, row.source]));
  return {
    entry,
    seed: check.seed,
    accepted: beside.map((other) => ({
      ...other,
      entry: JSON.parse(sourceOf.get(other.versionId) ?? "null") as unknown,
    })),
  };
}

interface StoredVersion {
  readonly id: string;
  readonly form: {
    readonly rangeFrom: number;
    readonly rangeTo: number;
    readonly component: string;
    readonly target: string;
    readonly visibility: string;
    readonly groupId: string;
    readonly amplitude: { readonly k: number; readonly loops: number };
  };
}

export function placeOf({ id, form }: StoredVersion): Place {
  const { rangeFrom, rangeTo, component, target, visibility, groupId, amplitude } = form;
  return {
    rangeFrom,
    rangeTo,
    component,
    target,
    visibility,
    groupId,
    k: amplitude.k,
    loops: amplitude.loops,
    versionId: id,
  };
}

function placeOfEntry(value: unknown): Place | null {
  const read = readStoredEntry(value);
  if (!read.ok) return null;
  const { rangeFrom, rangeTo, component, target, amplitude } = read.value;
  const { k, loops } = amplitude;
  return { rangeFrom, rangeTo, component, target, k, loops, versionId: null, visibility: "public", groupId: "" };
}

/** Members of a job that has come to its end. */
export const ended = (state: "done" | "cancelled") => ({
  state,
  leaseUntil: null,
  stage: state,
  seq: { increment: 1 },
});

/** A version whose check was cancelled is a draft again. */
async function putBack(transaction: Transaction, checkId: string): Promise<void> {
  await transaction.version.updateMany({ where: { checkId, state: "checking" }, data: { state: "draft" } });
}

/** Writes progress and renews the lease; "lost" when another worker has the job, "cancel" when it is to stop. */
export async function renew(
  claim: Claim,
  lease: number,
  progress: Progress | null,
  now: () => Date = () => new Date(),
): Promise<"held" | "cancel" | "lost"> {
  const { count } = await write((transaction) =>
    transaction.job.updateMany({
      where: heldBy(claim),
      data: {
        leaseUntil: new Date(now().getTime() + lease),
        ...(progress
          ? { stage: progress.stage, done: progress.done, total: progress.total, seq: { increment: 1 } }
          : {}),
      },
    }),
  );
  if (count === 0) return "lost";
  const row = await read().job.findUnique({ where: { checkId: claim.checkId }, select: { cancel: true } });
  return row?.cancel ? "cancel" : "held";
}

/** Gives a job back at once, so that nobody has to wait for the lease: a worker that is shut down, or an error (`failed`). */
export async function release(claim: Claim, failed: boolean): Promise<boolean> {
  const { count } = await write((transaction) =>
    transaction.job.updateMany({
      where: heldBy(claim),
      data: {
        state: "queued",
        leaseUntil: null,
        stage: "waiting",
        seq: { increment: 1 },
        ...(failed ? { failures: { increment: 1 } } : {}),
      },
    }),
  );
  return count === 1;
}

/** Ends a job that was asked to stop. */
export async function endCancelled(claim: Claim): Promise<boolean> {
  return write(async (transaction) => {
    const { count } = await transaction.job.updateMany({ where: heldBy(claim), data: ended("cancelled") });
    if (count === 1) await putBack(transaction, claim.checkId);
    return count === 1;
  });
}

/** Asks a check to stop: at once if it is waiting, else its worker is told. False when it has already ended. */
export async function requestCancel(checkId: string): Promise<boolean> {
  return write(async (transaction) => {
    const waiting = await transaction.job.updateMany({ where: { checkId, state: "queued" }, data: ended("cancelled") });
    if (waiting.count === 1) {
      await putBack(transaction, checkId);
      return true;
    }
    const running = await transaction.job.updateMany({ where: { checkId, state: "running" }, data: { cancel: true } });
    return running.count === 1;
  });
}

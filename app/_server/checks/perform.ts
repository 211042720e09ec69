/** One job from the queue to its end: run in a slot, under a lease that is renewed, with progress written down. */
import type { Report } from "../../../engine/checks/report";
import type { Progress } from "./engine";
import { finish } from "./finish";
import { type Claim, claimNext, endCancelled, release, renew } from "./queue";
import type { Slot } from "./slot";

export interface PerformOptions {
  /** Milliseconds of a lease; it is renewed four times in each. */
  readonly lease: number;
  /** Runs that may end in an error, and takings up in all, before a check is given up as undecided. */
  readonly mostFailures: number;
  readonly mostAttempts: number;
  readonly log: (line: string) => void;
}

/** Milliseconds between two writes of progress: at most four in a second. */
const interval = 250;

export type Performed = "idle" | "done" | "late" | "extended" | "cancelled" | "released" | "failed" | "given-up";

/** Takes up the next job and brings it to its end. "idle" when there is none. When `shutdown` aborts, the job is given back. */
export async function performNext(slot: Slot, options: PerformOptions, shutdown: AbortSignal): Promise<Performed> {
  const claim = await claimNext(options.lease);
  if (!claim) return "idle";
  if (claim.attempt > options.mostAttempts) return giveUp(claim, "it was begun too often without coming to an end");
  const stop = new AbortController();
  let reason: "cancel" | "lost" | "shutdown" | null = null;
  const halt = (why: NonNullable<typeof reason>): void => {
    reason ??= why;
    stop.abort();
  };
  const onShutdown = (): void => halt("shutdown");
  if (shutdown.aborted) onShutdown();
  shutdown.addEventListener("abort", onShutdown);
  const keeper = keepLease(claim, options, halt);
  const result = await slot.run(
    { entry: claim.entry, seed: claim.seed, accepted: claim.accepted },
    (progress) => keeper.note(progress),
    stop.signal,
  );
  await keeper.end();
  shutdown.removeEventListener("abort", onShutdown);
  if (result.kind === "report") return finish(claim, result);
  if (result.kind === "failed") {
    options.log(`check ${claim.checkId}: ${result.message}`);
    if (claim.failures + 1 >= options.mostFailures) return giveUp(claim, "the engine failed");
    return (await release(claim, true)) ? "failed" : "late";
  }
  if (result.why === "time") return giveUp(claim, "it took longer than a check may take here");
  if (reason === "cancel") return (await endCancelled(claim)) ? "cancelled" : "late";
  if (reason === "shutdown") return (await release(claim, false)) ? "released" : "late";
  return "late";
}

/** Renews the lease and writes progress, one write at a time, until it is ended. */
function keepLease(claim: Claim, options: PerformOptions, halt: (why: "cancel" | "lost") => void) {
  let latest: Progress | null = null;
  let going: Promise<void> = Promise.resolve();
  let busy = false;
  const beat = async (): Promise<void> => {
    const progress = latest;
    latest = null;
    try {
      const state = await renew(claim, options.lease, progress);
      if (state !== "held") halt(state);
    } catch (error) {
      // The database is out of reach for now; if it stays so, the lease runs out and the fence does the rest.
      options.log(`check ${claim.checkId}: ${(error as Error).message}`);
    }
  };
  const timer = setInterval(() => {
    if (busy) return;
    busy = true;
    going = beat().finally(() => {
      busy = false;
    });
  }, interval);
  return {
    note: (progress: Progress): void => {
      latest = progress;
    },
    end: async (): Promise<void> => {
      clearInterval(timer);
      await going;
    },
  };
}

/** Ends a check that cannot be brought to an end: undecided, never accepted. */
async function giveUp(claim: Claim, why: string): Promise<"given-up" | "late"> {
  const report: Report = {
    verdict: "undecided",
    comparisons: [],
    leftOut: [],
    marks: {},
    poles: [],
    diagnosis: [],
    diagnostics: [],
    summary: `The check was given up: ${why}. Nothing is known about the form.`,
  };
  return (await finish(claim, { report, protocol: "", engine: "" })) === "done" ? "given-up" : "late";
}

/** Performs jobs one after the other until `shutdown` aborts, looking for new ones every `idle` milliseconds. */
export async function performAll(
  slot: Slot,
  options: PerformOptions & { readonly idle: number },
  shutdown: AbortSignal,
): Promise<void> {
  while (!shutdown.aborted) {
    let performed: Performed = "idle";
    try {
      performed = await performNext(slot, options, shutdown);
    } catch (error) {
      options.log(`worker: ${(error as Error).message}`);
    }
    if (performed !== "idle" && performed !== "failed") continue;
    await new Promise<void>((resolve) => {
      const timer = setTimeout(done, options.idle);
      function done(): void {
        clearTimeout(timer);
        shutdown.removeEventListener("abort", done);
        resolve();
      }
      shutdown.addEventListener("abort", done);
    });
  }
  await slot.close();
}

/** The laws of the queue (DATA rules 4 and 8), the same on both databases. */
import { expect, it } from "vitest";
import { cancelCheck, getCheck, getForm, localUser, startCheck, submitForm, watchCheck } from "../../app/_server";
import { finish } from "../../app/_server/checks/finish";
import { type Claim, claimNext, endCancelled, release, renew } from "../../app/_server/checks/queue";
import { read } from "../../app/_server/db";
import { onEachDatabase } from "./support/databases";
import { entry, report } from "./support/examples";

const lease = 20_000;
const run = (verdict: Parameters<typeof report>[0] = "agrees") => ({
  report: report(verdict),
  protocol: "1",
  engine: "1",
});
const later = (milliseconds: number) => () => new Date(Date.now() + milliseconds);

async function submit(variant = 0, more: Record<string, unknown> = {}) {
  const result = await submitForm(localUser, entry(variant, more));
  if (!result.ok) throw new Error(JSON.stringify(result.problem));
  return result.value;
}

async function claim(now?: () => Date): Promise<Claim> {
  const job = await claimNext(lease, now);
  if (!job) throw new Error("there is no job to take up");
  return job;
}

const stateOf = async (id: string) => (await getForm(localUser, id))?.state;

onEachDatabase("the queue", () => {
  it("takes up each job once, the most urgent first, then in order of arrival", async () => {
    const first = await submit(1);
    const second = await submit(2);
    const urgent = await startCheck(localUser, entry(3));
    const order = [await claim(), await claim(), await claim()].map((job) => job.checkId);
    expect(order).toEqual([urgent.ok && urgent.value.check, first.check, second.check]);
    expect(await claimNext(lease)).toBeNull();
  });

  it("gives one job to one of many workers that ask at once", async () => {
    for (let variant = 0; variant < 5; variant++) await submit(variant);
    const jobs = await Promise.all(Array.from({ length: 12 }, () => claimNext(lease)));
    const taken = jobs.filter((job) => job !== null).map((job) => job.checkId);
    expect(taken).toHaveLength(5);
    expect(new Set(taken).size).toBe(5);
  });

  it("accepts, refuses or holds a version by the verdict", async () => {
    for (const [verdict, state] of [
      ["agrees", "accepted"],
      ["disagrees", "refused"],
      ["unreadable", "refused"],
      ["undecided", "held"],
    ] as const) {
      const { form, check } = await submit();
      expect(await stateOf(form)).toBe("checking");
      expect(await finish(await claim(), run(verdict))).toBe("done");
      expect(await stateOf(form)).toBe(state);
      expect((await getCheck(localUser, check))?.state).toBe("done");
      expect((await getCheck(localUser, check))?.report?.verdict).toBe(verdict);
    }
  });

  it("leaves a job alone while its lease runs, and takes it up again afterwards", async () => {
    await submit();
    const first = await claim();
    expect(await claimNext(lease, later(lease - 1000))).toBeNull();
    expect(await renew(first, lease, { stage: "poles", done: 1, total: 3 }, later(lease - 1000))).toBe("held");
    expect(await claimNext(lease, later(lease + 1000))).toBeNull();
    const second = await claim(later(2 * lease));
    expect(second.checkId).toBe(first.checkId);
    expect(second.attempt).toBe(first.attempt + 1);
    expect(second.seed).toBe(first.seed);
  });

  it("ignores whatever a worker says whose job was taken up by another", async () => {
    const { form, check } = await submit();
    const late = await claim();
    const present = await claim(later(2 * lease));
    expect(await renew(late, lease, { stage: "late", done: 1, total: 1 })).toBe("lost");
    expect(await release(late, false)).toBe(false);
    expect(await endCancelled(late)).toBe(false);
    expect(await finish(late, run("disagrees"))).toBe("late");
    expect(await stateOf(form)).toBe("checking");
    expect((await getCheck(localUser, check))?.progress.stage).toBe("reading");
    expect(await finish(present, run("agrees"))).toBe("done");
    expect(await finish(present, run("disagrees"))).toBe("late");
    expect(await finish(late, run("disagrees"))).toBe("late");
    expect(await stateOf(form)).toBe("accepted");
    expect(await read().comparison.count()).toBe(1);
    expect(await read().fingerprint.count()).toBe(1);
  });

  it("gives a released job back at once and counts its failures", async () => {
    await submit();
    expect(await release(await claim(), false)).toBe(true);
    const second = await claim();
    expect(second.failures).toBe(0);
    expect(await release(second, true)).toBe(true);
    expect((await claim()).failures).toBe(1);
  });

  it("cancels a waiting check at once; its version is a draft", async () => {
    const { form, check } = await submit();
    const cancelled = await cancelCheck(localUser, check);
    expect(cancelled.ok && cancelled.value.state).toBe("cancelled");
    expect(await stateOf(form)).toBe("draft");
    expect(await claimNext(lease)).toBeNull();
    const again = await cancelCheck(localUser, check);
    expect(again.ok && again.value.state).toBe("cancelled");
  });

  it("tells the worker of a running check, which ends it", async () => {
    const { form, check } = await submit();
    const job = await claim();
    await cancelCheck(localUser, check);
    expect(await renew(job, lease, null)).toBe("cancel");
    expect(await endCancelled(job)).toBe(true);
    expect(await finish(job, run())).toBe("late");
    expect(await stateOf(form)).toBe("draft");
  });

  it("ends a cancelled check whose worker died", async () => {
    const { form, check } = await submit();
    await claim();
    await cancelCheck(localUser, check);
    expect(await claimNext(lease, later(2 * lease))).toBeNull();
    expect((await getCheck(localUser, check))?.state).toBe("cancelled");
    expect(await stateOf(form)).toBe("draft");
  });

  it("does not cancel what has ended", async () => {
    const { check } = await submit();
    await finish(await claim(), run());
    const result = await cancelCheck(localUser, check);
    expect(result.ok).toBe(false);
    expect(!result.ok && result.problem.code).toBe("already-finished");
  });

  it("extends the check when an equal was accepted meanwhile that was not compared", async () => {
    await submit(1);
    const { form: second, check } = await submit(2);
    const first = await claim();
    const newcomer = await claim();
    expect(newcomer.accepted).toEqual([]);
    expect(await finish(first, run())).toBe("done");
    expect(await finish(newcomer, run())).toBe("extended");
    expect(await stateOf(second)).toBe("checking");
    expect((await getCheck(localUser, check))?.report).toBeNull();
    const extended = await claim();
    expect(extended.checkId).toBe(check);
    expect(extended.accepted.map((other) => other.name)).toEqual(["n6k1L0-1v1"]);
    expect(await finish(extended, run())).toBe("done");
    expect(await stateOf(second)).toBe("accepted");
    const form = await getForm(localUser, second);
    expect(form?.kind === "form" && form.equalForms).toEqual([{ id: "n6k1L0-1", title: "Variant 1", terms: 3 }]);
  });

  it("never accepts two of many at once without each having been compared with the earlier ones", async () => {
    for (let variant = 1; variant <= 6; variant++) await submit(variant);
    let jobs = await Promise.all(Array.from({ length: 6 }, () => claim()));
    const comparedOf = new Map<string, Set<string>>();
    const order: string[] = [];
    while (jobs.length > 0) {
      const results = await Promise.all(
        jobs.map(async (job) => {
          const result = await finish(job, run());
          if (result === "done") {
            order.push(job.checkId);
            comparedOf.set(job.checkId, new Set(job.accepted.map((other) => other.digest)));
          }
          return result;
        }),
      );
      expect(results.filter((result) => result === "done")).toHaveLength(1);
      jobs = await Promise.all(results.filter((result) => result === "extended").map(() => claim()));
    }
    expect(order).toHaveLength(6);
    const rows = await read().version.findMany({ select: { checkId: true, digest: true } });
    const digestOf = new Map(rows.map((row) => [row.checkId, row.digest]));
    for (const [place, checkId] of order.entries())
      for (const earlier of order.slice(0, place))
        expect(comparedOf.get(checkId)?.has(digestOf.get(earlier) as string)).toBe(true);
  });

  it("compares forms of one n with forms of many n where the ranges meet, and nothing else", async () => {
    const many = {
      amplitude: { n: { from: 6 }, k: 1, loops: 0 },
      notation: "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]",
    };
    await submit(0, many);
    await submit(0, { ...many, amplitude: { n: { from: 7, to: 9 }, k: 1, loops: 0 } });
    await submit(0, { target: "zero" });
    for (let i = 0; i < 3; i++) expect(await finish(await claim(), run())).toMatch(/done|extended/);
    for (let job = await claimNext(lease); job; job = await claimNext(lease)) await finish(job, run());
    await submit(1);
    expect((await claim()).accepted.map((other) => other.name)).toEqual(["nXk1L0-1v1"]);
  });

  it("reports events with rising numbers, continues after the last one seen, and ends", async () => {
    const { check } = await submit();
    const job = await claim();
    const seen: number[] = [];
    const stop = new AbortController();
    const watching = (async () => {
      for await (const event of watchCheck(localUser, check, -1, stop.signal)) {
        seen.push(event.seq);
        if (seen.length === 1) await renew(job, lease, { stage: "values", done: 1, total: 2 });
        else if (event.state === "running") await finish(job, run());
        else expect(event).toMatchObject({ state: "done", verdict: "agrees" });
      }
    })();
    await watching;
    expect(seen).toHaveLength(3);
    expect([...seen].sort((a, b) => a - b)).toEqual(seen);
    const rest: number[] = [];
    for await (const event of watchCheck(localUser, check, seen[1] as number, stop.signal)) rest.push(event.seq);
    expect(rest).toEqual([seen[2]]);
  });
});

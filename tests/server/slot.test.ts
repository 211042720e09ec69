/** Whatever happens in a check's thread, the slot answers and can be used again; and what becomes of the job then. */
import { fileURLToPath } from "node:url";
import { afterEach, describe, expect, it } from "vitest";
import { cancelCheck, getCheck, getForm, localUser, submitForm } from "../../app/_server";
import { performAll, performNext } from "../../app/_server/checks/perform";
import { Slot } from "../../app/_server/checks/slot";
import { read } from "../../app/_server/db";
import { onEachDatabase } from "./support/databases";
import { entry } from "./support/examples";

const program = fileURLToPath(new URL("./support/thread.mjs", import.meta.url));
const slots: Slot[] = [];
const makeSlot = (time = 60_000) => {
  const slot = new Slot({ program, memory: 64, time, grace: 100 });
  slots.push(slot);
  return slot;
};
afterEach(async () => {
  for (const slot of slots.splice(0)) await slot.close();
});

const never = new AbortController().signal;
const task = (note: string) => ({ entry: { note }, seed: "00", accepted: [] });

describe("a slot", () => {
  it("passes on progress and the report, check after check", async () => {
    const slot = makeSlot();
    for (let i = 0; i < 3; i++) {
      const stages: number[] = [];
      const result = await slot.run(task("wait 3"), (progress) => stages.push(progress.done), never);
      expect(result).toMatchObject({ kind: "report", report: { verdict: "agrees" } });
      expect(stages).toEqual([0, 1, 2]);
    }
  });

  it.each([
    ["throw", "thrown in the thread"],
    ["exit", "the thread ended"],
    ["fail", "the engine failed"],
    ["memory", "memory"],
  ])("answers a thread that ends by %s, and works afterwards", async (what, message) => {
    const slot = makeSlot();
    const result = await slot.run(task(what), () => undefined, never);
    expect(result.kind).toBe("failed");
    expect(result.kind === "failed" && result.message).toContain(message);
    expect(await slot.run(task("wait 0"), () => undefined, never)).toMatchObject({ kind: "report" });
  });

  it("stops a check that takes too long, and one that does not listen", async () => {
    expect(await makeSlot(50).run(task("hang"), () => undefined, never)).toEqual({ kind: "stopped", why: "time" });
    const slot = makeSlot();
    const stop = new AbortController();
    setTimeout(() => stop.abort(), 50);
    expect(await slot.run(task("hang"), () => undefined, stop.signal)).toEqual({ kind: "stopped", why: "asked" });
    expect(await slot.run(task("wait 0"), () => undefined, never)).toMatchObject({ kind: "report" });
  });

  it("does not take the report of a check that was told to stop as a result", async () => {
    const stop = new AbortController();
    const result = await makeSlot().run(task("listen"), () => stop.abort(), stop.signal);
    expect(result).toEqual({ kind: "stopped", why: "asked" });
  });
});

const lines: string[] = [];
const options = {
  lease: 2000,
  mostFailures: 2,
  mostAttempts: 5,
  idle: 20,
  log: (line: string) => void lines.push(line),
};

async function submit(note: string) {
  const result = await submitForm(localUser, entry(1, { note }));
  if (!result.ok) throw new Error(result.problem.detail);
  return result.value;
}

onEachDatabase("a worker", () => {
  it("brings a check to its end and stores what it found", async () => {
    const { form, check } = await submit("wait 600");
    const performing = performNext(makeSlot(), options, never);
    const stages = new Set<string>();
    while ((await getCheck(localUser, check))?.state !== "done") {
      stages.add((await getCheck(localUser, check))?.progress.stage ?? "");
      await new Promise((resolve) => setTimeout(resolve, 20));
    }
    expect(await performing).toBe("done");
    expect(stages).toContain("values");
    expect((await getForm(localUser, form))?.state).toBe("accepted");
    expect(await performNext(makeSlot(), options, never)).toBe("idle");
  });

  it("tries a failing check again and then gives it up as undecided, never accepted", async () => {
    const { form, check } = await submit("fail");
    const slot = makeSlot();
    expect(await performNext(slot, options, never)).toBe("failed");
    expect(await performNext(slot, options, never)).toBe("given-up");
    expect((await getForm(localUser, form))?.state).toBe("held");
    expect((await getCheck(localUser, check))?.report).toMatchObject({ verdict: "undecided", comparisons: [] });
    expect(lines.at(-1)).toContain("the engine failed");
  });

  it("gives up a check whose time is over as undecided", async () => {
    const { form } = await submit("hang");
    expect(await performNext(makeSlot(50), options, never)).toBe("given-up");
    expect((await getForm(localUser, form))?.state).toBe("held");
  });

  it("stops a check that is cancelled while it runs", async () => {
    const { form, check } = await submit("hang");
    const performing = performNext(makeSlot(), options, never);
    while ((await getCheck(localUser, check))?.state !== "running")
      await new Promise((resolve) => setTimeout(resolve, 10));
    await cancelCheck(localUser, check);
    expect(await performing).toBe("cancelled");
    expect((await getForm(localUser, form))?.state).toBe("draft");
  });

  it("gives its checks back when it is shut down, and another worker ends them", async () => {
    const { form } = await submit("listen");
    const shutdown = new AbortController();
    const working = performAll(makeSlot(), options, shutdown.signal);
    while ((await read().job.count({ where: { stage: "listening" } })) === 0)
      await new Promise((resolve) => setTimeout(resolve, 10));
    shutdown.abort();
    await working;
    expect((await getForm(localUser, form))?.state).toBe("checking");
    expect(await read().job.findFirst({ select: { state: true, failures: true } })).toEqual({
      state: "queued",
      failures: 0,
    });
  });
});

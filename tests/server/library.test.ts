/** Submission, numbers, idempotency, scope, lists and the seed library, the same on both databases. */
import { expect, it } from "vitest";
import { formListSchema, formViewSchema, triangleSchema } from "../../app/_contract";
import {
  getAmplitude,
  getCheck,
  getForm,
  getTriangle,
  listForms,
  localUser,
  type Principal,
  startCheck,
  submitForm,
} from "../../app/_server";
import { finish } from "../../app/_server/checks/finish";
import { claimNext } from "../../app/_server/checks/queue";
import { read, write } from "../../app/_server/db";
import { seedProgress, submitSeeds } from "../../app/_server/library";
import { migrateDatabase, onEachDatabase } from "./support/databases";
import { entry, report } from "./support/examples";

const stranger: Principal = { userId: "stranger", groups: [] };

async function finishAll(verdict: Parameters<typeof report>[0] = "agrees"): Promise<void> {
  for (let job = await claimNext(20_000); job; job = await claimNext(20_000))
    await finish(job, { report: report(verdict), protocol: "1", engine: "1" });
}

async function submit(variant = 0, more: Record<string, unknown> = {}, idempotencyKey?: string) {
  const result = await submitForm(localUser, entry(variant, more), { idempotencyKey });
  if (!result.ok) throw new Error(JSON.stringify(result.problem));
  return result.value;
}

const idsOf = async (principal: Principal, query: Parameters<typeof listForms>[1]) => {
  const list = await listForms(principal, query);
  if (!list.ok) throw new Error(list.problem.detail);
  return list.value.items.map((item) => item.id);
};

onEachDatabase("the library", (url) => {
  it("migrates once", async () => {
    expect(await migrateDatabase(url())).toEqual([]);
  });

  it("numbers public forms from 1 in each amplitude, also when many come at once", async () => {
    const replies = await Promise.all(Array.from({ length: 10 }, (_, variant) => submit(variant)));
    const numbers = replies.map(({ form }) => Number(form.split("-")[1])).sort((a, b) => a - b);
    expect(numbers).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
    expect((await submit(0, { amplitude: { n: 7, k: 1, loops: 0 } })).form).toBe("n7k1L0-1");
    for (const { form, version, check, state } of replies) {
      expect(version).toBe(`${form}v1`);
      expect(state).toBe("checking");
      expect((await getCheck(localUser, check))?.form).toBe(form);
    }
  });

  it("keeps nothing of a document that cannot be read, and says what is wrong", async () => {
    const result = await submitForm(localUser, entry(0, { notation: "[1 2 3 4 5" }));
    expect(result.ok).toBe(false);
    if (result.ok) return;
    expect(result.problem).toMatchObject({ status: 422, code: "unreadable-entry" });
    expect(result.problem.diagnostics?.[0]?.span).toBeDefined();
    expect(await read().form.count()).toBe(0);
    expect(await read().amplitude.count()).toBe(0);
    expect(await read().job.count()).toBe(0);
  });

  it("answers a check of an unreadable document by a finished report", async () => {
    const result = await startCheck(localUser, { amplitude: { n: 6 } });
    const check = result.ok ? await getCheck(localUser, result.value.check) : null;
    expect(check).toMatchObject({ state: "done", report: { verdict: "unreadable" } });
    expect(check?.report?.diagnostics.length).toBeGreaterThan(0);
    expect(await claimNext(1000)).toBeNull();
  });

  it("does a repeated call once and answers it alike; another body under the same key is refused", async () => {
    const replies = await Promise.all(Array.from({ length: 5 }, () => submit(1, {}, "key-1")));
    expect(new Set(replies.map((reply) => JSON.stringify(reply))).size).toBe(1);
    expect(await read().form.count()).toBe(1);
    expect(await read().job.count()).toBe(1);
    const other = await submitForm(localUser, entry(2), { idempotencyKey: "key-1" });
    expect(!other.ok && other.problem).toMatchObject({ status: 422, code: "idempotency-key-reused" });
    expect((await submit(2, {}, "key-2")).form).toBe("n6k1L0-2");
    const check = await startCheck(localUser, entry(2), { idempotencyKey: "key-1" });
    expect(check.ok).toBe(true);
    const bad = await submitForm(localUser, entry(3), { idempotencyKey: "two words" });
    expect(!bad.ok && bad.problem.code).toBe("bad-idempotency-key");
    expect(await read().form.count()).toBe(2);
  });

  it("shows a form as the contract says", async () => {
    const { form } = await submit(1, { references: [{ arxiv: "0807.1095", where: "section 4" }], note: "A note." });
    await finishAll();
    const view = await getForm(localUser, form);
    expect(formViewSchema.parse(view)).toEqual(view);
    expect(view).toMatchObject({
      id: "n6k1L0-1",
      version: "n6k1L0-1v1",
      state: "accepted",
      amplitude: { key: "n6k1L0", n: 6, range: null, k: 1, loops: 0 },
      component: null,
      target: "amplitude",
      terms: 3,
      hasCertificate: true,
      note: "A note.",
    });
    expect(view?.kind === "form" && view.report && "certificate" in view.report).toBe(false);
    expect(await getForm(localUser, "n6k1L0-1v1")).toEqual(view);
    for (const name of ["n6k1L0-2", "n6k1L0-1v2", "n6k1L0-01", "n6k1L0", "x", "n6k1L0-pabcdefghijklmnop"])
      expect(await getForm(localUser, name)).toBeNull();
  });

  it("shows strangers accepted public forms, tombstones of the others, and nothing private", async () => {
    const accepted = await submit(1);
    await finishAll();
    const refused = await submit(2);
    await finishAll("disagrees");
    const hidden = await submit(3, { title: "Hidden" });
    await finishAll();
    const handle = "n6k1L0-pabcdefghijklmnop";
    await write(async (transaction) => {
      const where = { amplitudeKey_number: { amplitudeKey: "n6k1L0", number: 3 } };
      await transaction.form.update({ where, data: { visibility: "private", number: null, handle } });
    });
    expect(hidden.form).toBe("n6k1L0-3");
    expect(await getForm(stranger, accepted.form)).toMatchObject({ kind: "form" });
    expect(await getForm(stranger, refused.form)).toEqual({
      kind: "tombstone",
      id: "n6k1L0-2",
      version: "n6k1L0-2v1",
      state: "refused",
    });
    expect(await getForm(stranger, handle)).toBeNull();
    expect(await getForm(localUser, handle)).toMatchObject({ kind: "form", id: handle, visibility: "private" });
    expect(await idsOf(stranger, {})).toEqual(["n6k1L0-1"]);
    expect(await idsOf(stranger, { q: "hidden" })).toEqual([]);
    expect(await idsOf(localUser, {})).toEqual(["n6k1L0-1", "n6k1L0-2", handle]);
    expect(await getAmplitude(stranger, "n6k1L0")).toMatchObject({ accepted: 1 });
    expect(await getAmplitude(localUser, "n6k1L0")).toMatchObject({ accepted: 2 });
    expect(await getCheck(stranger, refused.check)).toBeNull();
    expect(await getCheck(stranger, accepted.check)).toMatchObject({ state: "done" });
    const submitted = await submitForm(stranger, entry(4));
    expect(!submitted.ok && submitted.problem.code).toBe("forbidden");
  });

  it("lists in pages that neither miss nor repeat, in the order of amplitudes and numbers", async () => {
    for (let variant = 0; variant < 11; variant++) await submit(variant);
    await submit(0, { amplitude: { n: 10, k: 1, loops: 0 } });
    await submit(0, { amplitude: { n: { from: 6 }, k: 1, loops: 0 } });
    await submit(0, {
      amplitude: { n: 4, k: 0, loops: 1 },
      notation: "<1 2 3 4>^2/(<AB 1 2><AB 2 3><AB 3 4><AB 1 4>)",
    });
    const all = await idsOf(localUser, {});
    expect(all).toEqual([
      ...Array.from({ length: 11 }, (_, i) => `n6k1L0-${i + 1}`),
      "n10k1L0-1",
      "nXk1L0-1",
      "n4k0L1-1",
    ]);
    const paged: string[] = [];
    let cursor: string | undefined;
    do {
      const page = await listForms(localUser, { limit: 4, ...(cursor ? { cursor } : {}) });
      if (!page.ok) throw new Error(page.problem.detail);
      expect(formListSchema.parse(page.value)).toEqual(page.value);
      paged.push(...page.value.items.map((item) => item.id));
      cursor = page.value.next ?? undefined;
    } while (cursor);
    expect(paged).toEqual(all);
    const bad = await listForms(localUser, { cursor: "nonsense" });
    expect(!bad.ok && bad.problem.code).toBe("bad-cursor");
  });

  it("filters by amplitude, mark, method, state and words, exactly", async () => {
    await submit(1, { title: "Sum with 100% of the poles_x", method: "A" });
    await submit(2, { title: "Another Ünïcode title", method: "B", note: "back\\slash" });
    await finishAll();
    await submit(3, { title: "Waiting", method: "A" });
    expect(await idsOf(localUser, { amplitude: "n6k1L0", state: "accepted" })).toEqual(["n6k1L0-1", "n6k1L0-2"]);
    expect(await idsOf(localUser, { amplitude: "n7k1L0" })).toEqual([]);
    expect(await idsOf(localUser, { mark: "cyclic" })).toEqual(["n6k1L0-1", "n6k1L0-2"]);
    expect(await idsOf(localUser, { mark: "parity" })).toEqual([]);
    expect(await idsOf(localUser, { method: "A" })).toEqual(["n6k1L0-1", "n6k1L0-3"]);
    for (const [q, ids] of [
      ["100% poles_x", ["n6k1L0-1"]],
      ["100_", []],
      ["1%0", []],
      ["ÜNÏCODE", ["n6k1L0-2"]],
      ["back\\slash", ["n6k1L0-2"]],
      ["n6k1L0-3", ["n6k1L0-3"]],
      ["[2 3 4", ["n6k1L0-1", "n6k1L0-2", "n6k1L0-3"]],
      ["  ", ["n6k1L0-1", "n6k1L0-2", "n6k1L0-3"]],
    ] as const)
      expect(await idsOf(localUser, { q })).toEqual(ids);
    const unknown = await listForms(localUser, { mark: "handsome" as "cyclic" });
    expect(!unknown.ok && unknown.problem.code).toBe("bad-request");
  });

  it("counts into the triangle", async () => {
    await submit(1);
    await finishAll();
    await submit(2);
    await finishAll("undecided");
    await submit(3, { amplitude: { n: 9, k: 1, loops: 0 } });
    await submit(4, { amplitude: { n: { from: 6 }, k: 1, loops: 0 } });
    const triangle = await getTriangle(localUser, 0);
    expect(triangleSchema.parse(triangle)).toEqual(triangle);
    expect(triangle.rows.map((row) => [row.n, row.entries.length])).toEqual([4, 5, 6, 7, 8, 9].map((n) => [n, n - 3]));
    expect(triangle.rows[2]?.entries[1]).toEqual({ k: 1, key: "n6k1L0", accepted: 1, held: 1, checking: 0 });
    expect(triangle.rows[5]?.entries[1]).toMatchObject({ key: "n9k1L0", checking: 1 });
    expect(triangle.everyN).toEqual([{ k: 1, key: "nXk1L0", accepted: 0, held: 0, checking: 1 }]);
    expect((await getTriangle(localUser, 2)).rows).toHaveLength(5);
    expect(await getAmplitude(localUser, "n6k2L0")).toMatchObject({ n: 6, mirror: "n6k0L0", accepted: 0 });
    for (const key of ["n6k3L0", "n3k0L0", "n65k0L0", "n6k1", "n6k1L9"])
      expect(await getAmplitude(localUser, key)).toBeNull();
  });

  it("submits each document of the seed library once, however often it is started, and says which cannot be read", async () => {
    const files = [
      { path: "a.json", text: JSON.stringify(entry(1)) },
      { path: "b/c.json", text: JSON.stringify(entry(2)) },
      { path: "d.json", text: "{" },
      { path: "e.json", text: JSON.stringify(entry(0, { notation: "[1 2" })) },
    ];
    await submitSeeds(files);
    await submitSeeds(files);
    expect(await read().form.count()).toBe(2);
    expect(await seedProgress()).toMatchObject({ total: 4, submitted: 2, accepted: 0, finished: false });
    await finishAll();
    const progress = await seedProgress();
    expect(progress).toMatchObject({ total: 4, submitted: 2, accepted: 2, held: 0, refused: 0, finished: true });
    expect(progress.unreadable.map((row) => row.path)).toEqual(["d.json", "e.json"]);
  });
});

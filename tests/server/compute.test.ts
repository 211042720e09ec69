/** derive and evaluate over HTTP: replies as their schemas say, the same numbers as elsewhere, and every refusal with its reason. */
import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { beforeAll, describe, expect, it } from "vitest";
import { deriveReplySchema, evaluateReplySchema, problemSchema } from "../../app/_contract";
import { localUser, submitForm } from "../../app/_server";
import { Desk } from "../../app/_server/compute/desk";
import type { Task } from "../../app/_server/compute/task";
import { POST as deriveRoute } from "../../app/api/v1/derive/route";
import { POST as evaluateRoute } from "../../app/api/v1/evaluate/route";
import { onEachDatabase } from "./support/databases";
import { entry } from "./support/examples";

const root = fileURLToPath(new URL("../..", import.meta.url));

beforeAll(() => {
  const made = spawnSync(
    process.execPath,
    ["--input-type=module", "-e", 'await (await import("./app/_server/start/bundle.mjs")).bundle("compute-thread")'],
    { cwd: root, encoding: "utf8" },
  );
  if (made.status !== 0) throw new Error(made.stderr);
});

const none = { params: Promise.resolve({}) };
const post = (body: unknown) =>
  new Request("http://localhost:3000/api/v1/x", {
    method: "POST",
    body: JSON.stringify(body),
    headers: { "content-type": "application/json" },
  });
const derived = (body: unknown) => deriveRoute(post(body), none);
const evaluated = (body: unknown) => evaluateRoute(post(body), none);
const valuesOf = async (body: unknown) => evaluateReplySchema.parse(await (await evaluated(body)).json());

async function problemOf(reply: Response) {
  const problem = problemSchema.parse(await reply.json());
  expect(problem.status).toBe(reply.status);
  return problem;
}

describe("POST derive", () => {
  it("answers an entry document that can be handed in as it is", async () => {
    const reply = await derived({ n: 6, k: 1, loops: 0, method: "recursion", leg: 6 });
    expect(reply.status).toBe(200);
    const document = deriveReplySchema.parse(await reply.json());
    // 1008.2958: the three terms of the six-leg NMHV tree from a shift of leg 6 hold leg 1 each.
    const terms = document.notation.split(" + ").map((term) => term.match(/\d/g)?.join(" "));
    expect(terms.sort()).toEqual(["1 2 3 4 5", "1 2 3 5 6", "1 3 4 5 6"]);
    expect(document.amplitude).toEqual({ n: 6, k: 1, loops: 0 });
  });

  it.each([
    [{ n: 6 }, "bad-request"],
    [{ n: 6, k: 1, leg: "6" }, "bad-request"],
    [{ n: 6, k: 1, method: "guess" }, "bad-request"],
    [{ n: 6, k: 3 }, "cannot-derive"],
    [{ n: 6, k: 1, leg: 7 }, "cannot-derive"],
    [{ n: 6, k: 1, loops: 2, method: "local" }, "cannot-derive"],
    [{ n: 40, k: 18 }, "cannot-derive"],
    [[], "bad-request"],
  ])("refuses %j with %s", async (body, code) => {
    const problem = await problemOf(await derived(body));
    expect(problem.code).toBe(code);
    expect(problem.detail).not.toBe("");
  });
});

const mhv = { amplitude: { n: 4, k: 0, loops: 0 }, component: "--++", notation: "<1 2>^4 / (<1 2><2 3><3 4><4 1>)" };
const ratio = { amplitude: { n: 5, k: 0, loops: 0 }, notation: "<1 2 3 4> / <2 3 4 5>" };

describe("POST evaluate", () => {
  it("is exact at points that are given: determinants of small matrices", async () => {
    // The determinants of the identity, and of rows 2 to 4 of it with (1, 2, 3, 7): worked out by hand.
    const twistors = [
      ["1", "0", "0", "0"],
      ["0", "1", "0", "0"],
      ["0", "0", "1", "0"],
      ["0", "0", "0", "1/2"],
      ["3", "2", "3", "7"],
    ];
    expect(await valuesOf({ document: ratio, points: [{ twistors }] })).toEqual({ values: ["-1/3"] });
    const singular = await valuesOf({
      document: ratio,
      points: [{ twistors: [...twistors.slice(0, 4), twistors[1]] }],
    });
    expect(singular).toMatchObject({ values: [null], reasons: [{ point: 0 }] });
  });

  it("gives |A|^2 = s^4/(s^2 t^2) for four gluons at drawn points of phase space, and these points", async () => {
    const reply = await valuesOf({ document: mhv, phaseSpace: 3, seed: "four", energy: 2 });
    if (!("values" in reply)) throw new Error("expected one column");
    expect(reply.momenta).toHaveLength(3);
    reply.momenta?.forEach((momenta, point) => {
      const [p1, p2, p3] = momenta.map((p) => p.map(Number));
      const s = (p: number[], q: number[]) =>
        (p[0]! + q[0]!) ** 2 - (p[1]! + q[1]!) ** 2 - (p[2]! + q[2]!) ** 2 - (p[3]! + q[3]!) ** 2;
      const [re, im] = (reply.values[point] as [string, string]).map(Number) as [number, number];
      expect((re ** 2 + im ** 2) / (s(p1!, p2!) / s(p2!, p3!)) ** 2).toBeCloseTo(1, 10);
      expect(reply.digits?.[point]).toBeGreaterThan(8);
    });
    expect(await valuesOf({ document: mhv, momenta: reply.momenta })).toMatchObject({ values: reply.values });
  });

  it("lists all gluon components, exact momenta included, and repeats itself from its seed", async () => {
    const form = { amplitude: { n: 5, k: 1, loops: 0 }, notation: "[1 2 3 4 5]" };
    const first = await valuesOf({ document: form, phaseSpace: 2, field: "rational", helicities: "all", seed: "s" });
    if (!("components" in first)) throw new Error("expected components");
    expect(first.components.map(({ helicities }) => helicities)).toHaveLength(10);
    expect(first.signature).toBe("2,2");
    const one = await valuesOf({ document: form, phaseSpace: 2, field: "rational", helicities: "---++", seed: "s" });
    expect(one).toMatchObject({ helicities: "---++", values: first.components[0]?.values });
    const drawn = await valuesOf({ document: form, random: 3 });
    expect(await valuesOf({ document: form, random: 3, seed: drawn.seed })).toEqual(drawn);
  });

  it("takes one n of a form for many", async () => {
    const document = { ...mhv, amplitude: { n: { from: 4 }, k: 0, loops: 0 }, component: { minus: [1, 2] } };
    const many = { ...document, notation: "<1 2>^4 / prod(i : 1 <= i <= n) <i i+1>" };
    expect(await valuesOf({ document: many, random: 1, seed: "a" })).toEqual(
      await valuesOf({ document: mhv, random: 1, seed: "a" }),
    );
    expect(await valuesOf({ document: many, random: 1, seed: "a", n: 7 })).toMatchObject({
      values: [expect.any(String)],
    });
    expect((await problemOf(await evaluated({ document: many, random: 1, n: 3 }))).detail).toContain("from 4");
  });

  it.each([
    ["bad-request", {}],
    ["bad-request", { document: mhv }],
    ["bad-request", { document: mhv, random: 1, momenta: [] }],
    ["bad-request", { document: mhv, random: 0 }],
    ["bad-request", { document: mhv, random: 1, helicities: "--" }],
    ["bad-request", { document: mhv, random: 1, helicities: "all" }],
    ["bad-request", { document: mhv, phaseSpace: 1, field: "prime" }],
    ["bad-request", { document: mhv, phaseSpace: 1, energy: 1e300 }],
    ["bad-request", { document: mhv, random: 1, n: 5 }],
    ["bad-request", { form: "../../etc", random: 1 }],
    ["unreadable-entry", { document: { ...mhv, notation: "<1 2" }, random: 1 }],
    ["unreadable-entry", { document: null, random: 1 }],
    ["too-costly", { document: ratio, points: new Array(1001).fill({}) }],
    [
      "too-costly",
      { document: { amplitude: { n: 30, k: 13, loops: 0 }, notation: "1" }, random: 1, helicities: "all" },
    ],
    ["cannot-evaluate", { document: ratio, points: [{}] }],
    ["cannot-evaluate", { document: ratio, points: [7] }],
    ["cannot-evaluate", { document: mhv, momenta: [[["1", "0", "0", "1"]]] }],
    ["cannot-evaluate", { document: mhv, momenta: [new Array(4).fill(["1", "0", "0", "1"])] }],
    ["cannot-evaluate", { document: { amplitude: { n: 5, k: 1, loops: 0 }, notation: "[1 2 3 4 5]" }, phaseSpace: 1 }],
  ])("refuses with %s (%#)", async (code, body) => {
    const problem = await problemOf(await evaluated(body));
    expect(problem.code).toBe(code);
    if (code === "cannot-evaluate" || code === "unreadable-entry")
      expect(problem.diagnostics?.length).toBeGreaterThan(0);
  });
});

onEachDatabase("a kept form", () => {
  it("is evaluated by its identifier like its document", async () => {
    const submitted = await submitForm(localUser, entry(0), {});
    if (!submitted.ok) throw new Error(submitted.problem.detail);
    const kept = await valuesOf({ form: submitted.value.form, random: 2, seed: "kept" });
    expect(kept).toEqual(await valuesOf({ document: entry(0), random: 2, seed: "kept" }));
    expect((await problemOf(await evaluated({ form: "n6k1L0-99", random: 1 }))).code).toBe("not-found");
  });
});

describe("the desk", () => {
  const stand = fileURLToPath(new URL("./support/desk.mjs", import.meta.url));
  const task = (what: string) => ({ what }) as unknown as Task;

  it.each([
    ["hang", { kind: "time" }],
    ["memory", { kind: "memory" }],
    ["throw", { kind: "failed", message: "thrown in the thread" }],
    ["exit", { kind: "failed", message: "the thread ended" }],
  ])("ends a thread that does %s, says so, and goes on with the next task", async (what, expected) => {
    const desk = new Desk({ program: stand, memory: 64, time: what === "hang" ? 1500 : 60_000, waiting: 5 });
    const settled = await Promise.all([desk.run(task("answer")), desk.run(task(what)), desk.run(task("answer"))]);
    expect(settled).toEqual([{ kind: "refused", diagnostics: [] }, expected, { kind: "refused", diagnostics: [] }]);
    await desk.close();
  });

  it("turns away those who would wait behind too many", async () => {
    const desk = new Desk({ program: stand, memory: 64, time: 60_000, waiting: 1 });
    const kinds = (await Promise.all(["a", "b", "c"].map((what) => desk.run(task(what))))).map(({ kind }) => kind);
    expect(kinds).toEqual(["refused", "refused", "busy"]);
    expect((await desk.run(task("later"))).kind).toBe("refused");
    await desk.close();
  });
});

/** The HTTP interface: what is read, what is refused and how; routes answer what their schemas say. */
import { expect, it } from "vitest";
import {
  amplitudeListSchema,
  amplitudeViewSchema,
  checkEventSchema,
  checkViewSchema,
  formListSchema,
  formViewSchema,
  healthSchema,
  problemSchema,
  submitReplySchema,
} from "../../app/_contract";
import { finish } from "../../app/_server/checks/finish";
import { claimNext } from "../../app/_server/checks/queue";
import { faultOfRequest } from "../../app/_server/http/origin";
import { contentSecurityPolicy } from "../../app/_server/http/policy";
import { GET as amplitudeRoute } from "../../app/api/v1/amplitudes/[key]/route";
import { GET as amplitudesRoute } from "../../app/api/v1/amplitudes/route";
import { GET as eventsRoute } from "../../app/api/v1/checks/[id]/events/route";
import { DELETE as cancelRoute, GET as checkRoute } from "../../app/api/v1/checks/[id]/route";
import { POST as checksRoute } from "../../app/api/v1/checks/route";
import { GET as certificateRoute } from "../../app/api/v1/forms/[id]/certificate/route";
import { GET as citationRoute } from "../../app/api/v1/forms/[id]/citation/route";
import { GET as formRoute } from "../../app/api/v1/forms/[id]/route";
import { GET as formsRoute, POST as submitRoute } from "../../app/api/v1/forms/route";
import { GET as healthRoute } from "../../app/api/v1/health/route";
import { GET as schemaRoute } from "../../app/api/v1/schema/entry.json/route";
import { onEachDatabase } from "./support/databases";
import { entry, report } from "./support/examples";

const base = "http://localhost:3000/api/v1";
const none = { params: Promise.resolve({}) };
const named = (parameters: Record<string, string>) => ({ params: Promise.resolve(parameters) });
const get = (path: string, headers: Record<string, string> = {}) => new Request(`${base}/${path}`, { headers });
const post = (body: BodyInit, headers: Record<string, string> = {}) =>
  new Request(`${base}/forms`, { method: "POST", body, headers: { "content-type": "application/json", ...headers } });

async function problemOf(reply: Response) {
  expect(reply.headers.get("content-type")).toBe("application/problem+json; charset=utf-8");
  const problem = problemSchema.parse(await reply.json());
  expect(problem.status).toBe(reply.status);
  expect(problem.type).toBe(`urn:equiform:problem:${problem.code}`);
  return problem;
}

onEachDatabase("the HTTP interface", () => {
  it("takes a form from submission to citation and certificate", async () => {
    const submitted = await submitRoute(post(JSON.stringify(entry(1)), { "idempotency-key": "k" }), none);
    expect(submitted.status).toBe(202);
    const names = submitReplySchema.parse(await submitted.json());
    expect(names).toMatchObject({ form: "n6k1L0-1", version: "n6k1L0-1v1", state: "checking" });
    const again = await submitRoute(post(JSON.stringify(entry(1)), { "idempotency-key": "k" }), none);
    expect(await again.json()).toEqual(names);
    const of = named({ id: names.form });
    expect((await problemOf(await certificateRoute(get(""), of))).code).toBe("not-checked-yet");
    const waiting = checkViewSchema.parse(await (await checkRoute(get(""), named({ id: names.check }))).json());
    expect(waiting).toMatchObject({ state: "queued", report: null, form: "n6k1L0-1" });

    const job = await claimNext(20_000);
    if (job) await finish(job, { report: report(), protocol: "1", engine: "1" });
    const done = checkViewSchema.parse(await (await checkRoute(get(""), named({ id: names.check }))).json());
    expect(done).toMatchObject({ state: "done", report: { verdict: "agrees" }, versionState: "accepted" });
    const form = formViewSchema.parse(await (await formRoute(get(""), of)).json());
    expect(form.state).toBe("accepted");
    expect(formListSchema.parse(await (await formsRoute(get("forms?q=variant"), none)).json()).items).toHaveLength(1);
    expect(await (await certificateRoute(get(""), of)).json()).toEqual({ format: "test" });
    const citation = await citationRoute(get("forms/n6k1L0-1/citation?style=bibtex"), of);
    expect(citation.headers.get("content-disposition")).toBe('attachment; filename="n6k1L0-1v1.bib"');
    expect(await citation.text()).toContain("@misc{n6k1L0-1v1,");
    expect((await problemOf(await citationRoute(get("x?style=stone"), of))).code).toBe("bad-request");
    amplitudeViewSchema.parse(await (await amplitudeRoute(get(""), named({ key: "n6k1L0" }))).json());
    expect(amplitudeListSchema.parse(await (await amplitudesRoute(get(""), none)).json()).items).toHaveLength(1);
    expect(healthSchema.parse(await (await healthRoute(get(""), none)).json()).jobs).toEqual({ queued: 0, running: 0 });
  });

  it("streams events and continues after the last one seen", async () => {
    const { check } = (await (await checksRoute(post(JSON.stringify(entry(1))), none)).json()) as { check: string };
    const of = named({ id: check });
    const stream = await eventsRoute(get(""), of);
    expect(stream.headers.get("content-type")).toContain("text/event-stream");
    const cancelled = await cancelRoute(new Request(base, { method: "DELETE" }), of);
    expect(cancelled.status).toBe(200);
    const text = await stream.text();
    const events = [...text.matchAll(/^id: (\d+)\nevent: (\w+)\ndata: (.*)$/gm)].map(([, id, event, data]) => {
      const parsed = checkEventSchema.parse(JSON.parse(data as string));
      expect(parsed.seq).toBe(Number(id));
      return { event, state: parsed.state, id };
    });
    expect(events.at(-1)).toMatchObject({ event: "end", state: "cancelled" });
    const rest = await (await eventsRoute(get("", { "last-event-id": "0" }), of)).text();
    expect([...rest.matchAll(/^id: /gm)]).toHaveLength(1);
    expect((await problemOf(await eventsRoute(get(""), named({ id: "x" })))).code).toBe("not-found");
  });

  it("publishes the schema of the entry document", async () => {
    const reply = await schemaRoute(get(""), none);
    expect(reply.headers.get("content-type")).toBe("application/schema+json");
    const { $defs } = (await reply.json()) as { $defs: { Entry: { required: string[]; properties: object } } };
    expect([...$defs.Entry.required].sort()).toEqual(["amplitude", "notation"]);
    expect(Object.keys($defs.Entry.properties)).toContain("component");
  });

  const deep = `${"[".repeat(100_000)}${"]".repeat(100_000)}`;
  it.each([
    ["not-json", "{", {}],
    ["not-json", "", {}],
    ["not-json", deep, {}],
    ["not-json", new Uint8Array([0x22, 0xff, 0x22]), {}],
    ["unreadable-entry", "null", {}],
    ["unreadable-entry", "[]", {}],
    ["unreadable-entry", '{"amplitude": {"n": 6, "k": 1, "loops": 0}, "notation": "[1 2 3 4 \\ud800]"}', {}],
    ["unreadable-entry", '{"amplitude": {"n": 6, "k": 1, "loops": 0}, "notation": "[1 2 3 4 5]\\u0000"}', {}],
    ["unreadable-entry", '{"amplitude": {"n": 6, "k": 5, "loops": 0}, "notation": "1"}', {}],
    ["too-large", " ".repeat(4 * 1024 * 1024 + 1), {}],
    ["unsupported-media-type", "{}", { "content-type": "application/x-www-form-urlencoded" }],
    ["bad-idempotency-key", JSON.stringify(entry()), { "idempotency-key": "x".repeat(256) }],
  ] as const)("refuses with %s (%#)", async (code, body, headers) => {
    const problem = await problemOf(await submitRoute(post(body, headers), none));
    expect(problem.code).toBe(code);
    if (code === "unreadable-entry") expect(problem.diagnostics?.length).toBeGreaterThan(0);
  });

  it("answers unknown names with what names look like", async () => {
    expect((await problemOf(await formRoute(get(""), named({ id: "n6k1L0-7" })))).detail).toContain("n6k1L0-3");
    expect((await problemOf(await amplitudeRoute(get(""), named({ key: "n3k0L0" })))).code).toBe("bad-identifier");
    expect((await problemOf(await checkRoute(get(""), named({ id: "../../etc" })))).code).toBe("not-found");
    expect((await problemOf(await formsRoute(get("forms?sort=up"), none))).code).toBe("bad-request");
    expect((await problemOf(await formsRoute(get("forms?limit=0"), none))).code).toBe("bad-request");
  });
});

const request = (method: string, headers: Record<string, string>) => ({ method, headers: new Headers(headers) });

it.each([
  ["GET", { host: "localhost:3000" }, null],
  ["GET", { host: "127.0.0.1:3000" }, null],
  ["GET", { host: "[::1]:3000" }, null],
  ["GET", { host: "localhost:3001" }, "foreign-host"],
  ["GET", { host: "localhost" }, "foreign-host"],
  ["GET", { host: "rebound.example:3000" }, "foreign-host"],
  ["GET", { host: "localhost.example:3000" }, "foreign-host"],
  ["GET", {}, "foreign-host"],
  ["GET", { host: "localhost:3000", origin: "http://other.example" }, null],
  ["POST", { host: "localhost:3000" }, null],
  ["POST", { host: "localhost:3000", origin: "http://localhost:3000", "sec-fetch-site": "same-origin" }, null],
  ["POST", { host: "localhost:3000", origin: "http://127.0.0.1:3000" }, "foreign-origin"],
  ["POST", { host: "localhost:3000", origin: "http://localhost:8080" }, "foreign-origin"],
  ["POST", { host: "localhost:3000", origin: "https://localhost:3000" }, "foreign-origin"],
  ["POST", { host: "localhost:3000", origin: "null" }, "foreign-origin"],
  ["POST", { host: "localhost:3000", "sec-fetch-site": "cross-site" }, "foreign-origin"],
  ["DELETE", { host: "localhost:3000", "sec-fetch-site": "same-site" }, "foreign-origin"],
] as const)("lets %s with %o pass, or names the fault %s", (method, headers, code) => {
  expect(faultOfRequest(request(method, headers), 3000)?.code ?? null).toBe(code);
});

it("allows scripts by nonce only, in production", () => {
  const policy = contentSecurityPolicy("abc", false);
  expect(policy).toContain("script-src 'self' 'nonce-abc' 'strict-dynamic' 'wasm-unsafe-eval';");
  expect(policy).not.toContain("'unsafe-eval'");
  expect(policy.replace("style-src-attr 'unsafe-inline'", "")).not.toContain("unsafe-inline");
});

/** What the browser tests ask of the server directly: to keep a form and to tell how its check ended. */
import { type APIRequestContext, expect } from "@playwright/test";

export interface Kept {
  readonly form: string;
  readonly version: string;
  readonly check: string;
}

/** Submits an entry document. */
export async function submit(request: APIRequestContext, entry: unknown): Promise<Kept> {
  const reply = await request.post("/api/v1/forms", { data: entry });
  expect(reply.status(), await reply.text()).toBe(202);
  return (await reply.json()) as Kept;
}

/** The verdict of a check, once it is done. */
export async function verdict(request: APIRequestContext, check: string): Promise<string> {
  let found = "";
  await expect(async () => {
    const view = (await (await request.get(`/api/v1/checks/${check}`)).json()) as {
      state: string;
      report: { verdict: string } | null;
    };
    expect(view.state).toBe("done");
    found = view.report?.verdict ?? "";
  }).toPass({ timeout: 60_000 });
  return found;
}

/** Number of forms of an amplitude, whatever their state. */
export async function countForms(request: APIRequestContext, amplitude: string): Promise<number> {
  const list = (await (await request.get(`/api/v1/forms?amplitude=${amplitude}&limit=200`)).json()) as {
    items: unknown[];
  };
  return list.items.length;
}

export const sixLegs = {
  amplitude: { n: 6, k: 1, loops: 0 },
  title: "Six legs, from the browser tests",
  notation: "[1 2 3 4 6] + [1 2 4 5 6] + [2 3 4 5 6]",
};

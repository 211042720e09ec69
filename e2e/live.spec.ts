/** The verdict while typing: found by the engine in the browser, without the network, and the same that the server finds. */
import { expect, test } from "@playwright/test";
import { verdict } from "./support/library";

const formulas = [
  { notation: "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]", says: /^Agrees with /, verdict: "agrees" },
  { notation: "sum(i, j : 1 < i, i+1 < j < n-1) [1 i i+1 j j+1]", says: /^Differs from /, verdict: "disagrees" },
] as const;

test("with the network off, the browser's verdict is the server's", async ({ page, context, request }) => {
  await page.goto("/submit?n=7&k=1&loops=0&notation=[1 2 3 4 5]");
  const editor = page.locator(".cm-content");
  const line = page.locator("[data-state]");
  await expect(line).toHaveText(/Differs from /);
  await context.setOffline(true);
  for (const formula of formulas) {
    await editor.fill(formula.notation);
    await expect(line).toHaveText(formula.says);
  }
  await context.setOffline(false);
  for (const { notation, verdict: expected } of formulas) {
    const reply = await request.post("/api/v1/checks", { data: { amplitude: { n: 7, k: 1, loops: 0 }, notation } });
    const { check } = (await reply.json()) as { check: string };
    expect(await verdict(request, check)).toBe(expected);
  }
});

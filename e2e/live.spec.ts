/** The verdict while typing: found by the engine in the browser, without the network, and the same that the server finds. */
import { expect, test } from "@playwright/test";
import { verdict } from "./support/library";

const formulas = [
  { notation: "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]", says: /^Agrees with /, verdict: "agrees" },
  { notation: "sum(i, j : 1 < i, i+1 < j < n-1) [1 i i+1 j j+1]", says: /^Differs from /, verdict: "disagrees" },
] as const;

/** R-invariants of eight legs, 50 of the 56: nothing that agrees, and as long as what people type. */
const fifty = [1, 2, 3, 4, 5, 6, 7, 8]
  .flatMap((a, i, legs) => legs.slice(i + 1).flatMap((b, j, rest) => rest.slice(j + 1).map((c) => [a, b, c])))
  .slice(0, 50)
  .map((left) => `[${[1, 2, 3, 4, 5, 6, 7, 8].filter((a) => !left.includes(a)).join(" ")}]`);

test("the verdict on 50 terms at eight legs arrives while typing", async ({ page }, info) => {
  await page.goto("/submit?n=8&k=1&loops=0&notation=1");
  const editor = page.locator(".cm-content");
  const line = page.locator("[data-milliseconds]");
  const times: number[] = [];
  // The first look compiles the engine's own code; what follows is what somebody who types meets.
  for (let more = 0; more < 6; more++) {
    await editor.fill(`${fifty.join(" + ")}${" + [1 2 3 4 5]".repeat(more)}`);
    await expect(page.getByText(`${50 + more} terms at n = 8`)).toBeVisible();
    await expect(line).toHaveText(/Differs from /);
    times.push(Number(await line.getAttribute("data-milliseconds")));
  }
  info.annotations.push({ type: "milliseconds of each look", description: times.join(", ") });
  console.log(`live verdict, 50 terms at n = 8: ${times.join(", ")} ms`);
  expect(Math.min(...times)).toBeGreaterThan(0);
});

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

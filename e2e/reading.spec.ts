/** Reading: without script, by keyboard, on paper, and what every address says that leads nowhere. */
import { gzipSync } from "node:zlib";
import { expect, test } from "@playwright/test";
import { sixLegs, submit, verdict } from "./support/library";

let form = "";

test.beforeAll(async ({ request }) => {
  const kept = await submit(request, { ...sixLegs, title: "A form to be read" });
  expect(await verdict(request, kept.check)).toBe("agrees");
  form = kept.form;
});

test.describe("without script", () => {
  test.use({ javaScriptEnabled: false });

  test("the triangle leads to the amplitude, and that to the form, with its formula, marks and poles", async ({
    page,
  }) => {
    await page.goto("/");
    await page.getByRole("link", { name: /^six legs, NMHV, tree: \d+ form/ }).click();
    await page
      .getByRole("row", { name: /A form to be read/ })
      .getByRole("link", { name: form, exact: true })
      .click();
    await expect(page.getByRole("heading", { level: 1 })).toHaveText("A form to be read");
    await expect(page.locator("main math").first()).toBeAttached();
    await expect(page.getByRole("region", { name: "What it shows" }).getByRole("listitem").first()).toContainText(
      /\.$/,
    );
    await expect(page.getByRole("region", { name: /^Poles of/ }).getByRole("row")).not.toHaveCount(0);
    await page.getByText("In the notation").click();
    await expect(page.getByRole("region", { name: /^Notation of/ })).toContainText("[1 2 4 5 6]");
    await expect(page.getByRole("region", { name: /^BibTeX/ })).toContainText("@");
  });

  test("loop orders are links", async ({ page }) => {
    await page.goto("/?loops=1");
    await expect(page.getByRole("link", { name: "One loop", exact: true })).toHaveAttribute("aria-current", "page");
    await expect(page.getByRole("link", { name: /^four legs, MHV, one loop/ })).toBeVisible();
  });
});

for (const address of [
  "/n6k1L0-999999",
  "/n6k1L0-1v99",
  "/nonsense",
  "/amplitudes/n6k9L0",
  "/amplitudes/x",
  "/checks/x",
  "/%F0%9F%98%80",
]) {
  test(`${address} says that nothing is there, and where to go`, async ({ page }) => {
    const reply = await page.goto(address);
    expect(reply?.status()).toBe(404);
    await expect(page.getByRole("heading", { level: 1 })).toHaveText("There is nothing at this address");
    await expect(page.getByRole("link", { name: "amplitudes", exact: true })).toBeVisible();
  });
}

test("the first stop of the keyboard skips to the page, and a wide formula can be reached and scrolled", async ({
  page,
}) => {
  await page.setViewportSize({ width: 390, height: 900 });
  await page.goto("/specimen");
  await page.keyboard.press("Tab");
  await expect(page.getByRole("link", { name: "Skip to the page" })).toBeFocused();
  await page.keyboard.press("Enter");
  await expect(page.locator("main")).toBeFocused();
  const wide = page.getByRole("region", { name: "Wide formula" });
  await wide.focus();
  await page.keyboard.press("ArrowRight");
  await expect.poll(() => wide.evaluate((box) => box.scrollLeft)).toBeGreaterThan(0);
});

test("on paper a form has no buttons and no ways, and nothing is cut off", async ({ page }) => {
  await page.goto(`/${form}`);
  await page.emulateMedia({ media: "print", colorScheme: "dark" });
  await expect(page.getByRole("navigation", { name: "Main" })).toBeHidden();
  await expect(page.getByRole("button", { name: "Copy BibTeX" })).toBeHidden();
  expect(await page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor)).toBe(
    "rgb(255, 255, 255)",
  );
});

test("a reading page sends at most 150 kB of compressed script", async ({ page }) => {
  const sizes: Promise<number>[] = [];
  page.on("response", (response) => {
    if (response.request().resourceType() === "script")
      sizes.push(response.body().then((body) => gzipSync(body).length));
  });
  await page.goto(`/${form}`, { waitUntil: "networkidle" });
  const total = (await Promise.all(sizes)).reduce((sum, size) => sum + size, 0);
  expect(total).toBeGreaterThan(0);
  expect(total).toBeLessThanOrEqual(150_000);
});

/** The main job in a browser: a formula is typed, checked, kept, found, cited and replayed; or it is wrong, and that is said. */
import { execFile } from "node:child_process";
import { readFile } from "node:fs/promises";
import { promisify } from "node:util";
import { expect, type Page, test } from "@playwright/test";
import { countForms } from "./support/library";

const run = promisify(execFile);

/** Opens an empty editor for an amplitude and types the formula into it. */
async function type(page: Page, amplitude: { n: string; k: string; loops: string }, notation: string): Promise<void> {
  await page.goto(`/submit?n=${amplitude.n}&k=${amplitude.k}&loops=${amplitude.loops}`);
  const editor = page.getByRole("textbox", { name: "Formula, in the notation" });
  await expect(editor).toHaveAttribute("contenteditable", "true");
  await editor.click();
  await page.keyboard.type(notation);
}

test("a form is typed, accepted, found in the list, cited, and its certificate replayed", async ({
  page,
  context,
}, info) => {
  await context.grantPermissions(["clipboard-read", "clipboard-write"]);
  await page.goto("/");
  await page.getByRole("link", { name: "Submit a form" }).click();
  await type(page, { n: "7", k: "1", loops: "0" }, "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]");
  await expect(page.getByText("six terms at n = 7")).toBeVisible();
  await page.getByLabel("Title").fill("The NMHV sum at seven legs");
  await page.getByLabel("References").fill("0807.1095 section 4");
  await page.getByRole("button", { name: "Submit and check" }).click();

  await page.waitForURL("**/checks/*");
  await expect(page.getByRole("heading", { level: 1, name: "Accepted" })).toBeVisible({ timeout: 45_000 });
  await page.getByRole("link", { name: "the forms of its amplitude" }).click();

  await expect(page).toHaveURL(/\/amplitudes\/n7k1L0$/);
  const row = page.getByRole("row", { name: /The NMHV sum at seven legs/ });
  await expect(row).toContainText("accepted");
  await row.getByRole("link", { name: /^n7k1L0-\d+$/ }).click();

  await expect(page.getByRole("heading", { level: 1, name: "The NMHV sum at seven legs" })).toBeVisible();
  await expect(page.getByText("not a symbolic proof").first()).toBeVisible();
  const version = (await page.locator("header + main code").first().textContent())?.trim();
  expect(version).toMatch(/^n7k1L0-\d+v1$/);
  await page.getByRole("button", { name: "Copy BibTeX" }).click();
  await expect(page.getByText("Copied.")).toBeVisible();
  const copied = await page.evaluate(() => navigator.clipboard.readText());
  expect(copied).toMatch(/^@\w+\{/);
  expect(copied).toContain(version);

  const downloading = page.waitForEvent("download");
  await page.getByRole("link", { name: "Download the certificate" }).click();
  const file = info.outputPath("certificate.json");
  await (await downloading).saveAs(file);
  expect(JSON.parse(await readFile(file, "utf8"))).toBeInstanceOf(Object);
  const replayed = await run("npm", ["run", "-s", "equiform", "--", "replay", file]);
  expect(replayed.stderr + replayed.stdout).not.toBe("");
  // A certificate that was tampered with does not replay.
  await expect(run("npm", ["run", "-s", "equiform", "--", "replay", await tampered(file)])).rejects.toMatchObject({
    code: 1,
  });
});

/** A copy of the certificate in which one digit of the first long hexadecimal value is another. */
async function tampered(file: string): Promise<string> {
  const { writeFile } = await import("node:fs/promises");
  const text = await readFile(file, "utf8");
  const changed = text.replace(/("fingerprint":\s*"[0-9a-f]*)([0-9a-f])"/, (_, head: string, digit: string) => {
    return `${head}${digit === "0" ? "1" : "0"}"`;
  });
  expect(changed).not.toBe(text);
  const copy = file.replace(/\.json$/, "-changed.json");
  await writeFile(copy, changed);
  return copy;
}

test("a wrong form is refused and what is wrong is said", async ({ page }) => {
  await type(page, { n: "6", k: "1", loops: "0" }, "2 [1 2 3 4 5] + 2 [1 2 3 5 6] + 2 [1 3 4 5 6]");
  await page.getByRole("button", { name: "Submit and check" }).click();
  await expect(page.getByRole("heading", { level: 1, name: "It is not right" })).toBeVisible({ timeout: 45_000 });
  const wrong = page.getByRole("region", { name: "What is wrong" });
  await expect(wrong).toContainText("2");
  await wrong.getByRole("link", { name: "Mend it in the editor" }).click();
  await expect(page.getByRole("textbox", { name: "Formula, in the notation" })).toContainText("2 [1 3 4 5 6]");
});

test("a fault stands under its characters, and its suggestion is one click", async ({ page }) => {
  await type(page, { n: "6", k: "0", loops: "1" }, "<AB12> + 1");
  const fault = page.getByRole("region", { name: "Line 1 of the formula" });
  await expect(fault.locator("mark").first()).toContainText("AB12");
  await expect(fault.locator("pre").nth(1)).toContainText(/^ *\^+/);
  await expect(page.locator(".cm-fault").first()).toBeVisible();
  await page
    .getByRole("button", { name: /^Put .* there$/ })
    .first()
    .click();
  await expect(page.getByRole("textbox", { name: "Formula, in the notation" })).toContainText("<AB 1 2> + 1");
});

test("the server says the same of an unreadable form as the preview, and keeps nothing", async ({ page, request }) => {
  const before = await countForms(request, "n9k1L0");
  await type(page, { n: "9", k: "1", loops: "0" }, "[1 2 3 4 5] + [1 2 3");
  await page.getByRole("button", { name: "Submit and check" }).click();
  await expect(page.getByText("nothing was stored")).toBeVisible();
  await expect(page.getByRole("region", { name: "Line 1 of the formula" })).toBeVisible();
  expect(await countForms(request, "n9k1L0")).toBe(before);
});

test("a double click submits once, and so does a retry after the answer was lost", async ({ page, request }) => {
  const before = await countForms(request, "n5k1L0");
  await type(page, { n: "5", k: "1", loops: "0" }, "[1 2 3 4 5]");
  let lost = 0;
  await page.route("**/api/v1/forms", async (route) => {
    await route.fetch();
    lost += 1;
    await route.abort();
  });
  await page.getByRole("button", { name: "Submit and check" }).dblclick();
  await expect(page.getByText("The server could not be reached")).toBeVisible();
  expect(lost).toBe(1);
  await page.unroute("**/api/v1/forms");
  // The page is loaded again: the draft brings back the text and the key of the first attempt.
  await page.goto("/submit");
  await expect(page.getByText("This is the draft that this browser kept.")).toBeVisible();
  await page.getByRole("button", { name: "Submit and check" }).click();
  await page.waitForURL("**/checks/*");
  expect(await countForms(request, "n5k1L0")).toBe(before + 1);
});

test("a draft of two thousand terms comes back and can be typed into without waiting", async ({ page }) => {
  test.setTimeout(180_000);
  const notation = Array.from({ length: 2000 }, (_, i) => `${i + 1} [1 2 3 ${4 + (i % 2)} 6]`).join("\n+ ");
  await page.addInitScript((text) => {
    const fields = {
      n: "6",
      k: "1",
      loops: "0",
      component: "",
      target: "amplitude",
      square: "<ab>[ab]",
      notation: text,
    };
    const about = { title: "", method: "", references: "", note: "" };
    localStorage.setItem("equiform-draft-1", JSON.stringify({ fields: { ...fields, ...about }, attempt: null }));
    const holder = window as unknown as { longest: number };
    holder.longest = 0;
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries()) holder.longest = Math.max(holder.longest, entry.duration);
    }).observe({ type: "longtask" });
  }, notation);
  await page.goto("/submit");
  await expect(page.getByText("2,000 terms at n = 6")).toBeVisible({ timeout: 60_000 });
  await page.getByRole("textbox", { name: "Formula, in the notation" }).click();
  await page.evaluate(() => {
    (window as unknown as { longest: number }).longest = 0;
  });
  // A click lands anywhere in the text, also inside a bracket.
  await page.keyboard.press("Control+Home");
  await page.keyboard.type("7 + ", { delay: 60 });
  await expect(page.getByText("2,001 terms at n = 6")).toBeVisible({ timeout: 60_000 });
  // A bound that holds on a machine busy with other work; a parse on the page's own thread would take longer.
  expect(await page.evaluate(() => (window as unknown as { longest: number }).longest)).toBeLessThan(400);
});

test.describe("without script", () => {
  test.use({ javaScriptEnabled: false });

  test("a form is submitted, its check followed and read", async ({ page }) => {
    await page.goto("/");
    await page.getByRole("button", { name: "Take it to the editor" }).click();
    await page
      .getByRole("textbox", { name: "Formula, in the notation" })
      .fill("[1 2 3 4 5] + [1 2 3 5 6] + [1 3 4 5 6]");
    await page.getByLabel("Legs n").fill("6");
    await page.getByRole("button", { name: "Submit and check" }).click();
    await page.waitForURL("**/checks/*");
    await expect(page.getByRole("heading", { level: 1, name: "Accepted" })).toBeVisible({ timeout: 45_000 });
    await page.getByRole("link", { name: /^n6k1L0-\d+$/ }).click();
    await expect(page.getByRole("region", { name: /^Formula of/ })).toBeVisible();
  });

  test("what cannot be read comes back with the text and the faults", async ({ page }) => {
    await page.goto("/submit?n=6&k=1&loops=0&notation=[1 2 3 4");
    await page.getByRole("button", { name: "Submit and check" }).click();
    await expect(page.getByText("nothing was stored")).toBeVisible();
    await expect(page.getByRole("region", { name: "Line 1 of the formula" })).toBeVisible();
    await expect(page.getByRole("textbox", { name: "Formula, in the notation" })).toHaveValue("[1 2 3 4");
  });
});

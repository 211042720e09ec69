/** From a method to a form to its values, with script and without; points that are typed and uploaded. */
import { readFile } from "node:fs/promises";
import { expect, test } from "@playwright/test";
import { sixLegs, submit, verdict } from "./support/library";

/** Four momenta by hand: 3-4-5 triangles, all outgoing. */
const fourMomenta = JSON.stringify({
  momenta: [
    [
      ["-5", "0", "0", "-5"],
      ["-5", "0", "0", "5"],
      ["5", "3", "0", "4"],
      ["5", "-3", "0", "-4"],
    ],
  ],
});

/** s = 100 and t = (p2 + p3)^2 = -(3^2 + 9^2) = -90, so that |<1 2>^4/(<1 2><2 3><3 4><4 1>)| = s^2/(|s t|) = 10/9. */
const size = 10 / 9;

for (const javaScriptEnabled of [true, false]) {
  test.describe(javaScriptEnabled ? "with script" : "without script", () => {
    test.use({ javaScriptEnabled });

    test("a derived form is evaluated and taken to the editor", async ({ page }) => {
      await page.goto("/");
      await page.getByRole("link", { name: "Derive" }).click();
      await page.getByLabel("Legs n").fill("6");
      await page.getByLabel("Shifted leg").fill("2");
      await page.getByRole("button", { name: "Derive" }).click();
      await expect(page).toHaveURL(/\/derive\?n=6&k=1&loops=0&method=recursion&leg=2/);
      await expect(
        page.getByRole("heading", { name: "On-shell recursion, leg 2 shifted towards leg 1" }),
      ).toBeVisible();
      await expect(page.getByText("Three terms.")).toBeVisible();
      await page.getByRole("link", { name: "Evaluate it" }).click();
      await expect(page.getByRole("row")).toHaveCount(5);
      await page.goBack();
      await page.getByRole("link", { name: "Submit it" }).click();
      await expect(page.getByLabel("Title")).toHaveValue("On-shell recursion, leg 2 shifted towards leg 1");
    });

    test("momenta that are typed or uploaded give the textbook value", async ({ page }, info) => {
      for (const way of ["typed", "uploaded"]) {
        await page.goto("/evaluate?where=own&n=4&k=0&component=--%2B%2B&notation=<1 2>^4 / (<1 2><2 3><3 4><4 1>)");
        if (way === "typed") await page.getByLabel("Points or momenta as JSON").fill(fourMomenta);
        else
          await page
            .getByLabel("Or a file with them")
            .setInputFiles({ name: "momenta.json", mimeType: "application/json", buffer: Buffer.from(fourMomenta) });
        await page.getByRole("button", { name: "Evaluate" }).click();
        const cells = page.getByRole("region", { name: "Table of values" }).getByRole("cell");
        await expect(cells).toHaveCount(4);
        const [re, im, , digits] = (await cells.allTextContents()).map(Number);
        expect(Math.hypot(re ?? 0, im ?? 0)).toBeCloseTo(size, 10);
        expect(digits).toBeGreaterThan(8);
        const download = page.waitForEvent("download");
        await page.getByRole("link", { name: "Download as CSV" }).click();
        const path = info.outputPath(`${way}.csv`);
        await (await download).saveAs(path);
        const [head, row] = (await readFile(path, "utf8")).split("\r\n");
        expect(head).toBe("point,helicities,re,im,error,digits,reason");
        expect(row?.split(",").slice(0, 3)).toEqual(["0", "", String(re)]);
      }
    });

    test("many points, too long for an address, are evaluated all the same", async ({ page }) => {
      const [point] = (JSON.parse(fourMomenta) as { momenta: unknown[] }).momenta;
      await page.goto("/evaluate?where=own&n=4&k=0&component=--%2B%2B&notation=<1 2>^4 / (<1 2><2 3><3 4><4 1>)");
      await page.getByLabel("Points or momenta as JSON").fill(JSON.stringify({ momenta: new Array(300).fill(point) }));
      await page.getByRole("button", { name: "Evaluate" }).click();
      await expect(page.getByText("The first 200 of 300 values")).toBeVisible();
      await expect(page.getByLabel("Legs n")).toHaveValue("4");
    });
  });
}

test("a kept form has an address for its values, and the same ones there again", async ({ page, request }) => {
  const kept = await submit(request, sixLegs);
  expect(await verdict(request, kept.check)).toBe("agrees");
  await page.goto(`/${kept.form}`);
  await page.getByRole("link", { name: "Evaluate this form" }).click();
  await expect(page.getByRole("row")).toHaveCount(5);
  const first = await page.getByRole("row").allTextContents();
  await page.getByRole("link", { name: "Address of these values" }).click();
  await expect(page).toHaveURL(/seed=/);
  expect(await page.getByRole("row").allTextContents()).toEqual(first);
  const seed = new URL(page.url()).searchParams.get("seed");
  const reply = await request.post("/api/v1/evaluate", { data: { form: kept.form, random: 4, seed } });
  const { values } = (await reply.json()) as { values: string[] };
  expect(first[1]).toContain(values[0]);
});

test("what is wrong is said where it stands, and nothing is computed for too much", async ({ page }) => {
  await page.goto("/evaluate?n=6&k=1&loops=0&notation=[12345]&random=2");
  await expect(page.locator("main mark").first()).toBeVisible();
  await page.goto("/evaluate?form=n6k1L0-999999&random=1");
  await expect(page.getByText("There is no form n6k1L0-999999")).toBeVisible();
  await page.goto("/evaluate?derived=recursion&n=6&k=1&random=2000");
  await expect(page.getByRole("heading", { name: "No values" })).toBeVisible();
  await page.goto("/evaluate?derived=recursion&n=6&k=1&phaseSpace=2");
  await expect(page.getByText("Ask for gluon helicities with 3 minus signs")).toBeVisible();
  await page.goto("/derive?n=40&k=18");
  await expect(page.getByText("Ask for fewer legs")).toBeVisible();
});

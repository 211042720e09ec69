/** Every page, wide and narrow, light and dark: accessible, steady, inside its width, under its policy; a picture of each is kept. */
import AxeBuilder from "@axe-core/playwright";
import { expect, test } from "@playwright/test";
import { sixLegs, submit, verdict } from "./support/library";

const pages: Record<string, string> = {};

test.describe.configure({ timeout: 120_000 });

test.beforeAll(async ({ request }) => {
  const kept = await submit(request, sixLegs);
  expect(await verdict(request, kept.check)).toBe("agrees");
  const wrong = await submit(request, {
    ...sixLegs,
    title: "A sign is wrong",
    notation: sixLegs.notation.replace("+", "-"),
  });
  expect(await verdict(request, wrong.check)).toBe("disagrees");
  const long = await submit(request, {
    amplitude: { n: 12, k: 1, loops: 0 },
    title: "The NMHV sum at twelve legs, written out",
    notation: Array.from({ length: 9 }, (_, a) => a + 2)
      .flatMap((i) => Array.from({ length: 10 - i }, (_, b) => `[1 ${i} ${i + 1} ${i + 2 + b} ${i + 3 + b}]`))
      .join(" + "),
  });
  expect(await verdict(request, long.check)).toBe("agrees");
  Object.assign(pages, {
    home: "/",
    "home-one-loop": "/?loops=1",
    amplitude: "/amplitudes/n6k1L0",
    "amplitude-empty": "/amplitudes/n9k3L0",
    form: `/${kept.form}`,
    "form-long": `/${long.form}`,
    "form-refused": `/${wrong.form}`,
    submit: "/submit?n=6&k=1&loops=0&notation=[1 2 3 4 5] %2B [1 2 3 5 6] %2B [1 3 4 5 6]",
    "submit-faults": "/submit?n=6&k=1&loops=0&notation=[12345] %2B <AB 1 2>%0A%2B (1 2",
    "check-accepted": `/checks/${kept.check}`,
    "check-refused": `/checks/${wrong.check}`,
    derive: "/derive?n=7&k=1&loops=1&method=recursion&leg=3",
    "derive-refused": "/derive?n=6&k=1&loops=2&method=vertex",
    evaluate: "/evaluate",
    "evaluate-exact": `/evaluate?form=${kept.form}&random=4&seed=pages`,
    "evaluate-components": `/evaluate?form=${kept.form}&phaseSpace=2&helicities=all&seed=pages`,
    "evaluate-refused": "/evaluate?n=6&k=1&loops=0&notation=[1 2 3 4&random=2",
    reference: "/reference",
    sources: "/reference/sources",
    specimen: "/specimen",
    missing: "/n6k1L0-999999",
  });
});

const names = [
  "home",
  "home-one-loop",
  "amplitude",
  "amplitude-empty",
  "form",
  "form-long",
  "form-refused",
  "submit",
  "submit-faults",
  "check-accepted",
  "check-refused",
  "derive",
  "derive-refused",
  "evaluate",
  "evaluate-exact",
  "evaluate-components",
  "evaluate-refused",
  "reference",
  "sources",
  "specimen",
  "missing",
];

for (const width of [1280, 390]) {
  for (const colorScheme of ["light", "dark"] as const) {
    test.describe(`${width} px, ${colorScheme}`, () => {
      test.use({ viewport: { width, height: 900 }, colorScheme });

      for (const name of names) {
        test(name, async ({ page }) => {
          const complaints: string[] = [];
          page.on("console", (message) => {
            if (message.type() !== "error") return;
            if (name === "missing" && message.text().includes("404")) return;
            complaints.push(message.text());
          });
          page.on("pageerror", (error) => complaints.push(error.message));
          await page.addInitScript(() => {
            const holder = window as unknown as { shift: number };
            holder.shift = 0;
            new PerformanceObserver((list) => {
              for (const entry of list.getEntries()) holder.shift += (entry as unknown as { value: number }).value;
            }).observe({ type: "layout-shift", buffered: true });
          });
          const reply = await page.goto(pages[name] ?? "/");
          expect(reply?.status()).toBe(name === "missing" ? 404 : 200);
          await page.evaluate(() => document.fonts.ready);
          if (name.startsWith("submit")) await expect(page.locator(".cm-content")).toBeVisible();
          if (name === "submit-faults") await expect(page.locator("main mark").first()).toBeVisible();
          await page.waitForLoadState("networkidle");

          // Before the picture is taken: for it the window is made as high as the page.
          const shift = await page.evaluate(() => (window as unknown as { shift: number }).shift);
          await page.screenshot({ path: `screenshots/${name}-${width}-${colorScheme}.png`, fullPage: true });
          if (!name.startsWith("submit")) expect(shift).toBeLessThan(0.02);
          expect(complaints).toEqual([]);
          expect(
            await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
          ).toBeLessThanOrEqual(0);
          expect(await page.getByRole("heading", { level: 1 }).count()).toBe(1);
          const { violations } = await new AxeBuilder({ page })
            .withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa", "best-practice"])
            .analyze();
          expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target).join(" | ")}`)).toEqual(
            [],
          );
        });
      }
    });
  }
}

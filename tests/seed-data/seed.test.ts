/** The seed library: every document readable, cited and distinct, and accepted by the check that submissions take. */
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { checkForm } from "../../engine/checks";
import { digestOf, type Form, readEntry } from "../../engine/notation";

const folder = join(import.meta.dirname, "../../seed-data");
const files = (readdirSync(folder, { recursive: true }) as string[]).filter((file) => file.endsWith(".json")).sort();

const read = (file: string): Form => {
  const form = readEntry(readFileSync(join(folder, file), "utf8"));
  if (!form.ok) throw new Error(`${file}: ${form.diagnostics.map(({ message }) => message).join(" ")}`);
  return form.value;
};

const forms = files.map((file) => [file, read(file)] as const);

describe("the seed library", () => {
  it("has the kinds of forms that a first library needs", () => {
    const counted = new Map<string, number>();
    for (const file of files) counted.set(file.split("/")[0]!, (counted.get(file.split("/")[0]!) ?? 0) + 1);
    expect(Object.fromEntries(counted)).toEqual({
      components: 16,
      identities: 7,
      "one-loop": 16,
      "three-loop": 2,
      trees: 23,
      "two-loop": 6,
    });
  });

  it("names a publication with its title in every document, and notes what the form shows", () => {
    for (const [file, { title, method, references, note }] of forms) {
      expect(title, file).toMatch(/\S/);
      expect(method, file).toMatch(/\S/);
      expect(note, file).toMatch(/\S/);
      expect(references.length, file).toBeGreaterThan(0);
      for (const reference of references) {
        expect(reference.title, file).toMatch(/\S/);
        const source = reference.arxiv ?? reference.journal ?? "";
        expect(source, file).toMatch(/^(\d{4}\.\d{4,5}|hep-(th|ph)\/\d{7}|.+ [A-Z]?\d+ \((19|20)\d\d\) \d+)$/);
      }
    }
  });

  it("gives one publication one title", () => {
    const titles = new Map<string, string>();
    for (const [file, { references }] of forms) {
      for (const { arxiv, journal, title } of references) {
        const source = arxiv ?? journal ?? "";
        expect(titles.get(source) ?? title, `${file}: ${source}`).toBe(title);
        titles.set(source, title ?? "");
      }
    }
  });

  it("has no title and no digest twice", () => {
    expect(new Set(forms.map(([, { title }]) => title)).size).toBe(files.length);
    expect(new Set(forms.map(([, form]) => digestOf(form))).size).toBe(files.length);
  });

  it.each(forms)("%s passes the check", (file, form) => {
    const { report } = checkForm(form, { seed: `seed library ${file}` });
    expect(report.verdict, report.summary).toBe("agrees");
  });
});

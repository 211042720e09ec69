import { describe, expect, it } from "vitest";
import { certify, replay } from "../../../engine/certificate";
import { checkForm } from "../../../engine/checks";
import { canonicalJson, readEntryValue } from "../../../engine/notation";
import { published } from "../../support/forms";

const read = (notation: string) => {
  const form = readEntryValue({ amplitude: { n: 6, k: 1, loops: 0 }, notation });
  if (!form.ok) throw new Error("unreadable");
  return form.value;
};
const certificate = () => {
  const form = read(published.nmhv6);
  const accepted = [{ name: "n6k1L0-1v1", form: read("(1/2) cyc([1 2 3 4 5])") }];
  return certify(form, "seed", checkForm(form, { seed: "seed", accepted }));
};
const differences = (value: unknown) => {
  const result = replay(JSON.stringify(value));
  if (!result.ok) throw new Error(result.diagnostics[0]?.message);
  return result.value.differences.map((d) => d.path);
};

describe("a certificate", () => {
  it("replays from itself alone", () => {
    expect(differences(certificate())).toEqual([]);
  });

  it("has the same bytes each time", () => {
    expect(canonicalJson(certificate())).toBe(canonicalJson(certificate()));
  });

  it.each<[string, (c: ReturnType<typeof certificate>) => void, string]>([
    [
      "a value of the form",
      (c) => {
        c.evidence[0]!.samples[2]!.value += 1;
      },
      "evidence.0.samples.2.value",
    ],
    [
      "a value of a source",
      (c) => {
        c.evidence[0]!.truths[0]!.values[0]! += 1;
      },
      "evidence.0.truths.0.values.0",
    ],
    [
      "a prime",
      (c) => {
        c.evidence[0]!.samples[0]!.prime += 2;
      },
      "evidence.0.samples.0.prime",
    ],
    [
      "the verdict",
      (c) => {
        c.report.verdict = "disagrees";
      },
      "report.verdict",
    ],
    [
      "a bound",
      (c) => {
        c.report.comparisons[0]!.bound = "2^-999";
      },
      "report.comparisons.0.bound",
    ],
    [
      "a mark",
      (c) => {
        c.report.marks.cyclic!.manifest = true;
      },
      "report.marks.cyclic.manifest",
    ],
    [
      "the digest",
      (c) => {
        c.subject.digest = c.subject.digest.replace(/.$/, (d) => (d === "0" ? "1" : "0"));
      },
      "subject.digest",
    ],
  ])("with %s changed is found out, and the place is named", (_, change, path) => {
    const changed = structuredClone(certificate());
    change(changed);
    expect(differences(changed)).toContain(path);
  });

  it("with another formula put in no longer replays", () => {
    const changed = structuredClone(certificate());
    changed.subject.entry = { ...changed.subject.entry, notation: "[1 2 3 4 5]" };
    expect(differences(changed)).toContain("report.verdict");
  });

  it.each([
    ["no JSON", "{", "not-json"],
    ["another document", "{}", "not-a-certificate"],
    [
      "a newer protocol",
      JSON.stringify({ ...certificate(), versions: { points: "1", protocol: "999", engine: "1" } }),
      "other-version",
    ],
  ])("that is %s gets a diagnostic", (_, text, code) => {
    const result = replay(text);
    expect(result.ok ? [] : result.diagnostics.map((d) => d.code)).toContain(code);
  });
});

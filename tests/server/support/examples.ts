/** Entry documents and reports for tests of the server, where the engine's answer is given and the library's behaviour is looked at. */
import type { Report, Verdict } from "../../../engine/checks/report";

/** A document for (6,1,0); `variant` changes the formula and so the digest. */
export const entry = (variant = 0, more: Record<string, unknown> = {}) => ({
  amplitude: { n: 6, k: 1, loops: 0 },
  notation: `[1 2 3 4 5] + [1 2 3 5 6] + [1 3 4 5 6] + ${variant} [2 3 4 5 6]`,
  title: `Variant ${variant}`,
  method: "on-shell recursion",
  ...more,
});

/** A report with one comparison, one mark and one spurious pole. */
export const report = (verdict: Verdict = "agrees", more: Partial<Report> = {}): Report => ({
  verdict,
  fingerprint: "0123456789abcdef".repeat(4),
  terms: 3,
  comparisons: [
    {
      with: "on-shell recursion",
      kind: "source",
      agrees: verdict === "agrees",
      points: 12,
      primes: 12,
      bound: "2^-180",
    },
  ],
  leftOut: [],
  marks: { cyclic: { state: "holds", manifest: false, evidence: "The value is the same after a rotation." } },
  poles: [{ bracket: "<1 2 3 5>", kind: "spurious", reference: false, terms: [0, 1] }],
  diagnosis: [],
  diagnostics: [],
  summary: "For a test.",
  certificate: { format: "test" },
  ...more,
});

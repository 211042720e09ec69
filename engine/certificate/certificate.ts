/**
 * The certificate of a check: everything needed to repeat it without the server, in one JSON document.
 *
 * It holds no time and no machine, so that one check gives the same bytes wherever it runs. Forms that were compared are embedded;
 * sources of truth are named.
 */
import { z } from "zod";
import {
  type AcceptedForm,
  type CheckRecord,
  engineVersion,
  pointsVersion,
  protocolVersion,
  reportSchema,
} from "../checks";
import { digestOf, type EntryDocument, entryOf, type Form } from "../notation";

export const certificateFormat = "equiform-certificate-1";

const residue = z.int().min(0);
const embeddedForm = z.strictObject({ name: z.string(), digest: z.string(), entry: z.record(z.string(), z.unknown()) });

export const certificateSchema = z.strictObject({
  format: z.literal(certificateFormat),
  /** What the certificate says, for a person. */
  statement: z.string(),
  versions: z.strictObject({ points: z.string(), protocol: z.string(), engine: z.string() }),
  /** All primes and points follow from it; drawn after the form was handed in. */
  seed: z.string(),
  subject: z.strictObject({ digest: z.string(), entry: z.record(z.string(), z.unknown()) }),
  compared: z.strictObject({ sources: z.array(z.string()), forms: z.array(embeddedForm) }),
  /** For each n the draws that were kept, their primes, the form's values and those of everything it was compared with. */
  evidence: z.array(
    z.strictObject({
      n: z.int(),
      samples: z.array(z.strictObject({ draw: z.int().min(0), prime: z.int(), value: residue })),
      truths: z.array(z.strictObject({ with: z.string(), values: z.array(residue) })),
    }),
  ),
  report: reportSchema.omit({ certificate: true }),
});

export type Certificate = z.infer<typeof certificateSchema>;

/** The certificate of a check of `form` with this seed. */
export function certify(form: Form, seed: string, { report, evidence, compared }: CheckRecord): Certificate {
  const sources = [...new Set(report.comparisons.filter((c) => c.kind === "source").map((c) => c.with))];
  return {
    format: certificateFormat,
    statement: statement(report.summary),
    versions: { points: pointsVersion, protocol: protocolVersion, engine: engineVersion },
    seed,
    subject: { digest: digestOf(form), entry: plain(entryOf(form)) },
    compared: { sources, forms: compared.map(embed) },
    evidence: evidence.map(({ n, samples, truths }) => ({
      n,
      samples: samples.map((s) => ({ ...s })),
      truths: truths.map((t) => ({ with: t.with, values: [...t.values] })),
    })),
    report,
  };
}

const embed = ({ name, form }: AcceptedForm) => ({ name, digest: digestOf(form), entry: plain(entryOf(form)) });

const plain = (entry: EntryDocument): Record<string, unknown> =>
  JSON.parse(JSON.stringify(entry)) as Record<string, unknown>;

function statement(summary: string): string {
  return `${summary} The samples follow from the seed; "equiform replay" draws them again and repeats every comparison and mark.`;
}

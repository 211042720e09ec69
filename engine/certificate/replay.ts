/** Replay: the check repeated from its certificate alone, and every place where the two differ. */
import { type AcceptedForm, checkForm, engineVersion, pointsVersion, protocolVersion } from "../checks";
import { digestOf, readEntryValue } from "../notation";
import type { Diagnostic, Result } from "../result";
import { failure, success } from "../result";
import { type Certificate, certificateSchema, certify } from "./certificate";

export interface Difference {
  /** Where in the certificate: "evidence.0.samples.3.value". */
  readonly path: string;
  readonly stated: string;
  readonly recomputed: string;
}

export interface Replay {
  readonly certificate: Certificate;
  /** Empty where everything stated was found again. */
  readonly differences: readonly Difference[];
}

/** Differences listed at the most. */
const mostDifferences = 50;

/** Reads a certificate and repeats its check. Faults of the document are diagnostics; what does not repeat is a difference. */
export function replay(text: string, cancelled?: () => boolean): Result<Replay> {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    return failure(fault("not-json", "The certificate is not JSON.", "Give the file as it was downloaded."));
  }
  const parsed = certificateSchema.safeParse(value);
  if (!parsed.success)
    return failure(
      ...parsed.error.issues
        .slice(0, mostDifferences)
        .map((issue) =>
          fault(
            "not-a-certificate",
            `${issue.path.join(".") || "document"}: ${issue.message}`,
            "Give a certificate of this program, unchanged.",
          ),
        ),
    );
  const certificate = parsed.data;
  const versions = { points: pointsVersion, protocol: protocolVersion, engine: engineVersion };
  for (const name of ["points", "protocol"] as const) {
    if (certificate.versions[name] !== versions[name])
      return failure(
        fault(
          "other-version",
          `The certificate was made with version ${certificate.versions[name]} of ${name}; this program has version ${versions[name]}.`,
          "Replay it with a program of that version.",
        ),
      );
  }
  const subject = readEntryValue(certificate.subject.entry);
  if (!subject.ok) return subject;
  const accepted: AcceptedForm[] = [];
  for (const { name, entry, digest } of certificate.compared.forms) {
    const form = readEntryValue(entry);
    if (!form.ok)
      return failure(
        fault("compared-form", `The embedded form ${name} is not readable.`, "Give the certificate unchanged."),
        ...form.diagnostics,
      );
    if (digestOf(form.value) !== digest)
      return failure(
        fault(
          "compared-form",
          `The embedded form ${name} does not have the digest stated for it.`,
          "Give the certificate unchanged.",
        ),
      );
    accepted.push({ name, form: form.value });
  }
  const { seed } = certificate;
  const record = checkForm(subject.value, {
    seed,
    accepted,
    sources: certificate.compared.sources,
    ...(cancelled ? { cancelled } : {}),
  });
  const again: Certificate = { ...certify(subject.value, seed, record), versions: certificate.versions };
  return success({ certificate, differences: differences(certificate, again) });
}

const fault = (code: string, message: string, help: string): Diagnostic => ({ code, message, help });

/** Every leaf at which two JSON values differ, in the order of the first. */
function differences(stated: unknown, recomputed: unknown, path = ""): Difference[] {
  if (isObject(stated) && isObject(recomputed)) {
    const keys = [...new Set([...Object.keys(stated), ...Object.keys(recomputed)])];
    return keys
      .flatMap((key) => differences(stated[key], recomputed[key], path === "" ? key : `${path}.${key}`))
      .slice(0, mostDifferences);
  }
  return Object.is(stated, recomputed) ? [] : [{ path, stated: shown(stated), recomputed: shown(recomputed) }];
}

const isObject = (value: unknown): value is Record<string, unknown> => typeof value === "object" && value !== null;

function shown(value: unknown): string {
  const text = value === undefined ? "absent" : JSON.stringify(value);
  return text.length > 120 ? `${text.slice(0, 117)}...` : text;
}

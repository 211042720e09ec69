/** Problem documents (RFC 9457) with a stable `code`; the table of codes is the reference documentation. */
import { z } from "zod";
import { diagnosticSchema } from "../../engine/checks/report";

/** code -> HTTP status and the short title, the same for every occurrence. */
export const problemCodes = {
  "not-json": { status: 400, title: "The body is not JSON" },
  "bad-request": { status: 400, title: "The request is not understood" },
  "bad-identifier": { status: 400, title: "Not an identifier" },
  "bad-cursor": { status: 400, title: "Not a cursor of this list" },
  "bad-idempotency-key": { status: 400, title: "The idempotency key cannot be used" },
  forbidden: { status: 403, title: "Not allowed" },
  "foreign-origin": { status: 403, title: "The request comes from another site" },
  "not-found": { status: 404, title: "Not found" },
  "not-checked-yet": { status: 404, title: "There is no certificate yet" },
  "already-finished": { status: 409, title: "The check has already ended" },
  "too-large": { status: 413, title: "The body is too large" },
  "unsupported-media-type": { status: 415, title: "The body must be JSON" },
  "unreadable-entry": { status: 422, title: "The entry document cannot be read" },
  "cannot-derive": { status: 422, title: "The form cannot be derived" },
  "cannot-evaluate": { status: 422, title: "There are no values" },
  "too-costly": { status: 422, title: "The computation is too large for the server" },
  "idempotency-key-reused": { status: 422, title: "The idempotency key was used with another body" },
  "foreign-host": { status: 421, title: "The server does not answer to this host name" },
  busy: { status: 503, title: "The server is busy" },
  internal: { status: 500, title: "The server failed" },
} as const;

export type ProblemCode = keyof typeof problemCodes;

export const problemSchema = z.strictObject({
  /** `urn:equiform:problem:` and the code. */
  type: z.string(),
  title: z.string(),
  status: z.int(),
  code: z.enum(Object.keys(problemCodes) as [ProblemCode, ...ProblemCode[]]),
  /** What happened this time and what to do about it. */
  detail: z.string(),
  /** Faults in an entry document; spans of notation faults count in its `notation`. */
  diagnostics: z.array(diagnosticSchema).optional(),
});

export type Problem = z.infer<typeof problemSchema>;

/** Requests and replies about checks. */
import { z } from "zod";
import { reportSchema, verdictSchema } from "../../engine/checks/report";
import { versionStateSchema } from "./forms";
import { checkIdSchema, formIdSchema } from "./identifiers";

/** State of a check's job. */
export const checkStates = ["queued", "running", "done", "cancelled"] as const;
export const checkStateSchema = z.enum(checkStates);
export type CheckState = z.infer<typeof checkStateSchema>;

export const progressSchema = z.strictObject({
  stage: z.string(),
  done: z.int().min(0),
  total: z.int().min(0),
});

export const startCheckReplySchema = z.strictObject({ check: checkIdSchema });
export type StartCheckReply = z.infer<typeof startCheckReplySchema>;

export const checkViewSchema = z.strictObject({
  id: checkIdSchema,
  state: checkStateSchema,
  progress: progressSchema,
  /** The report without the certificate; null until the check is done. */
  report: reportSchema.nullable(),
  /** The form and version that are being checked; null for a check without keeping. */
  form: formIdSchema.nullable(),
  version: formIdSchema.nullable(),
  versionState: versionStateSchema.nullable(),
  title: z.string().nullable(),
  /** The formula as typed: spans of diagnostics count in it. Null where the document had none. */
  notation: z.string().nullable(),
  createdAt: z.iso.datetime(),
  /** Number of the latest event: what `Last-Event-ID` continues from. */
  seq: z.int(),
});
export type CheckView = z.infer<typeof checkViewSchema>;

/** One server-sent event: `id:` is seq, `event:` is `progress`, or `end` for the last one. */
export const checkEventSchema = z.strictObject({
  seq: z.int(),
  state: checkStateSchema,
  progress: progressSchema,
  verdict: verdictSchema.nullable(),
});
export type CheckEvent = z.infer<typeof checkEventSchema>;

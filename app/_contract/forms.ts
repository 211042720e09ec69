/** Requests and replies about forms: submission, reading, lists. */
import { z } from "zod";
import { markCodeSchema, markStateSchema, reportSchema, targetSchema } from "../../engine/checks/report";
import { amplitudeKeySchema, checkIdSchema, formIdSchema } from "./identifiers";

/** State of a version. */
export const versionStates = ["draft", "checking", "accepted", "refused", "held"] as const;
export const versionStateSchema = z.enum(versionStates);
export type VersionState = z.infer<typeof versionStateSchema>;

/** `n` is null for a form of many n; then `range` says which (`to` null: no end). */
export const amplitudeRefSchema = z.strictObject({
  key: amplitudeKeySchema,
  n: z.int().nullable(),
  range: z.strictObject({ from: z.int(), to: z.int().nullable() }).nullable(),
  k: z.int(),
  loops: z.int(),
});

/** Helicities as the entry document writes them, or null for the superamplitude. */
export const componentSchema = z.union([z.string(), z.strictObject({ minus: z.array(z.int()) })]).nullable();

/** A cited paper; exactly the references of the entry document. */
export const referenceSchema = z.looseObject({
  arxiv: z.string().optional(),
  doi: z.string().optional(),
  journal: z.string().optional(),
  title: z.string().optional(),
  where: z.string().optional(),
});

export const submitReplySchema = z.strictObject({
  form: formIdSchema,
  version: formIdSchema,
  check: checkIdSchema,
  state: versionStateSchema,
});
export type SubmitReply = z.infer<typeof submitReplySchema>;

export const versionRefSchema = z.strictObject({
  version: formIdSchema,
  no: z.int().min(1),
  state: versionStateSchema,
  digest: z.string(),
  createdAt: z.iso.datetime(),
});

export const equalFormSchema = z.strictObject({
  id: formIdSchema,
  title: z.string().nullable(),
  terms: z.int().nullable(),
});

/** One version of a form with everything its page says. `report` comes without the certificate, which has its own address. */
export const formViewSchema = z.strictObject({
  kind: z.literal("form"),
  id: formIdSchema,
  version: formIdSchema,
  no: z.int().min(1),
  state: versionStateSchema,
  amplitude: amplitudeRefSchema,
  component: componentSchema,
  target: targetSchema,
  /** The paper's convention for square brackets: `<ab>[ab]` or `<ab>[ba]`. */
  s: z.string(),
  title: z.string().nullable(),
  notation: z.string(),
  /** Line by line, definitions first. */
  latex: z.array(z.string()),
  method: z.string().nullable(),
  note: z.string().nullable(),
  references: z.array(referenceSchema),
  digest: z.string(),
  terms: z.int().nullable(),
  /** The check that decided, or the one under way. */
  check: checkIdSchema,
  report: reportSchema.nullable(),
  hasCertificate: z.boolean(),
  /** Accepted forms with the same amplitude, component and target. */
  equalForms: z.array(equalFormSchema),
  versions: z.array(versionRefSchema),
  group: z.strictObject({ id: z.string(), name: z.string() }),
  visibility: z.enum(["public", "private"]),
  createdAt: z.iso.datetime(),
});
export type FormView = z.infer<typeof formViewSchema>;

/** What stands for ever at a public identifier whose content the caller may not see: that it was not accepted. */
export const tombstoneSchema = z.strictObject({
  kind: z.literal("tombstone"),
  id: formIdSchema,
  version: formIdSchema,
  state: versionStateSchema,
});
export type Tombstone = z.infer<typeof tombstoneSchema>;

export const formSummarySchema = z.strictObject({
  id: formIdSchema,
  version: formIdSchema,
  state: versionStateSchema,
  amplitude: amplitudeRefSchema,
  component: componentSchema,
  target: targetSchema,
  title: z.string().nullable(),
  method: z.string().nullable(),
  references: z.array(referenceSchema),
  /** First line of the rendered formula, and how many lines there are. */
  firstLine: z.string(),
  lines: z.int(),
  terms: z.int().nullable(),
  /** Number of distinct spurious poles of single terms; null before the check has ended. */
  spuriousPoles: z.int().nullable(),
  marks: z.array(z.strictObject({ code: markCodeSchema, state: markStateSchema, manifest: z.boolean().nullable() })),
  check: checkIdSchema,
  createdAt: z.iso.datetime(),
});
export type FormSummary = z.infer<typeof formSummarySchema>;

/**
 * Filters of the list of forms, all of which must hold. `q`: every word (separated by blanks) occurs, in any letter case, somewhere in
 * identifier, title, method, note, references or notation. `mark`: holds for the form. `method`: equal. `state`: of the latest version.
 */
export const formListQuerySchema = z.strictObject({
  amplitude: amplitudeKeySchema.optional(),
  mark: markCodeSchema.optional(),
  method: z.string().max(300).optional(),
  state: versionStateSchema.optional(),
  q: z.string().max(500).optional(),
  cursor: z.string().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(200).optional(),
});
export type FormListQuery = z.input<typeof formListQuerySchema>;

export const formListSchema = z.strictObject({ items: z.array(formSummarySchema), next: z.string().nullable() });
export type FormList = z.infer<typeof formListSchema>;

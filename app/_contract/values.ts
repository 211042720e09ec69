/** Requests and replies of `derive` and `evaluate`. */
import { z } from "zod";
import { deriveMethods } from "../../engine/derive";
import { numberKinds } from "../../engine/evaluate";
import { entryDocumentSchema } from "../../engine/notation";
import { formIdSchema } from "./identifiers";

export const deriveRequestSchema = z.strictObject({
  n: z.int(),
  k: z.int(),
  loops: z.int().default(0),
  method: z.enum(deriveMethods).default("recursion"),
  /** Recursion: the shifted leg; n where it is left out. */
  leg: z.int().optional(),
  /** Recursion: towards leg - 1 (`forward`) or leg + 1. */
  direction: z.enum(["forward", "backward"]).optional(),
});
export type DeriveQuery = z.input<typeof deriveRequestSchema>;

/** The derived form: an entry document, as `POST forms` and `POST checks` take it. */
export const deriveReplySchema = entryDocumentSchema;

/** The most points of one request, and the most values: points times components. Larger ones are for the command line. */
export const mostPoints = 1000;
export const mostValuesHere = 2000;

/**
 * What is evaluated: a kept form by its identifier, or an entry document. Where: points, momenta, `random` many random points, or
 * `phaseSpace` many points of flat phase space (with field `rational`: exact momenta in signature (2,2)).
 */
export const evaluateRequestSchema = z.strictObject({
  form: formIdSchema.optional(),
  document: z.unknown().optional(),
  /** For a form for many n. */
  n: z.int().optional(),
  points: z.array(z.unknown()).optional(),
  momenta: z.array(z.unknown()).optional(),
  signature: z.string().optional(),
  random: z.int().min(1).max(mostPoints).optional(),
  phaseSpace: z.int().min(1).max(mostPoints).optional(),
  /** Total energy in the centre of mass, for `phaseSpace`. */
  energy: z.number().min(1e-6).max(1e6).optional(),
  seed: z.string().min(1).max(200).optional(),
  /** `rational` where it is left out; `complex` for momenta and phase space. */
  field: z.enum(numberKinds).optional(),
  /** "--+-++", or "all". */
  helicities: z.string().max(100).optional(),
});
export type EvaluateQuery = z.input<typeof evaluateRequestSchema>;

const numberSchema = z.union([z.string(), z.tuple([z.string(), z.string()])]);
const remarksSchema = z.array(z.strictObject({ point: z.int().min(0), message: z.string() }));

const columnParts = {
  /** One for each point; null where there is none, and `reasons` then says why. */
  values: z.array(numberSchema.nullable()),
  /** Field `complex`: estimates of the absolute error, and decimal digits to rely on. */
  errors: z.array(z.string().nullable()).optional(),
  digits: z.array(z.int().nullable()).optional(),
  reasons: remarksSchema.optional(),
};
const columnSchema = z.strictObject({ helicities: z.string(), ...columnParts });
export type ValueColumnReply = z.infer<typeof columnSchema>;

const commonParts = {
  warnings: remarksSchema.optional(),
  seed: z.string().optional(),
  /** The momenta that were drawn for `phaseSpace`: points, legs, (E, x, y, z), all outgoing. */
  momenta: z.array(z.array(z.array(z.string()))).optional(),
  signature: z.string().optional(),
};

/** One column of values, as `value --json` prints it; or, for all helicities, one for each. */
export const evaluateReplySchema = z.union([
  z.strictObject({ helicities: z.string().optional(), ...columnParts, ...commonParts }),
  z.strictObject({ components: z.array(columnSchema), ...commonParts }),
]);
export type EvaluateReply = z.infer<typeof evaluateReplySchema>;

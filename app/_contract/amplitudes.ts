/** Replies about amplitudes: the triangle of one loop order, and one amplitude. */
import { z } from "zod";
import { amplitudeKeySchema } from "./identifiers";

/** How many forms the caller can see, by the state of their latest version. */
const countsSchema = { accepted: z.int(), held: z.int(), checking: z.int() };

export const triangleEntrySchema = z.strictObject({ k: z.int(), key: amplitudeKeySchema, ...countsSchema });

/** Rows n = 4 to at least 8, each with entries k = 0..n-4; the mirror image k -> n-4-k is parity. */
export const triangleSchema = z.strictObject({
  loops: z.int(),
  /** Loop orders for which something is stored, 0 always among them. */
  loopOrders: z.array(z.int()),
  rows: z.array(z.strictObject({ n: z.int(), entries: z.array(triangleEntrySchema) })),
  /** Forms valid for many n. */
  everyN: z.array(triangleEntrySchema),
});
export type Triangle = z.infer<typeof triangleSchema>;

export const amplitudeViewSchema = z.strictObject({
  key: amplitudeKeySchema,
  n: z.int().nullable(),
  k: z.int(),
  loops: z.int(),
  /** The parity image (n, n-4-k); null for many n. */
  mirror: amplitudeKeySchema.nullable(),
  ...countsSchema,
});
export type AmplitudeView = z.infer<typeof amplitudeViewSchema>;

export const amplitudeListSchema = z.strictObject({ items: z.array(amplitudeViewSchema), next: z.string().nullable() });
export type AmplitudeList = z.infer<typeof amplitudeListSchema>;

/** The seed library's progress and the health document. */
import { z } from "zod";

export const seedProgressSchema = z.strictObject({
  /** Entry documents that came with the program. */
  total: z.int(),
  /** Of these: given to the normal check so far, and what became of them. */
  submitted: z.int(),
  accepted: z.int(),
  held: z.int(),
  refused: z.int(),
  /** Documents that could not be read, with what is wrong. */
  unreadable: z.array(z.strictObject({ path: z.string(), problem: z.string() })),
  /** True when nothing is left to do. */
  finished: z.boolean(),
});
export type SeedProgress = z.infer<typeof seedProgressSchema>;

export const healthSchema = z.strictObject({
  status: z.literal("ok"),
  database: z.enum(["sqlite", "postgresql"]),
  protocol: z.string(),
  engine: z.string(),
  jobs: z.strictObject({ queued: z.int(), running: z.int() }),
});
export type Health = z.infer<typeof healthSchema>;

/** The report of a check, as CONTRACT prints it: one zod schema for the command line, the API and the database. */
import { z } from "zod";

export const verdictSchema = z.enum(["agrees", "disagrees", "undecided", "unreadable"]);
export const targetSchema = z.enum(["amplitude", "even", "log", "zero"]);
export const markStateSchema = z.enum(["holds", "fails", "untested", "notApplicable"]);

export const markCodes = [
  "cyclic",
  "reflection",
  "parity",
  "loopExchange",
  "referenceIndependent",
  "localPoles",
  "spuriousCancel",
  "lineIndependent",
  "soft",
  "collinear",
  "factorisation",
  "twoParticleCuts",
  "unitLeadingSingularities",
  "logTest",
  "ratioTest",
  "logarithmic",
  "dualConformal",
  "oneSign",
  "termsOneSign",
] as const;
export const markCodeSchema = z.enum(markCodes);
export type MarkCode = z.infer<typeof markCodeSchema>;

const spanSchema = z.tuple([z.int().min(0), z.int().min(0)]);

export const diagnosticSchema = z.strictObject({
  code: z.string(),
  message: z.string(),
  span: spanSchema.optional(),
  help: z.string().optional(),
  suggestion: z.strictObject({ span: spanSchema, replacement: z.string() }).optional(),
});

export const comparisonSchema = z.strictObject({
  /** Name of the source of truth, or the identifier of the accepted form. */
  with: z.string(),
  kind: z.enum(["source", "form"]),
  agrees: z.boolean(),
  points: z.int().min(1),
  /** Number of different primes among the points. */
  primes: z.int().min(1),
  /** The probability that two different functions agree at all these points is below this: "2^-108". Absent where they disagree. */
  bound: z.string().optional(),
  n: z.int().optional(),
  /** Publication of a source. */
  reference: z.string().optional(),
  /** Method of a source: two sources of one lineage are not independent of each other. */
  lineage: z.string().optional(),
});

export const leftOutSchema = z.strictObject({
  with: z.string(),
  n: z.int().optional(),
  /** Too many operations for the budget, or too large an expression for any number of points to reach the bound. */
  reason: z.enum(["budget", "bound"]),
});

export const markSchema = z.strictObject({
  state: markStateSchema,
  evidence: z.string(),
  manifest: z.boolean().optional(),
  subgroup: z.string().optional(),
});

export const poleSchema = z.strictObject({
  bracket: z.string(),
  kind: z.enum(["physical", "spurious"]),
  /** True where the bracket holds the reference twistor `*` or the reference line `X`. */
  reference: z.boolean(),
  /** Indices of the terms whose denominator holds the bracket. */
  terms: z.array(z.int()),
  /** The highest order of the pole in any term; 1 is a simple pole. */
  orderInTerms: z.int().optional(),
  /** The order of the pole of the sum: 0 none, negative a zero. */
  order: z.int().optional(),
  /** For a spurious pole that cancels: its terms in the smallest groups found in each of which it cancels. */
  groups: z.array(z.array(z.int())).optional(),
});

export const diagnosisSchema = z.strictObject({
  code: z.enum([
    "constant-factor",
    "bracket-factor",
    "relabelled",
    "other-convention",
    "other-target",
    "other-amplitude",
    "reference-dependent",
    "spurious-pole",
    "combination",
    "terms",
    "edit",
    "weight",
  ]),
  message: z.string(),
  factor: z.string().optional(),
  bracket: z.string().optional(),
  power: z.int().optional(),
  shift: z.int().optional(),
  reflected: z.boolean().optional(),
  permutation: z.array(z.int()).optional(),
  target: targetSchema.optional(),
  key: z.string().optional(),
  brackets: z.array(z.string()).optional(),
  terms: z.array(z.int()).optional(),
  text: z.string().optional(),
  remove: z.array(z.int()).optional(),
  negate: z.array(z.int()).optional(),
  rescale: z.array(z.int()).optional(),
  span: spanSchema.optional(),
  replacement: z.string().optional(),
  label: z.string().optional(),
  spans: z.array(spanSchema).optional(),
});

export const reportSchema = z.strictObject({
  verdict: verdictSchema,
  /** Why an `undecided` verdict is undecided. */
  reason: z.enum(["nothing-to-compare", "budget", "bound"]).optional(),
  amplitude: z.strictObject({ key: z.string(), n: z.int().nullable(), k: z.int(), loops: z.int() }).optional(),
  target: targetSchema.optional(),
  component: z.string().optional(),
  digest: z.string().optional(),
  fingerprint: z.string().optional(),
  /** For a range of n: the n that terms, poles and fingerprint are of. */
  at: z.int().optional(),
  terms: z.int().optional(),
  operations: z.int().optional(),
  range: z.array(z.int()).optional(),
  evaluator: z.string().optional(),
  comparisons: z.array(comparisonSchema),
  /** Comparisons that apply and were not made. */
  leftOut: z.array(leftOutSchema),
  marks: z.partialRecord(markCodeSchema, markSchema),
  poles: z.array(poleSchema),
  diagnosis: z.array(diagnosisSchema),
  diagnostics: z.array(diagnosticSchema),
  /** One sentence that says the verdict and its reason. */
  summary: z.string(),
  /** The replayable record (its own schema in engine/certificate). */
  certificate: z.record(z.string(), z.unknown()).optional(),
});

export type Verdict = z.infer<typeof verdictSchema>;
export type Target = z.infer<typeof targetSchema>;
export type Mark = z.infer<typeof markSchema>;
export type Comparison = z.infer<typeof comparisonSchema>;
export type LeftOut = z.infer<typeof leftOutSchema>;
export type Pole = z.infer<typeof poleSchema>;
export type Diagnosis = z.infer<typeof diagnosisSchema>;
export type Report = z.infer<typeof reportSchema>;

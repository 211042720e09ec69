/** Momenta as JSON: what people hand to `value --momenta`, and what `points` writes. */
import { z } from "zod";
import type { Complex, Rational } from "../fields";
import { type Diagnostic, failure, type Result, success } from "../result";
import { fewestMomenta } from "./checkMomenta";
import { type FourMomentum, type Signature, signatures } from "./momenta";
import { complexNumberSchema } from "./readNumber";

/** Exact numbers, as they were written; every point has the same number of legs. Nothing is checked of their physics. */
export interface MomentaDocument {
  readonly signature: Signature;
  readonly points: readonly (readonly FourMomentum<Complex<Rational>>[])[];
}

const momentumSchema = z.tuple([complexNumberSchema, complexNumberSchema, complexNumberSchema, complexNumberSchema], {
  error: "expected four components E, x, y, z",
});

const documentSchema = z.strictObject({
  momenta: z.array(z.array(momentumSchema, { error: "expected a list of momenta, one for each leg" }), {
    error: "expected a list of points",
  }),
  signature: z.enum(signatures, { error: 'expected "1,3" or "2,2"' }).optional(),
  // What the command `points` writes beside the momenta.
  seed: z.string().optional(),
  energy: z.number().optional(),
  weight: z.number().optional(),
});

const HELP =
  'a momenta document is {"momenta": [[["E", "x", "y", "z"], ...], ...]}: points, legs, components, all outgoing; with "signature": "2,2" where p^2 = E^2 - x^2 + y^2 - z^2';

const MOST_DIAGNOSTICS = 100;

const place = (path: readonly PropertyKey[]): string =>
  path.map((step, i) => (typeof step === "number" ? `[${step}]` : `${i === 0 ? "" : "."}${String(step)}`)).join("");

/**
 * Reads a momenta document for amplitudes of n legs.
 * Faults: `momenta-shape` (structure or a malformed number), `momenta-count` (another number of legs), each with its place.
 */
export function readMomenta(json: unknown, n: number): Result<MomentaDocument> {
  const parsed = documentSchema.safeParse(json);
  if (!parsed.success) {
    return failure(
      ...parsed.error.issues.slice(0, MOST_DIAGNOSTICS).map(({ path, message }): Diagnostic => {
        const where = place(path);
        return { code: "momenta-shape", message: where === "" ? message : `${where}: ${message}`, help: HELP };
      }),
    );
  }
  const { momenta, signature = "1,3" } = parsed.data;
  const wrong = momenta.flatMap((legs, index): Diagnostic[] => {
    if (legs.length === n) return [];
    const few = legs.length < fewestMomenta ? `, and an amplitude has at least ${fewestMomenta}` : "";
    const message = `momenta[${index}]: there are ${legs.length} legs, the form has ${n}${few}.`;
    return [{ code: "momenta-count", message, help: `Give ${n} momenta in the order of the legs, all outgoing.` }];
  });
  if (wrong.length > 0) return failure(...wrong.slice(0, MOST_DIAGNOSTICS));
  return success({ signature, points: momenta });
}

/** One term is wrong by a factor: it should be removed, negated or rescaled. */
import { fractionText, reconstructFraction } from "../../solve/reconstruction";
import { drawSample } from "../draws";
import { prepare } from "../evaluator";
import type { Diagnosis } from "../report";
import type { DiagnosisCase } from "./case";

/** Samples with primes of their own at which the repair must give the truth. */
const confirmations = 4;

export function singleTerm(c: DiagnosisCase): readonly Diagnosis[] {
  const { probes } = c;
  const [first, ...rest] = probes;
  if (first === undefined || rest.length === 0 || first.value.terms.length < 2) return [];
  const { field, prime } = first.sample;
  for (const [index, term] of first.value.terms.entries()) {
    const inverse = field.inverse(term);
    if (inverse === null) continue;
    // form + x term = truth
    const x = field.multiply(field.subtract(first.truth, first.value.sum), inverse);
    const everywhere = rest.every(
      ({ value, truth }) => field.add(value.sum, field.multiply(x, value.terms[index] ?? 0)) === truth,
    );
    if (!everywhere) continue;
    const change = reconstructFraction(BigInt(x), BigInt(prime));
    if (change === null || !confirmed(c, index, change)) continue;
    return [repair(index, change.numerator, change.denominator)];
  }
  return [];
}

function repair(index: number, numerator: bigint, denominator: bigint): Diagnosis {
  const term = `term ${index + 1}`;
  if (numerator === -denominator)
    return { code: "terms", remove: [index], message: `The form is right without ${term}.` };
  if (numerator === -2n * denominator)
    return { code: "terms", negate: [index], message: `The form is right when the sign of ${term} is changed.` };
  const factor = fractionText({ numerator: numerator + denominator, denominator });
  return {
    code: "terms",
    rescale: [index],
    factor,
    message: `The form is right when ${term} is multiplied by ${factor}.`,
  };
}

function confirmed(
  { seed, form, truths, spend }: DiagnosisCase,
  index: number,
  change: { numerator: bigint; denominator: bigint },
): boolean {
  const [truth] = truths;
  if (truth === undefined) return false;
  const prepared = prepare(form);
  let agreed = 0;
  for (let draw = 0; agreed < confirmations && draw < 4 * confirmations; draw++) {
    if (!spend(prepared.operations + truth.cost)) return false;
    const sample = drawSample(seed, "repair", form, draw);
    const [outcome] = prepared.evaluate([sample]);
    const [expected] = truth.evaluate([sample]);
    const denominator = sample.field.inverse(sample.field.fromInteger(change.denominator));
    if (outcome?.kind !== "value" || expected === null || expected === undefined || denominator === null) continue;
    const x = sample.field.multiply(sample.field.fromInteger(change.numerator), denominator);
    if (sample.field.add(outcome.sum, sample.field.multiply(x, outcome.terms[index] ?? 0)) !== expected) return false;
    agreed += 1;
  }
  return agreed === confirmations;
}

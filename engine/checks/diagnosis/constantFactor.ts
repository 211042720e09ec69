/** The form is a constant times the truth. */
import { combineResidues, fractionText, reconstructFraction } from "../../solve/reconstruction";
import { drawSample } from "../draws";
import { prepare } from "../evaluator";
import type { Diagnosis } from "../report";
import type { DiagnosisCase } from "./case";

/** Primes that are combined at the most: 96 of 31 bits give fractions of up to 1,400 bits above and below the bar. */
const mostPrimes = 96;

export function constantFactor({ seed, form, truths, probes, spend }: DiagnosisCase): readonly Diagnosis[] {
  const [truth] = truths;
  if (truth === undefined || probes.length < 2) return [];
  const ratios = probes.map(({ sample: { field }, value, truth: expected }) => {
    const inverse = field.inverse(expected);
    return inverse === null ? null : field.multiply(value.sum, inverse);
  });
  const [first] = ratios;
  if (first === undefined || first === null || first === 0 || ratios.some((r) => r !== first)) return [];
  const prepared = prepare(form);
  const residues: { residue: bigint; modulus: bigint }[] = [];
  let known: string | null = null;
  for (let draw = 0; residues.length < mostPrimes && spend(prepared.operations + truth.cost); draw++) {
    const sample = drawSample(seed, "factor", form, draw);
    const [outcome] = prepared.evaluate([sample]);
    const [expected] = truth.evaluate([sample]);
    if (outcome?.kind !== "value" || expected === null || expected === undefined) continue;
    const inverse = sample.field.inverse(expected);
    if (inverse === null) continue;
    residues.push({ residue: BigInt(sample.field.multiply(outcome.sum, inverse)), modulus: BigInt(sample.prime) });
    const { residue, modulus } = combineResidues(residues);
    const fraction = reconstructFraction(residue, modulus);
    const text = fraction === null ? null : fractionText(fraction);
    // A fraction that two more primes confirm is the factor: a wrong one would pass with probability 2^-60.
    if (text !== null && text === known && residues.length >= 3)
      return [{ code: "constant-factor", factor: text, message: sentence(text, form.loops) }];
    known = text;
  }
  return [];
}

function sentence(factor: string, loops: number): string {
  if (factor === "-1") return "The form is -1 times the truth: its overall sign is wrong.";
  const symmetrised = loops > 1 && factor === String(factorial(loops));
  const because = symmetrised
    ? ` This is ${loops}!, the number of orders of the loop lines: the sum over them was taken once too often.`
    : "";
  return `The form is ${factor} times the truth.${because}`;
}

const factorial = (m: number): number => (m <= 1 ? 1 : m * factorial(m - 1));

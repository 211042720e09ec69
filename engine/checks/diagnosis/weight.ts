/** Weights that do not match, between summands or for the whole. */
import type { Diagnosis } from "../report";
import type { WeightFault } from "../weights";
import type { DiagnosisCase } from "./case";

/** One finding for each pair of places that differ, and one for the whole, which may be off in many labels. */
export function weight({ weights }: DiagnosisCase): readonly Diagnosis[] {
  const between = new Map(weights.faults.filter((f) => !f.overall).map((f) => [JSON.stringify(f.spans), f]));
  const whole = weights.faults.filter((f) => f.overall);
  const found = [...between.values()].map(finding);
  const [first, ...others] = whole;
  if (first === undefined) return found;
  const also = others.length === 0 ? "" : ` The weights in ${others.map((f) => f.label).join(", ")} are off as well.`;
  return [...found, { ...finding(first), message: `${first.message}${also}` }];
}

const finding = ({ label, message, spans }: WeightFault): Diagnosis => ({
  code: "weight",
  label,
  message,
  spans: spans.map(([start, end]) => [start, end] as [number, number]),
});

/** Weights that do not match, between summands or for the whole. */
import type { Diagnosis } from "../report";
import type { DiagnosisCase } from "./case";

export function weight({ weights }: DiagnosisCase): readonly Diagnosis[] {
  return weights.faults.map(({ label, message, spans }) => ({
    code: "weight",
    label,
    message,
    spans: spans.map(([start, end]) => [start, end] as [number, number]),
  }));
}

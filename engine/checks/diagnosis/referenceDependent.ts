/** The value depends on the reference twistor or the reference line. */
import { referenceIndependent } from "../marks/referenceIndependent";
import type { Diagnosis } from "../report";
import type { DiagnosisCase } from "./case";

export function referenceDependent({ bench }: DiagnosisCase): readonly Diagnosis[] {
  if (bench === null || referenceIndependent(bench).state !== "fails") return [];
  return [
    {
      code: "reference-dependent",
      message:
        "The value depends on the reference: a term is missing, or one has a wrong sign or label. The sum over all terms must not depend on it.",
    },
  ];
}

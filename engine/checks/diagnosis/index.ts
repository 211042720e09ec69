/** What is wrong with a form that disagrees: one file for each kind of fault, tried in this order, each exact (ENGINE section 4). */
import type { Diagnosis } from "../report";
import { bracketFactor } from "./bracketFactor";
import type { DiagnosisCase } from "./case";
import { constantFactor } from "./constantFactor";
import { otherAmplitude } from "./otherAmplitude";
import { otherConvention } from "./otherConvention";
import { otherTarget } from "./otherTarget";
import { referenceDependent } from "./referenceDependent";
import { relabelled } from "./relabelled";
import { singleTerm } from "./singleTerm";
import { spuriousPole } from "./spuriousPole";
import { weight } from "./weight";

export { type DiagnosisCase, drawProbes } from "./case";

interface DiagnosisCheck {
  readonly run: (c: DiagnosisCase) => readonly Diagnosis[];
  /** Nothing that comes later can add to a finding of this one. */
  readonly final: boolean;
}

const diagnoses: readonly DiagnosisCheck[] = [
  { run: weight, final: false },
  { run: otherConvention, final: false },
  { run: constantFactor, final: true },
  { run: bracketFactor, final: true },
  { run: otherTarget, final: true },
  { run: otherAmplitude, final: true },
  { run: singleTerm, final: false },
  { run: referenceDependent, final: false },
  { run: relabelled, final: true },
  { run: spuriousPole, final: false },
];

export function diagnose(c: DiagnosisCase): readonly Diagnosis[] {
  const found: Diagnosis[] = [];
  for (const { run, final } of diagnoses) {
    const here = run(c);
    found.push(...here);
    if (final && here.length > 0) break;
  }
  return found;
}

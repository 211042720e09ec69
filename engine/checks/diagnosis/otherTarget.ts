/** The form is right, but for another target of the same amplitude. */

import type { Diagnosis, Target } from "../report";
import { targetSchema } from "../report";
import { allEqual, type DiagnosisCase } from "./case";

const names: Readonly<Record<Target, string>> = {
  amplitude: "the amplitude itself",
  even: "the parity-even part of the amplitude",
  log: "the integrand of the logarithm of the amplitude",
  zero: "zero: an identity",
};

export function otherTarget({ question, bench, probes, truthOf }: DiagnosisCase): readonly Diagnosis[] {
  if (bench === null) return [];
  const others = targetSchema.options.filter((t) => t !== question.target && t !== "zero");
  const samples = probes.length > 0 ? probes.map((p) => p.sample) : bench.samples;
  return others.flatMap((target): Diagnosis[] => {
    const truth = truthOf({ ...question, target });
    if (truth === null) return [];
    const expected = truth.evaluate(samples);
    if (expected.some((v) => v === null)) return [];
    const right = allEqual(bench.prepared.evaluate(samples), expected as number[]);
    return right
      ? [{ code: "other-target", target, message: `The form is ${names[target]}: set the target to "${target}".` }]
      : [];
  });
}

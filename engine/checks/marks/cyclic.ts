/** Cyclic symmetry: of the value, and manifest in the set of terms. */
import { rotatePoint } from "../../kinematics";
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { termsPermuted, testInvariance } from "./invariance";

export function cyclic(bench: Bench): Mark {
  const { n, negativeLegs } = bench.form;
  const step = smallestRotation(n, negativeLegs);
  if (step === n)
    return { state: "notApplicable", evidence: "No rotation of the legs leaves the helicities as they are." };
  const when = step === 1 ? "every leg a becomes leg a+1" : `every leg a becomes leg a+${step}`;
  const mark = testInvariance(bench, { when, move: ({ point }) => rotatePoint(point, step) });
  if (mark.state !== "holds") return mark;
  const divisors = Array.from({ length: n - 1 }, (_, i) => i + 1).filter(
    (shift) => n % shift === 0 && shift % step === 0,
  );
  const manifestBy = divisors.find((shift) => termsPermuted(bench, ({ point }) => rotatePoint(point, shift)));
  const manifest = manifestBy === step;
  return {
    ...mark,
    evidence: `${mark.evidence} ${manifestSentence(step, manifestBy)}`,
    manifest,
    ...(manifestBy !== undefined && !manifest ? { subgroup: `rotations by ${manifestBy}` } : {}),
  };
}

function manifestSentence(step: number, manifestBy: number | undefined): string {
  if (manifestBy === undefined) return "It is not manifest: no rotation maps the terms to each other.";
  if (manifestBy === step) return "It is manifest: the rotation maps the terms to each other.";
  return `It is manifest only under rotations by ${manifestBy}, which map the terms to each other.`;
}

/** The least shift that leaves the helicities as they are; 1 for a superamplitude, n where only the whole turn does. */
function smallestRotation(n: number, negativeLegs: readonly number[] | null): number {
  if (negativeLegs === null) return 1;
  const negative = new Set(negativeLegs);
  for (let shift = 1; shift < n; shift++) {
    if (n % shift === 0 && negativeLegs.every((a) => negative.has(((a - 1 + shift) % n) + 1))) return shift;
  }
  return n;
}

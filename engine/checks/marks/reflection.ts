/** Reflection of the order of the legs: of the value, and manifest in the set of terms. A component carries (-1)^n. */
import { reflectPoint, rotatePoint } from "../../kinematics";
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { termsPermuted, testInvariance } from "./invariance";

export function reflection(bench: Bench): Mark {
  const { n, negativeLegs } = bench.form;
  const axes = reflections(n, negativeLegs);
  const [axis] = axes;
  if (axis === undefined)
    return { state: "notApplicable", evidence: "No reflection of the legs leaves the helicities as they are." };
  const sign = negativeLegs !== null && n % 2 === 1 ? -1 : 1;
  const mark = testInvariance(bench, {
    when: `the order of the legs is reversed${sign === -1 ? ", up to the sign (-1)^n" : ""}`,
    move: ({ point }) => rotatePoint(reflectPoint(point), axis),
    ...(sign === -1 ? { factor: ({ field }) => field.negate(field.one) } : {}),
  });
  if (mark.state !== "holds") return mark;
  const manifest = axes.some((shift) =>
    termsPermuted(bench, ({ point }) => rotatePoint(reflectPoint(point), shift), sign),
  );
  const sentence = manifest
    ? "It is manifest: a reflection maps the terms to each other."
    : "It is not manifest: no reflection maps the terms to each other.";
  return { ...mark, manifest, evidence: `${mark.evidence} ${sentence}` };
}

/** Shifts s such that reversing the legs (a -> n+1-a) and then rotating by s leaves the helicities as they are. */
function reflections(n: number, negativeLegs: readonly number[] | null): readonly number[] {
  const shifts = Array.from({ length: n }, (_, s) => s);
  if (negativeLegs === null) return shifts;
  const negative = new Set(negativeLegs);
  // Leg a of the moved point is leg n+1-(a+s) of the old one.
  return shifts.filter((s) => negativeLegs.every((a) => negative.has(n - ((a - 1 + s) % n))));
}

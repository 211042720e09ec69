/** Limits in which a leg disappears: the value must tend to that of the amplitude of the other legs (MARKS "Soft and collinear"). */
import { type PrimeSeries, type PrimeSeriesField, precisionOf, valuationOf } from "../../fields/primeSeries";
import type { Bench } from "../bench";
import { type Ground, mostAttempts } from "../ground";
import type { Mark } from "../report";
import {
  fitsBudget,
  type Lower,
  lowerAmplitude,
  lowerName,
  missingSource,
  notApplicable,
  onlyAmplitudes,
  overBudget,
  primeText,
  superamplitude,
  untested,
  valueOfLower,
} from "./lower";
import { directionOf, type Leg, legOf, movedLeg, withLeg, withoutLeg } from "./moves";

/** Where a leg goes: a supertwistor made from its neighbours. */
export interface Approach {
  /** Completes "when every leg in turn goes to ...". */
  readonly goal: string;
  readonly end: (ground: Ground, before: Leg<number>, after: Leg<number>) => Leg<number>;
}

/** Limits that every leg must have: no pole, and the constant term is the smaller amplitude. */
export function testLimits(bench: Bench, approaches: readonly Approach[]): Mark {
  const { n, k, loops } = bench.form;
  const other = onlyAmplitudes(bench);
  if (other !== null) return other;
  if (n < 5) return notApplicable("There is no amplitude with three legs for this to lead to.");
  // By cyclic symmetry, which is a mark of its own, one leg stands for all where all would take too long.
  const every = fitsBudget(bench, n * approaches.length);
  const costly = every ? null : overBudget(bench, approaches.length);
  if (costly !== null) return costly;
  const lower = lowerAmplitude(superamplitude(n - 1, k, loops));
  if (lower.kind === "unknown") return missingSource(lower.question);
  const primes = new Set<number>();
  for (const approach of approaches) {
    for (let leg = every ? 1 : n; leg <= n; leg++) {
      let found: ReturnType<typeof compareAtEnd> = "bad";
      for (let attempt = 0; found === "bad" && attempt < mostAttempts; attempt++) {
        const ground = bench.ground(attempt);
        found = compareAtEnd(bench, lower, approach, leg, ground);
        primes.add(ground.prime);
      }
      const when = `When leg ${leg} goes to ${approach.goal}`;
      if (found === "bad") return untested(`${when}, a denominator vanishes at every point tried.`);
      if (found !== "equal") return { state: "fails", evidence: `${when}, ${found}.` };
    }
  }
  const goals = approaches.map(({ goal }) => goal).join(", and to ");
  return {
    state: "holds",
    evidence: `The value tends to ${lowerName(lower)} when ${every ? "every leg in turn" : `leg ${n}`} goes to ${goals}: the constant term of a Laurent series at one point each, modulo ${primeText(primes)}; there is no pole.${every ? "" : " The other legs follow where the form is cyclic."}`,
  };
}

function compareAtEnd(
  bench: Bench,
  lower: Exclude<Lower, { kind: "unknown" }>,
  approach: Approach,
  leg: number,
  ground: Ground,
): "equal" | "bad" | string {
  const { point } = ground;
  const end = approach.end(ground, legOf(point, leg - 1), legOf(point, leg + 1));
  const along = directionOf(ground, leg);
  const path = (series: PrimeSeriesField) => withLeg<PrimeSeries>(point, leg, movedLeg(series, end, along));
  const found = bench.series.evaluate(ground.field, path, ({ sum }) => precisionOf(sum) > 0);
  if (found === null || precisionOf(found.sum) <= 0) return "bad";
  const valuation = valuationOf(found.sum);
  if (valuation !== null && valuation < 0) return `the value has a pole of order ${-valuation}`;
  const expected = valueOfLower(lower, withoutLeg(point, leg), ground.prime);
  if (expected === null) return "bad";
  return found.field.coefficient(found.sum, 0) === expected
    ? "equal"
    : `the value does not tend to ${lowerName(lower)}`;
}

/**
 * Products of smaller amplitudes with all Grassmann rows in one determinant, from the recursions of the sources: what residues on
 * poles and cuts are compared with. A three-leg amplitude is 1 for k = 0 without loops and otherwise 0.
 */

import { Modulus } from "../../sources/arithmetic";
import { determinant } from "../../sources/determinants";
import { loopPlan, loopTermCount } from "../../sources/loopPlan";
import { type Plan, type PlanBuilder, remembering, type Term, timesTerms, unit } from "../../sources/plan";
import { evaluatePlan, type SuperPoint } from "../../sources/runPlan";
import { treeExists, treePlan, treeTermCount } from "../../sources/treePlan";
import type { Leg } from "./moves";

/** One side: its legs as base points of the builder, its degree and its loops (0, or 1 with the line's two base points). */
export interface Side {
  readonly legs: readonly number[];
  readonly k: number;
  readonly line: readonly [number, number] | null;
}

/** Whether a side is not zero for reasons of counting. */
export const sideExists = ({ legs, k, line }: Side): boolean =>
  line === null ? treeExists(legs.length, k) : legs.length >= 4 && k >= 0 && k <= legs.length - 4;

export const sideTerms = ({ legs: { length }, k, line }: Side): number =>
  line !== null ? loopTermCount(length, k) : k === 0 ? 1 : treeTermCount(length, k);

const plans = remembering(24, (key) => {
  const [n, k, loops] = key.split(",").map(Number) as [number, number, number];
  return loops === 0 ? treePlan(n, k) : loopPlan(n, k);
});

/** The terms of a side in a builder that has its legs (and loop line) among its base points. */
export function buildSide(builder: PlanBuilder, side: Side): readonly Term[] {
  if (!sideExists(side)) return [];
  const { legs, k, line } = side;
  if (line === null && k === 0) return [unit];
  return embed(builder, plans(`${legs.length},${k},${line === null ? 0 : 1}`), [...legs, ...(line ?? [])]);
}

export const buildProduct = (builder: PlanBuilder, one: Side, other: Side): readonly Term[] =>
  sideExists(one) && sideExists(other) ? timesTerms(buildSide(builder, one), buildSide(builder, other)) : [];

/** A plan with its base points put where `base` says. */
function embed(builder: PlanBuilder, plan: Plan, base: readonly number[]): readonly Term[] {
  const at = [...base];
  const to = (point: number): number => at[point]!;
  for (const { line, plane, part } of plan.meets)
    at.push(builder.meet([to(line[0]), to(line[1])], [to(plane[0]), to(plane[1]), to(plane[2])], part));
  const invariants = plan.invariants.map(
    ([a, b, c, d, e]) => builder.invariant(to(a), to(b), to(c), to(d), to(e)).invariants[0]!,
  );
  const kermits = plan.kermits.map(
    ([p, q, a, b, c, d, e]) => builder.kermit(to(p), to(q), to(a), to(b), to(c), to(d), to(e)).kermits[0]!,
  );
  return plan.terms.map((term) => ({
    invariants: term.invariants.map((index) => invariants[index]!),
    kermits: term.kermits.map((index) => kermits[index]!),
  }));
}

/**
 * The sum of the plan's terms, each the product of its factors and, over the four flavours, of the determinant of its delta rows
 * with `rows[flavour]` below them where it is given; null where a denominator vanishes.
 */
export function sumOfProducts(
  prime: number,
  plan: Plan,
  base: readonly Leg<number>[],
  k: number,
  rows: readonly (readonly number[])[] | null,
): number | null {
  const m = new Modulus(prime);
  const points = base.map(({ z, chi }): SuperPoint => ({ twistor: z, chi }));
  const values = evaluatePlan(m, plan, points, k);
  const { denominators } = values;
  if (!m.invertAll(denominators, denominators.length)) return null;
  const width = 4 * k;
  const data = new Int32Array(values.rows.length + (rows === null ? 0 : width));
  data.set(values.rows);
  rows?.forEach((row, flavour) => {
    data.set(row, values.rows.length + flavour * k);
  });
  let sum = 0;
  for (const term of plan.terms) {
    let value = 1;
    for (const index of term.kermits)
      value = m.multiply(value, m.multiply(values.numerators[index]!, denominators[plan.invariants.length + index]!));
    for (const index of term.invariants) value = m.multiply(value, denominators[index]!);
    for (let flavour = 0; flavour < 4; flavour++) {
      const offsets = term.invariants.map((index) => index * width + flavour * k);
      if (rows !== null) offsets.push(values.rows.length + flavour * k);
      value = m.multiply(value, determinant(m, data, offsets));
    }
    sum = m.add(sum, value);
  }
  return sum;
}

/**
 * Two-particle cuts: where AB meets the lines (i i+1) and (j j+1) an integrand is the product of two lower amplitudes, each with the two
 * points where it meets them, summed over how k and the other loops are shared (1008.2958; MARKS "Two-particle cut").
 */
import { type PrimeSeries, type PrimeSeriesField, precisionOf, valuationOf } from "../../fields/primeSeries";
import { bracket, type Twistor, wrapLabel } from "../../kinematics";
import { PlanBuilder, type Term } from "../../sources/plan";
import type { Bench } from "../bench";
import { type Ground, mostAttempts } from "../ground";
import type { Mark } from "../report";
import { firstUnknown, splittings, sumOverSplittings } from "./distributions";
import { lowerBudget, missingSource, notApplicable, onlyAmplitudes, overBudget, primeText, untested } from "./lower";
import { combine, type Leg, legOf, moved, withLine } from "./moves";
import { buildProduct, type Side, sideExists, sideTerms, sumOfProducts } from "./products";

type Cut = readonly [i: number, j: number];

export function twoParticleCuts(bench: Bench): Mark {
  const { n, k, loops } = bench.form;
  const other = onlyAmplitudes(bench);
  if (other !== null) return other;
  if (loops === 0) return notApplicable("A tree has no loop line to cut.");
  const cuts = cutsOf(n);
  const lower = notKnown(bench, cuts);
  if (lower !== null) return lower;
  const costly = overBudget(bench, cuts.length);
  if (costly !== null) return costly;
  const primes = new Set<number>();
  for (const cut of cuts) {
    let found: ReturnType<typeof compare> = "bad";
    for (let attempt = 0; found === "bad" && attempt < mostAttempts; attempt++) {
      const ground = bench.ground(attempt);
      found = compare(bench, cut, ground);
      primes.add(ground.prime);
    }
    const name = `where AB meets the lines (${lineText(n, cut[0])}) and (${lineText(n, cut[1])})`;
    if (found === "bad") return untested(`${capital(name)} another denominator vanishes at every point tried.`);
    if (found === "unequal")
      return { state: "fails", evidence: `${capital(name)} the integrand is not the product of lower amplitudes.` };
  }
  const into = k === 0 && loops === 1 ? "tree amplitudes" : "lower amplitudes of the sources";
  return {
    state: "holds",
    evidence: `All ${cuts.length} two-particle cuts are products of ${into}, at one point each, modulo ${primeText(primes)}: the integrand is fixed by its cuts.`,
  };
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
const lineText = (n: number, i: number): string => `${i} ${wrapLabel(n, i + 1)}`;

/** Pairs i < j that are not adjacent around the circle: the orders (i,j) and (j,i) are the same cut. */
export const cutsOf = (n: number): readonly Cut[] =>
  Array.from({ length: n }, (_, a) => a + 1).flatMap((i) =>
    Array.from({ length: n }, (_, b) => b + 1).flatMap((j): Cut[] =>
      j - i >= 2 && !(i === 1 && j === n) ? [[i, j]] : [],
    ),
  );

/** Where the lower amplitudes are not known, or are too large to multiply. */
function notKnown(bench: Bench, cuts: readonly Cut[]): Mark | null {
  const { n, k, loops } = bench.form;
  if (k === 0) {
    const sizes = cuts.map(([i, j]) => [j - i + 2, n - (j - i) + 2] as const);
    const missing = firstUnknown(sizes, loops - 1);
    return missing === null ? null : missingSource(missing);
  }
  if (loops > 2)
    return untested(`No source of truth knows products of amplitudes with k >= 1 and ${loops - 1} loops between them.`);
  const terms = cuts
    .flatMap((cut) => sidesOf(bench, cut))
    .reduce((sum, [one, other]) => sum + sideTerms(one) * sideTerms(other), 0);
  if (terms * (60 + 4 * k ** 3) <= lowerBudget) return null;
  return untested(
    `The products of lower amplitudes that the cuts are compared with have ${terms.toLocaleString("en")} terms, more than one mark may take.`,
  );
}

/** Base points of the products: legs 0..n-1, the two points of the cut, then C and D. */
function sidesOf(bench: Bench, [i, j]: Cut): readonly (readonly [Side, Side])[] {
  const { n, k, loops } = bench.form;
  const legs = (from: number, count: number): number[] =>
    Array.from({ length: count }, (_, step) => (from - 1 + step) % n);
  const one = [n, ...legs(i + 1, j - i), n + 1];
  const other = [n + 1, ...legs(j + 1, n - (j - i)), n];
  const line = loops > 1 ? [[n + 2, n + 3] as const] : [];
  const pairs: (readonly [Side, Side])[] = [];
  for (let kL = 0; kL <= k; kL++)
    for (const [left, right] of splittings(line))
      pairs.push([
        { legs: one, k: kL, line: left[0] ?? null },
        { legs: other, k: k - kL, line: right[0] ?? null },
      ]);
  return pairs.filter(([left, right]) => sideExists(left) && sideExists(right));
}

function compare(bench: Bench, cut: Cut, ground: Ground): "equal" | "unequal" | "bad" {
  const [i, j] = cut;
  const { field, point, direction } = ground;
  const [a, b] = ground.numbers(`cut ${i} ${j}`, 2) as [number, number];
  const crossing = ([label, by]: readonly [number, number]): Leg<number> =>
    combine(field, [
      [1, legOf(point, label)],
      [by, legOf(point, label + 1)],
    ]);
  const [first, second] = [crossing([i, a]), crossing([j, b])];
  const [r, s] = direction.lines[0]!;
  const z = (label: number): Twistor<number> => legOf(point, label).z;
  const path = (series: PrimeSeriesField) =>
    withLine<PrimeSeries>(point, 0, [moved(series, first.z, r), moved(series, second.z, s)]);
  const found = bench.series.evaluate(field, path, ({ sum }) => precisionOf(sum) > -2);
  if (found === null || precisionOf(found.sum) <= -2) return "bad";
  const valuation = valuationOf(found.sum);
  if (valuation !== null && valuation < -2) return "unequal";
  const [one, two] = [first.z, second.z];
  const { multiply } = field;
  // With <AB i i+1> = e <R B i i+1> and <AB j j+1> = e <A R' j j+1> the slopes of the recipe cancel.
  const top = multiply(bracket(field, one, two, z(i + 1), r), bracket(field, one, two, z(j + 1), s));
  const leading = found.field.coefficient(found.sum, -2) ?? 0;
  const residue = multiply(leading, multiply(multiply(a, b), top));
  const expected = productOnCut(bench, cut, ground, first, second);
  if (expected === null) return "bad";
  return residue === expected ? "equal" : "unequal";
}

function productOnCut(bench: Bench, cut: Cut, ground: Ground, first: Leg<number>, second: Leg<number>): number | null {
  const { n, k } = bench.form;
  const { point } = ground;
  const [i, j] = cut;
  if (k === 0) {
    const legs = (from: number, count: number): Leg<number>[] =>
      Array.from({ length: count }, (_, step) => legOf(point, from + step));
    const one = [first, ...legs(i + 1, j - i), second];
    const other = [second, ...legs(j + 1, n - (j - i)), first];
    return sumOverSplittings(ground, [one, other], point.lines.slice(1));
  }
  const builder = new PlanBuilder(n + 2 + 2 * (point.loops - 1));
  const terms: Term[] = [];
  for (const [one, other] of sidesOf(bench, cut)) terms.push(...buildProduct(builder, one, other));
  const noChi = [0, 1, 2, 3].map(() => new Array<number>(k).fill(0));
  const base = [
    ...Array.from({ length: n }, (_, leg) => legOf(point, leg + 1)),
    first,
    second,
    ...point.lines.slice(1).flatMap((line) => line.map((twistor) => ({ z: twistor, chi: noChi }))),
  ];
  return sumOfProducts(ground.prime, builder.finish(terms), base, k, null);
}

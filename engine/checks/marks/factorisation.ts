/**
 * Factorisation on every pole <i i+1 j j+1>: the residue is a product of two smaller amplitudes summed over how k and the loops are
 * shared; j = i+2 is the collinear limit that lowers k (1008.2958; MARKS "Factorisation").
 */
import { type PrimeSeries, type PrimeSeriesField, precisionOf, valuationOf } from "../../fields/primeSeries";
import { bracket, combineChi, lineThrough, meetOfLineAndPlane, planeThrough, wrapLabel } from "../../kinematics";
import { PlanBuilder, type Term } from "../../sources/plan";
import type { Bench } from "../bench";
import { type Ground, mostAttempts } from "../ground";
import type { Mark } from "../report";
import { firstUnknown, sumOverSplittings } from "./distributions";
import {
  fitsBudget,
  keyOf,
  lowerBudget,
  missingSource,
  notApplicable,
  onlyAmplitudes,
  overBudget,
  primeText,
  untested,
} from "./lower";
import { combine, directionOf, type Leg, legOf, moved, withLeg } from "./moves";
import { buildProduct, type Side, sideExists, sideTerms, sumOfProducts } from "./products";

type Channel = readonly [i: number, j: number];

export function factorisation(bench: Bench): Mark {
  const { n, k, loops } = bench.form;
  const other = onlyAmplitudes(bench);
  if (other !== null) return other;
  if (k === 0) return notApplicable("An amplitude with k = 0 has no multi-particle pole, its MHV factor left aside.");
  if (loops > 1 && k > 1)
    return untested(`No source of truth knows products of amplitudes with k >= 1 and ${loops} loops between them.`);
  const all = channelsOf(n);
  // Every pole is a rotation of one with i = 1; cyclic symmetry is a mark of its own.
  const every = fitsBudget(bench, all.length);
  const channels = every ? all : all.filter(([i]) => i === 1);
  const missing =
    k > 1
      ? null
      : firstUnknown(
          channels.map(([i, j]) => [j - i + 1, n - (j - i) + 1] as const),
          loops,
        );
  if (missing !== null) return missingSource(missing);
  const costly = overBudget(bench, channels.length) ?? (k > 1 ? termsOverBudget(bench, channels) : null);
  if (costly !== null) return costly;
  const primes = new Set<number>();
  for (const channel of channels) {
    let found: ReturnType<typeof compare> = "bad";
    for (let attempt = 0; found === "bad" && attempt < mostAttempts; attempt++) {
      const ground = bench.ground(attempt);
      found = compare(bench, channel, ground);
      primes.add(ground.prime);
    }
    const name = `the pole ${poleText(n, channel)}`;
    if (found === "bad") return untested(`On ${name} another denominator vanishes at every point tried.`);
    if (found === "unequal")
      return {
        state: "fails",
        evidence: `On ${name} the residue is not the sum of products of smaller amplitudes.`,
      };
  }
  const lowering = channels.filter(([i, j]) => isLowering(n, i, j)).length;
  return {
    state: "holds",
    evidence: `On ${every ? `all ${channels.length} poles <i i+1 j j+1>` : `the ${channels.length} poles <1 2 j j+1>, of which the others are rotations`} (${lowering} of them the collinear limits that lower k) the residue is the sum of products of smaller amplitudes of the sources, at one point each, modulo ${primeText(primes)}.`,
  };
}

/** i < j, not adjacent, both sides of the circle. */
const channelsOf = (n: number): readonly Channel[] =>
  Array.from({ length: n }, (_, a) => a + 1).flatMap((i) =>
    Array.from({ length: n }, (_, b) => b + 1).flatMap((j): Channel[] =>
      j - i >= 2 && !(i === 1 && j === n) ? [[i, j]] : [],
    ),
  );

const isLowering = (n: number, i: number, j: number): boolean => j - i === 2 || n - (j - i) === 2;

function poleText(n: number, [i, j]: Channel): string {
  const labels = [i, i + 1, j, wrapLabel(n, j + 1)].sort((a, b) => a - b);
  return `<${labels.join(" ")}>`;
}

/** Base points of the products: legs 0..n-1, the reference, then A and B. */
function sidesOf(bench: Bench, [i, j]: Channel, inner: number): readonly (readonly [Side, Side])[] {
  const { n, k, loops } = bench.form;
  const legs = (from: number, count: number): number[] =>
    Array.from({ length: count }, (_, step) => (from - 1 + step) % n);
  const [right, left] = [
    [...legs(i + 1, j - i), inner],
    [inner, ...legs(j + 1, n - (j - i))],
  ];
  const line = [n + 1, n + 2] as const;
  const pairs: (readonly [Side, Side])[] = [];
  for (let kR = 0; kR < k; kR++) {
    const kL = k - 1 - kR;
    if (loops === 0)
      pairs.push([
        { legs: right, k: kR, line: null },
        { legs: left, k: kL, line: null },
      ]);
    else {
      pairs.push([
        { legs: right, k: kR, line },
        { legs: left, k: kL, line: null },
      ]);
      pairs.push([
        { legs: right, k: kR, line: null },
        { legs: left, k: kL, line },
      ]);
    }
  }
  return pairs.filter(([one, other]) => sideExists(one) && sideExists(other));
}

function termsOverBudget(bench: Bench, channels: readonly Channel[]): Mark | null {
  let terms = 0;
  for (const channel of channels)
    for (const [one, other] of sidesOf(bench, channel, 0)) terms += sideTerms(one) * sideTerms(other);
  const cost = terms * (60 + 4 * bench.form.k ** 3);
  if (cost <= lowerBudget) return null;
  return untested(
    `The products of smaller amplitudes that the residues of ${keyOf(bench.form)} are compared with have ${terms.toLocaleString("en")} terms, more than one mark may take.`,
  );
}

function compare(bench: Bench, [i, j]: Channel, ground: Ground): "equal" | "unequal" | "bad" {
  const { n } = bench.form;
  const { field, point } = ground;
  const label = wrapLabel(n, j + 1);
  const [a, b, c] = ground.numbers("factorisation", 3) as [number, number, number];
  const [first, second, third] = [legOf(point, i), legOf(point, i + 1), legOf(point, j)];
  // The twistor goes to the plane of the three others; its Grassmann part stays.
  const onPole: Leg<number> = {
    z: combine(field, [
      [a, first],
      [b, second],
      [c, third],
    ]).z,
    chi: legOf(point, label).chi,
  };
  const along = directionOf(ground, label).z;
  const path = (series: PrimeSeriesField) =>
    withLeg<PrimeSeries>(point, label, { z: moved(series, onPole.z, along), chi: onPole.chi });
  const found = bench.series.evaluate(field, path, ({ sum }) => precisionOf(sum) > -1);
  if (found === null || precisionOf(found.sum) <= -1) return "bad";
  const valuation = valuationOf(found.sum);
  if (valuation !== null && valuation < -1) return "unequal";
  // <i i+1 j j+1> = e <i i+1 j R>
  const slope = bracket(field, first.z, second.z, third.z, along);
  const residue = field.multiply(slope, found.field.coefficient(found.sum, -1) ?? 0);
  const expected = productOnPole(bench, [i, j], ground, onPole);
  return expected === null ? "bad" : residue === expected ? "equal" : "unequal";
}

/** lim b [i i+1 j j+1 *] times the sum of products, with leg j+1 on the pole b. */
function productOnPole(bench: Bench, [i, j]: Channel, ground: Ground, end: Leg<number>): number | null {
  const { n, k } = bench.form;
  const { field, point } = ground;
  const label = wrapLabel(n, j + 1);
  const star: Leg<number> = { z: point.referenceTwistor, chi: point.referenceChi };
  const five = [legOf(point, i), legOf(point, i + 1), legOf(point, j), end, star];
  const four = five.map((_, at) => {
    const [p, q, r, s] = [1, 2, 3, 4].map((step) => five[(at + step) % 5]!.z);
    return bracket(field, p!, q!, r!, s!);
  });
  // The bracket that vanishes belongs to the last point, and is the one that the limit takes away.
  const inverse = field.inverse(four.slice(0, 4).reduce(field.multiply, 1));
  const rows = combineChi(
    field,
    five.map(({ chi }, at) => [four[at]!, chi] as const),
  );
  if (inverse === null || rows === null) return null;
  const legs = Array.from({ length: n }, (_, leg) => (leg + 1 === label ? end : legOf(point, leg + 1)));
  const sum = k === 1 ? productsOfMhv(ground, legs, [i, j], rows) : productsOfPlans(bench, ground, legs, [i, j], rows);
  return sum === null ? null : field.multiply(inverse, sum);
}

/** For k = 1 both sides have k = 0: the determinants are the row itself, and the sides are numbers at any number of loops. */
function productsOfMhv(
  ground: Ground,
  legs: readonly Leg<number>[],
  [i, j]: Channel,
  rows: readonly (readonly number[])[],
): number | null {
  const { field, point } = ground;
  const n = legs.length;
  const at = (label: number): Leg<number> => legs[(label - 1) % n]!;
  const line = lineThrough(field, at(i).z, at(i + 1).z);
  const plane = planeThrough(field, at(j).z, at(j + 1).z, point.referenceTwistor);
  const inner: Leg<number> = { z: meetOfLineAndPlane(field, line, plane), chi: [] };
  const range = (from: number, count: number) => Array.from({ length: count }, (_, step) => at(from + step));
  const sides = [
    [...range(i + 1, j - i), inner],
    [inner, ...range(j + 1, n - (j - i))],
  ] as const;
  const sum = sumOverSplittings(ground, sides, point.lines);
  return sum === null ? null : rows.reduce((product, row) => field.multiply(product, row[0]!), sum);
}

function productsOfPlans(
  bench: Bench,
  { point, prime }: Ground,
  legs: readonly Leg<number>[],
  [i, j]: Channel,
  rows: readonly (readonly number[])[],
): number | null {
  const { n, k } = bench.form;
  const builder = new PlanBuilder(n + 1 + 2 * point.loops);
  const inner = builder.meet([i - 1, i % n], [j - 1, j % n, n]);
  const terms: Term[] = [];
  for (const [one, other] of sidesOf(bench, [i, j], inner)) terms.push(...buildProduct(builder, one, other));
  const noChi = [0, 1, 2, 3].map(() => new Array<number>(k).fill(0));
  const base: Leg<number>[] = [
    ...legs,
    { z: point.referenceTwistor, chi: point.referenceChi },
    ...(point.lines[0] ?? []).map((z) => ({ z, chi: noChi })),
  ];
  return sumOfProducts(prime, builder.finish(terms), base, k, rows);
}

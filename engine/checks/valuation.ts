/**
 * Orders of poles as exact valuations (ENGINE section 5, MARKS "Poles with meets"): on each divisor one evaluation in Laurent
 * series gives the order in every term and in the sum. A valuation found is exact but for a chance of about d/p, d the degree and p
 * the 31-bit prime, in which the divisor would seem to have a lower order of pole than it has.
 */
import type { FormAtN } from "../evaluate/form";
import { type PrimeSeries, type PrimeSeriesField, precisionOf, valuationOf } from "../fields/primeSeries";
import type { FoundPole } from "./divisor";
import { pathThrough } from "./divisorPaths";
import { type Ground, mostAttempts } from "./ground";
import { reported } from "./poles";
import type { Pole } from "./report";
import type { SeriesForm, SeriesValue } from "./seriesEvaluator";

/** A sum of which no coefficient up to this order is left is taken for zero, and has no order. */
const deepestZero = 2;

/** Field multiplications (of residues, before they become series) that the poles of one form may take. */
export const poleBudget = 40_000_000;

/**
 * The poles with their orders; those that were not measured have none: the budget ran out, the divisor could not be reached, or the
 * value vanishes identically.
 */
export function measurePoles(
  form: FormAtN,
  poles: readonly FoundPole[],
  series: SeriesForm,
  ground: (attempt: number) => Ground,
): readonly Pole[] {
  const { operations } = series;
  const affordable = operations * poles.length <= poleBudget;
  return poles.map((pole) => (affordable ? measure(form, pole, series, ground) : reported(pole)));
}

function measure(form: FormAtN, pole: FoundPole, series: SeriesForm, ground: (attempt: number) => Ground): Pole {
  for (let attempt = 0; attempt < mostAttempts; attempt++) {
    const path = pathThrough(form, pole.divisor, ground(attempt));
    if (path === null) continue;
    const found = series.evaluate(
      ground(attempt).field,
      path,
      ({ sum, terms }) =>
        terms.every((term) => valuationOf(term) !== null || precisionOf(term) > 0) &&
        (valuationOf(sum) !== null || precisionOf(sum) > deepestZero),
    );
    if (found !== null) return withOrders(pole, found);
  }
  return reported(pole);
}

function withOrders(pole: FoundPole, { field, sum, terms }: SeriesValue): Pole {
  const orderOf = (x: PrimeSeries): number | null => {
    const valuation = valuationOf(x);
    // -0 is not what a report should hold.
    return valuation === null || valuation === Number.POSITIVE_INFINITY ? null : 0 - valuation;
  };
  const orders = terms.map(orderOf).filter((order) => order !== null);
  const order = orderOf(sum);
  const groups = pole.divisor.physical ? [] : cancellingGroups(field, terms);
  return {
    ...reported(pole),
    ...(orders.length === 0 ? {} : { orderInTerms: Math.max(...orders) }),
    ...(order === null ? {} : { order }),
    ...(groups.length === 0 ? {} : { groups }),
  };
}

/** Up to so many terms all triples and quadruples are tried. */
const mostForTriples = 60;
const mostForQuadruples = 24;

/**
 * Terms that have the pole, parted into groups in each of which it cancels: pairs first, then triples and quadruples, the rest as
 * one group. Empty where the pole does not cancel. The polar parts are residues, so that a chance agreement has probability 1/p.
 */
function cancellingGroups(field: PrimeSeriesField, terms: readonly PrimeSeries[]): number[][] {
  const singular = terms.flatMap((term, index) => {
    const valuation = valuationOf(term);
    return valuation !== null && valuation < 0 ? [{ index, valuation }] : [];
  });
  const deepest = Math.min(0, ...singular.map((s) => s.valuation));
  const orders = Array.from({ length: -deepest }, (_, i) => deepest + i);
  const polar = new Map<number, readonly number[]>();
  for (const { index } of singular) {
    const part = orders.map((order) => field.coefficient(terms[index]!, order));
    if (part.includes(null)) return [];
    polar.set(index, part as number[]);
  }
  const vanishes = (group: readonly number[]): boolean =>
    orders.every((_, i) => group.reduce((sum, index) => (sum + polar.get(index)![i]!) % field.prime, 0) === 0);
  let left = [...polar.keys()];
  if (left.length === 0 || !vanishes(left)) return [];
  const groups: number[][] = [];
  for (const size of [2, 3, 4]) {
    if (left.length > (size === 2 ? 2000 : size === 3 ? mostForTriples : mostForQuadruples)) break;
    for (let found = smallestGroup(left, size, vanishes); found !== null; found = smallestGroup(left, size, vanishes)) {
      groups.push([...found]);
      left = left.filter((index) => !found!.includes(index));
    }
  }
  if (left.length > 0) groups.push(left);
  return groups;
}

function smallestGroup(
  left: readonly number[],
  size: number,
  vanishes: (group: readonly number[]) => boolean,
): readonly number[] | null {
  const extend = (group: readonly number[], from: number): readonly number[] | null => {
    if (group.length === size) return vanishes(group) ? group : null;
    for (let i = from; i <= left.length - (size - group.length); i++) {
      const found = extend([...group, left[i]!], i + 1);
      if (found !== null) return found;
    }
    return null;
  };
  return extend([], 0);
}

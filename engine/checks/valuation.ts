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

/**
 * Field multiplications (of residues, before they become series) that the poles of one form may take. Within it every pole is
 * looked at in the whole form; else in the terms that have it, and the order of a sum in which it cancels is not found.
 */
export const poleBudget = 15_000_000;

type Grounds = (attempt: number) => Ground;

/**
 * The poles with their orders; those that were not measured have none: the budget ran out, the divisor could not be reached, or the
 * value vanishes identically.
 * @param terms the number of terms of the form
 * @param alive called before every pole; throws to cancel
 */
export function measurePoles(
  form: FormAtN,
  poles: readonly FoundPole[],
  series: SeriesForm,
  ground: Grounds,
  terms: number,
  alive: () => void = () => {},
): readonly Pole[] {
  const { operations } = series;
  if (operations * poles.length <= poleBudget)
    return poles.map((pole) => {
      alive();
      return inWholeForm(form, pole, series, ground);
    });
  const incidences = poles.reduce((sum, pole) => sum + pole.terms.length, 0);
  if ((operations / Math.max(1, terms)) * incidences > poleBudget) return poles.map(reported);
  let left = poleBudget;
  return poles.map((pole) => {
    alive();
    const found = inItsTerms(form, pole, series, ground);
    if (found.kind === "physical" || (found.order ?? 0) <= 0) return found;
    // Another term may hold the divisor in a bracket that is a product: only the whole form can say that a spurious pole is left.
    left -= operations;
    return left >= 0 ? inWholeForm(form, pole, series, ground) : reported(pole);
  });
}

function inWholeForm(form: FormAtN, pole: FoundPole, series: SeriesForm, ground: Grounds): Pole {
  for (let attempt = 0; attempt < mostAttempts; attempt++) {
    const path = pathThrough(form, pole.divisor, ground(attempt));
    if (path === null) continue;
    const found = series.evaluate(
      ground(attempt).field,
      path,
      ({ sum, terms }) => polarPartsKnown(terms) && (valuationOf(sum) !== null || precisionOf(sum) > deepestZero),
    );
    if (found !== null) return withOrders(pole, found, null);
  }
  return reported(pole);
}

/** The other terms have no pole there: a polar part that is left is that of the whole sum. */
function inItsTerms(form: FormAtN, pole: FoundPole, series: SeriesForm, ground: Grounds): Pole {
  for (let attempt = 0; attempt < mostAttempts; attempt++) {
    const path = pathThrough(form, pole.divisor, ground(attempt));
    if (path === null) continue;
    const found = series.evaluateTerms(pole.terms, ground(attempt).field, path, ({ terms }) => polarPartsKnown(terms));
    if (found !== null) return withOrders(pole, found, pole.terms);
  }
  return reported(pole);
}

const polarPartsKnown = (terms: readonly PrimeSeries[]): boolean =>
  terms.every((term) => valuationOf(term) !== null || precisionOf(term) > 0);

/** `indices` are those of the terms that were evaluated, null for all of the form. */
function withOrders(pole: FoundPole, { field, sum, terms }: SeriesValue, indices: readonly number[] | null): Pole {
  const orderOf = (x: PrimeSeries): number | null => {
    const valuation = valuationOf(x);
    // -0 is not what a report should hold.
    return valuation === null || valuation === Number.POSITIVE_INFINITY ? null : 0 - valuation;
  };
  const orders = terms.map(orderOf).filter((order) => order !== null);
  const ofSum = orderOf(sum);
  const order = indices === null || (ofSum ?? 0) > 0 ? ofSum : null;
  const found = pole.divisor.physical ? [] : cancellingGroups(field, terms);
  const groups = indices === null ? found : found.map((group) => group.map((term) => indices[term]!));
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
  if (polar.size === 0 || !vanishes([...polar.keys()])) return [];
  const groups = opposites(polar, field);
  let left = [...polar.keys()].filter((index) => !groups.some((pair) => pair.includes(index)));
  for (const size of [3, 4]) {
    if (left.length > (size === 3 ? mostForTriples : mostForQuadruples)) break;
    for (let found = smallestGroup(left, size, vanishes); found !== null; found = smallestGroup(left, size, vanishes)) {
      groups.push([...found]);
      left = left.filter((index) => !found!.includes(index));
    }
  }
  if (left.length > 0) groups.push(left);
  return groups;
}

/** Pairs of terms with opposite polar parts, each term in one pair at most. */
function opposites(polar: ReadonlyMap<number, readonly number[]>, field: PrimeSeriesField): number[][] {
  const waiting = new Map<string, number[]>();
  const pairs: number[][] = [];
  for (const [index, part] of polar) {
    const partner = waiting.get(part.map((c) => (c === 0 ? 0 : field.prime - c)).join())?.pop();
    if (partner !== undefined) pairs.push([partner, index]);
    else waiting.set(part.join(), [...(waiting.get(part.join()) ?? []), index]);
  }
  return pairs;
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

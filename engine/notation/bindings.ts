/** Which values the indices of a `sum` or `prod` run over, found by narrowing intervals index by index, never by trying all candidates. */
import { type Inequality, type System, systemOf } from "./conditions";
import type { Bindings } from "./indices";
import type { Quantified } from "./tree";

/** An interval of integers with both ends included; null is no bound. */
type Interval = readonly [low: bigint | null, high: bigint | null];

const floorDivide = (a: bigint, b: bigint): bigint => {
  const quotient = a / b;
  return a % b !== 0n && a < 0n !== b < 0n ? quotient - 1n : quotient;
};

/**
 * Narrows the intervals by the inequalities until nothing changes, or for as many rounds as news needs to cross all indices once
 * (contradictory conditions like i < j, j < i would otherwise shrink their intervals one by one).
 * Returns null when an interval is empty.
 */
function narrow(system: System, start: readonly Interval[], active: readonly Inequality[]): Interval[] | null {
  const intervals = start.map((interval) => interval);
  for (let round = 0; round <= system.size + 1; round += 1) {
    let changed = false;
    for (const { variables, factors, bound } of active) {
      for (let place = 0; place < variables.length; place += 1) {
        let room: bigint | null = bound;
        for (let at = 0; at < variables.length && room !== null; at += 1) {
          if (at === place) continue;
          const [low, high] = intervals[variables[at]!]!;
          const least: bigint | null = factors[at]! > 0n ? low : high;
          room = least === null ? null : room - factors[at]! * least;
        }
        if (room === null) continue;
        const variable = variables[place]!;
        const [low, high] = intervals[variable]!;
        const factor = factors[place]!;
        if (factor > 0n) {
          const limit = floorDivide(room, factor);
          if (high === null || limit < high) {
            intervals[variable] = [low, limit];
            changed = true;
          }
        } else {
          const limit = -floorDivide(room, -factor);
          if (low === null || limit > low) {
            intervals[variable] = [limit, high];
            changed = true;
          }
        }
        const [newLow, newHigh] = intervals[variable]!;
        if (newLow !== null && newHigh !== null && newLow > newHigh) return null;
      }
    }
    if (!changed) return intervals;
  }
  return intervals;
}

/** Whether the values that are known can be part of one turn around the labels 1..n, room left for the others between them. */
function fitsCycle(cycle: readonly number[], values: readonly (bigint | undefined)[], n: bigint): boolean {
  const known = cycle.map((variable, place) => [place, values[variable]] as const).filter(([, v]) => v !== undefined);
  let turn = 0n;
  for (let at = 0; at < known.length; at += 1) {
    const [place, value] = known[at]!;
    const [nextPlace, nextValue] = known[(at + 1) % known.length]!;
    const last = at === known.length - 1;
    const gap = known.length === 1 ? n : (((nextValue! - value!) % n) + n) % n;
    if (gap < BigInt(last ? nextPlace + cycle.length - place : nextPlace - place)) return false;
    turn += gap;
  }
  return turn === n || known.length === 0;
}

const equals = ({ variables, factors, bound }: Inequality, values: readonly (bigint | undefined)[]): boolean =>
  variables.reduce((sum, variable, place) => sum + factors[place]! * values[variable]!, 0n) === bound;

/** The steps that searches may still take; several searches can share one. */
export interface Budget {
  steps: number;
}

/** Raised inside this file when the search took more steps than it was given. */
const tired = Symbol("tired");

/**
 * Goes through the points of a system in ascending order of the first index, then the second, and so on.
 * `interval` is called for the last index where nothing but an interval constrains it; `point` for single points.
 * Either ends the search by returning false. @throws tired when the budget has run out.
 */
class Search {
  private readonly values: (bigint | undefined)[];
  private readonly active: Inequality[][] = [];
  private readonly checks: Inequality[][] = [];
  private readonly cycles: (readonly number[])[][] = [];

  constructor(
    private readonly system: System,
    private readonly n: bigint,
    private readonly budget: Budget,
  ) {
    this.values = Array.from({ length: system.size }, () => undefined);
    const latest = (variables: readonly number[]): number => Math.max(-1, ...variables);
    for (let depth = 0; depth < system.size; depth += 1) {
      this.active.push(system.inequalities.filter(({ variables }) => latest(variables) >= depth));
      this.checks.push(system.unequal.filter(({ variables }) => latest(variables) === depth));
      this.cycles.push(system.cycles.filter((cycle) => cycle.includes(depth)));
    }
  }

  *points(): Generator<readonly bigint[]> {
    if (!this.holdsOutside()) return;
    const start = narrow(
      this.system,
      this.values.map((): Interval => [null, null]),
      this.system.inequalities,
    );
    if (start !== null) yield* this.descend(0, start);
  }

  /** The number of points, or `limit` + 1 when there are more. */
  count(limit: number): number {
    if (!this.holdsOutside()) return 0;
    const start = narrow(
      this.system,
      this.values.map((): Interval => [null, null]),
      this.system.inequalities,
    );
    return start === null ? 0 : Number(this.tally(0, start, BigInt(limit) + 1n));
  }

  /** Conditions without an index, like 4 < n, hold for all points or for none. */
  private holdsOutside(): boolean {
    const { inequalities, unequal } = this.system;
    return (
      inequalities.every(({ variables, bound }) => variables.length > 0 || bound >= 0n) &&
      unequal.every(({ variables, bound }) => variables.length > 0 || bound !== 0n)
    );
  }

  private accepts(depth: number): boolean {
    return (
      this.checks[depth]!.every((check) => !equals(check, this.values)) &&
      this.cycles[depth]!.every((cycle) => fitsCycle(cycle, this.values, this.n))
    );
  }

  /** The intervals once index `depth` has its value, or null when none is left; the last index needs no further look. */
  private next(depth: number, intervals: readonly Interval[], value: bigint): readonly Interval[] | null {
    this.budget.steps -= 1;
    if (this.budget.steps < 0) throw tired;
    this.values[depth] = value;
    if (!this.accepts(depth)) return null;
    if (depth === this.system.size - 1) return intervals;
    const fixed = intervals.map((interval, variable): Interval => (variable === depth ? [value, value] : interval));
    return narrow(this.system, fixed, this.active[depth]!);
  }

  private *descend(depth: number, intervals: readonly Interval[]): Generator<readonly bigint[]> {
    const [low, high] = bounded(intervals[depth]);
    for (let value = low; value <= high; value += 1n) {
      const inner = this.next(depth, intervals, value);
      if (inner === null) continue;
      if (depth === this.system.size - 1) yield this.values as bigint[];
      else yield* this.descend(depth + 1, inner);
    }
    this.values[depth] = undefined;
  }

  private tally(depth: number, intervals: readonly Interval[], most: bigint): bigint {
    const [low, high] = bounded(intervals[depth]);
    const last = depth === this.system.size - 1;
    if (last && this.checks[depth]!.length === 0 && this.cycles[depth]!.length === 0) {
      const width = high - low + 1n;
      return width < most ? width : most;
    }
    let total = 0n;
    for (let value = low; value <= high && total < most; value += 1n) {
      const inner = this.next(depth, intervals, value);
      if (inner !== null) total += last ? 1n : this.tally(depth + 1, inner, most - total);
    }
    this.values[depth] = undefined;
    return total;
  }
}

function bounded(interval: Interval | undefined): readonly [bigint, bigint] {
  const [low, high] = interval ?? [null, null];
  if (low === null || high === null) throw new Error("bindings: expected an index with two bounds, got an open one");
  return [low, high];
}

/**
 * The bindings that a `sum` or `prod` runs over, the outer ones included, in ascending order of the first index, then the second, and so on.
 * The parser has made sure that every index is bounded; `countBindings` tells beforehand how many there are.
 */
export function* enumerateBindings(quantified: Quantified, bindings: Bindings): Generator<Bindings> {
  const search = new Search(systemOf(quantified, bindings), bindings.get("n")!, { steps: Number.POSITIVE_INFINITY });
  for (const values of search.points()) {
    const inner = new Map(bindings);
    quantified.indices.forEach((name, variable) => {
      inner.set(name, values[variable]!);
    });
    yield inner;
  }
}

/** Steps enough to count up to `limit` bindings under any conditions but contrived ones. */
export const budgetFor = (limit: number): Budget => ({ steps: 4 * limit + 10_000 });

/**
 * How many bindings a `sum` or `prod` runs over, or `limit` + 1 when there are more than `limit` or when the budget runs out before they are
 * counted (conditions such as 2 i = 2 j + 1 between far bounds, which nothing satisfies).
 */
export function countBindings(
  quantified: Quantified,
  bindings: Bindings,
  limit: number,
  budget: Budget = budgetFor(limit),
): number {
  try {
    return new Search(systemOf(quantified, bindings), bindings.get("n")!, budget).count(limit);
  } catch (reason) {
    if (reason === tired) return limit + 1;
    throw reason;
  }
}

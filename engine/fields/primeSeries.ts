/**
 * Truncated Laurent series over a 31-bit prime field, made for points of which a few coordinates move: what does not move is a
 * plain number and costs what a number costs, and polynomials in the parameter are exact as long as they are short.
 */
import type { Field } from "./field";

/** A residue that does not depend on the parameter, or sum_i coefficients[i] e^(valuation+i), with an error term unless exact. */
export type PrimeSeries = number | LongPrimeSeries;

/**
 * The first coefficient is not zero. Exact ones have two coefficients or more, or a valuation other than 0; without
 * coefficients (never exact) it is O(e^valuation).
 */
export interface LongPrimeSeries {
  readonly valuation: number;
  readonly coefficients: readonly number[];
  readonly exact: boolean;
}

export interface PrimeSeriesField extends Field<PrimeSeries> {
  readonly prime: number;
  readonly terms: number;
  /** a + b e. */
  linear(a: number, b: number): PrimeSeries;
  /** a + b e + c e^2. */
  quadratic(a: number, b: number, c: number): PrimeSeries;
  /** The coefficient of e^order, or null where the truncation leaves it unknown. */
  coefficient(a: PrimeSeries, order: number): number | null;
}

/** The order of the first coefficient; null where none is known, Infinity for exact zero. */
export function valuationOf(a: PrimeSeries): number | null {
  if (typeof a === "number") return a === 0 ? Number.POSITIVE_INFINITY : 0;
  return a.coefficients.length === 0 ? null : a.valuation;
}

/** Where knowledge ends: the order of the error term, Infinity for exact series. */
export const precisionOf = (a: PrimeSeries): number =>
  typeof a === "number" || a.exact ? Number.POSITIVE_INFINITY : a.valuation + a.coefficients.length;

/**
 * The truncated series over `base` with at most `terms` coefficients, terms >= 2. A field up to the truncation, as `series` is:
 * a series of which no coefficient is known counts as zero and has no inverse.
 * @param base a field of 31-bit residues in plain numbers (`smallPrimeField`)
 */
export function primeSeries(base: Field<number>, terms: number): PrimeSeriesField {
  if (!Number.isInteger(terms) || terms < 2)
    throw new Error(`primeSeries: expected an integer terms >= 2, got ${terms}`);
  const prime = Number(base.characteristic);
  const { add: plus, subtract: minus, multiply: times } = base;

  /** `coefficients` may be longer than `terms` and begin or (if exact) end with zeros. */
  const normalise = (valuation: number, coefficients: number[], exact: boolean): PrimeSeries => {
    let from = 0;
    let to = coefficients.length;
    while (from < to && coefficients[from] === 0) from += 1;
    let known = exact;
    if (exact) {
      while (to > from && coefficients[to - 1] === 0) to -= 1;
      if (from === to) return 0;
      if (to - from === 1 && valuation + from === 0) return coefficients[from]!;
    }
    if (to - from > terms) {
      to = from + terms;
      known = false;
    }
    const kept = from === 0 && to === coefficients.length ? coefficients : coefficients.slice(from, to);
    return { valuation: valuation + from, coefficients: kept, exact: known };
  };
  const long = (a: number): LongPrimeSeries => ({ valuation: 0, coefficients: [a], exact: true });
  const scale = (a: LongPrimeSeries, by: number): PrimeSeries =>
    by === 0 ? 0 : { valuation: a.valuation, coefficients: a.coefficients.map((c) => times(c, by)), exact: a.exact };
  const negate = (a: PrimeSeries): PrimeSeries =>
    typeof a === "number"
      ? base.negate(a)
      : { valuation: a.valuation, coefficients: a.coefficients.map(base.negate), exact: a.exact };

  const combine = (
    a: LongPrimeSeries,
    b: LongPrimeSeries,
    operation: (x: number, y: number) => number,
  ): PrimeSeries => {
    const from = Math.min(a.valuation, b.valuation);
    const ends = [a.valuation + a.coefficients.length, b.valuation + b.coefficients.length] as const;
    const exact = a.exact && b.exact;
    const to = exact
      ? Math.max(ends[0], ends[1])
      : Math.min(a.exact ? Number.POSITIVE_INFINITY : ends[0], b.exact ? Number.POSITIVE_INFINITY : ends[1]);
    if (to <= from) return { valuation: to, coefficients: [], exact: false };
    const sum: number[] = new Array(to - from);
    for (let order = from; order < to; order++) {
      sum[order - from] = operation(a.coefficients[order - a.valuation] ?? 0, b.coefficients[order - b.valuation] ?? 0);
    }
    return normalise(from, sum, exact);
  };
  const product = (a: LongPrimeSeries, b: LongPrimeSeries): PrimeSeries => {
    const [x, y] = [a.coefficients, b.coefficients];
    const whole = x.length + y.length - 1;
    let known = a.exact && b.exact ? whole : Math.min(a.exact ? terms : x.length, b.exact ? terms : y.length);
    if (x.length === 0 || y.length === 0) known = 0;
    const exact = a.exact && b.exact && whole <= terms;
    const length = Math.min(known, terms);
    const out: number[] = new Array(length);
    for (let i = 0; i < length; i++) {
      let c = 0;
      const last = Math.min(i, x.length - 1);
      for (let j = Math.max(0, i - y.length + 1); j <= last; j++) c = plus(c, times(x[j]!, y[i - j]!));
      out[i] = c;
    }
    return normalise(a.valuation + b.valuation, out, exact);
  };
  const inverse = (a: PrimeSeries): PrimeSeries | null => {
    if (typeof a === "number") return base.inverse(a);
    const lead = a.coefficients[0];
    if (lead === undefined) return null;
    const leadInverse = base.inverse(lead)!;
    const { length } = a.coefficients;
    if (a.exact && length === 1) return normalise(-a.valuation, [leadInverse], true);
    const out = [leadInverse];
    const known = a.exact ? terms : length;
    for (let i = 1; i < known; i++) {
      let c = 0;
      for (let j = Math.min(i, length - 1); j >= 1; j--) c = plus(c, times(a.coefficients[j]!, out[i - j]!));
      out.push(base.negate(times(c, leadInverse)));
    }
    return { valuation: -a.valuation, coefficients: out, exact: false };
  };
  const coefficient = (a: PrimeSeries, order: number): number | null => {
    if (typeof a === "number") return order === 0 ? a : 0;
    return order >= precisionOf(a) ? null : (a.coefficients[order - a.valuation] ?? 0);
  };
  const isZero = (a: PrimeSeries): boolean => (typeof a === "number" ? a === 0 : a.coefficients.length === 0);
  const subtract = (a: PrimeSeries, b: PrimeSeries): PrimeSeries => {
    if (typeof a === "number") {
      if (typeof b === "number") return minus(a, b);
      return a === 0 ? negate(b) : combine(long(a), b, minus);
    }
    if (typeof b === "number") return b === 0 ? a : combine(a, long(b), minus);
    return combine(a, b, minus);
  };
  return {
    name: `Laurent series with ${terms} terms over the ${base.name}`,
    characteristic: base.characteristic,
    prime,
    terms,
    zero: 0,
    one: 1,
    linear: (a, b) => normalise(0, [a, b], true),
    quadratic: (a, b, c) => normalise(0, [a, b, c], true),
    coefficient,
    fromInteger: base.fromInteger,
    add: (a, b) => {
      if (typeof a === "number") {
        if (typeof b === "number") return plus(a, b);
        return a === 0 ? b : combine(long(a), b, plus);
      }
      if (typeof b === "number") return b === 0 ? a : combine(a, long(b), plus);
      return combine(a, b, plus);
    },
    subtract,
    multiply: (a, b) => {
      if (typeof a === "number") return typeof b === "number" ? times(a, b) : scale(b, a);
      return typeof b === "number" ? scale(a, b) : product(a, b);
    },
    negate,
    inverse,
    isZero,
    equals: (a, b) => isZero(subtract(a, b)),
    toText: (a) => {
      if (typeof a === "number") return base.toText(a);
      const written = a.coefficients.map((c, i) => `(${base.toText(c)}) e^${a.valuation + i}`);
      if (!a.exact) written.push(`O(e^${precisionOf(a)})`);
      return written.join(" + ");
    },
  };
}

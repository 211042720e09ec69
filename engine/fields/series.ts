/** Truncated Laurent series over a field: a point is moved off a divisor by a small parameter e, and orders are read off. */
import type { Field } from "./field";

/**
 * sum_i coefficients[i] e^(valuation+i) + O(e^(valuation + coefficients.length)). The first coefficient is not zero.
 * Without coefficients it is O(e^valuation): nothing is known but the order; exact zero has valuation Infinity.
 */
export interface Series<T> {
  readonly valuation: number;
  readonly coefficients: readonly T[];
}

/**
 * Series with a bounded number of terms. A field up to the truncation: every operation keeps the coefficients that its arguments
 * determine, at most `terms` of them. `isZero` says that no non-zero coefficient is known, and such a series has no inverse:
 * where that matters, compute again with more terms.
 */
export interface SeriesField<T> extends Field<Series<T>> {
  readonly terms: number;
  /** e itself. */
  readonly parameter: Series<T>;
  /** An element of the base field as a constant. */
  constant(x: T): Series<T>;
  /** The coefficient of e^order, or null where the truncation leaves it unknown. */
  coefficient(a: Series<T>, order: number): T | null;
}

/**
 * The truncated series over `base` with at most `terms` coefficients, terms >= 1. `equals` compares the coefficients that both
 * know.
 */
export function series<T>(base: Field<T>, terms: number): SeriesField<T> {
  if (!Number.isInteger(terms) || terms < 1) throw new Error(`series: expected an integer terms >= 1, got ${terms}`);
  const zero: Series<T> = { valuation: Number.POSITIVE_INFINITY, coefficients: [] };
  /** Where knowledge ends: the order of the error term. */
  const end = (a: Series<T>): number => a.valuation + a.coefficients.length;
  const at = (a: Series<T>, order: number): T => a.coefficients[order - a.valuation] ?? base.zero;

  const normalise = (valuation: number, coefficients: readonly T[]): Series<T> => {
    const skip = coefficients.findIndex((c) => !base.isZero(c));
    if (skip < 0) return { valuation: valuation + coefficients.length, coefficients: [] };
    return { valuation: valuation + skip, coefficients: coefficients.slice(skip, skip + terms) };
  };
  const constant = (x: T): Series<T> =>
    base.isZero(x) ? zero : { valuation: 0, coefficients: [x, ...new Array<T>(terms - 1).fill(base.zero)] };
  const negate = (a: Series<T>): Series<T> => ({ ...a, coefficients: a.coefficients.map(base.negate) });
  const combine = (a: Series<T>, b: Series<T>, operation: (x: T, y: T) => T): Series<T> => {
    const from = Math.min(a.valuation, b.valuation);
    const to = Math.min(end(a), end(b));
    if (to === Number.POSITIVE_INFINITY) return zero;
    const sum: T[] = [];
    for (let order = from; order < to; order++) sum.push(operation(at(a, order), at(b, order)));
    return normalise(from, sum);
  };
  const multiply = (a: Series<T>, b: Series<T>): Series<T> => {
    const valuation = a.valuation + b.valuation;
    const known = Math.min(a.coefficients.length, b.coefficients.length);
    const product: T[] = [];
    for (let i = 0; i < known; i++) {
      let c = base.zero;
      for (let j = 0; j <= i; j++) c = base.add(c, base.multiply(a.coefficients[j]!, b.coefficients[i - j]!));
      product.push(c);
    }
    return normalise(valuation, product);
  };
  const inverse = (a: Series<T>): Series<T> | null => {
    const lead = a.coefficients[0];
    if (lead === undefined) return null;
    const leadInverse = base.inverse(lead)!;
    const out: T[] = [leadInverse];
    for (let i = 1; i < a.coefficients.length; i++) {
      let c = base.zero;
      for (let j = 1; j <= i; j++) c = base.add(c, base.multiply(a.coefficients[j]!, out[i - j]!));
      out.push(base.negate(base.multiply(c, leadInverse)));
    }
    return { valuation: -a.valuation, coefficients: out };
  };
  return {
    name: `Laurent series with ${terms} terms over the ${base.name}`,
    characteristic: base.characteristic,
    zero,
    one: constant(base.one),
    terms,
    parameter: { ...constant(base.one), valuation: 1 },
    constant,
    coefficient: (a, order) => (order >= end(a) ? null : at(a, order)),
    fromInteger: (x) => constant(base.fromInteger(x)),
    add: (a, b) => combine(a, b, base.add),
    subtract: (a, b) => combine(a, b, base.subtract),
    multiply,
    negate,
    inverse,
    isZero: (a) => a.coefficients.length === 0,
    equals: (a, b) => combine(a, b, base.subtract).coefficients.length === 0,
    toText: (a) => {
      const written = a.coefficients.map((c, i) => `(${base.toText(c)}) e^${a.valuation + i}`);
      if (end(a) !== Number.POSITIVE_INFINITY) written.push(`O(e^${end(a)})`);
      return written.length === 0 ? "0" : written.join(" + ");
    },
  };
}

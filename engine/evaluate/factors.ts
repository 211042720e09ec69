/** Bounds on polynomials in the components of a point, multiplied and brought to common denominators factor by factor. */

/** Bounds of one polynomial with integer coefficients: total degree, and log2 of the sum of the absolute values of its coefficients. */
export interface Bound {
  readonly degree: number;
  readonly bits: number;
}

/** A rational function N/D: exponents (at least 1) of the numbered factors of N and of D. Nothing is cancelled between them. */
export interface Quotient {
  readonly top: ReadonlyMap<number, number>;
  readonly bottom: ReadonlyMap<number, number>;
}

const EMPTY: ReadonlyMap<number, number> = new Map();

/** log2(2^a1 + 2^a2 + ...), from above; of an empty list minus infinity. */
export function sumOfBits(bits: readonly number[]): number {
  const most = bits.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY);
  if (!Number.isFinite(most)) return most;
  return most + Math.log2(bits.reduce((sum, b) => sum + 2 ** (b - most), 0)) + 1e-9;
}

function merge(
  a: ReadonlyMap<number, number>,
  b: ReadonlyMap<number, number>,
  combine: (x: number, y: number) => number,
): ReadonlyMap<number, number> {
  if (b.size === 0) return a;
  if (a.size === 0) return b;
  const out = new Map(a);
  for (const [factor, exponent] of b) out.set(factor, combine(out.get(factor) ?? 0, exponent));
  return out;
}

const sum = (x: number, y: number): number => x + y;

/** Numbers the factors of one form: a factor with the same key is the same polynomial up to sign. */
export class Factors {
  private readonly numbers = new Map<string, number>();
  private readonly bounds: Bound[] = [];

  /** The number of the factor with this key, which must always come with the same bound. */
  factor(key: string, bound: Bound): number {
    const known = this.numbers.get(key);
    if (known !== undefined) return known;
    this.numbers.set(key, this.bounds.length);
    this.bounds.push(bound);
    return this.bounds.length - 1;
  }

  one(): Quotient {
    return { top: EMPTY, bottom: EMPTY };
  }

  /** The quotient of products of factors, each list holding a factor as often as it occurs. */
  quotient(top: readonly number[], bottom: readonly number[] = []): Quotient {
    const count = (factors: readonly number[]): ReadonlyMap<number, number> => {
      const exponents = new Map<number, number>();
      for (const factor of factors) exponents.set(factor, (exponents.get(factor) ?? 0) + 1);
      return exponents;
    };
    return { top: count(top), bottom: count(bottom) };
  }

  multiply(a: Quotient, b: Quotient): Quotient {
    return { top: merge(a.top, b.top, sum), bottom: merge(a.bottom, b.bottom, sum) };
  }

  inverse({ top, bottom }: Quotient): Quotient {
    return { top: bottom, bottom: top };
  }

  power(a: Quotient, exponent: number): Quotient {
    if (exponent === 0) return this.one();
    const base = exponent < 0 ? this.inverse(a) : a;
    const raise = (map: ReadonlyMap<number, number>): ReadonlyMap<number, number> =>
      new Map([...map].map(([factor, e]) => [factor, e * Math.abs(exponent)]));
    return { top: raise(base.top), bottom: raise(base.bottom) };
  }

  /** The sum over the least common multiple of the denominators: its numerator is one new factor. */
  add(summands: readonly Quotient[]): Quotient {
    const [first] = summands;
    if (first === undefined) return this.one();
    if (summands.length === 1) return first;
    let bottom: ReadonlyMap<number, number> = EMPTY;
    for (const summand of summands) bottom = this.leastCommonMultiple(bottom, summand.bottom);
    const whole = this.bound(bottom);
    const numerators = summands.map((summand) => {
      const [above, below] = [this.bound(summand.top), this.bound(summand.bottom)];
      return { degree: above.degree + whole.degree - below.degree, bits: above.bits + whole.bits - below.bits };
    });
    const key = summands.map((summand) => this.internKey(summand)).join("+");
    const numerator = this.factor(`(${key})`, {
      degree: numerators.reduce((most, { degree }) => Math.max(most, degree), 0),
      bits: sumOfBits(numerators.map(({ bits }) => bits)),
    });
    return { top: new Map([[numerator, 1]]), bottom };
  }

  /** The bound of a product of powers of factors. */
  bound(product: ReadonlyMap<number, number>): Bound {
    let [degree, bits] = [0, 0];
    for (const [factor, exponent] of product) {
      const bound = this.bounds[factor]!;
      degree += exponent * bound.degree;
      bits += exponent * bound.bits;
    }
    return { degree, bits };
  }

  private leastCommonMultiple(
    a: ReadonlyMap<number, number>,
    b: ReadonlyMap<number, number>,
  ): ReadonlyMap<number, number> {
    // Grown in place where possible: a sum of many terms must not copy the multiple for each of them.
    const out = a === EMPTY ? new Map<number, number>() : (a as Map<number, number>);
    for (const [factor, exponent] of b) {
      if (exponent > (out.get(factor) ?? 0)) out.set(factor, exponent);
    }
    return out;
  }

  /** A short name for a quotient, the same for equal ones. */
  private internKey({ top, bottom }: Quotient): string {
    const text = (map: ReadonlyMap<number, number>): string =>
      [...map]
        .sort(([a], [b]) => a - b)
        .map(([factor, exponent]) => `${factor}^${exponent}`)
        .join(" ");
    return `${this.factor(`:${text(top)}/${text(bottom)}`, { degree: 0, bits: 0 })}`;
  }
}

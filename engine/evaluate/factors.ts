/** Bounds on polynomials in the components of a point, multiplied and brought to common denominators factor by factor. */

/** Bounds of one polynomial with integer coefficients: total degree, and log2 of the sum of the absolute values of its coefficients. */
export interface Bound {
  readonly degree: number;
  readonly bits: number;
}

/** A product of powers of numbered factors, ascending: factor, exponent (at least 1), factor, exponent, ... */
export type Product = readonly number[];

/** A rational function N/D as products of factors. Nothing is cancelled between them. */
export interface Quotient {
  readonly top: Product;
  readonly bottom: Product;
}

/** A sum over the least common multiple of its denominators, its numerator not named as a factor. */
export interface CommonSum {
  readonly top: Bound;
  readonly bottom: Product;
}

const EMPTY: Product = [];

/** log2(2^a1 + 2^a2 + ...), from above, of terms that come one by one; of no terms minus infinity. */
class SumOfBits {
  private most = Number.NEGATIVE_INFINITY;
  private scaled = 0;

  add(bits: number): void {
    if (bits <= this.most) this.scaled += 2 ** (bits - this.most);
    else if (bits > Number.NEGATIVE_INFINITY) {
      this.scaled = this.scaled * 2 ** (this.most - bits) + 1;
      this.most = bits;
    }
  }

  get bits(): number {
    return Number.isFinite(this.most) ? this.most + Math.log2(this.scaled) + 1e-9 : this.most;
  }
}

/** log2(2^a1 + 2^a2 + ...), from above; of an empty list minus infinity. */
export function sumOfBits(bits: readonly number[]): number {
  const sum = new SumOfBits();
  for (const b of bits) if (b > Number.NEGATIVE_INFINITY) sum.add(b);
  return sum.bits;
}

function times(a: Product, b: Product): Product {
  if (b.length === 0) return a;
  if (a.length === 0) return b;
  const out: number[] = [];
  let [i, j] = [0, 0];
  while (i < a.length || j < b.length) {
    const [x, y] = [a[i] ?? Number.POSITIVE_INFINITY, b[j] ?? Number.POSITIVE_INFINITY];
    if (x < y) out.push(x, a[i + 1]!);
    else if (y < x) out.push(y, b[j + 1]!);
    else out.push(x, a[i + 1]! + b[j + 1]!);
    if (x <= y) i += 2;
    if (y <= x) j += 2;
  }
  return out;
}

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
    const count = (factors: readonly number[]): Product => {
      const product: number[] = [];
      for (const factor of [...factors].sort((a, b) => a - b)) {
        if (product.at(-2) === factor) product[product.length - 1]! += 1;
        else product.push(factor, 1);
      }
      return product;
    };
    return { top: count(top), bottom: count(bottom) };
  }

  multiply(a: Quotient, b: Quotient): Quotient {
    return { top: times(a.top, b.top), bottom: times(a.bottom, b.bottom) };
  }

  inverse({ top, bottom }: Quotient): Quotient {
    return { top: bottom, bottom: top };
  }

  power(a: Quotient, exponent: number): Quotient {
    if (exponent === 0) return this.one();
    const base = exponent < 0 ? this.inverse(a) : a;
    const raise = (product: Product): Product => product.map((x, i) => (i % 2 === 0 ? x : x * Math.abs(exponent)));
    return { top: raise(base.top), bottom: raise(base.bottom) };
  }

  /** The sum over the least common multiple of the denominators: its numerator is one new factor. */
  add(summands: readonly Quotient[]): Quotient {
    const [first] = summands;
    if (first === undefined) return this.one();
    if (summands.length === 1) return first;
    const { top, bottom } = this.commonSum(summands.map((summand) => [summand]));
    const key = summands.map((summand) => this.internKey(summand)).join("+");
    return { top: [this.factor(`(${key})`, top), 1], bottom };
  }

  /**
   * The sum of any number of summands, each the product of a list; neither summands nor products are kept: a form may have hundreds of
   * thousands of terms.
   */
  commonSum(summands: Iterable<readonly Quotient[]>): CommonSum {
    /** By factor its exponent in the denominator of the summand at hand, and the highest one so far. */
    const own: number[] = [];
    const highest: number[] = [];
    const numerator = new SumOfBits();
    let degree = Number.NEGATIVE_INFINITY;
    let count = 0;
    for (const summand of summands) {
      count += 1;
      let [ownDegree, ownBits] = [0, 0];
      for (const { top, bottom } of summand) {
        const [above, below] = [this.bound(top), this.bound(bottom)];
        ownDegree += above.degree - below.degree;
        ownBits += above.bits - below.bits;
        for (let i = 0; i < bottom.length; i += 2) {
          const factor = bottom[i]!;
          for (; own.length <= factor; highest.push(0)) own.push(0);
          own[factor]! += bottom[i + 1]!;
        }
      }
      for (const { bottom } of summand) {
        for (let i = 0; i < bottom.length; i += 2) {
          const factor = bottom[i]!;
          if (own[factor]! > highest[factor]!) highest[factor] = own[factor]!;
          own[factor] = 0;
        }
      }
      degree = Math.max(degree, ownDegree);
      numerator.add(ownBits);
    }
    const bottom = highest.flatMap((exponent, factor) => (exponent === 0 ? [] : [factor, exponent]));
    if (count === 0) return { top: { degree: 0, bits: 0 }, bottom };
    const whole = this.bound(bottom);
    return { top: { degree: Math.max(0, degree + whole.degree), bits: numerator.bits + whole.bits }, bottom };
  }

  /** The bound of a product of powers of factors. */
  bound(product: Product): Bound {
    let [degree, bits] = [0, 0];
    for (let i = 0; i < product.length; i += 2) {
      const bound = this.bounds[product[i]!]!;
      degree += product[i + 1]! * bound.degree;
      bits += product[i + 1]! * bound.bits;
    }
    return { degree, bits };
  }

  /** A short name for a quotient, the same for equal ones. */
  private internKey({ top, bottom }: Quotient): string {
    return `${this.factor(`:${top.join(" ")}/${bottom.join(" ")}`, { degree: 0, bits: 0 })}`;
  }
}

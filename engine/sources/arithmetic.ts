/**
 * Arithmetic modulo a 31-bit prime in plain numbers. Residues are canonical: 0..prime-1. No BigInt, so that a source
 * costs milliseconds; shares no code with engine/fields, so that a fault in one shows as a disagreement.
 */
export class Modulus {
  readonly prime: number;
  private readonly reciprocal: number;

  /** @throws Error unless 2^30 < prime < 2^31; that the number is prime is the caller's promise. */
  constructor(prime: number) {
    if (!Number.isInteger(prime) || prime <= 2 ** 30 || prime >= 2 ** 31) {
      throw new Error(`Modulus: expected a prime between 2^30 and 2^31, got ${prime}`);
    }
    this.prime = prime;
    this.reciprocal = 1 / prime;
  }

  add(a: number, b: number): number {
    const difference = a - (this.prime - b);
    return difference < 0 ? difference + this.prime : difference;
  }

  subtract(a: number, b: number): number {
    const difference = a - b;
    return difference < 0 ? difference + this.prime : difference;
  }

  negate(a: number): number {
    return a === 0 ? 0 : this.prime - a;
  }

  /**
   * The quotient is rounded to the nearest integer in doubles (off by less than 2^-19 before rounding), so the remainder
   * lies within prime/2 + 2^12 of zero and its low 32 bits, which `Math.imul` gives exactly, determine it.
   */
  multiply(a: number, b: number): number {
    const quotient = (a * b * this.reciprocal + 0.5) >>> 0;
    const remainder = (Math.imul(a, b) - Math.imul(quotient, this.prime)) | 0;
    return remainder < 0 ? remainder + this.prime : remainder;
  }

  /**
   * The residue of high * 2^16 + low, for integers |high| and |low| below 2^52. Sums of up to 32 products of a residue and the high (15)
   * or low (16) bits of another are below that, and exact.
   */
  reduceSplit(high: number, low: number): number {
    const { prime, reciprocal } = this;
    const above = high - Math.floor(high * reciprocal) * prime;
    const whole = above * 65536 + low;
    const residue = whole - Math.floor(whole * reciprocal) * prime;
    // Either quotient may be off by one; above * 2^16 is then still below 2^49.
    return residue < 0 ? residue + prime : residue >= prime ? residue - prime : residue;
  }

  /** a b - c d. */
  cross(a: number, b: number, c: number, d: number): number {
    return this.subtract(this.multiply(a, b), this.multiply(c, d));
  }

  /** a^exponent for an integer exponent >= 0. */
  power(a: number, exponent: number): number {
    let result = 1;
    for (let base = a, rest = exponent; rest > 0; rest = Math.floor(rest / 2), base = this.multiply(base, base)) {
      if (rest % 2 === 1) result = this.multiply(result, base);
    }
    return result;
  }

  /** The residue of any safe integer. */
  residue(integer: number): number {
    const remainder = integer % this.prime;
    return remainder < 0 ? remainder + this.prime : remainder;
  }

  /** The inverse by the extended Euclidean algorithm; null for zero. */
  inverse(a: number): number | null {
    if (a === 0) return null;
    let [high, low, before, now] = [this.prime, a, 0, 1];
    while (low > 1) {
      const quotient = Math.floor(high / low);
      [high, low] = [low, high - quotient * low];
      [before, now] = [now, before - quotient * now];
    }
    if (low === 0) throw new Error(`Modulus: ${this.prime} is not prime, it shares a factor with ${a}`);
    return now < 0 ? now + this.prime : now;
  }

  /** a / b, or null where b is zero. */
  divide(a: number, b: number): number | null {
    const inverse = this.inverse(b);
    return inverse === null ? null : this.multiply(a, inverse);
  }

  /**
   * Replaces the first `count` entries by their inverses with one inversion and three products each.
   * Returns false, leaving the entries as they were, when one of them is zero.
   */
  invertAll(values: Int32Array, count: number): boolean {
    const prefix = new Int32Array(count);
    let product = 1;
    for (let i = 0; i < count; i++) {
      prefix[i] = product;
      product = this.multiply(product, values[i]!);
    }
    let inverse = this.inverse(product);
    if (inverse === null) return false;
    for (let i = count - 1; i >= 0; i--) {
      const value = values[i]!;
      values[i] = this.multiply(inverse, prefix[i]!);
      inverse = this.multiply(inverse, value);
    }
    return true;
  }
}

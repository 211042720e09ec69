/** Values of expressions over a field: exact constants, scalars, and elements with a Grassmann degree. */
import { type Field, fromRational, type Rational, rational, rationals } from "../fields";
import { ZeroDenominator } from "./algebra";
import { GradedAlgebra, type Homogeneous } from "./graded";

/**
 * A constant is kept as an exact rational as long as nothing but constants is involved, so that p/p is 1 modulo p too.
 * `parts` are homogeneous elements of ascending degree, at least one of them of degree above 0 (a scalar part has degree 0).
 */
export type Value<T> =
  | { readonly kind: "constant"; readonly exact: Rational }
  | { readonly kind: "scalar"; readonly scalar: T }
  | { readonly kind: "graded"; readonly parts: readonly Homogeneous<T>[] };

/** Constants above this size are reduced into the field: powers of long integers would otherwise grow without need. */
const LARGEST_CONSTANT = 1n << 65536n;
const LARGEST_CONSTANT_BITS = 65536;

const isLarge = ({ numerator, denominator }: Rational): boolean =>
  denominator > LARGEST_CONSTANT || numerator > LARGEST_CONSTANT || numerator < -LARGEST_CONSTANT;

const bitLength = (x: bigint): number => (x < 0n ? -x : x).toString(16).length * 4;

const NO_INVERSE = "an R-invariant or delta stands in a denominator, and has no inverse";

/** Arithmetic of values. Operations throw `ZeroDenominator` where a constant or a divisor has no inverse in the field. */
export class ValueAlgebra<T> {
  readonly graded: GradedAlgebra<T>;

  constructor(
    readonly field: Field<T>,
    k: number,
  ) {
    this.graded = new GradedAlgebra(field, k);
  }

  constant(exact: Rational): Value<T> {
    return isLarge(exact) ? this.scalar(this.reduce(exact)) : { kind: "constant", exact };
  }

  scalar(scalar: T): Value<T> {
    return { kind: "scalar", scalar };
  }

  homogeneous(part: Homogeneous<T>): Value<T> {
    return { kind: "graded", parts: [part] };
  }

  add(values: readonly Value<T>[]): Value<T> {
    let exact = rationals.zero;
    let scalar: T | null = null;
    const byDegree = new Map<number, Homogeneous<T>[]>();
    for (const value of values) {
      if (value.kind === "constant") exact = rationals.add(exact, value.exact);
      else if (value.kind === "scalar") scalar = scalar === null ? value.scalar : this.field.add(scalar, value.scalar);
      else {
        for (const part of value.parts) {
          const list = byDegree.get(part.degree);
          if (list === undefined) byDegree.set(part.degree, [part]);
          else list.push(part);
        }
      }
    }
    if (scalar === null && byDegree.size === 0) return this.constant(exact);
    if (!rationals.isZero(exact)) {
      const reduced = this.reduce(exact);
      scalar = scalar === null ? reduced : this.field.add(scalar, reduced);
    }
    if (byDegree.size === 0) return this.scalar(scalar ?? this.field.zero);
    if (scalar !== null) {
      byDegree.set(0, [...(byDegree.get(0) ?? []), this.graded.scalar(scalar)]);
    }
    const parts = [...byDegree].sort(([a], [b]) => a - b).map(([, list]) => this.graded.add(list));
    return { kind: "graded", parts };
  }

  negate(value: Value<T>): Value<T> {
    if (value.kind === "constant") return { kind: "constant", exact: rationals.negate(value.exact) };
    if (value.kind === "scalar") return this.scalar(this.field.negate(value.scalar));
    const minusOne = this.field.negate(this.field.one);
    return { kind: "graded", parts: value.parts.map((part) => this.graded.scale(part, minusOne)) };
  }

  multiply(values: readonly Value<T>[]): Value<T> {
    let exact = rationals.one;
    let scalar: T | null = null;
    let graded: Extract<Value<T>, { kind: "graded" }> | null = null;
    for (const value of values) {
      if (value.kind === "constant") {
        exact = rationals.multiply(exact, value.exact);
        if (isLarge(exact)) {
          const reduced = this.reduce(exact);
          scalar = scalar === null ? reduced : this.field.multiply(scalar, reduced);
          exact = rationals.one;
        }
      } else if (value.kind === "scalar") {
        scalar = scalar === null ? value.scalar : this.field.multiply(scalar, value.scalar);
      } else {
        graded = graded === null ? value : { kind: "graded", parts: this.products(graded.parts, value.parts) };
      }
    }
    if (scalar === null && graded === null) return this.constant(exact);
    if (!rationals.equals(exact, rationals.one)) {
      const reduced = this.reduce(exact);
      scalar = scalar === null ? reduced : this.field.multiply(scalar, reduced);
    }
    if (graded === null) return this.scalar(scalar ?? this.field.one);
    if (scalar === null) return graded;
    const factor = scalar;
    return { kind: "graded", parts: graded.parts.map((part) => this.graded.scale(part, factor)) };
  }

  inverse(value: Value<T>): Value<T> {
    if (value.kind === "graded") throw new ZeroDenominator(NO_INVERSE);
    if (value.kind === "constant") {
      const exact = rationals.inverse(value.exact);
      if (exact === null) throw new ZeroDenominator();
      return this.constant(exact);
    }
    const inverse = this.field.inverse(value.scalar);
    if (inverse === null) throw new ZeroDenominator();
    return this.scalar(inverse);
  }

  power(base: Value<T>, exponent: number): Value<T> {
    if (exponent < 0) return this.power(this.inverse(base), -exponent);
    let square = base;
    if (base.kind === "constant") {
      const { numerator, denominator } = base.exact;
      const bits = exponent * Math.max(bitLength(numerator), bitLength(denominator));
      const e = BigInt(exponent);
      if (bits <= LARGEST_CONSTANT_BITS) return this.constant(rational(numerator ** e, denominator ** e));
      square = this.scalar(this.reduce(base.exact));
    }
    let result: Value<T> = this.constant(rationals.one);
    for (let e = exponent; e > 0; e = Math.floor(e / 2)) {
      if (e % 2 === 1) result = this.multiply([result, square]);
      if (e > 1) square = this.multiply([square, square]);
    }
    return result;
  }

  /** The number that a value stands for, see `GradedAlgebra.value`; parts of several degrees are added. */
  number(value: Value<T>): T {
    if (value.kind === "constant") return this.reduce(value.exact);
    if (value.kind === "scalar") return value.scalar;
    return value.parts.reduce((sum, part) => this.field.add(sum, this.graded.value(part)), this.field.zero);
  }

  /** The Grassmann degrees (in units of four eta) of the parts of a value; none for a constant zero. */
  degrees(value: Value<T>): readonly number[] {
    if (value.kind === "graded") return value.parts.map((part) => part.degree);
    return value.kind === "constant" && rationals.isZero(value.exact) ? [] : [0];
  }

  private products(a: readonly Homogeneous<T>[], b: readonly Homogeneous<T>[]): readonly Homogeneous<T>[] {
    if (a.length === 1 && b.length === 1) return [this.graded.multiply(a[0]!, b[0]!)];
    const all = a.flatMap((x) => b.map((y) => this.homogeneous(this.graded.multiply(x, y))));
    const sum = this.add(all);
    return sum.kind === "graded" ? sum.parts : [this.graded.scalar(this.number(sum))];
  }

  private reduce(exact: Rational): T {
    const reduced = fromRational(this.field, exact);
    if (reduced === null) throw new ZeroDenominator();
    return reduced;
  }
}

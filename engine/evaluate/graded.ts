/**
 * The commutative algebra that Grassmann values live in: the elements of equal degree in each factor of Lambda(F^k) x 4, one factor
 * for each flavour. A delta is four rows, one a flavour; a product of k deltas is the product of four k x k determinants.
 */
import type { Field } from "../fields";
import { determinant } from "../kinematics";

/** One product of deltas: rows[flavour][i] is a vector of F^k; it is worth coefficient times the wedge of the rows in each flavour. */
interface Product<T> {
  readonly coefficient: T;
  readonly rows: readonly (readonly (readonly T[])[])[];
}

/** A sum of products of `degree` deltas each. */
interface Products<T> {
  readonly kind: "products";
  readonly degree: number;
  readonly products: readonly Product<T>[];
}

/** C(k,degree)^4 components: subsets of columns in ascending order of their bit sets, the first flavour slowest. */
interface Dense<T> {
  readonly kind: "dense";
  readonly degree: number;
  readonly entries: readonly T[];
}

/** A homogeneous element: products of deltas while they are few, components once they are many or degree k is reached. */
export type Homogeneous<T> = Products<T> | Dense<T>;

/** Up to so many products are kept apart: multiplying them one by one is cheaper than multiplying components. */
const MOST_PRODUCTS = 16;

const FLAVOURS = 4;

/** The subsets of {0..k-1} with `degree` elements, as ascending bit sets. */
function subsets(k: number, degree: number): number[] {
  const out: number[] = [];
  for (let set = 0; set < 1 << k; set++) {
    let size = 0;
    for (let s = set; s !== 0; s &= s - 1) size++;
    if (size === degree) out.push(set);
  }
  return out;
}

/** Whether moving the elements of `second` behind those of `first` in ascending order takes an odd number of exchanges. */
function isOddShuffle(first: number, second: number): boolean {
  let odd = false;
  for (let s = second; s !== 0; s &= s - 1) {
    for (let above = first >> (32 - Math.clz32(s & -s)); above !== 0; above &= above - 1) odd = !odd;
  }
  return odd;
}

/** The operations of the algebra over one field for one k, 0 <= k. Elements of degree above k are zero and have no components. */
export class GradedAlgebra<T> {
  private readonly subsetsOf: number[][] = [];

  constructor(
    private readonly field: Field<T>,
    private readonly k: number,
  ) {}

  scalar(x: T): Homogeneous<T> {
    return { kind: "dense", degree: 0, entries: [x] };
  }

  /** delta times a coefficient: `rows` holds one vector of F^k for each flavour. */
  delta(coefficient: T, rows: readonly (readonly T[])[]): Homogeneous<T> {
    return this.close({ kind: "products", degree: 1, products: [{ coefficient, rows: rows.map((row) => [row]) }] });
  }

  scale(a: Homogeneous<T>, factor: T): Homogeneous<T> {
    const { multiply } = this.field;
    if (a.kind === "dense") return { ...a, entries: a.entries.map((x) => multiply(x, factor)) };
    return { ...a, products: a.products.map((p) => ({ ...p, coefficient: multiply(p.coefficient, factor) })) };
  }

  /** The sum of elements of one degree, at least one. */
  add(summands: readonly Homogeneous<T>[]): Homogeneous<T> {
    const [first, ...rest] = summands;
    if (first === undefined) throw new Error("GradedAlgebra.add: expected at least one element");
    if (rest.length === 0) return first;
    const { degree } = first;
    const products = summands.flatMap((a) => (a.kind === "products" ? a.products : []));
    if (products.length <= MOST_PRODUCTS && summands.every((a) => a.kind === "products")) {
      return { kind: "products", degree, products };
    }
    const sum = [...this.entries(first)];
    for (const next of rest) this.accumulate(sum, this.entries(next));
    return { kind: "dense", degree, entries: sum };
  }

  multiply(a: Homogeneous<T>, b: Homogeneous<T>): Homogeneous<T> {
    const degree = a.degree + b.degree;
    if (degree > this.k) return { kind: "dense", degree, entries: [] };
    if (a.degree === 0) return this.scale(b, this.entries(a)[0]!);
    if (b.degree === 0) return this.scale(a, this.entries(b)[0]!);
    if (a.kind === "products" && b.kind === "products") {
      if (a.products.length * b.products.length > MOST_PRODUCTS ** 2 / 4) return this.multiply(this.dense(a), b);
      const products = a.products.flatMap((x) =>
        b.products.map((y) => ({
          coefficient: this.field.multiply(x.coefficient, y.coefficient),
          rows: x.rows.map((flavour, f) => [...flavour, ...y.rows[f]!]),
        })),
      );
      return this.close({ kind: "products", degree, products });
    }
    if (a.kind === "dense" && b.kind === "dense") return this.wedge(a, b);
    const [components, factors] = a.kind === "dense" ? [a, b as Products<T>] : [b as Dense<T>, a];
    const size = this.columns(degree).length ** FLAVOURS;
    const sum = new Array<T>(size).fill(this.field.zero);
    for (const product of factors.products) {
      this.accumulate(sum, this.wedgeProduct(components, factors.degree, product));
    }
    return { kind: "dense", degree, entries: sum };
  }

  /**
   * The number that stands for an element: its first component, the product of the determinants on the first `degree` entries of
   * every chi. At degree k this is the value itself; below, it is what the element is worth for that smaller k; above, zero.
   */
  value(a: Homogeneous<T>): T {
    return this.entries(a)[0] ?? this.field.zero;
  }

  /** Elements of the top degree are one number, and of a higher one nothing: no need to keep their rows. */
  private close(a: Products<T>): Homogeneous<T> {
    return a.degree < this.k && a.products.length <= MOST_PRODUCTS ? a : this.dense(a);
  }

  private accumulate(sum: T[], entries: readonly T[]): void {
    entries.forEach((x, i) => {
      sum[i] = this.field.add(sum[i]!, x);
    });
  }

  private columns(degree: number): number[] {
    let known = this.subsetsOf[degree];
    if (known === undefined) {
      known = subsets(this.k, degree);
      this.subsetsOf[degree] = known;
    }
    return known;
  }

  private entries(a: Homogeneous<T>): readonly T[] {
    return this.dense(a).entries;
  }

  /** minors[flavour][I]: of the rows of that flavour and the columns of subset I. */
  private minors(degree: number, { rows }: Product<T>): T[][] {
    return rows.map((flavour) =>
      this.columns(degree).map((set) =>
        determinant(
          this.field,
          flavour.map((row) => row.filter((_, column) => (set >> column) & 1)),
        ),
      ),
    );
  }

  private dense(a: Homogeneous<T>): Dense<T> {
    if (a.kind === "dense") return a;
    const { degree } = a;
    const sum = new Array<T>(this.columns(degree).length ** FLAVOURS).fill(this.field.zero);
    if (sum.length === 0) return { kind: "dense", degree, entries: [] };
    for (const product of a.products) {
      let entries = [product.coefficient];
      for (const minors of this.minors(degree, product)) {
        entries = entries.flatMap((x) => minors.map((m) => this.field.multiply(x, m)));
      }
      this.accumulate(sum, entries);
    }
    return { kind: "dense", degree, entries: sum };
  }

  /** For each pair of disjoint subsets of the two degrees: their places, the place of their union, and the sign. */
  private pairs(first: number, second: number): { i: number; j: number; union: number; odd: boolean }[] {
    const unions = new Map(this.columns(first + second).map((set, place) => [set, place]));
    return this.columns(first).flatMap((a, i) =>
      this.columns(second).flatMap((b, j) =>
        (a & b) === 0 ? [{ i, j, union: unions.get(a | b)!, odd: isOddShuffle(a, b) }] : [],
      ),
    );
  }

  /** Components times one product of deltas, one flavour after the other. */
  private wedgeProduct(a: Dense<T>, degree: number, product: Product<T>): readonly T[] {
    const { field } = this;
    const pairs = this.pairs(a.degree, degree);
    const [before, after] = [this.columns(a.degree).length, this.columns(a.degree + degree).length];
    let entries = a.entries.map((x) => field.multiply(x, product.coefficient));
    this.minors(degree, product).forEach((minors, flavour) => {
      const outer = after ** flavour;
      const inner = before ** (FLAVOURS - 1 - flavour);
      const next = new Array<T>(outer * after * inner).fill(field.zero);
      for (let o = 0; o < outer; o++) {
        for (const { i, j, union, odd } of pairs) {
          const factor = odd ? field.negate(minors[j]!) : minors[j]!;
          for (let at = 0; at < inner; at++) {
            const target = (o * after + union) * inner + at;
            next[target] = field.add(next[target]!, field.multiply(factor, entries[(o * before + i) * inner + at]!));
          }
        }
      }
      entries = next;
    });
    return entries;
  }

  /** Components times components: all pairs of disjoint subsets in each of the four flavours. */
  private wedge(a: Dense<T>, b: Dense<T>): Homogeneous<T> {
    const { field } = this;
    const pairs = this.pairs(a.degree, b.degree);
    const degree = a.degree + b.degree;
    const [sizeA, sizeB, size] = [a.degree, b.degree, degree].map((d) => this.columns(d).length) as [
      number,
      number,
      number,
    ];
    const entries = new Array<T>(size ** FLAVOURS).fill(field.zero);
    const descend = (flavour: number, i: number, j: number, union: number, odd: boolean): void => {
      if (flavour === FLAVOURS) {
        const product = field.multiply(a.entries[i]!, b.entries[j]!);
        entries[union] = odd ? field.subtract(entries[union]!, product) : field.add(entries[union]!, product);
        return;
      }
      for (const pair of pairs) {
        descend(flavour + 1, i * sizeA + pair.i, j * sizeB + pair.j, union * size + pair.union, odd !== pair.odd);
      }
    };
    descend(0, 0, 0, 0, false);
    return { kind: "dense", degree, entries };
  }
}

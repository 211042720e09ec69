/**
 * The commutative algebra that Grassmann values live in: the elements of equal degree in each factor of Lambda(F^k) x 4, one factor
 * for each flavour. A delta is four rows, one a flavour; a product of k deltas is the product of four k x k determinants.
 */
import type { Field } from "../fields";
import { determinant } from "../kinematics";

/** rows[flavour][i] is a vector of F^k; the element is coefficient times the wedge of the rows in each flavour. */
interface Rows<T> {
  readonly kind: "rows";
  readonly degree: number;
  readonly coefficient: T;
  readonly rows: readonly (readonly (readonly T[])[])[];
}

/** C(k,degree)^4 components: subsets of columns in ascending order of their bit sets, the first flavour slowest. */
interface Dense<T> {
  readonly kind: "dense";
  readonly degree: number;
  readonly entries: readonly T[];
}

/** A homogeneous element: rows while it is one product of deltas, components once such products were added or degree k is reached. */
export type Homogeneous<T> = Rows<T> | Dense<T>;

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
    return this.close({ kind: "rows", degree: 1, coefficient, rows: rows.map((row) => [row]) });
  }

  scale(a: Homogeneous<T>, factor: T): Homogeneous<T> {
    const { multiply } = this.field;
    return a.kind === "rows"
      ? { ...a, coefficient: multiply(a.coefficient, factor) }
      : { ...a, entries: a.entries.map((x) => multiply(x, factor)) };
  }

  /** The sum of elements of one degree, at least one. */
  add(summands: readonly Homogeneous<T>[]): Homogeneous<T> {
    const [first, ...rest] = summands;
    if (first === undefined) throw new Error("GradedAlgebra.add: expected at least one element");
    if (rest.length === 0) return first;
    const sum = [...this.entries(first)];
    for (const next of rest) {
      this.entries(next).forEach((x, i) => {
        sum[i] = this.field.add(sum[i]!, x);
      });
    }
    return { kind: "dense", degree: first.degree, entries: sum };
  }

  multiply(a: Homogeneous<T>, b: Homogeneous<T>): Homogeneous<T> {
    const degree = a.degree + b.degree;
    if (degree > this.k) return { kind: "dense", degree, entries: [] };
    if (a.degree === 0) return this.scale(b, this.entries(a)[0]!);
    if (b.degree === 0) return this.scale(a, this.entries(b)[0]!);
    if (a.kind === "rows" && b.kind === "rows") {
      const rows = a.rows.map((flavour, f) => [...flavour, ...b.rows[f]!]);
      const coefficient = this.field.multiply(a.coefficient, b.coefficient);
      return this.close({ kind: "rows", degree, coefficient, rows });
    }
    if (b.kind === "rows") return this.wedgeRows(this.dense(a), b);
    if (a.kind === "rows") return this.wedgeRows(this.dense(b), a);
    return this.wedge(a, b);
  }

  /**
   * The number that stands for an element: its first component, the product of the determinants on the first `degree` entries of
   * every chi. At degree k this is the value itself; below, it is what the element is worth for that smaller k; above, zero.
   */
  value(a: Homogeneous<T>): T {
    return this.entries(a)[0] ?? this.field.zero;
  }

  /** Elements of the top degree are one number, and of a higher one nothing: no need to keep their rows. */
  private close(a: Rows<T>): Homogeneous<T> {
    return a.degree < this.k ? a : this.dense(a);
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
  private minors(a: Rows<T>): T[][] {
    return a.rows.map((flavour) =>
      this.columns(a.degree).map((set) =>
        determinant(
          this.field,
          flavour.map((row) => row.filter((_, column) => (set >> column) & 1)),
        ),
      ),
    );
  }

  private dense(a: Homogeneous<T>): Dense<T> {
    if (a.kind === "dense") return a;
    const { multiply } = this.field;
    let entries = [a.coefficient];
    for (const minors of this.minors(a)) entries = entries.flatMap((x) => minors.map((m) => multiply(x, m)));
    return { kind: "dense", degree: a.degree, entries: this.columns(a.degree).length === 0 ? [] : entries };
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

  /** Components times rows, one flavour after the other. */
  private wedgeRows(a: Dense<T>, b: Rows<T>): Homogeneous<T> {
    const { field } = this;
    const pairs = this.pairs(a.degree, b.degree);
    const [before, after] = [this.columns(a.degree).length, this.columns(a.degree + b.degree).length];
    let entries = a.entries.map((x) => field.multiply(x, b.coefficient));
    this.minors(b).forEach((minors, flavour) => {
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
    return { kind: "dense", degree: a.degree + b.degree, entries };
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

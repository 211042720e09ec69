/**
 * Grassmann values on a graph: the commutative algebra of ENGINE section 2, elements of equal degree in each factor of the
 * fourfold exterior algebra of F^k. A sum of products of deltas is kept as such while that is cheap, else as a tensor.
 */
import type { Graph, Ref } from "./graph";
import { negated } from "./graph";
import { binomial } from "./opcodes";
import { ascendingSubsets, isOddShuffle } from "./subsets";
import { TupleTable } from "./tuples";

/** A homogeneous element: sum of coefficients[i] times the product of deltas products[i]. */
interface FormalSum {
  readonly kind: "sum";
  readonly degree: number;
  readonly coefficients: readonly Ref[];
  readonly products: readonly number[];
}

/** A homogeneous element by its C(k,degree)^4 components: subsets in the order of `ascendingSubsets`, the first flavour slowest. */
interface Tensor {
  readonly kind: "tensor";
  readonly degree: number;
  readonly entries: readonly Ref[];
}

type Homogeneous = FormalSum | Tensor;

/** An element: its non-zero homogeneous parts, ascending in degree; zero has none. */
export type Element = readonly Homogeneous[];

/** The empty product, the first one that is met. */
const NO_DELTAS = 0;

export class Exterior {
  /** Products of deltas: ascending lists of rows (nodes). */
  private readonly products = new TupleTable();
  private readonly buffer = new Int32Array(16);
  private readonly wedges = new Map<number, Ref>();
  private readonly tops: (Ref | undefined)[] = [];

  constructor(
    private readonly graph: Graph,
    private readonly k: number,
  ) {
    this.products.intern([], 0);
  }

  readonly zero: Element = [];

  scalar(x: Ref): Element {
    return x === this.graph.zero ? this.zero : [{ kind: "sum", degree: 0, coefficients: [x], products: [NO_DELTAS] }];
  }

  /** coefficient times the delta of a row. */
  delta(coefficient: Ref, row: Ref | null): Element {
    if (row === null || coefficient === this.graph.zero || this.k === 0) return this.zero;
    this.buffer[0] = row >> 1;
    const product = this.products.intern(this.buffer, 1);
    return this.close({ kind: "sum", degree: 1, coefficients: [coefficient], products: [product] });
  }

  /** The number that an element without deltas is, or null for one with deltas. */
  asScalar(a: Element): Ref | null {
    if (a.length === 0) return this.graph.zero;
    const [part] = a;
    return a.length === 1 && part!.degree === 0 && part!.kind === "sum" ? part!.coefficients[0]! : null;
  }

  negate(a: Element): Element {
    return a.map((part) =>
      part.kind === "sum"
        ? { ...part, coefficients: part.coefficients.map(negated) }
        : { ...part, entries: part.entries.map(negated) },
    );
  }

  add(summands: readonly Element[]): Element {
    const byDegree: Homogeneous[][] = [];
    for (const summand of summands) {
      for (const part of summand) {
        byDegree[part.degree] ??= [];
        byDegree[part.degree]!.push(part);
      }
    }
    return byDegree.filter((parts) => parts !== undefined).map((parts) => this.addParts(parts));
  }

  private addParts(parts: readonly Homogeneous[]): Homogeneous {
    const [first] = parts;
    if (parts.length === 1) return first!;
    if (parts.some((part) => part.kind === "tensor")) {
      const sum = [...this.tensor(first!).entries];
      for (const part of parts.slice(1)) {
        this.tensor(part).entries.forEach((x, i) => {
          sum[i] = this.graph.add(sum[i]!, x);
        });
      }
      return { kind: "tensor", degree: first!.degree, entries: sum };
    }
    const coefficients: Ref[] = [];
    const products: number[] = [];
    const places = new Map<number, number>();
    for (const part of parts as readonly FormalSum[]) {
      part.products.forEach((product, i) => {
        const place = places.get(product);
        if (place === undefined) {
          places.set(product, products.length);
          products.push(product);
          coefficients.push(part.coefficients[i]!);
        } else coefficients[place] = this.graph.add(coefficients[place]!, part.coefficients[i]!);
      });
    }
    return { kind: "sum", degree: first!.degree, coefficients, products };
  }

  /**
   * The product of any number of elements. Numbers, and the coefficients of factors that are one product of deltas, are multiplied
   * first, in the order of their nodes: equal products are then shared however they are written.
   */
  product(factors: readonly Element[]): Element {
    const numbers: Ref[] = [];
    let deltas: number | null = NO_DELTAS;
    let degree = 0;
    let rest: Element | null = null;
    for (const factor of factors) {
      const [part] = factor;
      if (factor.length === 1 && part!.kind === "sum" && part!.products.length === 1) {
        numbers.push(part!.coefficients[0]!);
        degree += part!.degree;
        if (deltas !== null && degree <= this.k) deltas = this.union(deltas, part!.products[0]!);
      } else rest = rest === null ? factor : this.multiply(rest, factor);
    }
    if (deltas === null || degree > this.k) return this.zero;
    numbers.sort((a, b) => a - b);
    let coefficient = this.graph.one;
    for (const number of numbers) coefficient = this.graph.multiply(coefficient, number);
    if (coefficient === this.graph.zero) return this.zero;
    const simple = this.close({ kind: "sum", degree, coefficients: [coefficient], products: [deltas] });
    return rest === null ? simple : this.multiply(rest, simple);
  }

  multiply(a: Element, b: Element): Element {
    const products: Element[] = [];
    for (const x of a) {
      for (const y of b) {
        if (x.degree + y.degree <= this.k) products.push(this.multiplyParts(x, y));
      }
    }
    return products.length === 1 ? products[0]! : this.add(products);
  }

  private multiplyParts(a: Homogeneous, b: Homogeneous): Element {
    if (a.degree === 0) return this.scale(b, (a as FormalSum).coefficients[0]!);
    if (b.degree === 0) return this.scale(a, (b as FormalSum).coefficients[0]!);
    if (a.kind === "sum" && b.kind === "sum" && this.multipliesOut(a, b)) return this.multiplyOut(a, b);
    return [this.multiplyTensors(this.tensor(a), this.tensor(b))];
  }

  private scale(a: Homogeneous, factor: Ref): Element {
    return [
      a.kind === "sum"
        ? { ...a, coefficients: a.coefficients.map((x) => this.graph.multiply(x, factor)) }
        : { ...a, entries: a.entries.map((x) => this.graph.multiply(x, factor)) },
    ];
  }

  /** Whether multiplying out takes fewer multiplications than the tensors of both and their product. */
  private multipliesOut(a: FormalSum, b: FormalSum): boolean {
    const { k } = this;
    const degree = a.degree + b.degree;
    const count = a.products.length * b.products.length;
    const tensor = (d: number, terms: number): number => terms * 4 * binomial(k, d) ** 4;
    const byTensors =
      tensor(a.degree, a.products.length) +
      tensor(b.degree, b.products.length) +
      (binomial(k, degree) * binomial(degree, a.degree)) ** 4;
    return count * (4 * binomial(k, degree >> 1) + 4) <= byTensors;
  }

  private multiplyOut(a: FormalSum, b: FormalSum): Element {
    const coefficients: Ref[] = [];
    const products: number[] = [];
    a.products.forEach((p, i) => {
      b.products.forEach((q, j) => {
        const product = this.union(p, q);
        if (product === null) return;
        products.push(product);
        coefficients.push(this.graph.multiply(a.coefficients[i]!, b.coefficients[j]!));
      });
    });
    if (products.length === 0) return this.zero;
    return this.close({ kind: "sum", degree: a.degree + b.degree, coefficients, products });
  }

  /** The product of two products of deltas, or null where a delta stands in both: its square is zero. */
  private union(p: number, q: number): number | null {
    if (p === NO_DELTAS) return q;
    if (q === NO_DELTAS) return p;
    const { words, starts } = this.products;
    const [endP, endQ] = [starts[p + 1]!, starts[q + 1]!];
    let [i, j, length] = [starts[p]!, starts[q]!, 0];
    while (i < endP || j < endQ) {
      if (i < endP && j < endQ && words[i] === words[j]) return null;
      const first = j >= endQ || (i < endP && words[i]! < words[j]!);
      this.buffer[length++] = first ? words[i++]! : words[j++]!;
    }
    return this.products.intern(this.buffer, length);
  }

  /** Elements of degree k are one number. */
  private close(a: FormalSum): Element {
    if (a.degree < this.k || this.k === 0) return [a];
    let sum = this.graph.zero;
    a.products.forEach((product, i) => {
      sum = this.graph.add(sum, this.graph.multiply(a.coefficients[i]!, this.top(product)));
    });
    return [{ kind: "tensor", degree: a.degree, entries: [sum] }];
  }

  private rows(product: number): Ref[] {
    const { words, starts } = this.products;
    return Array.from(words.subarray(starts[product]!, starts[product + 1]!), (node) => node << 1);
  }

  /** The product of k deltas as a number: four determinants, each from the minors of the first and the last half of the rows. */
  private top(product: number): Ref {
    let top = this.tops[product];
    if (top === undefined) {
      const rows = this.rows(product);
      const half = Math.ceil(this.k / 2);
      top =
        this.k === 1
          ? this.graph.pair(rows[0]!, rows[0]!, 0)
          : this.graph.pair(this.wedge(rows.slice(0, half)), this.wedge(rows.slice(half)), half);
      this.tops[product] = top;
    }
    return top;
  }

  /** The minors of some rows, all subsets of columns, four flavours: one vector. */
  private wedge(rows: readonly Ref[]): Ref {
    let wedge = rows[0]!;
    for (let degree = 1; degree < rows.length; degree++) {
      wedge = this.graph.wedge(wedge, rows[degree]!, degree, 4 * binomial(this.k, degree + 1));
    }
    return wedge;
  }

  private tensor(a: Homogeneous): Tensor {
    if (a.kind === "tensor") return a;
    const { graph } = this;
    const size = binomial(this.k, a.degree);
    const sum = new Array<Ref>(size ** 4).fill(graph.zero);
    a.products.forEach((product, i) => {
      let known = this.wedges.get(product);
      if (known === undefined) {
        known = this.wedge(this.rows(product));
        this.wedges.set(product, known);
      }
      const wedge = known;
      let entries = [a.coefficients[i]!];
      for (let flavour = 0; flavour < 4; flavour++) {
        entries = entries.flatMap((x) =>
          Array.from({ length: size }, (_, at) => graph.multiply(x, graph.part(wedge, flavour * size + at, 1))),
        );
      }
      entries.forEach((x, at) => {
        sum[at] = graph.add(sum[at]!, x);
      });
    });
    return { kind: "tensor", degree: a.degree, entries: sum };
  }

  private multiplyTensors(a: Tensor, b: Tensor): Tensor {
    const { graph, k } = this;
    const degree = a.degree + b.degree;
    const unions = new Map(ascendingSubsets(k, degree).map((set, place) => [set, place]));
    const pairs = ascendingSubsets(k, a.degree).flatMap((p, i) =>
      ascendingSubsets(k, b.degree).flatMap((q, j) =>
        (p & q) === 0 ? [{ i, j, union: unions.get(p | q)!, odd: isOddShuffle(p, q) }] : [],
      ),
    );
    const [sizeA, sizeB, size] = [a.degree, b.degree, degree].map((d) => binomial(k, d)) as [number, number, number];
    const entries = new Array<Ref>(size ** 4).fill(graph.zero);
    const descend = (flavour: number, i: number, j: number, union: number, odd: boolean): void => {
      if (flavour === 4) {
        const product = graph.multiply(a.entries[i]!, b.entries[j]!);
        entries[union] = graph.add(entries[union]!, odd ? negated(product) : product);
        return;
      }
      for (const pair of pairs) {
        descend(flavour + 1, i * sizeA + pair.i, j * sizeB + pair.j, union * size + pair.union, odd !== pair.odd);
      }
    };
    descend(0, 0, 0, 0, false);
    return { kind: "tensor", degree, entries };
  }

  /** The number that stands for an element: for each part its first component, at degree k the value itself. */
  value(a: Element): Ref {
    let sum = this.graph.zero;
    for (const part of a) sum = this.graph.add(sum, this.firstComponent(part));
    return sum;
  }

  private firstComponent(a: Homogeneous): Ref {
    if (a.kind === "tensor") return a.entries[0]!;
    if (a.degree === 0) return a.coefficients[0]!;
    return this.tensor(a).entries[0]!;
  }
}

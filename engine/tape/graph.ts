/**
 * The expression as a graph of shared nodes, before it is put in order. A node is an operation on earlier nodes; equal nodes are
 * one. A `Ref` is a node with a sign: 2 * node, plus 1 for its negative, so that signs cost nothing and never hide a match.
 */
import type { Span } from "../result";
import {
  ADD,
  BRACKET,
  COMBINE2,
  COMBINE3,
  COMBINE5,
  INVERT,
  LINE,
  MINOR,
  MULTIPLY,
  PAIR,
  SUBTRACT,
  WEDGE,
} from "./opcodes";
import { grown, TupleTable } from "./tuples";

export type Ref = number;

/** Nodes that are no operation: given before the tape runs, or a part of a vector. */
export const INPUT = 20;
export const CONSTANT = 21;
export const PART = 22;

/** An exact constant numerator/denominator, denominator >= 1, in lowest terms. */
export interface Constant {
  readonly numerator: bigint;
  readonly denominator: bigint;
  /** Where the source divides by it, for a denominator that vanishes modulo a prime. */
  readonly span: Span;
}

/** Constants are folded exactly as long as they stay below this size; beyond, they are computed on the tape. */
const CONSTANT_BITS = 65_536;

export const negated = (ref: Ref): Ref => ref ^ 1;
const nodeOf = (ref: Ref): number => ref >> 1;

const greatestCommonDivisor = (a: bigint, b: bigint): bigint => {
  let [x, y] = [a, b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
};

/** An upper bound of the size in bits, without the cost of printing in base 2. */
const bitsOf = (x: bigint): number => x.toString(16).length * 4;

/** Thrown when the limit on nodes is passed, caught where compilation begins. */
export class GraphOverflow extends Error {}

export class Graph {
  /** Node i as the tuple [operation + 256 * parameter, operands...]; operands of operations are Refs. */
  readonly nodes = new TupleTable();
  /** Slots of each node. */
  private widths = new Int32Array(1 << 12);
  /** The operation of each node, kept apart from its operands: it is asked for far more often. */
  private operations = new Uint8Array(1 << 12);
  readonly constants: Constant[] = [];
  private readonly integers = new Map<bigint, number>();
  private readonly quotients = new Map<bigint, Map<bigint, number>>();
  /** The inversions in the order of the source, with the denominator's place; bad points name their first one. */
  readonly denominatorNodes: number[] = [];
  readonly denominatorSpans: Span[] = [];
  private readonly tuple = new Int32Array(16);
  readonly zero: Ref;
  readonly one: Ref;

  constructor(private readonly limit: number) {
    this.zero = this.constant(0n, 1n, [0, 0]);
    this.one = this.constant(1n, 1n, [0, 0]);
  }

  get size(): number {
    return this.nodes.size;
  }

  width(node: number): number {
    return this.widths[node]!;
  }

  private intern(length: number, width: number): Ref {
    const before = this.nodes.size;
    const node = this.nodes.intern(this.tuple, length);
    if (node === before) {
      if (node >= this.limit) throw new GraphOverflow();
      if (node >= this.widths.length) {
        this.widths = grown(this.widths, node + 1);
        const operations = new Uint8Array(this.widths.length);
        operations.set(this.operations);
        this.operations = operations;
      }
      this.widths[node] = width;
      this.operations[node] = this.tuple[0]! & 255;
    }
    return node << 1;
  }

  private node2(operation: number, parameter: number, a: number, b: number, width: number): Ref {
    this.tuple[0] = operation | (parameter << 8);
    this.tuple[1] = a;
    this.tuple[2] = b;
    return this.intern(3, width);
  }

  operation(node: number): number {
    return this.operations[node]!;
  }

  constant(numerator: bigint, denominator: bigint, span: Span): Ref {
    if (numerator < 0n) return negated(this.constant(-numerator, denominator, span));
    if (denominator !== 1n) {
      const divisor = greatestCommonDivisor(numerator, denominator);
      if (divisor !== 1n) return this.constant(numerator / divisor, denominator / divisor, span);
    }
    let known = this.integers;
    if (denominator !== 1n) {
      known = this.quotients.get(denominator) ?? new Map();
      this.quotients.set(denominator, known);
    }
    let at = known.get(numerator);
    if (at === undefined) {
      at = this.constants.length;
      this.constants.push({ numerator, denominator, span });
      known.set(numerator, at);
    }
    return this.node2(CONSTANT, 0, at, 0, 1);
  }

  /** The exact value of a constant Ref, or null for what is no constant. */
  private valueOf(ref: Ref): { numerator: bigint; denominator: bigint; span: Span } | null {
    const node = nodeOf(ref);
    if (this.operation(node) !== CONSTANT) return null;
    const constant = this.constants[this.nodes.words[this.nodes.starts[node]! + 1]!]!;
    return (ref & 1) === 0 ? constant : { ...constant, numerator: -constant.numerator };
  }

  isConstant(ref: Ref): boolean {
    return this.operation(nodeOf(ref)) === CONSTANT;
  }

  private fold(a: Ref, b: Ref, operation: "add" | "multiply"): Ref | null {
    const x = this.valueOf(a);
    const y = x === null ? null : this.valueOf(b);
    if (x === null || y === null) return null;
    const numerator =
      operation === "add" ? x.numerator * y.denominator + y.numerator * x.denominator : x.numerator * y.numerator;
    const denominator = x.denominator * y.denominator;
    if (bitsOf(numerator) + bitsOf(denominator) > CONSTANT_BITS) return null;
    return this.constant(numerator, denominator, x.denominator === 1n ? y.span : x.span);
  }

  add(a: Ref, b: Ref): Ref {
    if (a === this.zero) return b;
    if (b === this.zero) return a;
    if (a === negated(b)) return this.zero;
    const folded = this.fold(a, b, "add");
    if (folded !== null) return folded;
    const [x, y] = a < b ? [a, b] : [b, a];
    if (((x ^ y) & 1) === 0) return this.node2(ADD, 0, x & ~1, y & ~1, 1) | (x & 1);
    return this.node2(SUBTRACT, 0, x & ~1, y & ~1, 1) | (x & 1);
  }

  multiply(a: Ref, b: Ref): Ref {
    const sign = (a ^ b) & 1;
    const x = Math.min(a & ~1, b & ~1);
    const y = Math.max(a & ~1, b & ~1);
    // Nodes 0 and 1 are the constants zero and one.
    if (x === this.zero) return this.zero;
    if (x === this.one) return y | sign;
    return (this.fold(x, y, "multiply") ?? this.node2(MULTIPLY, 0, x, y, 1)) ^ sign;
  }

  /** 1/a. The inverse of the constant zero stays on the tape, where it makes every point bad and says why. */
  inverse(a: Ref, span: Span): Ref {
    const constant = this.valueOf(a);
    if (constant !== null && constant.numerator !== 0n) {
      const negative = constant.numerator < 0n;
      const numerator = negative ? -constant.denominator : constant.denominator;
      return this.constant(numerator, negative ? -constant.numerator : constant.numerator, span);
    }
    this.tuple[0] = INVERT;
    this.tuple[1] = a & ~1;
    const before = this.size;
    const ref = this.intern(2, 1);
    if (this.size !== before) {
      this.denominatorNodes.push(nodeOf(ref));
      this.denominatorSpans.push(span);
    }
    return ref | (a & 1);
  }

  /** a to the power of an exponent, 0 <= exponent; a^0 is 1, also for zero. */
  power(a: Ref, exponent: number): Ref {
    let result = this.one;
    let square = a;
    for (let rest = exponent; rest > 0; rest = Math.floor(rest / 2)) {
      if (rest % 2 === 1) result = this.multiply(result, square);
      if (rest > 1) square = this.multiply(square, square);
    }
    return result;
  }

  input(kind: number, index: number, width: number): Ref {
    return this.node2(INPUT, kind, index, 0, width);
  }

  /** Slots offset .. offset+width-1 of a vector; costs nothing on the tape. */
  part(vector: Ref, offset: number, width: number): Ref {
    this.tuple[0] = PART | (width << 8);
    this.tuple[1] = vector & ~1;
    this.tuple[2] = offset;
    return this.intern(3, width) | (vector & 1);
  }

  /** The line through two points; all zero where they are one point. */
  line(p: Ref, q: Ref): Ref {
    const sign = (p ^ q) & 1;
    const a = p & ~1;
    const b = q & ~1;
    return a <= b ? this.node2(LINE, 0, a, b, 6) | sign : this.node2(LINE, 0, b, a, 6) | (sign ^ 1);
  }

  /** Whether the line through two points is there already. */
  hasLine(p: Ref, q: Ref): boolean {
    this.tuple[0] = LINE;
    this.tuple[1] = Math.min(p & ~1, q & ~1);
    this.tuple[2] = Math.max(p & ~1, q & ~1);
    return this.nodes.find(this.tuple, 3) >= 0;
  }

  bracket(l: Ref, m: Ref): Ref {
    const sign = (l ^ m) & 1;
    return this.node2(BRACKET, 0, Math.min(l & ~1, m & ~1), Math.max(l & ~1, m & ~1), 1) | sign;
  }

  /** a_1 b_2 - a_2 b_1 of the first two components. */
  minor(p: Ref, q: Ref): Ref {
    const sign = (p ^ q) & 1;
    const a = p & ~1;
    const b = q & ~1;
    if (a === b) return this.zero;
    return a < b ? this.node2(MINOR, 0, a, b, 1) | sign : this.node2(MINOR, 0, b, a, 1) | (sign ^ 1);
  }

  /**
   * The linear combination sum of scalars[i] * vectors[i] of at least one vector; one node however its terms are ordered and
   * whatever its overall sign.
   */
  combine(scalars: readonly Ref[], vectors: readonly Ref[], width: number): Ref {
    const parts: [number, number, number][] = [];
    scalars.forEach((scalar, i) => {
      if (scalar !== this.zero) parts.push([scalar & ~1, vectors[i]! & ~1, (scalar ^ vectors[i]!) & 1]);
    });
    if (parts.length === 0) return this.combineFew([[this.zero, vectors[0]! & ~1, 0]], width);
    parts.sort((x, y) => x[1] - y[1] || x[0] - y[0]);
    let sum: Ref = this.zero;
    for (let from = 0; from < parts.length; ) {
      // A vector that was begun goes on as one more term of the next stretch.
      const head: [number, number, number][] = from === 0 ? [] : [[this.one, sum & ~1, sum & 1]];
      const stretch = [...head, ...parts.slice(from, from + 5 - head.length)];
      from += 5 - head.length;
      sum = this.combineFew(stretch, width);
    }
    return sum;
  }

  private combineFew(parts: readonly [number, number, number][], width: number): Ref {
    if (parts.length === 1 && parts[0]![0] === this.one) return parts[0]![1] | parts[0]![2];
    const length = parts.length <= 2 ? 2 : parts.length === 3 ? 3 : 5;
    const overall = parts[0]![2];
    let signs = 0;
    for (let i = 0; i < length; i++) {
      const [scalar, vector, sign] = parts[i] ?? [this.zero, parts[0]![1], overall];
      this.tuple[2 + 2 * i] = scalar;
      this.tuple[3 + 2 * i] = vector;
      signs |= (sign ^ overall) << i;
    }
    this.tuple[0] = (length === 2 ? COMBINE2 : length === 3 ? COMBINE3 : COMBINE5) | (width << 8);
    this.tuple[1] = signs;
    return this.intern(2 + 2 * length, width) | overall;
  }

  /** Degree `degree` times a vector, for four flavours at once. */
  wedge(product: Ref, row: Ref, degree: number, width: number): Ref {
    return this.node2(WEDGE, degree, product & ~1, row & ~1, width);
  }

  /** The product over four flavours of the top component of v w; degree 0 is the product of the four entries of v. */
  pair(v: Ref, w: Ref, degree: number): Ref {
    return this.node2(PAIR, degree, v & ~1, w & ~1, 1);
  }
}

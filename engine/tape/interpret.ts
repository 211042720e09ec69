/** The tape in plain TypeScript over any field, one point at a time: what the kernel is compared with. */
import type { Field } from "../fields";
import type { Point } from "../kinematics/point";
import type { Span } from "../result";
import { readInput } from "./inputs";
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
  opcodeOf,
  PAIR,
  SUBTRACT,
  TERM,
  WEDGE,
} from "./opcodes";
import { runsOf, type Tape } from "./tape";
import { pairTable, type WedgeProduct, wedgeTable } from "./wedgeTables";

export type Interpretation<T> =
  | { readonly kind: "value"; readonly sum: T; readonly terms: readonly T[] }
  | { readonly kind: "zero-denominator"; readonly span: Span };

/**
 * The value of a tape at a point of the same n, k and loops. Where denominators vanish, the first of them in the source is named.
 * Over truncated series this is the same tape with another field.
 */
export function interpretTape<T>(tape: Tape, field: Field<T>, point: Point<T>): Interpretation<T> {
  const slots = new Array<T>(tape.slots).fill(field.zero);
  for (const input of tape.inputs) {
    const components = readInput(input, point, field.zero, field.one).flat();
    components.forEach((x, i) => {
      slots[input.slot + i] = x;
    });
  }
  for (const { slot, numerator, denominator, span } of tape.constants) {
    const inverse = field.inverse(field.fromInteger(denominator));
    if (inverse === null) return { kind: "zero-denominator", span };
    slots[slot] = field.multiply(field.fromInteger(numerator), inverse);
  }
  const machine = new Machine(field, slots, tape.k);
  for (const run of runsOf(tape.code)) {
    const { words } = opcodeOf[run.code]!;
    for (let i = 0; i < run.count; i++) {
      machine.run(run.code, run.parameter, tape.code.subarray(run.at + i * words, run.at + (i + 1) * words));
    }
  }
  if (machine.denominator !== null) return { kind: "zero-denominator", span: tape.denominators[machine.denominator]! };
  return { kind: "value", sum: machine.terms.reduce((a, b) => field.add(a, b), field.zero), terms: machine.terms };
}

/** Slots and the effect of each operation on them. */
class Machine<T> {
  readonly terms: T[] = [];
  /** The first denominator, in the order of the source, that was zero. */
  denominator: number | null = null;

  constructor(
    private readonly field: Field<T>,
    private readonly slots: T[],
    private readonly k: number,
  ) {}

  run(code: number, parameter: number, entry: Int32Array): void {
    const { field, slots } = this;
    const [out, a, b] = [entry[0]!, entry[1]!, entry[2]!];
    switch (code) {
      case LINE: {
        const minor = (i: number, j: number): T => this.crossed(a + i, b + j, a + j, b + i);
        const line = [minor(0, 1), minor(0, 2), minor(0, 3), minor(1, 2), minor(3, 1), minor(2, 3)];
        line.forEach((x, i) => {
          slots[out + i] = x;
        });
        break;
      }
      case BRACKET:
        slots[out] = [0, 1, 2, 3, 4, 5].reduce((sum, i) => field.add(sum, this.product(a + i, b + 5 - i)), field.zero);
        break;
      case MINOR:
        slots[out] = this.crossed(a, b + 1, a + 1, b);
        break;
      case ADD:
        slots[out] = field.add(slots[a]!, slots[b]!);
        break;
      case SUBTRACT:
        slots[out] = field.subtract(slots[a]!, slots[b]!);
        break;
      case MULTIPLY:
        slots[out] = this.product(a, b);
        break;
      case INVERT: {
        const inverse = field.inverse(slots[a]!);
        if (inverse === null) this.denominator = Math.min(b, this.denominator ?? b);
        slots[out] = inverse ?? field.one;
        break;
      }
      case COMBINE2:
      case COMBINE3:
      case COMBINE5:
        for (let i = 0; i < parameter; i++) slots[out + i] = this.combination(entry, i);
        break;
      case WEDGE:
        this.wedge(out, a, b, parameter);
        break;
      case PAIR:
        slots[out] = this.pair(a, b, parameter);
        break;
      case TERM:
        this.terms.push(a === 0 ? slots[out]! : field.negate(slots[out]!));
        break;
      default:
        throw new Error(`run: expected an opcode, got ${code}`);
    }
  }

  private product(a: number, b: number): T {
    return this.field.multiply(this.slots[a]!, this.slots[b]!);
  }

  private crossed(a: number, b: number, c: number, d: number): T {
    return this.field.subtract(this.product(a, b), this.product(c, d));
  }

  private combination(entry: Int32Array, component: number): T {
    let sum = this.field.zero;
    for (let i = 2; i < entry.length; i += 2) {
      const product = this.product(entry[i]!, entry[i + 1]! + component);
      const negative = (entry[1]! >> (i / 2 - 1)) & 1;
      sum = negative ? this.field.subtract(sum, product) : this.field.add(sum, product);
    }
    return sum;
  }

  private sumOf(products: readonly WedgeProduct[], a: number, b: number): T {
    return products.reduce((sum, { left, right, odd }) => {
      const product = this.product(a + left, b + right);
      return odd ? this.field.subtract(sum, product) : this.field.add(sum, product);
    }, this.field.zero);
  }

  private wedge(out: number, w: number, r: number, degree: number): void {
    const table = wedgeTable(this.k, degree);
    const width = wedgeTable(this.k, degree - 1).length;
    for (let flavour = 0; flavour < 4; flavour++) {
      table.forEach((products, i) => {
        this.slots[out + flavour * table.length + i] = this.sumOf(products, w + flavour * width, r + flavour * this.k);
      });
    }
  }

  private pair(v: number, w: number, degree: number): T {
    const { field, slots } = this;
    const table = pairTable(this.k, degree);
    const [left, right] = [table.length, pairTable(this.k, this.k - degree).length];
    let product = field.one;
    for (let flavour = 0; flavour < 4; flavour++) {
      const factor = degree === 0 ? slots[v + flavour]! : this.sumOf(table, v + flavour * left, w + flavour * right);
      product = field.multiply(product, factor);
    }
    return product;
  }
}

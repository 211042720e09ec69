/** Recursion terms as a formula of the notation: every meet that is used defined once, kermits that are used twice as well. */
import type { Definition, Expression, Formula, Item, Operand } from "../notation/tree";
import {
  add,
  call,
  define,
  divide,
  five,
  four,
  group,
  integer,
  label,
  loopLine,
  meet,
  multiply,
  named,
  square,
} from "./build";
import type { Meet, Vertex } from "./points";
import type { Kermit, Term } from "./recursion";

/** The same R-invariant, which any of the ten rotations and reflections leaves alone, read from its lowest leg upwards. */
function readable(bracket: readonly Vertex[]): readonly Vertex[] {
  const rank = (point: Vertex) => (point.kind === "leg" ? point.leg : 1_000 + Number(point.key.slice(1)));
  const before = (a: readonly Vertex[], b: readonly Vertex[]) => {
    const different = a.findIndex((point, position) => rank(point) !== rank(b[position]!));
    return different >= 0 && rank(a[different]!) < rank(b[different]!);
  };
  let best = bracket;
  for (const turned of [bracket, [...bracket].reverse()]) {
    for (let shift = 0; shift < turned.length; shift++) {
      const image = [...turned.slice(shift), ...turned.slice(0, shift)];
      if (before(image, best)) best = image;
    }
  }
  return best;
}

const kermitKey = ({ pivot, first, second }: Kermit): string =>
  [pivot, ...first, ...second].map((point) => point.key).join(" ");

/** Collects the definitions of one formula in the order of first use. */
class Writer {
  readonly definitions: Definition[] = [];
  private readonly items = new Map<string, Item>();
  private readonly invariants = new Map<readonly Vertex[], Expression>();

  /** Nodes of the tree are shared: a recursion of many terms is made of few points and invariants. */
  item(point: Vertex): Item {
    let item = this.items.get(point.key);
    if (item === undefined) {
      item = point.kind === "leg" ? label(null, point.leg) : named(this.define(point));
      this.items.set(point.key, item);
    }
    return item;
  }

  /** The recursion hands the same list of points to all terms that hold an invariant. */
  invariant(bracket: readonly Vertex[]): Expression {
    let invariant = this.invariants.get(bracket);
    if (invariant === undefined) {
      invariant = five(...readable(bracket).map((point) => this.item(point)));
      this.invariants.set(bracket, invariant);
    }
    return invariant;
  }

  private define(point: Meet): string {
    const side = (parts: readonly (Vertex | "AB")[]): Operand =>
      group(parts.map((part) => (part === "AB" ? loopLine(0) : this.item(part))));
    const geometry = meet(side(point.line === "AB" ? ["AB"] : point.line), side(point.plane));
    const name = `p${this.definitions.length + 1}`;
    this.definitions.push(define(name, [], { kind: "geometry", geometry }));
    return name;
  }

  /** Numerator and denominators of <AB (p a b) cap (p c d)>^2 / (<AB p a><AB a b><AB b p><AB p c><AB c d><AB d p>). */
  kermit({ pivot, first, second }: Kermit): { numerator: Expression; denominator: Expression } {
    const p = this.item(pivot);
    const loop = loopLine(0);
    const planes = [first, second].map((line) => line.map((point) => this.item(point)));
    const [left, right] = planes.map((line) => group([p, ...line]));
    const sides = planes.flatMap(([a, b]) => [four(loop, p, a!), four(loop, a!, b!), four(loop, b!, p)]);
    return { numerator: square(four(loop, meet(left!, right!))), denominator: multiply(sides) };
  }
}

/** The sum of the terms. No term at all is the number 0; a term without factors is the number 1. */
export function writeTerms(terms: readonly Term[]): Formula {
  if (terms.length === 0) return { definitions: [], expression: integer(0) };
  const writer = new Writer();
  const uses = new Map<string, number>();
  for (const { kermit } of terms) {
    if (kermit !== null) uses.set(kermitKey(kermit), (uses.get(kermitKey(kermit)) ?? 0) + 1);
  }
  const shared = new Map<string, { name: string; definition: Definition }>();
  const summands = terms.map(({ brackets, kermit }) => {
    const invariants = brackets.map((bracket) => writer.invariant(bracket));
    if (kermit === null) return invariants.length === 0 ? integer(1) : multiply(invariants);
    const key = kermitKey(kermit);
    if (uses.get(key) === 1) {
      const { numerator, denominator } = writer.kermit(kermit);
      return divide(multiply([...invariants, numerator]), denominator);
    }
    if (!shared.has(key)) {
      const { numerator, denominator } = writer.kermit(kermit);
      const name = `k${shared.size + 1}`;
      const expression = divide(numerator, denominator);
      shared.set(key, { name, definition: define(name, [], { kind: "scalar", expression }) });
    }
    return multiply([call(shared.get(key)!.name), ...invariants]);
  });
  return {
    definitions: [...writer.definitions, ...[...shared.values()].map(({ definition }) => definition)],
    expression: add(summands),
  };
}

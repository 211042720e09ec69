/** The poles of a form: the brackets in its denominators, term by term, told apart as physical and spurious (ENGINE section 5). */
import type { FormAtN } from "../evaluate/form";
import { cyclicRange, wrapLabel } from "../kinematics";
import { enumerateBindings } from "../notation/bindings";
import {
  cyclicPlaces,
  definitionPlace,
  definitionsOf,
  expandTerms,
  type Place,
  scalarBody,
  symmetricPlaces,
} from "../notation/expand";
import { evaluateLabel, evaluateNumber, momentumLegs } from "../notation/indices";
import type { Definition, DualPoint, Expression, SpinorEnd } from "../notation/tree";
import { BracketNames } from "./bracketNames";
import { adjacent, factorsOfFour, holdsReference, isPhysicalFour, itemsText, type Point, pointText } from "./brackets";
import type { Divisor, FoundPole } from "./divisor";
import { type Factor, Factoring } from "./factoring";
import { PlacedPoints } from "./placedPoints";
import type { Pole } from "./report";
import { type PlainString, stringFactors, stringText } from "./strings";

/** Formal order of an expression on each divisor, as written: negative in a denominator. A lower bound of the true valuation. */
type Orders = ReadonlyMap<string, number>;

/** Poles of all top-level terms, in order of first appearance, as they are reported before any order is measured. */
export const findPoles = (form: FormAtN): readonly Pole[] => findDivisors(form).map(reported);

export const reported = ({ divisor, terms }: FoundPole): Pole => ({
  bracket: divisor.text,
  kind: divisor.physical ? "physical" : "spurious",
  reference: divisor.reference,
  terms: [...terms],
});

/** The divisors of all top-level terms, in order of first appearance; `terms` holds the indices of the terms with one in a denominator. */
export function findDivisors(form: FormAtN): readonly FoundPole[] {
  const finder = new PoleFinder(form);
  const poles = new Map<string, number[]>();
  let index = 0;
  for (const term of expandTerms(form.formula, form)) {
    for (const [key, order] of finder.orders(term.expression, term)) {
      if (order >= 0) continue;
      const terms = poles.get(key);
      if (terms === undefined) poles.set(key, [index]);
      else terms.push(index);
    }
    index += 1;
  }
  return [...poles].map(([key, terms]) => {
    const divisor = finder.divisors.get(key);
    if (divisor === undefined) throw new Error(`findDivisors: no divisor ${key}`);
    return { divisor, terms };
  });
}

const none: Orders = new Map();

class PoleFinder {
  readonly divisors = new Map<string, Divisor>();
  readonly #definitions: ReadonlyMap<string, Definition>;
  readonly #memo = new Map<string, Orders>();
  readonly #factors = new Map<string, readonly Factor[]>();
  readonly #factoring = new Factoring();
  readonly #fives = new Map<string, Orders>();
  readonly #numbers = new Map<Point, number>();
  readonly #numbersOfTexts = new Map<string, number>();
  readonly #names: BracketNames;
  readonly #placed: PlacedPoints;

  constructor(private readonly form: FormAtN) {
    this.#names = new BracketNames(form);
    this.#definitions = definitionsOf(form.formula);
    this.#placed = new PlacedPoints(form.n, this.#definitions);
  }

  orders(e: Expression, at: Place): Orders {
    switch (e.kind) {
      case "integer":
      case "index":
      case "unknown":
        return none;
      case "negate":
        return this.orders(e.operand, at);
      case "add":
        return smallest(e.summands.map((s) => this.orders(s, at)));
      case "multiply":
        return e.factors.reduce<Orders>((total, f) => combined(total, this.orders(f, at), 1), none);
      case "divide":
        return combined(this.orders(e.numerator, at), this.#denominator(e.denominator, at), -1);
      case "power": {
        const power = Number(evaluateNumber(e.exponent, at.bindings));
        const base = power < 0 ? this.#denominator(e.base, at) : this.orders(e.base, at);
        return combined(none, base, power);
      }
      case "sum":
        return smallest(
          [...enumerateBindings(e, at.bindings)].map((bindings) => this.orders(e.body, { ...at, bindings })),
        );
      case "product":
        return [...enumerateBindings(e, at.bindings)].reduce<Orders>(
          (total, bindings) => combined(total, this.orders(e.body, { ...at, bindings }), 1),
          none,
        );
      case "cyc":
        return smallest(cyclicPlaces(at, this.form.n).map((place) => this.orders(e.body, place)));
      case "sym":
        return smallest(symmetricPlaces(at, this.form.loops).map((place) => this.orders(e.body, place)));
      case "call":
        return this.#call(e, at);
      case "four":
        return this.#fours([this.#placed.points(e.items, at)], 1);
      case "five":
        return this.#five(this.#placed.points(e.items, at));
      case "delta":
        return none;
      case "angle":
        return this.#angle(this.#placed.points(e.items, at));
      case "square":
        return this.#square(e.left, e.right, at);
      case "string":
        return this.#string({
          left: e.left,
          first: this.#end(e.first, at),
          middle: e.middle.map((momenta) => momentumLegs(momenta, at.bindings, this.form.n, at.shift)),
          last: this.#end(e.last, at),
        });
      case "mandelstam":
        return this.#mandelstam(momentumLegs(e.momenta, at.bindings, this.form.n, at.shift));
      case "distance":
        return this.#distance(e.left, e.right, at);
    }
  }

  /** A denominator that is a sum is a divisor of its own: its summands say nothing about where it vanishes. */
  #denominator(e: Expression, at: Place): Orders {
    if (e.kind === "negate") return this.#denominator(e.operand, at);
    if (e.kind === "multiply")
      return e.factors.reduce<Orders>((total, f) => combined(total, this.#denominator(f, at), 1), none);
    if (e.kind === "product")
      return [...enumerateBindings(e, at.bindings)].reduce<Orders>(
        (total, bindings) => combined(total, this.#denominator(e.body, { ...at, bindings }), 1),
        none,
      );
    if (e.kind === "power") {
      const power = Number(evaluateNumber(e.exponent, at.bindings));
      // A denominator in a denominator is a numerator.
      return power < 0 ? this.orders(e, at) : combined(none, this.#denominator(e.base, at), power);
    }
    if (e.kind === "call") {
      const definition = this.#definitions.get(e.name);
      if (definition !== undefined)
        return this.#denominator(
          scalarBody(this.#definitions, e.name),
          definitionPlace(definition, e.arguments, at, this.form.n),
        );
    }
    if (e.kind === "add" || e.kind === "sum" || e.kind === "cyc" || e.kind === "sym")
      return this.#whole(this.#sumText(e, at), false, { written: { expression: e, place: at } });
    return this.orders(e, at);
  }

  /** A name for a denominator that is a sum: the brackets that its summands hold, so that equal sums have equal names. */
  #sumText(e: Expression, at: Place): string {
    const names = (x: Expression, place: Place): string => {
      if (x.kind === "add") return x.summands.map((s) => names(s, place)).join(" + ");
      const text = [...this.orders(x, place)].map(([key, order]) => (order === 1 ? key : `${key}^${order}`)).join(" ");
      return text === "" ? "1" : text;
    };
    return `sum of ${names(e, at)}`;
  }

  #call(e: Extract<Expression, { kind: "call" }>, at: Place): Orders {
    const definition = this.#definitions.get(e.name);
    if (definition === undefined) throw new Error(`findPoles: expected ${e.name} to be defined`);
    const place = definitionPlace(definition, e.arguments, at, this.form.n);
    const values = definition.parameters.map((p) => place.bindings.get(p)).join(",");
    const key = `${e.name}|${values}|${at.shift}|${at.permutation.join("")}`;
    const known = this.#memo.get(key);
    if (known !== undefined) return known;
    const orders = this.orders(scalarBody(this.#definitions, e.name), place);
    this.#memo.set(key, orders);
    return orders;
  }

  /** Between dual points of legs a component has the momentum that it is; elsewhere it is the bracket of the two lines. */
  #distance(left: DualPoint, right: DualPoint, at: Place): Orders {
    if (this.form.negativeLegs !== null && left.kind === "label" && right.kind === "label") {
      const { n } = this.form;
      const [i, j] = [left, right].map((end) => evaluateLabel(end.index, at.bindings, n, at.shift)) as [number, number];
      if (i !== j) return this.#mandelstam(cyclicRange(n, i, j - 1));
    }
    return this.#fours([[...this.#placed.dual(left, at), ...this.#placed.dual(right, at)]], 1);
  }

  /** Once for each set of points, which are told apart by what they are known as: terms of a recursion share their invariants. */
  #five(points: readonly Point[]): Orders {
    const key = points
      .map((p) => this.#numberOf(p))
      .sort((a, b) => a - b)
      .join(" ");
    const known = this.#fives.get(key);
    if (known !== undefined) return known;
    const orders = this.#fours(
      points.map((_, left) => points.filter((_, i) => i !== left)),
      -1,
    );
    this.#fives.set(key, orders);
    return orders;
  }

  #numberOf(p: Point): number {
    const known = this.#numbers.get(p);
    if (known !== undefined) return known;
    const text = pointText(p);
    const number = this.#numbersOfTexts.get(text) ?? this.#numbersOfTexts.size;
    this.#numbersOfTexts.set(text, number);
    this.#numbers.set(p, number);
    return number;
  }

  #fours(brackets: readonly (readonly Point[])[], order: number): Orders {
    const total = new Map<string, number>();
    for (const points of brackets)
      for (const whole of factorsOfFour(points))
        for (const { points: factor, power, without } of this.#plain(whole)) {
          const spinors = this.#consecutive(factor);
          if (spinors !== null) {
            for (const [text, times] of spinors) total.set(text, (total.get(text) ?? 0) + times * power * order);
            continue;
          }
          const text = `<${itemsText(factor)}>`;
          const key = this.#names.keyOf(factor, without, text);
          this.#note(key, {
            text,
            physical: isPhysicalFour(factor, this.form.n),
            reference: holdsReference(factor),
            points: factor,
            without,
          });
          total.set(key, (total.get(key) ?? 0) + power * order);
        }
    return total;
  }

  #plain(points: readonly Point[]): readonly Factor[] {
    const key = itemsText(points);
    const known = this.#factors.get(key);
    if (known !== undefined) return known;
    const factors = this.#factoring.factorsOf(points);
    this.#factors.set(key, factors);
    return factors;
  }

  /** In a component <i-1 i i+1 i+2> is <i-1 i><i i+1><i+1 i+2>[i i+1]; null for any other bracket. */
  #consecutive(points: readonly Point[]): Orders | null {
    const { n, negativeLegs } = this.form;
    if (negativeLegs === null || n === 4) return null;
    const labels = points.flatMap((p) => (p.kind === "label" ? [p.label] : []));
    if (labels.length !== 4) return null;
    const first = labels.find((a) => [1, 2, 3].every((step) => labels.includes(wrapLabel(n, a + step))));
    if (first === undefined) return null;
    const [a, b, c, d] = [0, 1, 2, 3].map((step) => wrapLabel(n, first + step)) as [number, number, number, number];
    return [this.#pair("<", a, b), this.#pair("<", b, c), this.#pair("<", c, d), this.#pair("[", b, c)].reduce(
      (sum, one) => combined(sum, one, 1),
      none,
    );
  }

  /** <a b> or [a b]. */
  #pair(bracket: "<" | "[", a: number, b: number): Orders {
    const text = `${Math.min(a, b)} ${Math.max(a, b)}`;
    return this.#whole(bracket === "<" ? `<${text}>` : `[${text}]`, adjacent(a, b, this.form.n));
  }

  #angle(points: readonly Point[]): Orders {
    const labels = points.flatMap((p) => (p.kind === "label" ? [p.label] : []));
    const [a, b] = labels;
    const physical = a !== undefined && b !== undefined && adjacent(a, b, this.form.n);
    return this.#whole(`<${itemsText(points)}>`, physical, { reference: holdsReference(points) });
  }

  #square(left: SpinorEnd, right: SpinorEnd, at: Place): Orders {
    const ends = [this.#end(left, at), this.#end(right, at)].sort((a, b) => Number(a) - Number(b));
    const [a, b] = ends.map(Number);
    return this.#whole(`[${ends.join(" ")}]`, !ends.includes("*") && adjacent(a ?? 0, b ?? 0, this.form.n));
  }

  #string(whole: PlainString): Orders {
    const factors = stringFactors(this.form.n, whole);
    return factors.reduce<Orders>((total, string) => {
      const [a, b] = [string.first, string.last].map(Number);
      const physical = string.middle.length === 0 && adjacent(a ?? 0, b ?? 0, this.form.n);
      // A string in one piece is shown as it was written first, whatever equal one it goes by.
      const shown = factors.length === 1 ? { text: stringText(whole) } : {};
      return combined(total, this.#whole(stringText(string), physical, shown), 1);
    }, none);
  }

  /** s of legs S is s of the other legs too: the name is the shorter of the two, or the one that holds the lowest leg. */
  #mandelstam(legs: readonly number[]): Orders {
    const { n } = this.form;
    const set = [...new Set(legs)].sort((a, b) => a - b);
    const rest = Array.from({ length: n }, (_, i) => i + 1).filter((a) => !set.includes(a));
    const shorter = set.length < rest.length || (set.length === rest.length && set[0] === 1) ? set : rest;
    const [a, b] = shorter;
    // s(a b) = <a b>[a b] is two divisors where spinors are the variables.
    if (this.form.negativeLegs !== null && shorter.length === 2 && a !== undefined && b !== undefined)
      return combined(this.#pair("<", a, b), this.#pair("[", a, b), 1);
    const jumps = shorter.filter((c, i) => !adjacent(c, shorter[(i + 1) % shorter.length] ?? 0, n)).length;
    return this.#whole(`s(${shorter.join(" ")})`, shorter.length > 0 && jumps <= 1);
  }

  /** A divisor of order 1 under the key, which is its text unless `more` says otherwise. */
  #whole(key: string, physical: boolean, more: Partial<Divisor> = {}): Orders {
    this.#note(key, { physical, ...more });
    return new Map([[key, 1]]);
  }

  #note(key: string, known: Partial<Divisor>): void {
    if (this.divisors.has(key)) return;
    this.divisors.set(key, {
      text: key,
      physical: false,
      reference: key.includes("*"),
      points: null,
      without: [],
      written: null,
      ...known,
    });
  }

  #end(end: SpinorEnd, at: Place): string {
    return end.kind === "label" ? String(evaluateLabel(end.index, at.bindings, this.form.n, at.shift)) : "*";
  }
}

function combined(a: Orders, b: Orders, factor: number): Orders {
  if (b.size === 0) return a;
  const total = new Map(a);
  for (const [key, order] of b) total.set(key, (total.get(key) ?? 0) + factor * order);
  return total;
}

/** Order of a sum: on each divisor the least of its summands, which is 0 where a summand does not hold it. */
function smallest(all: readonly Orders[]): Orders {
  const total = new Map<string, number>();
  for (const key of new Set(all.flatMap((orders) => [...orders.keys()]))) {
    total.set(key, Math.min(...all.map((orders) => orders.get(key) ?? 0)));
  }
  return total;
}

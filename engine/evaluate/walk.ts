/** Goes through a syntax tree at given n and L and computes its value in any algebra, every name, label and sum resolved. */
import { enumerateBindings } from "../notation/bindings";
import {
  areFixed,
  cyclicPlaces,
  definitionPlace,
  definitionsOf,
  type Extent,
  type Place,
  scalarBody,
  symmetricPlaces,
} from "../notation/expand";
import { evaluateIndex, evaluateLabel, evaluateNumber, momentumLegs } from "../notation/indices";
import type {
  Definition,
  DualPoint,
  Expression,
  Formula,
  IndexExpression,
  Item,
  NamedItem,
  Operand,
  SpinorEnd,
} from "../notation/tree";
import type { Span } from "../result";
import { type Algebra, type DualSlot, type Piece, type PointPiece, type SpinorSlot, ZeroDenominator } from "./algebra";

const slotsOf = (pieces: readonly { readonly slots: number }[]): number =>
  pieces.reduce((sum, piece) => sum + piece.slots, 0);

/**
 * One walk over one formula. Definitions are evaluated once for each list of arguments, shift and permutation; equal points share
 * an id, so that an algebra can remember what it computed from them.
 */
export class Walker<V, P, L> {
  /** The node at work: after a `ZeroDenominator` it is the denominator that vanished. */
  span: Span = [0, 0];
  private readonly definitions: ReadonlyMap<string, Definition>;
  private readonly scalars = new Map<string, V>();
  private readonly geometries = new Map<string, readonly Piece<P, L>[]>();
  private readonly pieces = new Map<string, Piece<P, L>>();
  private readonly legs: (PointPiece<P> | undefined)[] = [];
  /** R-invariants without indices where nothing moves them, by their node. */
  private readonly fixedInvariants = new Map<Expression, V>();

  constructor(
    private readonly algebra: Algebra<V, P, L>,
    formula: Formula,
    private readonly extent: Extent,
  ) {
    this.definitions = definitionsOf(formula);
  }

  /** The value of an expression at its place. @throws ZeroDenominator, with `span` left at the denominator */
  value(expression: Expression, place: Place): V {
    const { algebra } = this;
    switch (expression.kind) {
      case "integer":
        return algebra.integer(BigInt(expression.value));
      case "index":
        return algebra.integer(evaluateNumber(expression, place.bindings));
      case "add":
        return algebra.add(expression.summands.map((summand) => this.value(summand, place)));
      case "negate":
        return algebra.negate(this.value(expression.operand, place));
      case "multiply":
        return algebra.multiply(expression.factors.map((factor) => this.value(factor, place)));
      case "divide":
        return this.quotient(expression.numerator, expression.denominator, place);
      case "power": {
        const exponent = Number(evaluateNumber(expression.exponent, place.bindings));
        const base = this.value(expression.base, place);
        this.span = expression.base.span;
        return algebra.power(base, exponent);
      }
      case "sum":
      case "product": {
        const values: V[] = [];
        for (const bindings of enumerateBindings(expression, place.bindings)) {
          values.push(this.value(expression.body, { ...place, bindings }));
        }
        return expression.kind === "sum" ? algebra.add(values) : algebra.multiply(values);
      }
      case "cyc":
        return algebra.add(cyclicPlaces(place, this.extent.n).map((at) => this.value(expression.body, at)));
      case "sym":
        return algebra.add(symmetricPlaces(place, this.extent.loops).map((at) => this.value(expression.body, at)));
      case "call":
        return this.call(expression, place);
      case "unknown":
        throw new Error(`value: expected a formula without unknowns, got ?${expression.name}`);
      default:
        return this.bracket(expression, place);
    }
  }

  private bracket(expression: Expression, place: Place): V {
    const { algebra } = this;
    const label = (index: Extract<Item, { kind: "label" }>["index"]): number => this.label(index, place);
    const legs = (momenta: Parameters<typeof momentumLegs>[0]): number[] =>
      momentumLegs(momenta, place.bindings, this.extent.n, place.shift);
    const end = (slot: SpinorEnd): SpinorSlot =>
      slot.kind === "label" ? { kind: "leg", label: label(slot.index) } : { kind: "reference" };
    const dual = (slot: DualPoint): DualSlot =>
      slot.kind === "label"
        ? { kind: "leg", label: label(slot.index) }
        : { kind: "loop", loop: place.permutation[slot.loop]! };
    switch (expression.kind) {
      case "four":
      case "angle": {
        const pieces = this.items(expression.items, place);
        this.span = expression.span;
        return expression.kind === "four" ? algebra.fourBracket(pieces) : algebra.angleBracket(pieces);
      }
      case "five": {
        // Derived forms share their nodes: most invariants are met again as the same node.
        const known = this.fixedInvariants.get(expression);
        if (known !== undefined && place.shift === 0) return known;
        const points = this.points(expression.items, place);
        this.span = expression.span;
        const value = algebra.fiveBracket(points);
        if (areFixed(expression.items, place)) this.fixedInvariants.set(expression, value);
        return value;
      }
      case "delta": {
        const points = this.points(expression.items, place);
        this.span = expression.span;
        return algebra.delta(points);
      }
      case "square":
        this.span = expression.span;
        return algebra.squareBracket(end(expression.left), end(expression.right));
      case "string":
        this.span = expression.span;
        return algebra.spinorString({
          left: expression.left,
          first: end(expression.first),
          middle: expression.middle.map(legs),
          last: end(expression.last),
        });
      case "mandelstam":
        this.span = expression.span;
        return algebra.mandelstam(legs(expression.momenta));
      case "distance":
        this.span = expression.span;
        return algebra.dualDistance(dual(expression.left), dual(expression.right));
      default:
        throw new Error(`bracket: expected a bracket, got ${expression.kind}`);
    }
  }

  private quotient(numerator: Expression, denominator: Expression, place: Place): V {
    const above = this.value(numerator, place);
    const below = this.value(denominator, place);
    this.span = denominator.span;
    try {
      return this.algebra.divide(above, below);
    } catch (reason) {
      if (reason instanceof ZeroDenominator) this.span = this.vanishing(denominator, place).span;
      throw reason;
    }
  }

  /** The factor of a vanishing denominator that vanishes. */
  private vanishing(denominator: Expression, place: Place): Expression {
    const one = this.algebra.integer(1n);
    const factors =
      denominator.kind === "multiply"
        ? denominator.factors
        : denominator.kind === "negate"
          ? [denominator.operand]
          : denominator.kind === "power"
            ? [denominator.base]
            : [];
    for (const factor of factors) {
      try {
        this.algebra.divide(one, this.value(factor, place));
      } catch (reason) {
        if (reason instanceof ZeroDenominator) return this.vanishing(factor, place);
        throw reason;
      }
    }
    return denominator;
  }

  private call(expression: Extract<Expression, { kind: "call" }>, place: Place): V {
    const { name } = expression;
    return remember(this.scalars, keyOfUse(name, expression.arguments, place), () => {
      const at = definitionPlace(this.definition(name), expression.arguments, place, this.extent.n);
      return this.value(scalarBody(this.definitions, name), at);
    });
  }

  private definition(name: string): Definition {
    const definition = this.definitions.get(name);
    if (definition === undefined) throw new Error(`definition: expected ${name} to be defined`);
    return definition;
  }

  private label(index: Extract<Item, { kind: "label" }>["index"], place: Place): number {
    return evaluateLabel(index, place.bindings, this.extent.n, place.shift);
  }

  private items(items: readonly Item[], place: Place): readonly Piece<P, L>[] {
    if (items.length === 1) return this.item(items[0]!, place);
    const pieces: Piece<P, L>[] = [];
    for (const item of items) pieces.push(...this.item(item, place));
    return pieces;
  }

  private points(items: readonly Item[], place: Place): readonly PointPiece<P>[] {
    return this.items(items, place).map((piece) => {
      if (piece.slots === 2) throw new Error("points: expected points only, got a line without points of its own");
      return piece;
    });
  }

  private item(item: Item, place: Place): readonly Piece<P, L>[] {
    const { algebra } = this;
    switch (item.kind) {
      case "label":
        return [this.external(this.label(item.index, place))];
      case "loopPoint": {
        const letter = item.letter.charCodeAt(0) - 65;
        return [this.loopPoint(place.permutation[letter >> 1]!, (letter & 1) as 0 | 1)];
      }
      case "loopLine": {
        const loop = place.permutation[item.loop]!;
        return [this.loopPoint(loop, 0), this.loopPoint(loop, 1)];
      }
      case "referenceTwistor":
        return [this.point("*", () => algebra.referenceTwistor())];
      case "referenceLine":
        return [this.point("X1", () => algebra.referencePoint(0)), this.point("X2", () => algebra.referencePoint(1))];
      case "meet":
        return [this.meet(this.operand(item.left, place), this.operand(item.right, place))];
      case "named":
        return this.named(item, place);
    }
  }

  private external(label: number): PointPiece<P> {
    let leg = this.legs[label];
    if (leg === undefined) {
      leg = this.point(`Z${label}`, () => this.algebra.externalPoint(label));
      this.legs[label] = leg;
    }
    return leg;
  }

  private loopPoint(loop: number, which: 0 | 1): PointPiece<P> {
    return this.point(`L${loop}.${which}`, () => this.algebra.loopPoint(loop, which));
  }

  private point(key: string, make: () => P): PointPiece<P> {
    const piece = remember<Piece<P, L>>(this.pieces, key, () => ({ slots: 1, id: this.pieces.size, value: make() }));
    return piece as PointPiece<P>;
  }

  private operand(operand: Operand, place: Place): readonly Piece<P, L>[] {
    if (operand.kind === "group") return this.items(operand.items, place);
    const middle = this.label(operand.index, place);
    const { n } = this.extent;
    return [middle === 1 ? n : middle - 1, middle, middle === n ? 1 : middle + 1].map((a) => this.external(a));
  }

  private meet(left: readonly Piece<P, L>[], right: readonly Piece<P, L>[]): Piece<P, L> {
    const ids = (pieces: readonly Piece<P, L>[]): string => pieces.map((piece) => piece.id).join();
    const [slotsLeft, slotsRight] = [slotsOf(left), slotsOf(right)];
    if (slotsLeft === 3 && slotsRight === 3) {
      return remember<Piece<P, L>>(this.pieces, `${ids(left)}^${ids(right)}`, () => ({
        slots: 2,
        value: this.algebra.meetOfPlanes(left, right),
        id: this.pieces.size,
      }));
    }
    if (slotsLeft + slotsRight !== 5 || slotsLeft * slotsRight !== 6) {
      throw new Error(`meet: expected a line and a plane or two planes, got ${slotsLeft} and ${slotsRight} slots`);
    }
    const [line, plane] = slotsLeft === 2 ? [left, right] : [right, left];
    return this.point(`${ids(line)}^${ids(plane)}`, () => this.algebra.meetOfLineAndPlane(line, plane));
  }

  private named(item: NamedItem, place: Place): readonly Piece<P, L>[] {
    return remember(this.geometries, keyOfUse(item.name, item.arguments, place), () => {
      const definition = this.definition(item.name);
      const { value } = definition;
      if (value.kind !== "geometry") throw new Error(`named: expected ${item.name} to be a point, line or plane`);
      const at = definitionPlace(definition, item.arguments, place, this.extent.n);
      return value.geometry.kind === "meet" ? this.item(value.geometry, at) : this.items(value.geometry.items, at);
    });
  }
}

/** One key for each list of arguments and each place that `cyc` and `sym` move a definition to. */
function keyOfUse(name: string, values: readonly IndexExpression[], { bindings, shift, permutation }: Place): string {
  if (values.length === 0 && shift === 0 && permutation.length < 2) return name;
  return `${name}|${values.map((value) => evaluateIndex(value, bindings)).join()}|${shift}|${permutation.join("")}`;
}

function remember<X>(known: Map<string, X>, key: string, make: () => X): X {
  const old = known.get(key);
  if (old !== undefined) return old;
  const made = make();
  known.set(key, made);
  return made;
}

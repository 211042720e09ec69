/** From the syntax tree to a graph of ring operations: sums written out, labels reduced, brackets normalised, deltas as determinants. */
import { enumerateBindings } from "../notation/bindings";
import {
  areFixed,
  cyclicPlaces,
  definitionPlace,
  definitionsOf,
  expandTerms,
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
import { type Element, Exterior } from "./exterior";
import { type Figure, Geometry, loopLineFigure, pointFigure, referenceLineFigure, slotsOf } from "./geometry";
import { type Graph, negated, type Ref } from "./graph";
import { type DualLine, type SpinorLabel, Spinors } from "./spinors";
import { TupleTable } from "./tuples";

/** A form at one n: what a tape is made from. */
export interface FormToCompile {
  readonly n: number;
  readonly k: number;
  readonly loops: number;
  /** Legs of negative helicity of a component form, null for a superamplitude; a value is what is written in both. */
  readonly negativeLegs: readonly number[] | null;
  readonly squareSign: 1 | -1;
  readonly formula: Formula;
}

/** Arguments of definitions up to this size are told apart by value, larger ones by a list. */
const SMALL = 1 << 29;

export class Lowering {
  private readonly geometry: Geometry;
  private readonly exterior: Exterior;
  private readonly spinors: Spinors;
  private readonly definitions: ReadonlyMap<string, Definition>;
  private readonly numbers = new Map<string, number>();
  private readonly uses = new TupleTable();
  private readonly useKey: number[] = [];
  private readonly scalars: (Element | undefined)[] = [];
  private readonly figures: (Figure | undefined)[] = [];
  private readonly invariants = new TupleTable();
  private readonly invariantValues: Element[] = [];
  /** R-invariants without indices where nothing moves them, by their node. */
  private readonly fixedInvariants = new Map<Expression, Element>();
  private readonly largeArguments = new Map<bigint, number>();
  private readonly buffer = new Int32Array(6);
  /** <AB>^-4 for each loop line of a form in dual points, else null. */
  private readonly measure: Element | null;

  constructor(
    private readonly graph: Graph,
    private readonly form: FormToCompile,
  ) {
    this.geometry = new Geometry(graph, form.n, form.k);
    this.exterior = new Exterior(graph, form.k);
    this.spinors = new Spinors(graph, this.geometry, form.n, form.squareSign);
    this.definitions = definitionsOf(form.formula);
    form.formula.definitions.forEach((definition, i) => {
      this.numbers.set(definition.name, i);
    });
    this.measure = this.dualMeasure();
  }

  /** The top-level terms in order, each as one number with its sign. */
  *terms(): Generator<Ref> {
    for (const term of expandTerms(this.form.formula, this.form)) {
      let value = this.value(term.expression, term);
      if (this.measure !== null) value = this.exterior.multiply(value, this.measure);
      const ref = this.exterior.value(value);
      yield term.sign === 1 ? ref : negated(ref);
    }
  }

  private value(expression: Expression, place: Place): Element {
    const { exterior, graph, form } = this;
    switch (expression.kind) {
      case "integer":
        return exterior.scalar(graph.constant(BigInt(expression.value), 1n, expression.span));
      case "index":
        return exterior.scalar(graph.constant(evaluateNumber(expression, place.bindings), 1n, expression.span));
      case "add":
        return exterior.add(expression.summands.map((summand) => this.value(summand, place)));
      case "negate":
        return exterior.negate(this.value(expression.operand, place));
      case "multiply":
        return exterior.product(expression.factors.map((factor) => this.value(factor, place)));
      case "divide": {
        const numerator = this.value(expression.numerator, place);
        const inverse = this.inverse(this.value(expression.denominator, place), expression.denominator.span);
        return exterior.multiply(numerator, exterior.scalar(inverse));
      }
      case "power":
        return this.power(expression, place);
      case "sum":
      case "product": {
        const values: Element[] = [];
        for (const bindings of enumerateBindings(expression, place.bindings)) {
          values.push(this.value(expression.body, { ...place, bindings }));
        }
        return expression.kind === "sum" ? exterior.add(values) : exterior.product(values);
      }
      case "cyc":
        return exterior.add(cyclicPlaces(place, form.n).map((at) => this.value(expression.body, at)));
      case "sym":
        return exterior.add(symmetricPlaces(place, form.loops).map((at) => this.value(expression.body, at)));
      case "call": {
        const use = this.use(expression.name, expression.arguments, place);
        const known = this.scalars[use];
        if (known !== undefined) return known;
        const definition = this.definitions.get(expression.name)!;
        const at = definitionPlace(definition, expression.arguments, place, form.n);
        const value = this.value(scalarBody(this.definitions, expression.name), at);
        this.scalars[use] = value;
        return value;
      }
      case "unknown":
        throw new Error(`value: expected a formula without unknowns, got ?${expression.name}`);
      case "five": {
        // Derived forms share their nodes: most invariants are met again as the same node.
        const known = this.fixedInvariants.get(expression);
        if (known !== undefined && place.shift === 0) return known;
        const value = this.invariant("five", this.figure(expression.items, place).points, expression.span);
        if (areFixed(expression.items, place)) this.fixedInvariants.set(expression, value);
        return value;
      }
      case "delta":
        return this.invariant("delta", this.figure(expression.items, place).points, expression.span);
      default:
        return exterior.scalar(this.bracket(expression, place));
    }
  }

  /** 1/denominator; an element with deltas has no inverse, and counts as a zero at every point. */
  private inverse(denominator: Element, span: Span): Ref {
    return this.graph.inverse(this.exterior.asScalar(denominator) ?? this.graph.zero, span);
  }

  private power(expression: Extract<Expression, { kind: "power" }>, place: Place): Element {
    const { exterior, graph } = this;
    const exponent = Number(evaluateNumber(expression.exponent, place.bindings));
    const base = this.value(expression.base, place);
    if (exponent < 0) return exterior.scalar(graph.power(this.inverse(base, expression.base.span), -exponent));
    const number = exterior.asScalar(base);
    if (number !== null) return exterior.scalar(graph.power(number, exponent));
    let power = exterior.scalar(graph.one);
    // Degrees add up, so this ends at zero after k factors unless the base has a part without deltas.
    for (let i = 0; i < exponent && power.length > 0; i++) power = exterior.multiply(power, base);
    return power;
  }

  /** [a b c d e] or delta(a b c d e), once for each list of points. */
  private invariant(kind: "five" | "delta", points: readonly Ref[], span: Span): Element {
    const { exterior, geometry, graph } = this;
    points.forEach((point, i) => {
      this.buffer[i] = point;
    });
    this.buffer[5] = kind === "five" ? 1 : 0;
    const id = this.invariants.intern(this.buffer, 6);
    const known = this.invariantValues[id];
    if (known !== undefined) return known;
    const brackets = geometry.fiveBrackets(points);
    const row = this.form.k === 0 ? null : geometry.deltaRow(points, brackets);
    let coefficient = graph.one;
    if (kind === "five") {
      const denominator = [...brackets].sort((a, b) => a - b).reduce((a, b) => graph.multiply(a, b), graph.one);
      coefficient = graph.inverse(denominator, span);
    }
    const value = exterior.delta(coefficient, row);
    this.invariantValues[id] = value;
    return value;
  }

  private bracket(expression: Expression, place: Place): Ref {
    const { geometry, spinors } = this;
    const legs = (momenta: Parameters<typeof momentumLegs>[0]): number[] =>
      momentumLegs(momenta, place.bindings, this.form.n, place.shift);
    const end = (slot: SpinorEnd): SpinorLabel => (slot.kind === "label" ? this.label(slot.index, place) : 0);
    switch (expression.kind) {
      case "four":
        return geometry.bracketOf(this.figure(expression.items, place));
      case "angle":
        return geometry.angle(this.figure(expression.items, place));
      case "square":
        return spinors.square(end(expression.left), end(expression.right), expression.span);
      case "string": {
        const middle = expression.middle.map(legs);
        return spinors.string(expression.left, end(expression.first), middle, end(expression.last), expression.span);
      }
      case "mandelstam":
        return spinors.mandelstam(legs(expression.momenta), expression.span);
      case "distance": {
        const [left, right] = [expression.left, expression.right].map((point) => this.dualLine(point, place));
        return spinors.distance(left!, right!, expression.span);
      }
      default:
        throw new Error(`bracket: expected a bracket, got ${expression.kind}`);
    }
  }

  private dualLine(point: DualPoint, place: Place): DualLine {
    if (point.kind === "label") return this.spinors.dualPoint(this.label(point.index, place));
    return loopLineFigure(this.geometry, place.permutation[point.loop]!).points as unknown as DualLine;
  }

  private label(index: IndexExpression, place: Place): number {
    if (index.terms.length === 0 && index.constant.length < 3) {
      const { n } = this.form;
      const residue = (Number(index.constant) + place.shift) % n;
      return residue <= 0 ? residue + n : residue;
    }
    return evaluateLabel(index, place.bindings, this.form.n, place.shift);
  }

  private figure(items: readonly Item[], place: Place): Figure {
    if (items.length === 1) return this.item(items[0]!, place);
    const points: Ref[] = [];
    const lines: Ref[] = [];
    for (const item of items) {
      const figure = this.item(item, place);
      points.push(...figure.points);
      lines.push(...figure.lines);
    }
    return { points, lines };
  }

  private item(item: Item, place: Place): Figure {
    const { geometry } = this;
    switch (item.kind) {
      case "label":
        return pointFigure(geometry.leg(this.label(item.index, place)));
      case "loopPoint": {
        const letter = item.letter.charCodeAt(0) - 65;
        return pointFigure(geometry.loopPoint(2 * place.permutation[letter >> 1]! + (letter & 1)));
      }
      case "loopLine":
        return loopLineFigure(geometry, place.permutation[item.loop]!);
      case "referenceTwistor":
        return pointFigure(geometry.referenceTwistor());
      case "referenceLine":
        return referenceLineFigure(geometry);
      case "meet":
        return this.meet(this.operand(item.left, place), this.operand(item.right, place));
      case "named": {
        const use = this.use(item.name, item.arguments, place);
        this.figures[use] ??= this.named(item, place);
        return this.figures[use];
      }
    }
  }

  private named(item: NamedItem, place: Place): Figure {
    const definition = this.definitions.get(item.name)!;
    if (definition.value.kind !== "geometry") {
      throw new Error(`named: expected ${item.name} to be a point, line or plane`);
    }
    const at = definitionPlace(definition, item.arguments, place, this.form.n);
    const { geometry } = definition.value;
    return geometry.kind === "meet" ? this.item(geometry, at) : this.figure(geometry.items, at);
  }

  private operand(operand: Operand, place: Place): Figure {
    if (operand.kind === "group") return this.figure(operand.items, place);
    const { n } = this.form;
    const middle = this.label(operand.index, place);
    const labels = [middle === 1 ? n : middle - 1, middle, middle === n ? 1 : middle + 1];
    return { points: labels.map((label) => this.geometry.leg(label)), lines: [] };
  }

  private meet(left: Figure, right: Figure): Figure {
    if (slotsOf(left) === 3 && slotsOf(right) === 3) {
      return { points: [], lines: [this.geometry.meetOfPlanes(left, right)] };
    }
    const [line, plane] = slotsOf(left) === 2 ? [left, right] : [right, left];
    return pointFigure(this.geometry.meetOfLineAndPlane(line, plane));
  }

  /** The number of a use of a definition: of its (name, arguments, shift, permutation). */
  private use(name: string, values: readonly IndexExpression[], place: Place): number {
    let lines = 1;
    for (const line of place.permutation) lines = lines * 4 + line;
    const { useKey } = this;
    useKey[0] = this.numbers.get(name)!;
    useKey[1] = place.shift;
    useKey[2] = lines;
    useKey.length = 3;
    for (const value of values) useKey.push(this.argumentCode(evaluateIndex(value, place.bindings)));
    return this.uses.intern(useKey, useKey.length);
  }

  private argumentCode(value: bigint): number {
    if (value > -SMALL && value < SMALL) return Number(value);
    let code = this.largeArguments.get(value);
    if (code === undefined) {
      code = SMALL + this.largeArguments.size;
      this.largeArguments.set(value, code);
    }
    return code;
  }

  /** Where a form's loop lines stand in x2( ) alone, it is a form in dual points: its measure brings <AB>^-4 for each line. */
  private dualMeasure(): Element | null {
    const { graph, geometry, form, exterior } = this;
    if (form.loops === 0 || !isInDualPoints(form.formula)) return null;
    const { span } = form.formula.expression;
    let measure = graph.one;
    for (let loop = 0; loop < form.loops; loop++) {
      const angle = geometry.angle(loopLineFigure(geometry, loop));
      measure = graph.multiply(measure, graph.power(graph.inverse(angle, span), 4));
    }
    return exterior.scalar(measure);
  }
}

/** Whether loop lines occur, and in x2( ) only; definitions count where they are used. */
function isInDualPoints(formula: Formula): boolean {
  const seen = new Set<string>();
  const stack: unknown[] = [formula.expression];
  let inDistances = false;
  for (let node = stack.pop(); node !== undefined; node = stack.pop()) {
    const { kind, name } = node as { kind?: string; name?: string };
    if (kind === "loopLine" || kind === "loopPoint") return false;
    if (kind === "distance") {
      const { left, right } = node as Extract<Expression, { kind: "distance" }>;
      if (left.kind === "loopLine" || right.kind === "loopLine") inDistances = true;
      continue;
    }
    if ((kind === "call" || kind === "named") && !seen.has(name!)) {
      seen.add(name!);
      stack.push(formula.definitions.find((definition) => definition.name === name)!.value);
    }
    for (const child of Object.values(node as object))
      if (typeof child === "object" && child !== null) stack.push(child);
  }
  return inDistances;
}

/**
 * Goes through a formula as an evaluator does, definitions once for each list of arguments and place, without computing values: bounds the steps
 * and the degree, and looks at exponents and momenta wherever they are evaluated.
 */
import type { Span } from "../result";
import { type Budget, budgetFor, countBindings, enumerateBindings } from "./bindings";
import {
  cyclicPlaces,
  definitionPlace,
  definitionsOf,
  type Extent,
  type Place,
  permutations,
  startingPlace,
  symmetricPlaces,
} from "./expand";
import type { Faults } from "./faults";
import { evaluateNumber } from "./indices";
import { highestDegree, largestExponent, mostSteps, mostTerms } from "./limits";
import { reportRepeated } from "./momenta";
import type { Definition, Expression, Formula, IndexExpression, Item, Quantified } from "./tree";
import { innerExpressions, itemsOf, momentumSums, operandsOf } from "./walk";

/** What is true of an expression wherever it stands. */
interface Shape {
  /** Nodes, items included: the steps of evaluating it once where `fixed`. */
  readonly nodes: number;
  /** Steps, degree and faults are the same for all values of the indices, and it uses no definition. */
  readonly fixed: boolean;
}

/** The parts of a walk: steps are counted on the walker, the degree is returned. */
class Walker {
  private steps = 0;
  private readonly budget: Budget = budgetFor(mostTerms);
  private readonly shapes = new WeakMap<object, Shape>();
  private readonly fixedDegrees = new WeakMap<object, number>();
  private readonly degrees = new Map<string, number>();
  /** Spans already reported; a sum meets the same fault again and again. */
  private readonly reported = new Set<string>();
  private readonly definitions: ReadonlyMap<string, Definition>;

  constructor(
    private readonly formula: Formula,
    private readonly extent: Extent,
    private readonly faults: Faults,
  ) {
    this.definitions = definitionsOf(formula);
  }

  check(): void {
    this.walk(this.formula.expression, startingPlace(this.extent));
  }

  private take(steps: number): void {
    this.steps += steps;
    if (this.steps <= mostSteps) return;
    this.faults.fatal(
      "limit-steps",
      this.formula.expression.span,
      `Evaluating the formula at n = ${this.extent.n} would take more than ${mostSteps.toLocaleString("en")} steps.`,
      {
        help: "Bound the sums inside products and definitions more narrowly, or check parts of the formula separately.",
      },
    );
  }

  private degree(degree: number, span: Span): number {
    if (degree <= highestDegree) return degree;
    return this.faults.fatal(
      "limit-degree",
      span,
      `The degree of this expression is more than ${highestDegree.toLocaleString("en")}.`,
      {
        help: "Powers of powers and products of definitions multiply up.",
      },
    );
  }

  private shape(expression: Expression): Shape {
    const known = this.shapes.get(expression);
    if (known !== undefined) return known;
    let nodes = 1;
    let fixed = !["call", "sum", "product"].includes(expression.kind);
    for (const inner of innerExpressions(expression)) {
      const shape = this.shape(inner);
      nodes += shape.nodes;
      fixed &&= shape.fixed;
    }
    for (const item of itemsOf(expression)) {
      const shape = itemShape(item);
      nodes += shape.nodes;
      fixed &&= shape.fixed;
    }
    if (expression.kind === "power") fixed &&= isConstant(expression.exponent);
    for (const momenta of momentumSums(expression)) {
      nodes += momenta.length;
      fixed &&= momenta.every((momentum) =>
        momentum.kind === "single"
          ? momenta.length === 1 || isBare(momentum.index)
          : isBare(momentum.from) && isBare(momentum.to),
      );
    }
    // All images cost the same; nested ones multiply up here without being gone through.
    if (expression.kind === "cyc") nodes *= this.extent.n;
    if (expression.kind === "sym") nodes *= permutations(this.extent.loops).length;
    const shape = { nodes, fixed };
    this.shapes.set(expression, shape);
    return shape;
  }

  /** Takes the steps of one evaluation and returns the degree, 0 for numbers. */
  private walk(expression: Expression, place: Place): number {
    const { nodes, fixed } = this.shape(expression);
    this.take(fixed ? nodes : 1);
    return fixed ? this.fixedDegree(expression, place) : this.openDegree(expression, place);
  }

  /** The degree of an expression that is the same everywhere, found once. */
  private fixedDegree(expression: Expression, place: Place): number {
    const known = this.fixedDegrees.get(expression);
    if (known !== undefined) return known;
    const degree = this.combine(expression, place, (inner) => this.fixedDegree(inner, place));
    this.fixedDegrees.set(expression, degree);
    return degree;
  }

  /** The degree from those of the parts. */
  private combine(expression: Expression, place: Place, of: (inner: Expression) => number): number {
    switch (expression.kind) {
      case "integer":
        // About four digits weigh as much as a bracket.
        return expression.value.length >> 2;
      case "index":
        return 0;
      case "add":
        return expression.summands.reduce((highest, summand) => Math.max(highest, of(summand)), 0);
      case "negate":
        return of(expression.operand);
      case "cyc":
      case "sym":
        return of(expression.body);
      case "multiply":
        return this.degree(
          expression.factors.reduce((sum, factor) => sum + of(factor), 0),
          expression.span,
        );
      case "divide":
        return this.degree(of(expression.numerator) + of(expression.denominator), expression.span);
      case "power": {
        const size = this.exponent(expression.exponent, place);
        return this.degree(size * of(expression.base), expression.span);
      }
      default:
        return 1;
    }
  }

  private openDegree(expression: Expression, place: Place): number {
    switch (expression.kind) {
      case "sum":
        return this.over(expression, place, false);
      case "product":
        return this.over(expression, place, true);
      case "cyc":
        return this.images(expression.body, cyclicPlaces(place, this.extent.n));
      case "sym":
        return this.images(expression.body, symmetricPlaces(place, this.extent.loops));
      case "call":
        return this.use(expression.name, expression.arguments, place);
      case "string":
      case "mandelstam":
        for (const momenta of momentumSums(expression)) {
          this.take(momenta.length);
          this.take(this.extent.n);
          const span: Span = [momenta[0]!.span[0], momenta.at(-1)!.span[1]];
          if (this.reported.has(span.join())) continue;
          if (reportRepeated(momenta, place.bindings, this.extent.n, this.faults)) this.reported.add(span.join());
        }
        return 1;
      default: {
        for (const item of itemsOf(expression)) this.walkItem(item, place);
        return this.combine(expression, place, (inner) => this.walk(inner, place));
      }
    }
  }

  private walkItem(item: Item, place: Place): void {
    this.take(1);
    if (item.kind === "named") this.use(item.name, item.arguments, place);
    for (const operand of operandsOf(item)) {
      if (operand.kind === "group") for (const inner of operand.items) this.walkItem(inner, place);
    }
  }

  /** One use of a definition; its body is gone through at the first use with these arguments at this place. */
  private use(name: string, values: readonly IndexExpression[], place: Place): number {
    // Arguments and a key are made anew at each use, which takes longer than a step of arithmetic.
    this.take(20 + 4 * values.length);
    const definition = this.definitions.get(name)!;
    const at = definitionPlace(definition, values, place, this.extent.n);
    const key = `${name}(${definition.parameters.map((parameter) => at.bindings.get(parameter)).join()})${at.shift}:${at.permutation.join("")}`;
    const known = this.degrees.get(key);
    if (known !== undefined) return known;
    this.take(16);
    let degree = 1;
    const { value } = definition;
    if (value.kind === "scalar") degree = this.walk(value.expression, at);
    else if (value.geometry.kind === "meet") this.walkItem(value.geometry, at);
    else for (const item of value.geometry.items) this.walkItem(item, at);
    this.degrees.set(key, degree);
    return degree;
  }

  /** Everything a `sum` or `prod` runs over: the highest degree of a sum, the total degree of a product. */
  private over(quantified: Quantified, place: Place, isProduct: boolean): number {
    const count = countBindings(quantified, place.bindings, mostTerms, this.budget);
    if (count > mostTerms) {
      this.faults.fatal(
        "limit-terms",
        quantified.span,
        `This runs over more than ${mostTerms.toLocaleString("en")} values at n = ${this.extent.n}.`,
        { help: "Bound the indices more narrowly." },
      );
    }
    this.take(count + 1);
    const { nodes, fixed } = this.shape(quantified.body);
    if (count === 0) return 0;
    if (fixed) {
      this.take(count * nodes);
      const degree = this.fixedDegree(quantified.body, place);
      return isProduct ? this.degree(count * degree, quantified.span) : degree;
    }
    let degree = 0;
    for (const bindings of enumerateBindings(quantified, place.bindings)) {
      const inner = this.walk(quantified.body, { ...place, bindings });
      degree = isProduct ? this.degree(degree + inner, quantified.span) : Math.max(degree, inner);
    }
    return degree;
  }

  /** The images that `cyc` or `sym` adds up, of a body that is not the same at all of them. */
  private images(body: Expression, places: readonly Place[]): number {
    this.take(4 * places.length);
    return places.reduce((most, at) => Math.max(most, this.walk(body, at)), 0);
  }

  /** The size of an exponent at this place; one that is too large is reported. */
  private exponent(expression: Expression, place: Place): number {
    const value = evaluateNumber(expression, place.bindings);
    const size = value < 0n ? -value : value;
    if (size <= BigInt(largestExponent)) return Number(size);
    if (this.isNew(expression.span)) {
      this.faults.add(
        "limit-exponent",
        expression.span,
        `This exponent is ${size > 10n ** 20n ? "far" : value} at n = ${this.extent.n}; an exponent is at most ${largestExponent.toLocaleString("en")} in size.`,
      );
    }
    return 1;
  }

  private isNew(span: Span): boolean {
    const key = span.join();
    if (this.reported.has(key)) return false;
    this.reported.add(key);
    return true;
  }
}

/** Whether a label or number is the same for all values of the indices. */
const isBare = ({ terms }: IndexExpression): boolean => terms.every(({ name }) => name === "n");

function isConstant(exponent: Expression): boolean {
  return (exponent.kind !== "index" || exponent.name === "n") && innerExpressions(exponent).every(isConstant);
}

/** Nodes of an item; it is fixed unless a named point, line or plane is in it. */
function itemShape(item: Item): Shape {
  let nodes = 1;
  let fixed = item.kind !== "named";
  for (const operand of operandsOf(item)) {
    if (operand.kind === "bar") nodes += 1;
    else {
      for (const inner of operand.items) {
        const shape = itemShape(inner);
        nodes += shape.nodes;
        fixed &&= shape.fixed;
      }
    }
  }
  return { nodes, fixed };
}

/**
 * Reports where evaluating a formula, already free of the faults that `validate` finds without evaluating, takes too many steps or
 * meets an exponent or a sum of momenta that is not allowed. @throws stop after the report of a limit.
 */
export function checkWork(formula: Formula, extent: Extent, faults: Faults): void {
  new Walker(formula, extent, faults).check();
}

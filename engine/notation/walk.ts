/** The parts of a node, for everything that goes through a whole tree. */
import type { Expression, Formula, IndexExpression, Item, Momentum, Operand } from "./tree";

/** The expressions directly inside an expression, exponents included. */
export function innerExpressions(expression: Expression): readonly Expression[] {
  switch (expression.kind) {
    case "add":
      return expression.summands;
    case "negate":
      return [expression.operand];
    case "multiply":
      return expression.factors;
    case "divide":
      return [expression.numerator, expression.denominator];
    case "power":
      return [expression.base, expression.exponent];
    case "sum":
    case "product":
    case "cyc":
    case "sym":
      return [expression.body];
    default:
      return [];
  }
}

/** The items of a bracket; empty for everything else. */
export function itemsOf(expression: Expression): readonly Item[] {
  switch (expression.kind) {
    case "four":
    case "five":
    case "delta":
    case "angle":
      return expression.items;
    default:
      return [];
  }
}

/** The sums of momenta in an expression: the middle entries of a string, the argument of s( ). */
export function momentumSums(expression: Expression): readonly (readonly Momentum[])[] {
  if (expression.kind === "string") return expression.middle;
  return expression.kind === "mandelstam" ? [expression.momenta] : [];
}

/** The operands of a meet; empty for every other item. */
export const operandsOf = (item: Item): readonly Operand[] => (item.kind === "meet" ? [item.left, item.right] : []);

/** All expressions of a tree, each before what is inside it. */
export function* everyExpression(root: Expression): Generator<Expression> {
  const stack: Expression[] = [root];
  for (let top = stack.pop(); top !== undefined; top = stack.pop()) {
    yield top;
    const inner = innerExpressions(top);
    for (let at = inner.length - 1; at >= 0; at -= 1) stack.push(inner[at]!);
  }
}

/** All items among these, each before what is inside it. */
export function* everyItem(items: readonly Item[]): Generator<Item> {
  const stack: Item[] = [...items].reverse();
  for (let top = stack.pop(); top !== undefined; top = stack.pop()) {
    yield top;
    for (const operand of operandsOf(top)) if (operand.kind === "group") stack.push(...operand.items);
  }
}

/** The roots of a formula: the expressions of scalar definitions and of the formula, and the items of the others. */
export function rootsOf(formula: Formula): { expressions: Expression[]; items: Item[] } {
  const expressions: Expression[] = [];
  const items: Item[] = [];
  for (const { value } of formula.definitions) {
    if (value.kind === "scalar") expressions.push(value.expression);
    else if (value.geometry.kind === "meet") items.push(value.geometry);
    else items.push(...value.geometry.items);
  }
  expressions.push(formula.expression);
  return { expressions, items };
}

/** The labels that stand directly in an expression, outside its items: ends of strings, momenta, dual points. */
export function labelsOf(expression: Expression): readonly IndexExpression[] {
  const momenta = (sum: readonly Momentum[]): IndexExpression[] =>
    sum.flatMap((momentum) => (momentum.kind === "single" ? [momentum.index] : [momentum.from, momentum.to]));
  const ends = (points: readonly { kind: string; index?: IndexExpression }[]): IndexExpression[] =>
    points.flatMap(({ index }) => (index === undefined ? [] : [index]));
  switch (expression.kind) {
    case "square":
      return ends([expression.left, expression.right]);
    case "string":
      return [...ends([expression.first, expression.last]), ...expression.middle.flatMap(momenta)];
    case "mandelstam":
      return momenta(expression.momenta);
    case "distance":
      return ends([expression.left, expression.right]);
    default:
      return [];
  }
}

/** The labels directly in an item: itself, or the label of a bar. */
export function labelsOfItem(item: Item): readonly IndexExpression[] {
  if (item.kind === "label") return [item.index];
  return operandsOf(item).flatMap((operand) => (operand.kind === "bar" ? [operand.index] : []));
}

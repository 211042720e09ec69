/** Prints a tree in the plain notation: parsing the text gives the tree back, up to spans. */
import { loopWords } from "./reader";
import type {
  Condition,
  Definition,
  DualPoint,
  Expression,
  Formula,
  IndexExpression,
  Item,
  Momentum,
  Operand,
  Quantified,
  SpinorEnd,
} from "./tree";

/** How tightly an expression holds together; one that stands where something tighter is needed gets parentheses. */
const tightness = { sum: 0, product: 1, factor: 2, primary: 3 } as const;
type Tightness = (typeof tightness)[keyof typeof tightness];

function tightnessOf(expression: Expression): Tightness {
  switch (expression.kind) {
    case "add":
    case "negate":
      return tightness.sum;
    case "multiply":
    case "divide":
    case "sum":
      return tightness.product;
    case "power":
    case "product":
      return tightness.factor;
    default:
      return tightness.primary;
  }
}

/** One part of an index expression with its sign: `+i`, `-2*j`, `+3`. */
const part = (factor: string, name: string): string => {
  const size = factor.replace("-", "");
  return `${factor.startsWith("-") ? "-" : "+"}${size === "1" ? "" : `${size}*`}${name}`;
};

/** An index expression where a sign may begin it: bounds and arguments. */
export function printIndex({ terms, constant }: IndexExpression): string {
  const parts = terms.map(({ name, factor }) => part(factor, name));
  if (constant !== "0" || parts.length === 0) parts.push(constant.startsWith("-") ? constant : `+${constant}`);
  return parts.join("").replace(/^\+/, "");
}

/** An index expression as a label, which begins with a name or number. */
export function printLabel(index: IndexExpression): string {
  const text = printIndex(index);
  if (!text.startsWith("-")) return text;
  const names = index.terms.map(({ name, factor }) => part(factor, name)).join("");
  return index.constant.startsWith("-") ? `0${text}` : `${index.constant}${names}`;
}

const printArguments = (values: readonly IndexExpression[]): string =>
  values.length === 0 ? "" : `(${values.map(printIndex).join(", ")})`;

const printOperand = (operand: Operand): string => {
  if (operand.kind === "bar") return `bar(${printIndex(operand.index)})`;
  const [only] = operand.items;
  const bare =
    operand.items.length === 1 &&
    (only?.kind === "loopLine" || only?.kind === "referenceLine" || only?.kind === "named");
  return bare ? printItems(operand.items) : `(${printItems(operand.items)})`;
};

/** An item of a bracket, or a meet on its own. */
export function printItem(item: Item): string {
  switch (item.kind) {
    case "label":
      return printLabel(item.index);
    case "loopPoint":
      return item.letter;
    case "loopLine":
      return loopWords[item.loop]!;
    case "referenceTwistor":
      return "*";
    case "referenceLine":
      return "X";
    case "meet":
      return `${printOperand(item.left)} cap ${printOperand(item.right)}`;
    case "named":
      return `${item.name}${printArguments(item.arguments)}`;
  }
}

const printItems = (items: readonly Item[]): string => items.map(printItem).join(" ");

const printEnd = (end: SpinorEnd): string => (end.kind === "label" ? printLabel(end.index) : "*");
const printDual = (point: DualPoint): string =>
  point.kind === "label" ? printLabel(point.index) : loopWords[point.loop]!;
const printMomentum = (momentum: Momentum): string =>
  momentum.kind === "single" ? printLabel(momentum.index) : `${printLabel(momentum.from)}..${printLabel(momentum.to)}`;

const printCondition = ({ expressions, relations }: Condition): string =>
  expressions
    .map((expression, at) => (at === 0 ? printIndex(expression) : `${relations[at - 1]} ${printIndex(expression)}`))
    .join(" ");

const printHead = ({ indices, conditions }: Quantified): string =>
  `(${indices.join(", ")} : ${conditions.map(printCondition).join(", ")})`;

/** Parentheses where the expression is looser than its place allows. */
function printAt(expression: Expression, least: Tightness): string {
  const text = printExpression(expression);
  return tightnessOf(expression) < least ? `(${text})` : text;
}

/**
 * A factor of a product. A `sum` takes all that follows it, so only the last factor of a whole product may be one; a quotient may only come first.
 */
function printFactor(factor: Expression, isFirst: boolean, isLast: boolean): string {
  const stands = (factor.kind === "divide" && isFirst) || (factor.kind === "sum" && isLast);
  return stands ? printExpression(factor) : printAt(factor, tightness.factor);
}

const isFraction = (expression: Expression): boolean =>
  expression.kind === "divide" && expression.numerator.kind === "integer" && expression.denominator.kind === "integer";

/** A product; `open` tells that nothing follows it, so that its last factor may be a `sum`. */
function printProduct(factors: readonly Expression[], open: boolean): string {
  let text = "";
  factors.forEach((factor, at) => {
    const next = printFactor(factor, at === 0, open && at === factors.length - 1);
    if (at === 0) {
      text = next;
      return;
    }
    const afterQuotient = at === 1 && factors[0]!.kind === "divide" && !isFraction(factors[0]!);
    // An integer, and s or x2 before a parenthesis, would be read as something else without the sign.
    if (afterQuotient || /^\d/.test(next) || (/\b(s|x2)$/.test(text) && next.startsWith("("))) text += ` * ${next}`;
    else if (/[>\]]$/.test(text) && /^[<[]/.test(next)) text += next;
    else text += ` ${next}`;
  });
  return text;
}

function printQuotient(numerator: Expression, denominator: Expression): string {
  const above =
    numerator.kind === "multiply"
      ? printProduct(numerator.factors, false)
      : numerator.kind === "divide"
        ? printExpression(numerator)
        : printAt(numerator, tightness.factor);
  const below = printAt(denominator, tightness.factor);
  return numerator.kind === "integer" && denominator.kind === "integer" ? `${above}/${below}` : `${above} / ${below}`;
}

function printPower(base: Expression, exponent: Expression): string {
  const plain = exponent.kind === "integer" || exponent.kind === "index";
  return `${printAt(base, tightness.primary)}^${plain ? printExpression(exponent) : `(${printExpression(exponent)})`}`;
}

function printSummands(summands: readonly Expression[]): string {
  return summands
    .map((summand, at) => {
      const isNegative = summand.kind === "negate";
      if (at === 0) return isNegative ? printExpression(summand) : printAt(summand, tightness.product);
      return isNegative ? ` - ${printNegated(summand.operand)}` : ` + ${printAt(summand, tightness.product)}`;
    })
    .join("");
}

/** What follows a minus sign: a product, or another negative. */
const printNegated = (operand: Expression): string =>
  operand.kind === "negate" ? printExpression(operand) : printAt(operand, tightness.product);

const left = { angle: "<", square: "[" } as const;
const right = { angle: ">", square: "]" } as const;

/** An expression in the plain notation, on one line. */
export function printExpression(expression: Expression): string {
  switch (expression.kind) {
    case "integer":
      return expression.value;
    case "index":
      return expression.name;
    case "add":
      return printSummands(expression.summands);
    case "negate":
      return `-${printNegated(expression.operand)}`;
    case "multiply":
      return printProduct(expression.factors, true);
    case "divide":
      return printQuotient(expression.numerator, expression.denominator);
    case "power":
      return printPower(expression.base, expression.exponent);
    case "sum":
      return `sum${printHead(expression)} ${printAt(expression.body, tightness.product)}`;
    case "product":
      return `prod${printHead(expression)} ${printAt(expression.body, tightness.factor)}`;
    case "cyc":
    case "sym":
      return `${expression.kind}(${printExpression(expression.body)})`;
    case "call":
      return `${expression.name}${printArguments(expression.arguments)}`;
    case "unknown":
      return `?${expression.name}${printArguments(expression.arguments)}`;
    case "four":
    case "angle":
      return `<${printItems(expression.items)}>`;
    case "five":
      return `[${printItems(expression.items)}]`;
    case "delta":
      return `delta(${printItems(expression.items)})`;
    case "square":
      return `[${printEnd(expression.left)} ${printEnd(expression.right)}]`;
    case "string": {
      const middle = expression.middle.map((momenta) => momenta.map(printMomentum).join("+")).join("|");
      return `${left[expression.left]}${printEnd(expression.first)}|${middle}|${printEnd(expression.last)}${right[expression.right]}`;
    }
    case "mandelstam":
      return `s(${expression.momenta.map(printMomentum).join(" ")})`;
    case "distance":
      return `x2(${printDual(expression.left)} ${printDual(expression.right)})`;
  }
}

/** A definition in the plain notation, with its semicolon. */
export function printDefinition({ name, parameters, value }: Definition): string {
  const head = parameters.length === 0 ? name : `${name}(${parameters.join(", ")})`;
  if (value.kind === "scalar") return `let ${head} = ${printExpression(value.expression)};`;
  const { geometry } = value;
  return `let ${head} = ${geometry.kind === "meet" ? printItem(geometry) : `(${printItems(geometry.items)})`};`;
}

/** A formula in the plain notation: one definition on each line, then the expression. */
export function printFormula({ definitions, expression }: Formula): string {
  return [...definitions.map(printDefinition), printExpression(expression)].join("\n");
}

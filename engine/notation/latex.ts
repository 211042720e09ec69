/** Prints a tree as LaTeX, the way a paper prints it. */
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

/** A user's name: one letter as it is, longer ones upright, trailing digits as a subscript. */
export function latexName(name: string): string {
  const [, word = name, digits = ""] = /^(.*?[^\d_])_?(\d*)$/.exec(name) ?? [];
  const base = word.length === 1 ? word : `\\mathrm{${word.replaceAll("_", "\\_")}}`;
  return digits === "" ? base : `${base}_{${digits}}`;
}

/** One part of an index expression with its sign. */
const part = (factor: string, name: string): string => {
  const size = factor.replace("-", "");
  return `${factor.startsWith("-") ? "-" : "+"}${size === "1" ? "" : size}${latexName(name)}`;
};

/** An index expression: `i+1`, `2j-n`. */
function latexIndex({ terms, constant }: IndexExpression): string {
  const parts = terms.map(({ name, factor }) => part(factor, name));
  if (constant !== "0" || parts.length === 0) parts.push(constant.startsWith("-") ? constant : `+${constant}`);
  return parts.join("").replace(/^\+/, "");
}

/** A label inside a bracket, its operator without the space of an operator. */
const latexLabel = (index: IndexExpression): string => latexIndex(index).replace(/(?<=.)([+-])/g, "{$1}");

const latexArguments = (values: readonly IndexExpression[]): string =>
  values.length === 0 ? "" : `(${values.map(latexIndex).join(",")})`;

function latexOperand(operand: Operand): string {
  if (operand.kind === "bar") return `\\bar{${latexIndex(operand.index)}}`;
  return `(${latexItems(operand.items)})`;
}

function latexItem(item: Item): string {
  switch (item.kind) {
    case "label":
      return latexLabel(item.index);
    case "loopPoint":
      return item.letter;
    case "loopLine":
      return loopWords[item.loop]!;
    case "referenceTwistor":
      return "\\ast";
    case "referenceLine":
      return "X";
    case "meet":
      return `${latexOperand(item.left)}\\cap ${latexOperand(item.right)}`;
    case "named":
      return `${latexName(item.name)}${latexArguments(item.arguments)}`;
  }
}

const latexItems = (items: readonly Item[]): string => items.map(latexItem).join("\\,");
const latexEnd = (end: SpinorEnd): string => (end.kind === "label" ? latexLabel(end.index) : "\\ast");

/** A sum of momenta in a spinor string. */
const latexMomentum = (momentum: Momentum): string =>
  momentum.kind === "single"
    ? latexLabel(momentum.index)
    : `${latexLabel(momentum.from)}{+}{\\cdots}{+}${latexLabel(momentum.to)}`;

/** The subscript of s: digits run together, anything longer is separated. */
function latexMandelstam(momenta: readonly Momentum[]): string {
  const digits = momenta.every(
    (momentum) =>
      momentum.kind === "single" && momentum.index.terms.length === 0 && momentum.index.constant.length === 1,
  );
  const parts = momenta.map((momentum) =>
    momentum.kind === "single"
      ? latexIndex(momentum.index)
      : `${latexIndex(momentum.from)}\\ldots ${latexIndex(momentum.to)}`,
  );
  return `s_{${parts.join(digits ? "" : ",")}}`;
}

/** The dual points of x^2: loop lines are named by their letters. */
function latexDistance(left: DualPoint, right: DualPoint): string {
  const name = (point: DualPoint): string =>
    point.kind === "label" ? latexIndex(point.index) : `(${loopWords[point.loop]})`;
  const short = [left, right].every((point) => name(point).length === 1);
  return `x^{2}_{${name(left)}${short ? "" : ","}${name(right)}}`;
}

const relations = { "<": "<", "<=": "\\le ", "=": "=", "!=": "\\ne " } as const;

const latexCondition = ({ expressions, relations: chain }: Condition): string =>
  expressions.map((expression, at) => `${at === 0 ? "" : relations[chain[at - 1]!]}${latexIndex(expression)}`).join("");

/** `\sum` with its conditions under it, one above the other. */
function latexHead(sign: "\\sum" | "\\prod", { conditions, indices }: Quantified): string {
  const lines = conditions.map(latexCondition);
  const named = conditions.flatMap(({ expressions }) =>
    expressions.flatMap(({ terms }) => terms.map(({ name }) => name)),
  );
  const free = indices.filter((index) => !named.includes(index)).map(latexName);
  const all = [...lines, ...free];
  return `${sign}_{${all.length === 1 ? all[0] : `\\substack{${all.join("\\\\ ")}}`}}`;
}

/** How tightly an expression holds together in print; a fraction is a block of its own. */
function looseness(expression: Expression): "sum" | "product" | "block" {
  switch (expression.kind) {
    case "add":
    case "negate":
      return "sum";
    case "multiply":
    case "sum":
    case "product":
      return "product";
    default:
      return "block";
  }
}

const parenthesised = (text: string): string => `\\left(${text}\\right)`;

/** A factor of a product; a `sum` stands without parentheses only at the end. */
function latexFactor(factor: Expression, isLast: boolean): string {
  const text = latexExpression(factor);
  if (factor.kind === "sum" || factor.kind === "product") return isLast ? text : parenthesised(text);
  return looseness(factor) === "block" ? text : parenthesised(text);
}

function latexProduct(factors: readonly Expression[]): string {
  return factors
    .map((factor, at) => {
      const text = latexFactor(factor, at === factors.length - 1);
      if (at === 0) return text;
      const before = factors[at - 1]!;
      // Numbers side by side would run together.
      if (/^[\d-]/.test(text) || (before.kind === "power" && /^[\d-]/.test(text))) return `\\cdot ${text}`;
      return `\\,${text}`;
    })
    .join("");
}

function latexPower(base: Expression, exponent: Expression): string {
  const text = latexExpression(base);
  const isWhole = [
    "integer",
    "index",
    "call",
    "unknown",
    "four",
    "five",
    "angle",
    "square",
    "string",
    "delta",
  ].includes(base.kind);
  const hasExponent = base.kind === "distance" || (base.kind === "call" && text.includes("_"));
  const below = isWhole && !hasExponent ? text : base.kind === "mandelstam" ? text : parenthesised(text);
  return `${below}^{${latexExpression(exponent)}}`;
}

function latexSummand(summand: Expression): string {
  const text = latexExpression(summand);
  return summand.kind === "add" ? parenthesised(text) : text;
}

/** What follows a minus sign. */
const latexNegated = (operand: Expression): string =>
  looseness(operand) === "sum" ? parenthesised(latexExpression(operand)) : latexExpression(operand);

function latexSum(summands: readonly Expression[]): string {
  return summands
    .map((summand, at) => {
      if (summand.kind === "negate") return `${at === 0 ? "-" : " - "}${latexNegated(summand.operand)}`;
      return at === 0 ? latexSummand(summand) : ` + ${latexSummand(summand)}`;
    })
    .join("");
}

const opening = { angle: "\\langle ", square: "[" } as const;
const closing = { angle: "\\rangle", square: "]" } as const;

/** An expression in LaTeX, for math mode, on one line. */
export function latexExpression(expression: Expression): string {
  switch (expression.kind) {
    case "integer":
      return expression.value;
    case "index":
      return latexName(expression.name);
    case "add":
      return latexSum(expression.summands);
    case "negate":
      return `-${latexNegated(expression.operand)}`;
    case "multiply":
      return latexProduct(expression.factors);
    case "divide":
      return `\\frac{${latexExpression(expression.numerator)}}{${latexExpression(expression.denominator)}}`;
    case "power":
      return latexPower(expression.base, expression.exponent);
    case "sum":
    case "product": {
      const body = latexExpression(expression.body);
      const loose =
        looseness(expression.body) === "sum" || (expression.kind === "product" && expression.body.kind === "multiply");
      return `${latexHead(expression.kind === "sum" ? "\\sum" : "\\prod", expression)} ${loose ? parenthesised(body) : body}`;
    }
    case "cyc":
      return `\\operatorname{cyc}${parenthesised(latexExpression(expression.body))}`;
    case "sym":
      return `\\operatorname{sym}${parenthesised(latexExpression(expression.body))}`;
    case "call":
      return `${latexName(expression.name)}${latexArguments(expression.arguments)}`;
    case "unknown":
      return `${latexName(expression.name)}^{?}${latexArguments(expression.arguments)}`;
    case "four":
    case "angle":
      return `\\langle ${latexItems(expression.items)}\\rangle`;
    case "five":
      return `[${latexItems(expression.items)}]`;
    case "delta":
      return `\\delta(${latexItems(expression.items)})`;
    case "square":
      return `[${latexEnd(expression.left)}\\,${latexEnd(expression.right)}]`;
    case "string": {
      const middle = expression.middle.map((momenta) => momenta.map(latexMomentum).join("{+}")).join("|");
      return `${opening[expression.left]}${latexEnd(expression.first)}|${middle}|${latexEnd(expression.last)}${closing[expression.right]}`;
    }
    case "mandelstam":
      return latexMandelstam(expression.momenta);
    case "distance":
      return latexDistance(expression.left, expression.right);
  }
}

/** A definition in LaTeX: its name, an equals sign with spaces around it, its value. */
export function latexDefinition({ name, parameters, value }: Definition): string {
  const head = `${latexName(name)}${parameters.length === 0 ? "" : `(${parameters.map(latexName).join(",")})`}`;
  if (value.kind === "scalar") return `${head} = ${latexExpression(value.expression)}`;
  return `${head} = ${value.geometry.kind === "meet" ? latexItem(value.geometry) : `(${latexItems(value.geometry.items)})`}`;
}

/** The summands of an expression with their signs, additions inside additions included. */
function* signedSummands(
  expression: Expression,
  negative: boolean,
): Generator<{ summand: Expression; negative: boolean }> {
  if (expression.kind === "add") for (const summand of expression.summands) yield* signedSummands(summand, negative);
  else if (expression.kind === "negate") yield* signedSummands(expression.operand, !negative);
  else yield { summand: expression, negative };
}

/**
 * A formula in LaTeX, one line for each definition and then one for each summand, in order. Every line is an expression of its own for math
 * mode; summands after the first begin with their sign.
 */
export function latexLines({ definitions, expression }: Formula): string[] {
  const lines = definitions.map(latexDefinition);
  let first = true;
  for (const { summand, negative } of signedSummands(expression, false)) {
    lines.push(`${negative ? "-" : first ? "" : "+"}${latexSummand(summand)}`);
    first = false;
  }
  return lines;
}

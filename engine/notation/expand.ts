/** The top-level terms of a formula at given n and L: sums, `cyc` and `sym` written out, products left as they are. */
import type { Span } from "../result";
import { enumerateBindings } from "./bindings";
import { type Bindings, bindingsFor, evaluateIndex } from "./indices";
import type { Definition, Expression, Formula, IndexExpression, Item, LoopNumber } from "./tree";

/** The size of the amplitude that a formula is written out for. */
export interface Extent {
  readonly n: number;
  readonly loops: number;
}

/**
 * Where in the writing-out an expression stands. A label is evaluated with the bindings and then moved on by `shift` legs;
 * loop line l of the text is line permutation[l]; numbers are never moved.
 */
export interface Place {
  readonly bindings: Bindings;
  readonly shift: number;
  readonly permutation: readonly LoopNumber[];
}

/** One top-level term: sign times the expression at its place. */
export interface Term extends Place {
  readonly expression: Expression;
  readonly sign: 1 | -1;
  /** The source of the innermost expression, which may lie in a definition. */
  readonly span: Span;
}

/** Where the whole formula stands: nothing moved, no name known but n. */
export function startingPlace({ n, loops }: Extent): Place {
  return { bindings: bindingsFor(n), shift: 0, permutation: permutations(loops)[0]! };
}

/** The L! orders of the loop lines 0..L-1 in lexicographic order, the identity first; one empty order for L = 0. */
export function permutations(loops: number): readonly (readonly LoopNumber[])[] {
  let orders: LoopNumber[][] = [[]];
  for (let length = 1; length <= loops; length += 1) {
    orders = orders.flatMap((order) =>
      Array.from({ length: loops }, (_, line) => line as LoopNumber)
        .filter((line) => !order.includes(line))
        .map((line) => [...order, line]),
    );
  }
  return orders;
}

/** The places that `cyc` puts its body at: moved on by 0, 1, ... n-1 legs more. */
export function cyclicPlaces(place: Place, n: number): Place[] {
  return Array.from({ length: n }, (_, step) => ({ ...place, shift: (place.shift + step) % n }));
}

/** The places that `sym` puts its body at. A `sym` inside acts first: line l becomes inner[l], and that becomes outer[inner[l]]. */
export function symmetricPlaces(place: Place, loops: number): Place[] {
  return permutations(loops).map((inner) => ({
    ...place,
    permutation: inner.map((line) => place.permutation[line]!),
  }));
}

/** The place of a definition's body where it is used with these arguments: only n and its parameters have values there. */
export function definitionPlace(
  definition: Definition,
  values: readonly IndexExpression[],
  place: Place,
  n: number,
): Place {
  const bindings = new Map(bindingsFor(n));
  definition.parameters.forEach((name, at) => {
    bindings.set(name, evaluateIndex(values[at]!, place.bindings));
  });
  return { ...place, bindings };
}

/** Whether an item means the same wherever it stands, as long as nothing moves it: a label without indices, or a name without arguments. */
const isFixedItem = (item: Item): boolean =>
  item.kind === "label" ? item.index.terms.length === 0 : item.kind === "named" && item.arguments.length === 0;

/** Whether items have one meaning in the whole formula: they hold no index, and neither `cyc` nor `sym` moves them at this place. */
export const areFixed = (items: readonly Item[], { shift, permutation }: Place): boolean =>
  shift === 0 && permutation.length < 2 && items.every(isFixedItem);

/** The definitions of a formula by name. */
export function definitionsOf(formula: Formula): ReadonlyMap<string, Definition> {
  return new Map(formula.definitions.map((definition) => [definition.name, definition]));
}

/** The expression that a scalar definition stands for. @throws Error for a point, line or plane, which the parser rules out. */
export function scalarBody(definitions: ReadonlyMap<string, Definition>, name: string): Expression {
  const value = definitions.get(name)?.value;
  if (value?.kind !== "scalar") throw new Error(`scalarBody: expected ${name} to be defined as a scalar`);
  return value.expression;
}

/** Whether an expression is written out at the top: a sum of any kind, its negative, or the name of one. */
export function isWrittenOut(expression: Expression, definitions: ReadonlyMap<string, Definition>): boolean {
  let inner = expression;
  for (;;) {
    if (inner.kind === "negate") inner = inner.operand;
    else if (inner.kind === "call") inner = scalarBody(definitions, inner.name);
    else return inner.kind === "add" || inner.kind === "sum" || inner.kind === "cyc" || inner.kind === "sym";
  }
}

type Work = Omit<Term, "span">;

function* scopes(work: Work, quantified: Extract<Expression, { kind: "sum" }>): Generator<Work> {
  for (const bindings of enumerateBindings(quantified, work.bindings)) {
    yield { ...work, expression: quantified.body, bindings };
  }
}

function* list(items: readonly Work[]): Generator<Work> {
  yield* items;
}

/**
 * The top-level terms in the order written: additions, `sum` (ascending in its first index, then the second ...), `cyc` (by shift), `sym`
 * (by permutation) and scalar definitions that are such sums are written out; a product, quotient or power is one term.
 * The formula must have been validated for this n and L, which bounds their number.
 */
export function* expandTerms(formula: Formula, extent: Extent): Generator<Term> {
  const definitions = definitionsOf(formula);
  const start: Work = { ...startingPlace(extent), expression: formula.expression, sign: 1 };
  const stack: Generator<Work>[] = [list([start])];
  for (let top = stack.at(-1); top !== undefined; top = stack.at(-1)) {
    const next = top.next();
    if (next.done) {
      stack.pop();
      continue;
    }
    const work = next.value;
    const { expression, sign } = work;
    switch (expression.kind) {
      case "add":
        stack.push(list(expression.summands.map((summand) => ({ ...work, expression: summand }))));
        break;
      case "negate":
        stack.push(list([{ ...work, expression: expression.operand, sign: sign === 1 ? -1 : 1 }]));
        break;
      case "sum":
        stack.push(scopes(work, expression));
        break;
      case "cyc":
        stack.push(list(cyclicPlaces(work, extent.n).map((at) => ({ ...at, expression: expression.body, sign }))));
        break;
      case "sym":
        stack.push(
          list(symmetricPlaces(work, extent.loops).map((at) => ({ ...at, expression: expression.body, sign }))),
        );
        break;
      case "call":
        if (isWrittenOut(expression, definitions)) {
          const definition = definitions.get(expression.name)!;
          const at = definitionPlace(definition, expression.arguments, work, extent.n);
          stack.push(list([{ ...at, expression: scalarBody(definitions, expression.name), sign }]));
          break;
        }
        yield { ...work, span: expression.span };
        break;
      default:
        yield { ...work, span: expression.span };
    }
  }
}

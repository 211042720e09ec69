/** Constructors of syntax-tree nodes for formulas that nobody typed: every span is empty. */
import type {
  Condition,
  Definition,
  DefinitionValue,
  Expression,
  IndexExpression,
  Item,
  LoopNumber,
  MeetItem,
  Operand,
  Relation,
} from "../notation/tree";

const span = [0, 0] as const;

/** The label or bound `name + constant`, or a bare number where `name` is null. */
export const index = (name: string | null, constant = 0): IndexExpression => ({
  terms: name === null ? [] : [{ name, factor: "1" }],
  constant: String(constant),
  span,
});

export const label = (name: string | null, constant = 0): Item => ({
  kind: "label",
  index: index(name, constant),
  span,
});
export const loopLine = (loop: LoopNumber): Item => ({ kind: "loopLine", loop, span });
export const referenceTwistor: Item = { kind: "referenceTwistor", span };
export const referenceLine: Item = { kind: "referenceLine", span };
export const named = (name: string): Item => ({ kind: "named", name, arguments: [], span });

export const group = (items: readonly Item[]): Extract<Operand, { kind: "group" }> => ({ kind: "group", items, span });
export const bar = (name: string): Operand => ({ kind: "bar", index: index(name), span });
export const meet = (left: Operand, right: Operand): MeetItem => ({ kind: "meet", left, right, span });

export const four = (...items: readonly Item[]): Expression => ({ kind: "four", items, span });
export const five = (...items: readonly Item[]): Expression => ({ kind: "five", items, span });
export const integer = (value: number): Expression => ({ kind: "integer", value: String(value), span });
export const call = (name: string, ...parameters: readonly IndexExpression[]): Expression => ({
  kind: "call",
  name,
  arguments: parameters,
  span,
});
export const square = (base: Expression): Expression => ({ kind: "power", base, exponent: integer(2), span });
export const divide = (numerator: Expression, denominator: Expression): Expression => ({
  kind: "divide",
  numerator,
  denominator,
  span,
});

/** The product of one or more factors. */
export const multiply = (factors: readonly Expression[]): Expression =>
  factors.length === 1 ? factors[0]! : { kind: "multiply", factors, span };

/** The sum of one or more summands. */
export const add = (summands: readonly Expression[]): Expression =>
  summands.length === 1 ? summands[0]! : { kind: "add", summands, span };

/** The condition e0 r0 e1 r1 e2 ... */
export const chain = (
  first: IndexExpression,
  ...rest: readonly (readonly [Relation, IndexExpression])[]
): Condition => ({
  expressions: [first, ...rest.map(([, expression]) => expression)],
  relations: rest.map(([relation]) => relation),
  span,
});

export const sum = (indices: readonly string[], conditions: readonly Condition[], body: Expression): Expression => ({
  kind: "sum",
  indices,
  conditions,
  body,
  span,
});

export const define = (name: string, parameters: readonly string[], value: DefinitionValue): Definition => ({
  name,
  parameters,
  value,
  span,
});

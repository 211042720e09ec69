/**
 * The syntax tree of the notation. Plain JSON: integers are decimal strings, every node has its span in the source.
 *
 * The tree keeps what was written (definitions, sums, `cyc`, `sym` are not expanded). Grouping parentheses and comments are not
 * kept: the printer puts back the parentheses that are needed, and parse(print(tree)) equals the tree up to spans.
 */
import type { Span } from "../result";

/** Loop lines are numbered 0..3 for AB, CD, EF, GH. */
export type LoopNumber = 0 | 1 | 2 | 3;
export type LoopLetter = "A" | "B" | "C" | "D" | "E" | "F" | "G" | "H";

/**
 * An integer-linear expression sum(factor * name) + constant in indices and `n`, in order of first appearance, no zero factors.
 * As a label it is reduced modulo n to 1..n; as a number it is used as it is.
 */
export interface IndexExpression {
  readonly terms: readonly { readonly name: string; readonly factor: string }[];
  readonly constant: string;
  readonly span: Span;
}

export interface NamedItem {
  readonly kind: "named";
  readonly name: string;
  readonly arguments: readonly IndexExpression[];
  readonly span: Span;
}

/** A meet of a line and a plane (a point, one slot) or of two planes (a line, two slots). Operands in the order written. */
export interface MeetItem {
  readonly kind: "meet";
  readonly left: Operand;
  readonly right: Operand;
  readonly span: Span;
}

/** What can stand in a bracket. Slots: 1 for label, loopPoint, referenceTwistor; 2 for loopLine, referenceLine; meet and named as they are. */
export type Item =
  | { readonly kind: "label"; readonly index: IndexExpression; readonly span: Span }
  | { readonly kind: "loopPoint"; readonly letter: LoopLetter; readonly span: Span }
  | { readonly kind: "loopLine"; readonly loop: LoopNumber; readonly span: Span }
  | { readonly kind: "referenceTwistor"; readonly span: Span }
  | { readonly kind: "referenceLine"; readonly span: Span }
  | MeetItem
  | NamedItem;

/**
 * An operand of `cap`: items in parentheses with two slots (a line) or three (a plane), `bar(i)`, or, without parentheses, a loop word.
 * A bare loop word and a parenthesised one are the same tree: a group with one item.
 */
export type Operand =
  | { readonly kind: "group"; readonly items: readonly Item[]; readonly span: Span }
  | { readonly kind: "bar"; readonly index: IndexExpression; readonly span: Span };

/** A momentum, or a cyclic range of momenta with both ends included. */
export type Momentum =
  | { readonly kind: "single"; readonly index: IndexExpression; readonly span: Span }
  | { readonly kind: "range"; readonly from: IndexExpression; readonly to: IndexExpression; readonly span: Span };

/** End of a spinor string or slot of a two-bracket of spinors. */
export type SpinorEnd =
  | { readonly kind: "label"; readonly index: IndexExpression; readonly span: Span }
  | { readonly kind: "referenceTwistor"; readonly span: Span };

export type Relation = "<" | "<=" | "=" | "!=";

/** `e0 r0 e1 r1 e2 ...`; relations.length = expressions.length - 1 >= 1. A chain that begins and ends with the same bare index is a cyclic order. */
export interface Condition {
  readonly expressions: readonly IndexExpression[];
  readonly relations: readonly Relation[];
  readonly span: Span;
}

export interface Quantified {
  readonly indices: readonly string[];
  readonly conditions: readonly Condition[];
  readonly body: Expression;
  readonly span: Span;
}

export type Expression =
  | { readonly kind: "integer"; readonly value: string; readonly span: Span }
  /** An index, `n`, or a parameter of a definition, used as a number. */
  | { readonly kind: "index"; readonly name: string; readonly span: Span }
  /** Two or more summands; subtraction is a summand of kind `negate`. */
  | { readonly kind: "add"; readonly summands: readonly Expression[]; readonly span: Span }
  | { readonly kind: "negate"; readonly operand: Expression; readonly span: Span }
  /** Two or more factors. */
  | { readonly kind: "multiply"; readonly factors: readonly Expression[]; readonly span: Span }
  | { readonly kind: "divide"; readonly numerator: Expression; readonly denominator: Expression; readonly span: Span }
  /** The exponent holds integers, indices, and + - * only, and is at most 1,000 in size wherever it is evaluated. */
  | { readonly kind: "power"; readonly base: Expression; readonly exponent: Expression; readonly span: Span }
  | ({ readonly kind: "sum" } & Quantified)
  | ({ readonly kind: "product" } & Quantified)
  | { readonly kind: "cyc"; readonly body: Expression; readonly span: Span }
  | { readonly kind: "sym"; readonly body: Expression; readonly span: Span }
  /** A scalar defined by `let`. */
  | {
      readonly kind: "call";
      readonly name: string;
      readonly arguments: readonly IndexExpression[];
      readonly span: Span;
    }
  /** An unknown rational number of an ansatz. */
  | {
      readonly kind: "unknown";
      readonly name: string;
      readonly arguments: readonly IndexExpression[];
      readonly span: Span;
    }
  /** <a b c d>: items with four slots. */
  | { readonly kind: "four"; readonly items: readonly Item[]; readonly span: Span }
  /** [a b c d e], the R-invariant: items with five slots. */
  | { readonly kind: "five"; readonly items: readonly Item[]; readonly span: Span }
  /** delta(a b c d e), the numerator of the R-invariant. */
  | { readonly kind: "delta"; readonly items: readonly Item[]; readonly span: Span }
  /** <a b>: items with two slots. */
  | { readonly kind: "angle"; readonly items: readonly Item[]; readonly span: Span }
  /** [a b]: external legs or `*`. */
  | { readonly kind: "square"; readonly left: SpinorEnd; readonly right: SpinorEnd; readonly span: Span }
  /** <a|P|...|b]: `left` and `right` say which bracket the end has; middle entries are non-empty sums of momenta. */
  | {
      readonly kind: "string";
      readonly left: "angle" | "square";
      readonly right: "angle" | "square";
      readonly first: SpinorEnd;
      readonly last: SpinorEnd;
      readonly middle: readonly (readonly Momentum[])[];
      readonly span: Span;
    }
  /** s(...), the square of a sum of momenta. */
  | { readonly kind: "mandelstam"; readonly momenta: readonly Momentum[]; readonly span: Span }
  /** x2(a b): squared distance of two dual points, each a label or a loop line. */
  | { readonly kind: "distance"; readonly left: DualPoint; readonly right: DualPoint; readonly span: Span };

export type DualPoint =
  | { readonly kind: "label"; readonly index: IndexExpression; readonly span: Span }
  | { readonly kind: "loopLine"; readonly loop: LoopNumber; readonly span: Span };

/** The value of a definition: a number, or a point, line or plane. A group of one slot is a point. */
export type DefinitionValue =
  | { readonly kind: "scalar"; readonly expression: Expression }
  | { readonly kind: "geometry"; readonly geometry: MeetItem | Extract<Operand, { kind: "group" }> };

export interface Definition {
  readonly name: string;
  readonly parameters: readonly string[];
  readonly value: DefinitionValue;
  readonly span: Span;
}

/** A whole formula: definitions in order, then one expression. */
export interface Formula {
  readonly definitions: readonly Definition[];
  readonly expression: Expression;
}

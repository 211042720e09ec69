/** What a formula is interpreted in: the walker goes through the tree, an algebra says what each construct is worth. */

/** A point (one slot) or a line that is not given by points (two slots). Equal ids are the same object, within one walk. */
export type Piece<P, L> =
  | { readonly slots: 1; readonly id: number; readonly value: P }
  | { readonly slots: 2; readonly id: number; readonly value: L };

export type PointPiece<P> = Extract<Piece<P, never>, { slots: 1 }>;

/** End of a spinor string or slot of `[a b]`: an external leg, or `*`. */
export type SpinorSlot = { readonly kind: "leg"; readonly label: number } | { readonly kind: "reference" };

/** A dual point: of an external leg 1..n, or of loop line 0..L-1. */
export type DualSlot =
  | { readonly kind: "leg"; readonly label: number }
  | { readonly kind: "loop"; readonly loop: number };

/** A spinor string with its momenta as lists of legs. */
export interface StringSlots {
  readonly left: "angle" | "square";
  readonly first: SpinorSlot;
  readonly middle: readonly (readonly number[])[];
  readonly last: SpinorSlot;
}

/**
 * V are values, P points, L lines. Labels are 1..n, loops 0..L-1, already shifted and permuted.
 * Any operation may throw `ZeroDenominator`; the walker knows the place.
 */
export interface Algebra<V, P, L> {
  integer(x: bigint): V;
  /** The sum of any number of values; of none it is zero. */
  add(values: readonly V[]): V;
  negate(value: V): V;
  /** The product of any number of values; of none it is one. */
  multiply(values: readonly V[]): V;
  divide(numerator: V, denominator: V): V;
  /** An integer power, exponent -1000..1000; the power 0 is one. */
  power(base: V, exponent: number): V;

  externalPoint(label: number): P;
  loopPoint(loop: number, which: 0 | 1): P;
  referenceTwistor(): P;
  referencePoint(which: 0 | 1): P;
  /** Where a line (pieces of two slots) meets a plane (three slots). */
  meetOfLineAndPlane(line: readonly Piece<P, L>[], plane: readonly Piece<P, L>[]): P;
  meetOfPlanes(first: readonly Piece<P, L>[], second: readonly Piece<P, L>[]): L;

  /** `<a b c d>`: pieces of four slots. */
  fourBracket(pieces: readonly Piece<P, L>[]): V;
  /** `[a b c d e]`, and its numerator alone: five points. */
  fiveBracket(points: readonly PointPiece<P>[]): V;
  delta(points: readonly PointPiece<P>[]): V;
  /** `<a b>`: pieces of two slots. */
  angleBracket(pieces: readonly Piece<P, L>[]): V;
  squareBracket(left: SpinorSlot, right: SpinorSlot): V;
  spinorString(string: StringSlots): V;
  mandelstam(legs: readonly number[]): V;
  dualDistance(left: DualSlot, right: DualSlot): V;
}

/** Thrown by an algebra where a denominator has no inverse. `explanation` is there where zero is not the whole story. */
export class ZeroDenominator extends Error {
  constructor(readonly explanation: string | null = null) {
    super(explanation ?? "a denominator vanishes");
  }
}

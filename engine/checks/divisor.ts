/** What a denominator vanishes with. */
import type { Place } from "../notation/expand";
import type { Expression } from "../notation/tree";
import type { Point } from "./brackets";

export type SpinorKind = "angle" | "square";

export interface Divisor {
  /** In the notation, but for a denominator that is a sum. */
  readonly text: string;
  readonly physical: boolean;
  readonly reference: boolean;
  /** The four points of a four-bracket, null for anything else. */
  readonly points: readonly Point[] | null;
  /** Brackets that divide the one of `points`: the divisor is what is left of it. */
  readonly without: readonly { readonly points: readonly Point[]; readonly power: number }[];
  /** Set for a denominator that is a sum: the expression itself and where it stands. */
  readonly written: { readonly expression: Expression; readonly place: Place } | null;
}

/** A divisor and the terms that have it in a denominator. */
export interface FoundPole {
  readonly divisor: Divisor;
  readonly terms: readonly number[];
}

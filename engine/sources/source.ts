/** What a source of truth is. A source shares nothing with the notation and the tape: agreement is then evidence. */
import type { Point } from "../kinematics/point";

/** Which function is asked for. `negativeLegs` (ascending, 1..n, k+2 of them) asks for a helicity component, null for the superamplitude. */
export interface Question {
  readonly n: number;
  readonly k: number;
  readonly loops: number;
  readonly negativeLegs: readonly number[] | null;
  readonly target: "amplitude" | "even" | "log" | "zero";
}

/**
 * Bounds on the value as a quotient N/D of polynomials with integer coefficients in all components of the point:
 * total degrees of N and D, and the base-2 logarithm of the sum of absolute values of the coefficients of each.
 */
export interface SizeBound {
  readonly degree: number;
  readonly denominatorDegree: number;
  readonly heightBits: number;
  readonly denominatorHeightBits: number;
}

export interface Source {
  /** As printed in reports: "on-shell recursion". */
  readonly name: string;
  /** The publication: arXiv id and title, or a journal reference. */
  readonly reference: string;
  /** Sources of one lineage share a method and are not independent of each other. */
  readonly lineage: string;
  covers(question: Question): boolean;
  /** Field operations for one point, an estimate from above; budgets are counted in these. */
  cost(question: Question): number;
  size(question: Question): SizeBound;
  /**
   * The value modulo a 31-bit prime (2^30 < prime < 2^31), residues in 0..prime-1; null where a denominator vanishes (draw another point).
   * @throws Error when the question is not covered.
   */
  evaluate(question: Question, point: Point<number>, prime: number): number | null;
}

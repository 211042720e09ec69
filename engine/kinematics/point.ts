/** A kinematic point: the values that a form is evaluated at. */

/** Four homogeneous components (lambda_1, lambda_2, mu_1, mu_2). */
export type Twistor<T> = readonly T[];

/** The vector of F^k that stands for eta^A of one leg, for each of the four flavours A: four rows of k. */
export type GrassmannVectors<T> = readonly (readonly T[])[];

/** n >= 4, 0 <= k <= n-4, loops >= 0. Which of the fields a form reads depends on what it is written in. */
export interface Point<T> {
  readonly n: number;
  readonly k: number;
  readonly loops: number;
  /** n twistors; label a is twistors[a-1]. */
  readonly twistors: readonly Twistor<T>[];
  /** n entries of four rows of k numbers (rows are empty for k = 0). */
  readonly chi: readonly GrassmannVectors<T>[];
  /** One pair of points for each loop line: [A, B], [C, D], ... */
  readonly lines: readonly (readonly [Twistor<T>, Twistor<T>])[];
  /** `*` */
  readonly referenceTwistor: Twistor<T>;
  readonly referenceChi: GrassmannVectors<T>;
  /** `X` */
  readonly referenceLine: readonly [Twistor<T>, Twistor<T>];
}

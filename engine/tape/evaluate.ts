/** Values of a tape at many points, by the kernel. */
import type { Point } from "../kinematics/point";
import { loadKernel } from "./kernel/kernel";
import {
  type Complex,
  complex,
  type KernelField,
  MERSENNE_31,
  mersenne31,
  mersenne61,
  montgomery31,
  real,
} from "./kernelFields";
import { type PointValue, type Progress, runTape, type Sample } from "./run";
import type { Tape } from "./tape";

/** A point with the prime it is given modulo, 2^30 < prime < 2^31; its numbers are residues in 0..prime-1. */
export interface PrimePoint {
  readonly point: Point<number>;
  readonly prime: number;
}

export interface EvaluateOptions {
  /** Whether the values of the top-level terms are wanted as well. */
  readonly terms?: boolean;
  /** Told after each slice, about 4,096 operations on a block of points. */
  readonly progress?: (progress: Progress) => void;
  /** Asked after each slice; true stops the evaluation. */
  readonly cancelled?: () => boolean;
}

/** Values in the order of the points, and how they were found. `values` is null when the evaluation was cancelled. */
export interface Evaluated<T> {
  readonly evaluator: "WebAssembly SIMD tape";
  readonly field: string;
  readonly values: readonly PointValue<T>[] | null;
}

/**
 * Values modulo 31-bit primes, one prime a point.
 * @throws KernelUnavailable without WebAssembly SIMD; Error for a prime out of range or a point of another size
 */
export function evaluateTape(
  tape: Tape,
  points: readonly PrimePoint[],
  options: EvaluateOptions = {},
): Evaluated<number> {
  for (const { prime } of points) {
    if (!(prime > 2 ** 30 && prime <= MERSENNE_31 && prime % 2 === 1)) {
      throw new Error(`evaluateTape: expected a prime between 2^30 and 2^31, got ${prime}`);
    }
  }
  const field = points.every(({ prime }) => prime === MERSENNE_31) ? mersenne31 : montgomery31;
  return drive(
    field,
    tape,
    points.map(({ point, prime }) => ({ point, parameter: prime })),
    options,
  );
}

const plain = <T>(points: readonly Point<T>[]): Sample<T, null>[] =>
  points.map((point) => ({ point, parameter: null }));

/** Values modulo 2^61-1, residues in 0..2^61-2. */
export const evaluateTapeModulo61 = (
  tape: Tape,
  points: readonly Point<bigint>[],
  options: EvaluateOptions = {},
): Evaluated<bigint> => drive(mersenne61, tape, plain(points), options);

/** Values in double precision: for physical numbers and pictures, never for decisions. */
export const evaluateTapeReal = (
  tape: Tape,
  points: readonly Point<number>[],
  options: EvaluateOptions = {},
): Evaluated<number> => drive(real, tape, plain(points), options);

export const evaluateTapeComplex = (
  tape: Tape,
  points: readonly Point<Complex>[],
  options: EvaluateOptions = {},
): Evaluated<Complex> => drive(complex, tape, plain(points), options);

function drive<T, P>(
  field: KernelField<T, P>,
  tape: Tape,
  samples: readonly Sample<T, P>[],
  { terms = false, progress, cancelled }: EvaluateOptions,
): Evaluated<T> {
  for (const { point } of samples) {
    if (point.n !== tape.n || point.k !== tape.k || point.loops !== tape.loops) {
      throw new Error(
        `evaluateTape: expected points for (${tape.n},${tape.k},${tape.loops}), got one for (${point.n},${point.k},${point.loops})`,
      );
    }
  }
  const run = runTape(loadKernel(), field, tape, samples, terms);
  for (let step = run.next(); ; step = run.next()) {
    if (step.done) return { evaluator: "WebAssembly SIMD tape", field: field.name, values: step.value };
    progress?.(step.value);
    if (cancelled?.()) return { evaluator: "WebAssembly SIMD tape", field: field.name, values: null };
  }
}

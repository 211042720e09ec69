/**
 * Signs on positive kinematics (1412.8478; MARKS "Positivity"), exact: external data from a totally positive matrix, the plane Y and
 * the loop lines from the rows of another one, and the four flavours of chi alike.
 */
import { type Randomness, randomness } from "../../fields";
import type { Point } from "../../kinematics";
import { interpretTape } from "../../tape";
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { type Fraction, fraction, fractions, signOf } from "./fractions";
import { notApplicable, onlyAmplitudes, untested } from "./lower";

export interface Signs {
  /** Of the sum and of every term, one entry for each sample. */
  readonly samples: readonly { readonly sum: number; readonly terms: readonly number[] }[];
}

const mostSamples = 20;
const fewestSamples = 4;
/** Multiplications of all samples together, and of one: they are of integers with thousands of digits. */
const samplesBudget = 12_000;
const sampleBudget = 40_000;

const known = new WeakMap<Bench, Signs | Mark>();

/** The signs at the samples, or why there are none; both marks of positivity share them. */
export function signsOf(bench: Bench): Signs | Mark {
  const found = known.get(bench) ?? findSigns(bench);
  known.set(bench, found);
  return found;
}

function findSigns(bench: Bench): Signs | Mark {
  const { n, k, loops } = bench.form;
  const other = onlyAmplitudes(bench);
  if (other !== null) return other;
  if (k + 2 * loops > n)
    return notApplicable(
      "Positive lines are rows of a matrix with n columns, and there are not enough for so many loops.",
    );
  const { operations, tape } = bench.prepared;
  if (operations > sampleBudget)
    return untested(
      `One sample would take ${operations.toLocaleString("en")} multiplications of long integers, more than ${sampleBudget.toLocaleString("en")}.`,
    );
  const count = Math.max(fewestSamples, Math.min(mostSamples, Math.floor(samplesBudget / Math.max(1, operations))));
  const random = randomness(`${bench.seed}|positive|${n} ${k} ${loops}`);
  const samples: { sum: number; terms: readonly number[] }[] = [];
  for (let draw = 0; draw < count; draw++) {
    const value = interpretTape<Fraction>(tape, fractions, positivePoint(n, k, loops, random));
    if (value.kind === "value") samples.push({ sum: signOf(value.sum), terms: value.terms.map(signOf) });
  }
  if (samples.length === 0) return untested("A denominator vanishes at every sample.");
  return { samples };
}

/** log-uniform over six decades, at least 1. */
const positive = (random: Randomness): bigint => 1n + random.below(10n ** random.below(7n));

type Matrix = readonly (readonly bigint[])[];

const product = (a: Matrix, b: Matrix): Matrix =>
  a.map((row) => b[0]!.map((_, j) => row.reduce((sum, x, i) => sum + x * b[i]![j]!, 0n)));

const matrix = (size: number, entry: (i: number, j: number) => bigint): Matrix =>
  Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_unused, j) => entry(i, j)));

/** A totally positive matrix, every minor positive: a product of bidiagonal factors with positive entries (Whitney, Loewner). */
export function totallyPositive(size: number, random: Randomness): Matrix {
  const one = (i: number, j: number): bigint => (i === j ? 1n : 0n);
  let whole = matrix(size, (i, j) => (i === j ? positive(random) : 0n));
  for (let width = 1; width < size; width++) {
    const below = matrix(size, (i, j) => (i === j + 1 && i >= width ? positive(random) : one(i, j)));
    const above = matrix(size, (i, j) => (j === i + 1 && j >= width ? positive(random) : one(i, j)));
    whole = product(product(below, whole), above);
  }
  return whole;
}

function determinant(rows: Matrix): bigint {
  const [first, ...rest] = rows;
  if (first === undefined) return 1n;
  return first.reduce((sum, x, j) => {
    const minor = determinant(rest.map((row) => row.filter((_, column) => column !== j)));
    return j % 2 === 0 ? sum + x * minor : sum - x * minor;
  }, 0n);
}

/**
 * Z_a in 4+k dimensions from T, Y = C Z with C the first k rows of U and the lines D_l Z with D_l the next rows, two each. With unit
 * vectors f_1..f_4, for which det(f; Y) is a minor of Y and positive, the coordinates of Z_a in (f, Y) are (Z_a | chi_a), here times
 * that minor.
 */
export function positivePoint(n: number, k: number, loops: number, random: Randomness): Point<Fraction> {
  const [t, u] = [totallyPositive(n, random), totallyPositive(n, random)];
  const external = Array.from({ length: n }, (_, a) => t.slice(0, 4 + k).map((row) => row[a]!));
  const combination = (row: readonly bigint[]): readonly bigint[] =>
    Array.from({ length: 4 + k }, (_, i) => row.reduce((sum, x, a) => sum + x * external[a]![i]!, 0n));
  const y = u.slice(0, k).map(combination);
  const block = y.map((row) => row.slice(4));
  const scale = determinant(block);
  const coordinates = (v: readonly bigint[]) => {
    const chi = y.map((_, j) => determinant(block.map((row, i) => (i === j ? v.slice(4) : row))));
    const z = [0, 1, 2, 3].map((i) => chi.reduce((sum, x, j) => sum - x * y[j]![i]!, scale * v[i]!));
    return { z: z.map((x) => fraction(x)), chi: [0, 1, 2, 3].map(() => chi.map((x) => fraction(x))) };
  };
  const any = (length: number): Fraction[] =>
    Array.from({ length }, () => fraction(random.below(2_000_001n) - 1_000_000n));
  const legs = external.map(coordinates);
  const line = (l: number) => [0, 1].map((end) => coordinates(combination(u[k + 2 * l + end]!)).z);
  return {
    n,
    k,
    loops,
    twistors: legs.map(({ z }) => z),
    chi: legs.map(({ chi }) => chi),
    lines: Array.from({ length: loops }, (_, l) => line(l) as [Fraction[], Fraction[]]),
    referenceTwistor: any(4),
    referenceChi: [0, 1, 2, 3].map(() => any(k)),
    referenceLine: [any(4), any(4)],
  };
}

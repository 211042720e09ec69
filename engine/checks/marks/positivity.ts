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

/** Entries from one draw: a draw costs more than the arithmetic on what it gives. */
const entriesOfDraw = 12;
const decades = 4n;
const range = decades * 10n ** (decades - 1n);

/** Positive integers in four sizes from 1 to 1000 equally often: quotients of two of them spread over six decades. */
function positiveIntegers(random: Randomness): () => bigint {
  let [left, rest] = [0, 0n];
  return () => {
    if (left === 0) [left, rest] = [entriesOfDraw, random.below(range ** BigInt(entriesOfDraw))];
    const entry = rest % range;
    rest /= range;
    left -= 1;
    return 1n + ((entry / decades) % 10n ** (entry % decades));
  };
}

type Matrix = readonly (readonly bigint[])[];

/** A totally positive matrix, every minor positive: a product of bidiagonal factors with positive entries (Whitney, Loewner). */
export function totallyPositive(size: number, random: Randomness): Matrix {
  const positive = positiveIntegers(random);
  const rows = Array.from({ length: size }, (_, i) =>
    Array.from({ length: size }, (_unused, j) => (i === j ? positive() : 0n)),
  );
  for (let width = 1; width < size; width++) {
    // A bidiagonal factor on the left scales each row and adds a multiple of the one above it, one on the right likewise columns.
    for (let i = size - 1; i >= width; i--) {
      const [own, other] = [positive(), positive()];
      for (let j = 0; j < size; j++) rows[i]![j] = own * rows[i]![j]! + other * rows[i - 1]![j]!;
    }
    for (let j = size - 1; j >= width; j--) {
      const [own, other] = [positive(), positive()];
      for (let i = 0; i < size; i++) rows[i]![j] = own * rows[i]![j]! + other * rows[i]![j - 1]!;
    }
  }
  return rows;
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

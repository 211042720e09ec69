/** What a tape reads from a point: vectors, each of a kind and a number. */
import type { Point } from "../kinematics/point";

/** Z_a, index a-1; four slots. */
export const TWISTOR = 0;
/** Point 0 or 1 of loop line l, index 2 l + that; four slots. */
export const LOOP_POINT = 1;
/** `*`; four slots. */
export const REFERENCE_TWISTOR = 2;
/** Point 0 or 1 of `X`; four slots. */
export const REFERENCE_LINE_POINT = 3;
/** chi of leg a, index a-1; four flavours of k slots. */
export const CHI = 4;
/** chi of `*`; four flavours of k slots. */
export const REFERENCE_CHI = 5;
/** The i-th basis vector, whatever the point; four slots. */
export const BASIS = 6;

/** One vector that the tape wants in slots slot, slot+1, ... before it runs. */
export interface TapeInput {
  readonly kind: number;
  readonly index: number;
  readonly slot: number;
  readonly width: number;
}

/**
 * The components of an input at a point, in rows that follow each other: four flavours of a chi, else one row.
 * @throws Error when the point lacks what the form reads
 */
export function readInput<T>(input: TapeInput, point: Point<T>, zero: T, one: T): readonly (readonly T[])[] {
  const rows = select(input, point, zero, one);
  let width = 0;
  for (const row of rows) width += row?.length ?? 0;
  if (width !== input.width) {
    throw new Error(`readInput: expected ${input.width} components of ${describeInput(input)}, got ${width}`);
  }
  return rows as readonly (readonly T[])[];
}

function select<T>(
  { kind, index }: TapeInput,
  point: Point<T>,
  zero: T,
  one: T,
): readonly (readonly T[] | undefined)[] {
  switch (kind) {
    case TWISTOR:
      return [point.twistors[index]];
    case LOOP_POINT:
      return [point.lines[index >> 1]?.[(index & 1) as 0 | 1]];
    case REFERENCE_TWISTOR:
      return [point.referenceTwistor];
    case REFERENCE_LINE_POINT:
      return [point.referenceLine[index as 0 | 1]];
    case CHI:
      return point.chi[index] ?? [];
    case REFERENCE_CHI:
      return point.referenceChi;
    default:
      return [[0, 1, 2, 3].map((i) => (i === index ? one : zero))];
  }
}

/** For people: `Z3`, `A`, `*`, `chi5`. */
export function describeInput({ kind, index }: { readonly kind: number; readonly index: number }): string {
  switch (kind) {
    case TWISTOR:
      return `Z${index + 1}`;
    case LOOP_POINT:
      return "ABCDEFGH"[index]!;
    case REFERENCE_TWISTOR:
      return "*";
    case REFERENCE_LINE_POINT:
      return `X${index + 1}`;
    case CHI:
      return `chi${index + 1}`;
    case REFERENCE_CHI:
      return "chi*";
    default:
      return `e${index + 1}`;
  }
}

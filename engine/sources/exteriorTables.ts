/**
 * Products in the exterior algebra of F^k for four flavours at once. An element of degree d is 4 C(k,d) numbers: for each flavour
 * its components on the subsets of d columns, ascending as bit masks.
 *
 * Sums of products are exact in doubles: one factor is split into 15 high and 16 low bits, so that 32 products of 47 bits add up to
 * less than 2^53 before they are reduced once.
 */
import type { Modulus } from "./arithmetic";

/** How the product of an element and a row comes about: d+1 products for each component of the result, one after the other. */
export interface RowTable {
  /** Components of one flavour of the element, and of the product. */
  readonly size: number;
  readonly productSize: number;
  readonly element: Int32Array;
  readonly column: Int32Array;
  readonly sign: Float64Array;
}

const bitsOf = (mask: number): number => {
  let count = 0;
  for (let rest = mask; rest !== 0; rest &= rest - 1) count++;
  return count;
};

/** The tables for degrees 0 .. k-1, with the row on the right. The last one, of degree k-1, makes determinants. @param k 1..16 */
export function rowTables(k: number): readonly RowTable[] {
  const subsets: number[][] = Array.from({ length: k + 1 }, () => []);
  const places = new Int32Array(1 << k);
  for (let mask = 0; mask < 1 << k; mask++) {
    const same = subsets[bitsOf(mask)]!;
    places[mask] = same.length;
    same.push(mask);
  }
  return Array.from({ length: k }, (_, degree) => {
    const products = subsets[degree + 1]!.flatMap((mask) =>
      Array.from({ length: k }, (__, column) => column)
        .filter((column) => (mask >> column) & 1)
        .map((column) => ({ rest: mask & ~(1 << column), column })),
    );
    return {
      size: subsets[degree]!.length,
      productSize: subsets[degree + 1]!.length,
      element: Int32Array.from(products, ({ rest }) => places[rest]!),
      column: Int32Array.from(products, ({ column }) => column),
      // The column moves to its place past the larger ones.
      sign: Float64Array.from(products, ({ rest, column }) => (bitsOf(rest >> column) % 2 === 0 ? 1 : -1)),
    };
  });
}

/** Numbers split as value = high * 2^16 + low. */
export interface Split {
  readonly high: Float64Array;
  readonly low: Float64Array;
}

export const splitOf = (length: number): Split => ({
  high: new Float64Array(length),
  low: new Float64Array(length),
});

/** Splits values[from .. from+length-1]. */
export function splitInto(target: Split, values: Int32Array, from: number, length: number): void {
  for (let i = 0; i < length; i++) {
    const value = values[from + i]!;
    target.high[i] = value >>> 16;
    target.low[i] = value & 0xffff;
  }
}

/** out = element times row, four flavours; `row` holds 4 k numbers. Residues are canonical. */
export function timesRow(table: RowTable, element: Int32Array, row: Split, out: Int32Array, m: Modulus): void {
  const { size, productSize, element: places, column, sign } = table;
  const { high: rowHigh, low: rowLow } = row;
  const columns = rowHigh.length / 4;
  const count = places.length / productSize;
  let to = 0;
  for (let flavour = 0; flavour < 4; flavour++) {
    const from = flavour * size;
    const rowFrom = flavour * columns;
    let i = 0;
    for (let component = 0; component < productSize; component++) {
      let high = 0;
      let low = 0;
      for (const end = i + count; i < end; i++) {
        const factor = sign[i]! * element[from + places[i]!]!;
        high += rowHigh[rowFrom + column[i]!]! * factor;
        low += rowLow[rowFrom + column[i]!]! * factor;
      }
      out[to++] = m.reduceSplit(high, low);
    }
  }
}

/** The element of degree k-1 as the covectors whose scalar products with rows are the determinants; `table` is the last one. */
export function covectorInto(table: RowTable, element: Int32Array, out: Split, prime: number): void {
  const columns = table.size;
  for (let flavour = 0; flavour < 4; flavour++) {
    for (let i = 0; i < columns; i++) {
      const value = element[flavour * columns + table.element[i]!]!;
      const signed = table.sign[i]! > 0 || value === 0 ? value : prime - value;
      out.high[flavour * columns + table.column[i]!] = signed >>> 16;
      out.low[flavour * columns + table.column[i]!] = signed & 0xffff;
    }
  }
}

/** sum over i < length of a[aAt + i] b[bAt + i], length <= 32; a canonical residue. */
export function dot(a: Split, aAt: number, b: Int32Array, bAt: number, length: number, m: Modulus): number {
  let high = 0;
  let low = 0;
  for (let i = 0; i < length; i++) {
    const factor = b[bAt + i]!;
    high += a.high[aAt + i]! * factor;
    low += a.low[aAt + i]! * factor;
  }
  return m.reduceSplit(high, low);
}

/** Columns at most: the tables have 2^k subsets, and sums of up to 32 products are exact. */
export const mostColumns = 16;

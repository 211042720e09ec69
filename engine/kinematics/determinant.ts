/** Determinants over any field. */
import type { Field } from "../fields";

/** Up to this size the expansion over subsets of columns is used: no division, so nothing is lost on truncated series. */
const LARGEST_EXPANSION = 8;

/**
 * The determinant of a square matrix given by its rows; 1 for the empty matrix.
 * @throws Error when a row has another length than the matrix has rows
 */
export function determinant<T>(field: Field<T>, rows: readonly (readonly T[])[]): T {
  const size = rows.length;
  for (const row of rows) {
    if (row.length !== size) throw new Error(`determinant: expected rows of length ${size}, got ${row.length}`);
  }
  return size <= LARGEST_EXPANSION ? expand(field, rows) : eliminate(field, rows);
}

/** minors[S] is the minor of the first |S| rows and the columns in the bit set S; each is an expansion along its last row. */
function expand<T>(field: Field<T>, rows: readonly (readonly T[])[]): T {
  const size = rows.length;
  const minors: T[] = [field.one];
  for (let set = 1; set < 1 << size; set++) {
    let rest = set;
    let count = 0;
    for (let s = set; s !== 0; s &= s - 1) count++;
    const row = rows[count - 1]!;
    let minor = field.zero;
    // The first column of the set has count-1 columns behind it, hence that sign; it alternates from there.
    let negative = count % 2 === 0;
    while (rest !== 0) {
      const bit = rest & -rest;
      rest ^= bit;
      const product = field.multiply(row[31 - Math.clz32(bit)]!, minors[set ^ bit]!);
      minor = negative ? field.subtract(minor, product) : field.add(minor, product);
      negative = !negative;
    }
    minors.push(minor);
  }
  return minors[minors.length - 1]!;
}

function eliminate<T>(field: Field<T>, rows: readonly (readonly T[])[]): T {
  const matrix = rows.map((row) => [...row]);
  let result = field.one;
  for (let column = 0; column < matrix.length; column++) {
    const at = matrix.findIndex((row, i) => i >= column && !field.isZero(row[column]!));
    if (at < 0) return field.zero;
    const pivot = matrix[at]!;
    if (at !== column) {
      matrix[at] = matrix[column]!;
      matrix[column] = pivot;
      result = field.negate(result);
    }
    result = field.multiply(result, pivot[column]!);
    const inverse = field.inverse(pivot[column]!)!;
    for (const row of matrix.slice(column + 1)) {
      const factor = field.multiply(row[column]!, inverse);
      if (field.isZero(factor)) continue;
      for (let j = column; j < row.length; j++) row[j] = field.subtract(row[j]!, field.multiply(factor, pivot[j]!));
    }
  }
  return result;
}

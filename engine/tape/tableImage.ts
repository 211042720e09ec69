/** The tables of wedge and pair as the kernel reads them, offsets in bytes for a given stride. */

import { PAIR, WEDGE } from "./opcodes";
import type { Tape } from "./tape";
import { runsOf } from "./tape";
import { pairTable, type WedgeProduct, wedgeTable } from "./wedgeTables";

/** Entries of the directory: wedge by degree, then from the 8th on pair by degree. */
const DIRECTORY = 16;

/** Degrees of the wedge and pair operations that occur on a tape. */
function degreesOf(tape: Tape): { wedges: Set<number>; pairs: Set<number> } {
  const wedges = new Set<number>();
  const pairs = new Set<number>();
  for (const run of runsOf(tape.code)) {
    if (run.code === WEDGE) wedges.add(run.parameter);
    if (run.code === PAIR) pairs.add(run.parameter);
  }
  return { wedges, pairs };
}

/** A directory of addresses, then the tables; `address` is where the image will stand in memory. */
export function tableImage(tape: Tape, address: number, stride: number): Int32Array {
  const { wedges, pairs } = degreesOf(tape);
  const image: number[] = new Array<number>(DIRECTORY).fill(0);
  const put = (entry: number, head: readonly number[], products: readonly WedgeProduct[]): void => {
    image[entry] = address + 4 * image.length;
    image.push(...head, 0);
    for (const { left, right, odd } of products) image.push(left * stride, right * stride, -odd);
  };
  for (const degree of wedges) {
    const table = wedgeTable(tape.k, degree);
    put(degree, [table.length, wedgeTable(tape.k, degree - 1).length, tape.k], table.flat());
  }
  for (const degree of pairs) {
    const table = degree === 0 ? [] : pairTable(tape.k, degree);
    const right = degree === 0 ? 0 : pairTable(tape.k, tape.k - degree).length;
    put(8 + degree, [table.length, table.length, right], table);
  }
  return Int32Array.from(image);
}

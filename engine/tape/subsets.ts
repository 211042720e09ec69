/** Subsets of columns, the components of an exterior power, and the signs of putting two of them together. */

const sizeOf = (set: number): number => {
  let size = 0;
  for (let s = set; s !== 0; s &= s - 1) size++;
  return size;
};

/** The subsets of {0..k-1} with `degree` elements as bit sets, in ascending order; {0..degree-1} is the first. */
export function ascendingSubsets(k: number, degree: number): number[] {
  const out: number[] = [];
  for (let set = 0; set < 1 << k; set++) if (sizeOf(set) === degree) out.push(set);
  return out;
}

/** Whether sorting the elements of `first` followed by those of `second` takes an odd number of exchanges. */
export function isOddShuffle(first: number, second: number): boolean {
  let exchanges = 0;
  for (let s = second; s !== 0; s &= s - 1) exchanges += sizeOf(first & ~((s & -s) * 2 - 1));
  return exchanges % 2 === 1;
}

// Where everything lies in memory; set by the host before a run. All values of a block stand slot by slot, `stride` bytes each.

export let slots: usize = 0;
/** Bytes of one slot of a block: 16 for each vector. */
export let stride: usize = 0;
/** 48 bytes for each vector of the block: modulus, its inverse modulo 2^32, and one, as the field wants them. */
export let context: usize = 0;
/** For each lane the first denominator that was zero, a 32-bit number, all ones for none. */
export let bad: usize = 0;
/** The sum of the terms, `stride` bytes. */
export let sum: usize = 0;
/** Where the next term goes, `stride` bytes each; 0 when terms are not wanted. */
export let terms: usize = 0;
/** Addresses of the tables of wedge (by degree) and pair (by degree, from the 8th entry on). */
export let tables: usize = 0;
/** Room for the partial products of one batch: 16 bytes for each. */
export let scratch: usize = 0;

export function place(
  slots_: usize,
  stride_: usize,
  context_: usize,
  bad_: usize,
  sum_: usize,
  tables_: usize,
  scratch_: usize,
): void {
  slots = slots_;
  stride = stride_;
  context = context_;
  bad = bad_;
  sum = sum_;
  tables = tables_;
  scratch = scratch_;
}

export function placeTerms(terms_: usize): void {
  terms = terms_;
}

export function nextTerm(): void {
  terms += stride;
}

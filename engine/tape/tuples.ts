/** A set of tuples of 32-bit integers, each known by its number: what sharing is made of. Typed arrays only, no string keys. */

const FIRST_CAPACITY = 1 << 12;

/** Tuples are numbered 0, 1, 2, ... in the order they are first met. */
export class TupleTable {
  /** The tuples one after the other; tuple i is words[starts[i] .. starts[i+1]-1]. */
  words = new Int32Array(FIRST_CAPACITY * 4);
  starts = new Int32Array(FIRST_CAPACITY + 1);
  size = 0;
  private slots = new Int32Array(FIRST_CAPACITY * 2).fill(-1);
  private mask = FIRST_CAPACITY * 2 - 1;

  /** The number of a tuple, or -1 when it has not been met. */
  find(tuple: ArrayLike<number>, length: number): number {
    return this.slots[this.probe(tuple, length)]!;
  }

  /** The place in the hash table where a tuple is, or would be. */
  private probe(tuple: ArrayLike<number>, length: number): number {
    let at = hashOf(tuple, 0, length) & this.mask;
    for (;;) {
      const id = this.slots[at]!;
      if (id < 0) return at;
      const start = this.starts[id]!;
      if (this.starts[id + 1]! - start === length) {
        let i = 0;
        while (i < length && this.words[start + i] === tuple[i]) i++;
        if (i === length) return at;
      }
      at = (at + 1) & this.mask;
    }
  }

  /** The number of the tuple words[0..length-1] of `tuple`; it equals the former `size` when the tuple is new. */
  intern(tuple: ArrayLike<number>, length: number): number {
    const at = this.probe(tuple, length);
    const known = this.slots[at]!;
    if (known >= 0) return known;
    const id = this.size;
    const start = this.starts[id]!;
    if (start + length > this.words.length) this.words = grown(this.words, start + length);
    if (id + 2 > this.starts.length) this.starts = grown(this.starts, id + 2);
    for (let i = 0; i < length; i++) this.words[start + i] = tuple[i]!;
    this.starts[id + 1] = start + length;
    this.slots[at] = id;
    this.size = id + 1;
    if (this.size * 2 > this.slots.length) this.rehash();
    return id;
  }

  private rehash(): void {
    this.slots = new Int32Array(this.slots.length * 4).fill(-1);
    this.mask = this.slots.length - 1;
    for (let id = 0; id < this.size; id++) {
      const start = this.starts[id]!;
      let at = hashOf(this.words, start, this.starts[id + 1]! - start) & this.mask;
      while (this.slots[at]! >= 0) at = (at + 1) & this.mask;
      this.slots[at] = id;
    }
  }
}

/** Spreads a tuple over 32 bits. */
function hashOf(words: ArrayLike<number>, from: number, length: number): number {
  let hash = length;
  for (let i = from; i < from + length; i++) hash = Math.imul(hash ^ words[i]!, 0x9e3779b1) ^ (hash >>> 15);
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  return hash ^ (hash >>> 13);
}

/** A copy with room for at least `needed` entries, doubled so that growing costs a constant for each entry. */
export function grown(array: Int32Array, needed: number): Int32Array<ArrayBuffer> {
  const larger = new Int32Array(Math.max(needed, array.length * 2));
  larger.set(array);
  return larger;
}

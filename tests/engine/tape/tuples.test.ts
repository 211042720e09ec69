import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { TupleTable } from "../../../engine/tape/tuples";

describe("TupleTable", () => {
  it("numbers tuples as a map by their text does", () => {
    const tuples = fc.array(fc.array(fc.integer({ min: -3, max: 3 }), { maxLength: 4 }), { maxLength: 300 });
    fc.assert(
      fc.property(tuples, (list) => {
        const table = new TupleTable();
        const known = new Map<string, number>();
        for (const tuple of list) {
          const key = tuple.join();
          expect(table.find(tuple, tuple.length)).toBe(known.get(key) ?? -1);
          if (!known.has(key)) known.set(key, known.size);
          expect(table.intern(tuple, tuple.length)).toBe(known.get(key));
        }
        expect(table.size).toBe(known.size);
      }),
      { numRuns: 100, seed: 1 },
    );
  });

  it("keeps 200,000 tuples apart while it grows", () => {
    const table = new TupleTable();
    for (let i = 0; i < 200_000; i++) table.intern([i, i >> 3, -i], 3);
    expect(table.size).toBe(200_000);
    for (let i = 0; i < 200_000; i += 997) expect(table.find([i, i >> 3, -i], 3)).toBe(i);
    expect(table.find([1, 2, 3], 3)).toBe(-1);
  });
});

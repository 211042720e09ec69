/** The tables of exterior products against determinants from mathjs. */
import { det } from "mathjs";
import { describe, expect, it } from "vitest";
import { binomial } from "../../../engine/tape/opcodes";
import { pairTable, type WedgeProduct, wedgeTable } from "../../../engine/tape/wedgeTables";

/** A matrix of small integers with no structure. */
const matrixOf = (k: number): number[][] =>
  Array.from({ length: k }, (_, i) =>
    Array.from({ length: k }, (_, j) => ((i * 37 + j * 17 + i * j * 5 + 3) % 11) - 5),
  );

const sumOf = (products: readonly WedgeProduct[], left: readonly number[], right: readonly number[]) =>
  products.reduce((sum, p) => sum + (p.odd ? -1 : 1) * left[p.left]! * right[p.right]!, 0);

/** Minors of the rows, by wedging one row after the other. */
function minors(rows: readonly (readonly number[])[], k: number): number[] {
  let wedge = [...rows[0]!];
  for (let degree = 1; degree < rows.length; degree++) {
    wedge = wedgeTable(k, degree).map((products) => sumOf(products, wedge, rows[degree]!));
  }
  return wedge;
}

describe.each([2, 3, 4, 5, 6])("k = %i", (k) => {
  it("every split of the rows gives the determinant", () => {
    const rows = matrixOf(k);
    for (let degree = 1; degree < k; degree++) {
      const value = sumOf(pairTable(k, degree), minors(rows.slice(0, degree), k), minors(rows.slice(degree), k));
      expect(value).toBeCloseTo(det(rows), 6);
    }
    expect(det(rows)).not.toBe(0);
  });

  it("has C(k,d) components of d products", () => {
    for (let degree = 1; degree < k; degree++) {
      const table = wedgeTable(k, degree);
      expect(table.length).toBe(binomial(k, degree + 1));
      expect(table.every((products) => products.length === degree + 1)).toBe(true);
    }
  });
});

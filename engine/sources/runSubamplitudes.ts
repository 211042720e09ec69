/**
 * Evaluates the shared tree recursion at one point. A term is a product over four flavours of the determinant of its k delta rows.
 * Terms are gone through as paths of invariants: the exterior product of the rows met so far, the prefix, is shared by all terms that
 * begin alike, and the last row of each term costs one scalar product a flavour.
 */
import type { Modulus } from "./arithmetic";
import { covectorInto, dot, type RowTable, type Split, splitInto, splitOf, timesRow } from "./exteriorTables";
import { evaluatePlan, type SuperPoint } from "./runPlan";
import type { SharedTree, SubAmplitude } from "./subamplitudes";

/** The value of the tree, null where a denominator vanishes. @param legs with k >= 1 numbers for each flavour */
export function sumTree(m: Modulus, tree: SharedTree, legs: readonly SuperPoint[]): number | null {
  const { rows, denominators } = evaluatePlan(m, tree.plan, legs, tree.k);
  if (!m.invertAll(denominators, denominators.length)) return null;
  return new TreeRun(m, tree, rows, denominators).sum();
}

/** Sub-amplitudes that are still to come on a path. */
interface Rest {
  readonly side: SubAmplitude;
  readonly rest: Rest | null;
}

class TreeRun {
  private readonly tables: readonly RowTable[];
  /** By degree the prefix at hand. */
  private readonly prefixes: readonly Int32Array[];
  private readonly row: Split;
  private readonly covector: Split;

  constructor(
    private readonly m: Modulus,
    private readonly tree: SharedTree,
    /** Four rows of k numbers for each invariant. */
    private readonly rows: Int32Array,
    /** One over the five brackets of each invariant. */
    private readonly factors: Int32Array,
  ) {
    this.tables = tree.tables;
    this.prefixes = this.tables.map(({ size }) => new Int32Array(4 * size));
    this.row = splitOf(4 * tree.k);
    this.covector = splitOf(4 * tree.k);
  }

  sum(): number {
    this.prefixes[0]!.fill(1);
    return this.paths(this.tree.whole, null, 0, 1);
  }

  /** coefficient * (prefix of degree `degree`) * side * all that is to come, together of degree k. */
  private paths(side: SubAmplitude, rest: Rest | null, degree: number, coefficient: number): number {
    if (side.k === 1 && rest === null) return this.m.multiply(coefficient, this.lastRows(side));
    const { m, tables, prefixes, row, rows, tree } = this;
    const width = 4 * tree.k;
    let sum = 0;
    for (let part: SubAmplitude | null = side; part !== null; part = part.shorter) {
      for (const { invariant, sides } of part.channels) {
        splitInto(row, rows, invariant * width, width);
        timesRow(tables[degree]!, prefixes[degree]!, row, prefixes[degree + 1]!, m);
        const factor = m.multiply(coefficient, this.factors[invariant]!);
        const [first, second] = sides;
        const value =
          first === undefined
            ? this.paths(rest!.side, rest!.rest, degree + 1, factor)
            : this.paths(first, second === undefined ? rest : { side: second, rest }, degree + 1, factor);
        sum = m.add(sum, value);
      }
    }
    return sum;
  }

  /** The prefix of degree k-1 times a sum of invariants. */
  private lastRows(side: SubAmplitude): number {
    const { m, rows, factors, covector } = this;
    const { k } = this.tree;
    covectorInto(this.tables[k - 1]!, this.prefixes[k - 1]!, covector, m.prime);
    let sum = 0;
    for (let part: SubAmplitude | null = side; part !== null; part = part.shorter) {
      for (const { invariant } of part.channels) {
        let product = factors[invariant]!;
        for (let flavour = 0; flavour < 4; flavour++) {
          const at = (4 * invariant + flavour) * k;
          product = m.multiply(product, dot(covector, flavour * k, rows, at, k, m));
        }
        sum = m.add(sum, product);
      }
    }
    return sum;
  }
}

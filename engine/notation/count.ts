/** How many top-level terms a formula has, counted without writing them out. */
import { type Budget, budgetFor, countBindings, enumerateBindings } from "./bindings";
import {
  definitionPlace,
  definitionsOf,
  type Extent,
  isWrittenOut,
  type Place,
  permutations,
  scalarBody,
  startingPlace,
} from "./expand";
import type { Definition, Expression, Formula } from "./tree";

/** Counts with every definition counted once for each list of arguments. */
class Counter {
  private readonly known = new Map<string, number>();
  private readonly budget: Budget;

  constructor(
    private readonly definitions: ReadonlyMap<string, Definition>,
    private readonly extent: Extent,
    private readonly limit: number,
  ) {
    this.budget = budgetFor(limit);
  }

  count(expression: Expression, place: Place): number {
    const clip = (count: number): number => Math.min(count, this.limit + 1);
    switch (expression.kind) {
      case "add": {
        let total = 0;
        for (const summand of expression.summands) {
          total += this.count(summand, place);
          if (total > this.limit) break;
        }
        return clip(total);
      }
      case "negate":
        return this.count(expression.operand, place);
      case "cyc":
        return clip(this.extent.n * this.count(expression.body, place));
      case "sym":
        return clip(permutations(this.extent.loops).length * this.count(expression.body, place));
      case "sum": {
        const bindings = countBindings(expression, place.bindings, this.limit, this.budget);
        if (bindings === 0 || bindings > this.limit || !isWrittenOut(expression.body, this.definitions))
          return bindings;
        let total = 0;
        for (const inner of enumerateBindings(expression, place.bindings)) {
          total += this.count(expression.body, { ...place, bindings: inner });
          if (total > this.limit) break;
        }
        return clip(total);
      }
      case "call": {
        if (!isWrittenOut(expression, this.definitions)) return 1;
        const definition = this.definitions.get(expression.name)!;
        const inner = definitionPlace(definition, expression.arguments, place, this.extent.n);
        const key = `${expression.name}(${definition.parameters.map((name) => inner.bindings.get(name)).join()})`;
        const known = this.known.get(key);
        if (known !== undefined) return known;
        const count = this.count(scalarBody(this.definitions, expression.name), inner);
        this.known.set(key, count);
        return count;
      }
      default:
        return 1;
    }
  }
}

/** The number of top-level terms that `expandTerms` yields, or `limit` + 1 when there are more. */
export function countTerms(formula: Formula, extent: Extent, limit: number): number {
  return new Counter(definitionsOf(formula), extent, limit).count(formula.expression, startingPlace(extent));
}

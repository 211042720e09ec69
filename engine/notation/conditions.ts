/** The conditions of a `sum` or `prod` as linear inequalities in its indices, and which indices they leave without a bound. */
import { type Bindings, evaluateIndex } from "./indices";
import type { Condition, IndexExpression, Quantified } from "./tree";

/** sum(factors[t] * value of index variables[t]) <= bound */
export interface Inequality {
  readonly variables: readonly number[];
  readonly factors: readonly bigint[];
  readonly bound: bigint;
}

/** A set of integer points: all inequalities hold, no equation of `unequal` does, each cycle is in cyclic order. */
export interface System {
  readonly size: number;
  readonly inequalities: readonly Inequality[];
  /** sum(factors * values) = bound is forbidden. */
  readonly unequal: readonly Inequality[];
  /** Indices whose values, in this order, go once around the labels 1..n. */
  readonly cycles: readonly (readonly number[])[];
}

/** Whether a chain is a cyclic order such as i < j < k < i: it begins and ends with the same bare index. */
export function isCyclicOrder(condition: Condition): boolean {
  if (condition.expressions.length < 3 || condition.relations.some((relation) => relation !== "<")) return false;
  const first = bareName(condition.expressions[0]);
  return first !== null && first !== "n" && first === bareName(condition.expressions.at(-1));
}

/** The name an index expression consists of, or null when it is more than a name. */
export function bareName(expression: IndexExpression | undefined): string | null {
  if (expression === undefined || expression.constant !== "0" || expression.terms.length !== 1) return null;
  const [term] = expression.terms;
  return term !== undefined && term.factor === "1" ? term.name : null;
}

/** The difference a - b, split into its part in the indices and the value of the rest. */
function difference(
  a: IndexExpression,
  b: IndexExpression,
  indices: readonly string[],
  rest: (expression: IndexExpression) => bigint,
): { variables: number[]; factors: bigint[]; rest: bigint } {
  const factors = new Map<number, bigint>();
  const outer = (expression: IndexExpression, sign: bigint): bigint => {
    for (const { name, factor } of expression.terms) {
      const variable = indices.indexOf(name);
      if (variable >= 0) factors.set(variable, (factors.get(variable) ?? 0n) + sign * BigInt(factor));
    }
    return sign * rest({ ...expression, terms: expression.terms.filter(({ name }) => !indices.includes(name)) });
  };
  const value = outer(a, 1n) + outer(b, -1n);
  const kept = [...factors].filter(([, factor]) => factor !== 0n);
  return { variables: kept.map(([variable]) => variable), factors: kept.map(([, factor]) => factor), rest: value };
}

function compile(quantified: Quantified, n: bigint, rest: (expression: IndexExpression) => bigint): System {
  const { indices } = quantified;
  const inequalities: Inequality[] = [];
  const unequal: Inequality[] = [];
  const cycles: number[][] = [];
  for (const condition of quantified.conditions) {
    if (isCyclicOrder(condition)) {
      const cycle = condition.expressions.slice(0, -1).map((expression) => indices.indexOf(bareName(expression) ?? ""));
      cycles.push(cycle);
      for (const variable of cycle) {
        inequalities.push({ variables: [variable], factors: [1n], bound: n });
        inequalities.push({ variables: [variable], factors: [-1n], bound: -1n });
      }
      continue;
    }
    condition.relations.forEach((relation, place) => {
      const [a, b] = [condition.expressions[place]!, condition.expressions[place + 1]!];
      const { variables, factors, rest: value } = difference(a, b, indices, rest);
      const slack = relation === "<" ? 1n : 0n;
      if (relation === "!=") unequal.push({ variables, factors, bound: -value });
      else inequalities.push({ variables, factors, bound: -value - slack });
      if (relation === "=") inequalities.push({ variables, factors: factors.map((factor) => -factor), bound: value });
    });
  }
  return { size: indices.length, inequalities, unequal, cycles };
}

/** The conditions with every outer name replaced by its value. */
export function systemOf(quantified: Quantified, bindings: Bindings): System {
  return compile(quantified, bindings.get("n") ?? 0n, (expression) => evaluateIndex(expression, bindings));
}

/** The indices that the conditions do not bound on both sides, whatever n and the outer names are, in the order they are listed. */
export function unboundedIndices(quantified: Quantified): { name: string; below: boolean; above: boolean }[] {
  const { inequalities } = compile(quantified, 0n, () => 0n);
  const below = quantified.indices.map(() => false);
  const above = quantified.indices.map(() => false);
  for (let changed = true; changed; ) {
    changed = false;
    for (const { variables, factors } of inequalities) {
      variables.forEach((variable, place) => {
        const gained = factors[place]! > 0n ? above : below;
        if (gained[variable]) return;
        const othersBounded = variables.every(
          (other, at) => at === place || (factors[at]! > 0n ? below[other] : above[other]),
        );
        if (othersBounded) {
          gained[variable] = true;
          changed = true;
        }
      });
    }
  }
  return quantified.indices
    .map((name, variable) => ({ name, below: below[variable] === true, above: above[variable] === true }))
    .filter((index) => !index.below || !index.above);
}

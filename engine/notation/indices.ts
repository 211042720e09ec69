/** Values of index expressions, labels and momenta once every index has a number. */
import type { Expression, IndexExpression, Momentum } from "./tree";

/** What every name stands for: the indices in scope, the parameters of the definition at hand, and always `n`. */
export type Bindings = ReadonlyMap<string, bigint>;

/** The names in scope at the top of a formula for n legs: `n` alone. */
export const bindingsFor = (n: number): Bindings => new Map([["n", BigInt(n)]]);

/**
 * The integer an index expression stands for.
 * @throws Error when a name has no value, which the parser rules out.
 */
export function evaluateIndex(expression: IndexExpression, bindings: Bindings): bigint {
  let value = expression.constant === "0" ? 0n : BigInt(expression.constant);
  for (const { name, factor } of expression.terms) {
    const bound = bindings.get(name);
    if (bound === undefined) throw new Error(`evaluateIndex: expected a value for ${name}, got none`);
    value += factor === "1" ? bound : BigInt(factor) * bound;
  }
  return value;
}

/** The label 1..n that an integer means among n legs: reduced modulo n, 0 is n. */
export function reduceLabel(value: bigint, n: number): number {
  const residue = Number(value % BigInt(n));
  return residue <= 0 ? residue + n : residue;
}

/** The label 1..n of an index expression, moved on by `shift` legs (what `cyc` does, after the expression has its value). */
export function evaluateLabel(expression: IndexExpression, bindings: Bindings, n: number, shift = 0): number {
  const { terms, constant } = expression;
  if (terms.length === 0 && constant.length < 10) {
    // Most labels are written as numbers: no big integers for those.
    const residue = (Number(constant) + shift) % n;
    return residue <= 0 ? residue + n : residue;
  }
  return reduceLabel(evaluateIndex(expression, bindings) + BigInt(shift), n);
}

/**
 * The integer an exponent stands for.
 * @throws Error for any kind of node but integers, indices, and their sums, products and negatives.
 */
export function evaluateNumber(expression: Expression, bindings: Bindings): bigint {
  switch (expression.kind) {
    case "integer":
      return BigInt(expression.value);
    case "index": {
      const value = bindings.get(expression.name);
      if (value === undefined) throw new Error(`evaluateNumber: expected a value for ${expression.name}, got none`);
      return value;
    }
    case "negate":
      return -evaluateNumber(expression.operand, bindings);
    case "add":
      return expression.summands.reduce((sum, summand) => sum + evaluateNumber(summand, bindings), 0n);
    case "multiply":
      return expression.factors.reduce((product, factor) => product * evaluateNumber(factor, bindings), 1n);
    default:
      throw new Error(`evaluateNumber: expected an index expression, got ${expression.kind}`);
  }
}

/**
 * The legs of a sum of momenta in the order written, each range from its first to its last leg going upwards and past n to 1.
 * A range whose end is just before its beginning holds all n legs. A leg that is named twice is listed twice.
 */
export function momentumLegs(momenta: readonly Momentum[], bindings: Bindings, n: number, shift = 0): number[] {
  const legs: number[] = [];
  for (const momentum of momenta) {
    if (momentum.kind === "single") {
      legs.push(evaluateLabel(momentum.index, bindings, n, shift));
      continue;
    }
    const from = evaluateLabel(momentum.from, bindings, n, shift);
    const to = evaluateLabel(momentum.to, bindings, n, shift);
    const length = ((to - from + n) % n) + 1;
    for (let step = 0; step < length; step += 1) legs.push(((from - 1 + step) % n) + 1);
  }
  return legs;
}

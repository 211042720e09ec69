/** Inverting many elements at the price of one inversion. */
import type { Field } from "./field";

/**
 * The inverses of `xs`, null for each zero, with one inversion and three multiplications an element
 * (products of all before, one inverse, then backwards).
 */
export function batchInverse<T>(field: Field<T>, xs: readonly T[]): (T | null)[] {
  const before: T[] = [];
  let product = field.one;
  for (const x of xs) {
    before.push(product);
    if (!field.isZero(x)) product = field.multiply(product, x);
  }
  let inverse = field.inverse(product);
  if (inverse === null) throw new Error("batchInverse: a product of non-zero elements vanished, this is not a field");
  const out: (T | null)[] = new Array(xs.length).fill(null);
  for (let i = xs.length - 1; i >= 0; i--) {
    const x = xs[i]!;
    if (field.isZero(x)) continue;
    out[i] = field.multiply(inverse, before[i]!);
    inverse = field.multiply(inverse, x);
  }
  return out;
}

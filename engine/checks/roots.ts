/** Polynomials in one variable over a 31-bit prime field: through values, and one of their roots. */
import type { Field } from "../fields";

/**
 * The coefficients (constant first, the last one not zero) of the polynomial with the values of `at`, by Newton's differences at
 * 0, 1, 2, ...; null where a value is missing or the degree is above `mostDegree`. One value more than needed must fit.
 */
export function interpolate(
  field: Field<number>,
  at: (t: number) => number | null,
  mostDegree: number,
): readonly number[] | null {
  const { add, subtract, multiply } = field;
  const differences: number[] = [];
  let diagonal: number[] = [];
  for (let t = 0; t <= mostDegree + 1; t++) {
    const value = at(t);
    if (value === null) return null;
    // Divided differences with nodes 0, 1, ...: entry i of the new diagonal belongs to the nodes t-i..t.
    const next = [value];
    for (let i = 1; i <= t; i++) {
      const step = field.inverse(i);
      if (step === null) throw new Error("interpolate: a small integer has no inverse");
      next.push(multiply(step, subtract(next[i - 1]!, diagonal[i - 1]!)));
    }
    diagonal = next;
    const newest = next[t]!;
    // Two vanishing differences in a row: the polynomial before them fits two values that it was not made from.
    if (newest === 0 && t > 0 && differences.at(-1) === 0) break;
    if (t > mostDegree) return newest === 0 ? finish() : null;
    differences.push(newest);
  }
  return finish();

  function finish(): readonly number[] {
    let coefficients: number[] = [];
    for (let i = differences.length - 1; i >= 0; i--) {
      // coefficients := coefficients * (t - i) + differences[i]
      const shiftedUp = [0, ...coefficients];
      coefficients = shiftedUp.map((c, j) => subtract(c, multiply(i, coefficients[j] ?? 0)));
      coefficients[0] = add(coefficients[0]!, differences[i]!);
    }
    while (coefficients.length > 0 && coefficients.at(-1) === 0) coefficients.pop();
    return coefficients;
  }
}

/** A root of a polynomial of degree 1 or 2, or null: no root in the field, or a higher degree. */
export function firstRoot(field: Field<number>, coefficients: readonly number[]): number | null {
  const [c, b, a] = coefficients as readonly [number, number, number?];
  const { add, subtract, multiply, negate } = field;
  if (coefficients.length === 2) {
    const inverse = field.inverse(b);
    return inverse === null ? null : negate(multiply(c, inverse));
  }
  if (coefficients.length !== 3 || a === undefined) return null;
  const root = squareRoot(field, subtract(multiply(b, b), multiply(4, multiply(a, c))));
  const inverse = field.inverse(add(a, a));
  return root === null || inverse === null ? null : multiply(subtract(root, b), inverse);
}

/** A square root modulo the prime of the field, null for a non-residue (Tonelli and Shanks). */
export function squareRoot(field: Field<number>, x: number): number | null {
  if (x === 0) return 0;
  const prime = Number(field.characteristic);
  const power = (base: number, exponent: number): number => {
    let result = 1;
    for (let square = base, e = exponent; e > 0; e = Math.floor(e / 2), square = field.multiply(square, square))
      if (e % 2 === 1) result = field.multiply(result, square);
    return result;
  };
  const half = (prime - 1) / 2;
  if (power(x, half) !== 1) return null;
  let [odd, twos] = [prime - 1, 0];
  while (odd % 2 === 0) [odd, twos] = [odd / 2, twos + 1];
  let nonResidue = 2;
  while (power(nonResidue, half) === 1) nonResidue += 1;
  let [generator, root, rest] = [power(nonResidue, odd), power(x, (odd + 1) / 2), power(x, odd)];
  for (let order = twos; rest !== 1; ) {
    let steps = 0;
    for (let s = rest; s !== 1; s = field.multiply(s, s)) steps += 1;
    const factor = power(generator, 2 ** (order - steps - 1));
    [generator, order] = [field.multiply(factor, factor), steps];
    root = field.multiply(root, factor);
    rest = field.multiply(rest, generator);
  }
  return root;
}

/** Rational numbers from their residues. */

export interface Fraction {
  readonly numerator: bigint;
  /** Positive; coprime to the numerator. */
  readonly denominator: bigint;
}

/** "p/q", or "p" where q is 1. */
export const fractionText = ({ numerator, denominator }: Fraction): string =>
  denominator === 1n ? String(numerator) : `${numerator}/${denominator}`;

/** The residue modulo the product of coprime moduli (Chinese remainders, Garner's form). @throws Error when the list is empty. */
export function combineResidues(residues: readonly { readonly residue: bigint; readonly modulus: bigint }[]): {
  readonly residue: bigint;
  readonly modulus: bigint;
} {
  const [first, ...rest] = residues;
  if (first === undefined) throw new Error("combineResidues: expected at least one residue");
  return rest.reduce((total, { residue, modulus }) => {
    const step = modulo((residue - total.residue) * inverseModulo(modulo(total.modulus, modulus), modulus), modulus);
    return { residue: total.residue + total.modulus * step, modulus: total.modulus * modulus };
  }, first);
}

/**
 * The fraction a/b with |a|, b <= sqrt(modulus/2) that has this residue, or null where there is none (half of the extended Euclidean
 * algorithm; J. Symb. Comput. 4 (1987) 255, from memory). At most one such fraction exists.
 */
export function reconstructFraction(residue: bigint, modulus: bigint): Fraction | null {
  let [r0, r1] = [modulus, modulo(residue, modulus)];
  let [t0, t1] = [0n, 1n];
  while (2n * r1 * r1 > modulus) {
    const quotient = r0 / r1;
    [r0, r1] = [r1, r0 - quotient * r1];
    [t0, t1] = [t1, t0 - quotient * t1];
  }
  if (t1 === 0n || 2n * t1 * t1 > modulus || gcd(r1, t1 < 0n ? -t1 : t1) !== 1n) return null;
  return t1 > 0n ? { numerator: r1, denominator: t1 } : { numerator: -r1, denominator: -t1 };
}

export function modulo(a: bigint, m: bigint): bigint {
  const r = a % m;
  return r < 0n ? r + m : r;
}

function gcd(a: bigint, b: bigint): bigint {
  let [x, y] = [a, b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** Inverse of a modulo m, a and m coprime. @throws Error when they are not. */
function inverseModulo(a: bigint, m: bigint): bigint {
  let [r0, r1] = [m, a];
  let [t0, t1] = [0n, 1n];
  while (r1 !== 0n) {
    const quotient = r0 / r1;
    [r0, r1] = [r1, r0 - quotient * r1];
    [t0, t1] = [t1, t0 - quotient * t1];
  }
  if (r0 !== 1n) throw new Error("combineResidues: expected coprime moduli");
  return modulo(t0, m);
}

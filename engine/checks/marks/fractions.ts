/**
 * Exact fractions for signs alone: never reduced, and sums of fractions are kept apart until something is multiplied by them, so that
 * the sign of a long sum is found from leading digits with a bound on what they leave out.
 */
import type { Field } from "../../fields";

/** numerator / denominator, denominator not 0 and of either sign; or a sum of such. */
export type Fraction =
  | { readonly numerator: bigint; readonly denominator: bigint }
  | { readonly parts: readonly Single[] };
type Single = Extract<Fraction, { numerator: bigint }>;

export const fraction = (numerator: bigint, denominator = 1n): Single => ({ numerator, denominator });

const zero = fraction(0n);

const addSingles = (a: Single, b: Single): Single => {
  if (a.numerator === 0n) return b;
  if (b.numerator === 0n) return a;
  return a.denominator === b.denominator
    ? fraction(a.numerator + b.numerator, a.denominator)
    : fraction(a.numerator * b.denominator + b.numerator * a.denominator, a.denominator * b.denominator);
};

/** One fraction, the parts of a sum added two by two so that the numbers stay of like size. */
function collapse(a: Fraction): Single {
  if (!("parts" in a)) return a;
  let parts = [...a.parts];
  while (parts.length > 1) {
    const next: Single[] = [];
    for (let i = 0; i < parts.length; i += 2) {
      const [x, y] = [parts[i]!, parts[i + 1]];
      next.push(y === undefined ? x : addSingles(x, y));
    }
    parts = next;
  }
  return parts[0] ?? zero;
}

function add(a: Fraction, b: Fraction): Fraction {
  if (!("parts" in a) && !("parts" in b)) {
    if (a.denominator === b.denominator || a.numerator === 0n || b.numerator === 0n) return addSingles(a, b);
    return { parts: [a, b] };
  }
  return { parts: [...("parts" in a ? a.parts : [a]), ...("parts" in b ? b.parts : [b])] };
}

function negate(a: Fraction): Fraction {
  if ("parts" in a) return { parts: a.parts.map(({ numerator, denominator }) => fraction(-numerator, denominator)) };
  return fraction(-a.numerator, a.denominator);
}

/** The rationals with this representation: equal numbers may look different, `equals` tells. */
export const fractions: Field<Fraction> = {
  name: "rationals, not reduced",
  characteristic: 0n,
  zero,
  one: fraction(1n),
  fromInteger: (x) => fraction(x),
  add,
  subtract: (a, b) => add(a, negate(b)),
  multiply: (a, b) => {
    const [x, y] = [collapse(a), collapse(b)];
    return fraction(x.numerator * y.numerator, x.denominator * y.denominator);
  },
  negate,
  inverse: (a) => {
    const { numerator, denominator } = collapse(a);
    return numerator === 0n ? null : fraction(denominator, numerator);
  },
  isZero: (a) => collapse(a).numerator === 0n,
  equals: (a, b) => collapse(add(a, negate(b))).numerator === 0n,
  toText: (a) => {
    const { numerator, denominator } = collapse(a);
    return `${numerator}/${denominator}`;
  },
};

const digits = 160n;

/** The number of binary digits, rounded up to a multiple of four. */
const lengthOf = (x: bigint): bigint => BigInt((x < 0n ? -x : x).toString(16).length * 4);

/** The leading digits of n/d: mantissa 2^exponent, off by less than 2^exponent times 2^10. */
function leading({ numerator, denominator }: Single): { mantissa: bigint; exponent: bigint } {
  const [down, below] = [lengthOf(numerator) - 2n * digits, lengthOf(denominator) - digits];
  const top = down > 0n ? numerator >> down : numerator << -down;
  const bottom = below > 0n ? denominator >> below : denominator << -below;
  return { mantissa: top / bottom, exponent: down - below };
}

/** -1, 0 or 1, exact. */
export function signOf(a: Fraction): -1 | 0 | 1 {
  if ("parts" in a) {
    const parts = a.parts.filter((part) => part.numerator !== 0n).map(leading);
    let highest = parts[0]?.exponent ?? 0n;
    for (const { exponent } of parts) if (exponent > highest) highest = exponent;
    const sum = parts.reduce((total, { mantissa, exponent }) => total + (mantissa >> (highest - exponent)), 0n);
    const unknown = BigInt(parts.length) << 12n;
    if (sum > unknown) return 1;
    if (sum < -unknown) return -1;
  }
  const { numerator, denominator } = collapse(a);
  if (numerator === 0n) return 0;
  return numerator > 0n === denominator > 0n ? 1 : -1;
}

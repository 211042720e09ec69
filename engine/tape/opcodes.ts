/**
 * The operations of a tape, one table. A tape is runs: four words [opcode, count, parameter, 0], then `count` entries of
 * `words` words each. Words are slot numbers unless said otherwise; a vector stands in consecutive slots, first slot given.
 */

export interface Opcode {
  readonly code: number;
  readonly name: string;
  /** Words of one entry. */
  readonly words: number;
  /** What one entry does; P is the parameter of the run. */
  readonly synopsis: string;
  /** Multiplications of one entry, given the parameter of its run and k. */
  readonly multiplications: (parameter: number, k: number) => number;
}

/** The binomial coefficient, for 0 <= k <= n <= 60 or so (exact in machine numbers); 0 for k > n. */
export function binomial(n: number, k: number): number {
  let value = 1;
  for (let i = 0; i < k; i++) value = (value * (n - i)) / (i + 1);
  return value;
}

export const LINE = 1;
export const BRACKET = 2;
export const MINOR = 3;
export const ADD = 4;
export const SUBTRACT = 5;
export const MULTIPLY = 6;
export const INVERT = 7;
export const COMBINE2 = 8;
export const COMBINE3 = 9;
export const COMBINE5 = 10;
export const WEDGE = 11;
export const PAIR = 12;
export const TERM = 13;

export const opcodes: readonly Opcode[] = [
  {
    code: LINE,
    name: "line",
    words: 3,
    synopsis: "out a b: the six Plücker coordinates 12, 13, 14, 23, 42, 34 of the line through points a and b",
    multiplications: () => 12,
  },
  {
    code: BRACKET,
    name: "bracket",
    words: 3,
    synopsis: "out l m: the bracket of two lines, the determinant of four points from shared 2x2 minors",
    multiplications: () => 6,
  },
  {
    code: MINOR,
    name: "minor",
    words: 3,
    synopsis: "out a b: a_1 b_2 - a_2 b_1",
    multiplications: () => 2,
  },
  { code: ADD, name: "add", words: 3, synopsis: "out a b: a + b", multiplications: () => 0 },
  { code: SUBTRACT, name: "subtract", words: 3, synopsis: "out a b: a - b", multiplications: () => 0 },
  { code: MULTIPLY, name: "multiply", words: 3, synopsis: "out a b: a b", multiplications: () => 1 },
  {
    code: INVERT,
    name: "invert",
    words: 3,
    synopsis: "out a d: 1/a, a run is one batch; where a is zero the point is bad and denominator d is the reason",
    // Three for the batch, and one for a share of its power.
    multiplications: () => 4,
  },
  ...[
    [COMBINE2, 2],
    [COMBINE3, 3],
    [COMBINE5, 5],
  ].map(([code, terms]) => ({
    code: code!,
    name: `combine${terms}`,
    words: 2 + 2 * terms!,
    synopsis: `out signs (s v) x ${terms}: sum of s v over vectors of P slots, bit i of signs negates the i-th`,
    multiplications: (width: number) => terms! * width,
  })),
  {
    code: WEDGE,
    name: "wedge",
    words: 3,
    synopsis: "out w r: for each of four flavours, w of degree P in the exterior algebra of F^k times the vector r",
    multiplications: (degree, k) => 4 * binomial(k, degree + 1) * (degree + 1),
  },
  {
    code: PAIR,
    name: "pair",
    words: 3,
    synopsis: "out v w: the product over four flavours of the top component of v (degree P) times w (degree k-P)",
    multiplications: (degree, k) => 4 * binomial(k, degree) + 3,
  },
  {
    code: TERM,
    name: "term",
    words: 3,
    synopsis: "a sign 0: adds a (sign 0) or -a (sign 1) to the sum; the next top-level term has this value",
    multiplications: () => 0,
  },
];

/** Looked up by code; opcode 0 does not exist. */
export const opcodeOf: readonly (Opcode | undefined)[] = Array.from({ length: 32 }, (_, code) =>
  opcodes.find((opcode) => opcode.code === code),
);

/** Every evaluator of forms, in one list: the conformance suite runs over it. */
import { evaluateForm } from "../../../engine/evaluate/evaluate";
import type { FormAtN } from "../../../engine/evaluate/form";
import { draw31BitPrime, MERSENNE_61, primeField, randomness, smallPrimeField } from "../../../engine/fields";
import { randomPoint } from "../../../engine/kinematics";
import type { Point } from "../../../engine/kinematics/point";
import {
  compile,
  evaluateTape,
  evaluateTapeModulo61,
  interpretTape,
  MERSENNE_31,
  type Tape,
} from "../../../engine/tape";

/** A value with the values of its terms, or null where a denominator vanished; big integers, so that evaluators compare. */
export type Outcome = { readonly sum: bigint; readonly terms: readonly bigint[] } | null;

/** A point and its prime; residues are big integers. */
export interface Sample {
  readonly point: Point<bigint>;
  readonly prime: bigint;
}

export interface Evaluator {
  readonly name: string;
  /** Which prime its points are modulo; the i-th point of a list may have its own. */
  prime(i: number): bigint;
  /** Its prime is so small that some points are bad ones: compared with the tree walker only, not held to have a value. */
  readonly small?: true;
  evaluate(form: FormAtN, samples: readonly Sample[]): readonly Outcome[];
}

/** The tape of a form. @throws Error where it is refused */
export function tapeOf(form: FormAtN): Tape {
  const tape = compile(form);
  if (!tape.ok) throw new Error(tape.diagnostics.map(({ message }) => message).join("\n"));
  return tape.value;
}

/** The oracle: the tree walker over big integers, which shares no code with the tape. */
export const walk = (form: FormAtN, { point, prime }: Sample): Outcome => {
  const value = evaluateForm(primeField(prime), form, point);
  return value.kind === "value" ? { sum: value.sum, terms: value.terms } : null;
};

export const sampleAt = (form: FormAtN, prime: bigint, seed: string): Sample => ({
  prime,
  point: randomPoint(primeField(prime), form, randomness(seed)),
});

const narrow = (point: Point<bigint>): Point<number> => ({
  ...point,
  twistors: point.twistors.map((z) => z.map(Number)),
  chi: point.chi.map((flavours) => flavours.map((row) => row.map(Number))),
  lines: point.lines.map(([a, b]) => [a.map(Number), b.map(Number)] as const),
  referenceTwistor: point.referenceTwistor.map(Number),
  referenceChi: point.referenceChi.map((row) => row.map(Number)),
  referenceLine: [point.referenceLine[0].map(Number), point.referenceLine[1].map(Number)],
});

const kernel31 = (form: FormAtN, samples: readonly Sample[]): readonly Outcome[] => {
  const points = samples.map(({ point, prime }) => ({ point: narrow(point), prime: Number(prime) }));
  return evaluateTape(tapeOf(form), points, { terms: true }).values!.map((value) =>
    value.kind === "value" ? { sum: BigInt(value.sum), terms: value.terms!.map(BigInt) } : null,
  );
};

const drawn = Array.from({ length: 5 }, (_, i) => BigInt(draw31BitPrime(randomness(`conformance ${i}`))));

export const evaluators: readonly Evaluator[] = [
  {
    name: "tree walker in machine numbers",
    prime: (i) => drawn[i % drawn.length]!,
    evaluate: (form, samples) =>
      samples.map(({ point, prime }) => {
        const value = evaluateForm(smallPrimeField(Number(prime)), form, narrow(point));
        return value.kind === "value" ? { sum: BigInt(value.sum), terms: value.terms.map(BigInt) } : null;
      }),
  },
  {
    name: "tape in TypeScript, a small prime, where denominators vanish now and then",
    prime: () => 101n,
    small: true,
    evaluate: (form, samples) =>
      samples.map(({ point, prime }) => {
        const value = interpretTape(tapeOf(form), primeField(prime), point);
        return value.kind === "value" ? { sum: value.sum, terms: value.terms } : null;
      }),
  },
  {
    name: "tape in TypeScript, 2^61-1",
    prime: () => MERSENNE_61,
    evaluate: (form, samples) =>
      samples.map(({ point, prime }) => {
        const value = interpretTape(tapeOf(form), primeField(prime), point);
        return value.kind === "value" ? { sum: value.sum, terms: value.terms } : null;
      }),
  },
  { name: "tape in WebAssembly, 2^31-1", prime: () => BigInt(MERSENNE_31), evaluate: kernel31 },
  { name: "tape in WebAssembly, a prime for each point", prime: (i) => drawn[i % drawn.length]!, evaluate: kernel31 },
  {
    name: "tape in WebAssembly, the largest and smallest primes of 31 bits",
    // 2^31-19 is the largest prime below 2^31-1, 2^30+3 the smallest above 2^30.
    prime: (i) => [2147483629n, 1073741827n][i % 2]!,
    evaluate: kernel31,
  },
  {
    name: "tape in WebAssembly, 2^61-1",
    prime: () => MERSENNE_61,
    evaluate: (form, samples) =>
      evaluateTapeModulo61(
        tapeOf(form),
        samples.map(({ point }) => point),
        { terms: true },
      ).values!.map((value) => (value.kind === "value" ? { sum: value.sum, terms: value.terms! } : null)),
  },
];

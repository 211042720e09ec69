/** What several marks have in common: where they apply, what they may cost, and smaller amplitudes from the sources of truth. */
import type { Point } from "../../kinematics";
import { answering, type Question, type Source } from "../../sources";
import type { Bench } from "../bench";
import type { Mark } from "../report";

/** Field multiplications (of residues, before they become series) that the form may take in one mark. */
export const markBudget = 4_000_000;
/** Operations that the smaller amplitudes may take in one mark. */
export const lowerBudget = 20_000_000;

export const notApplicable = (evidence: string): Mark => ({ state: "notApplicable", evidence });
export const untested = (evidence: string): Mark => ({ state: "untested", evidence });

/** Why a mark of whole amplitudes does not apply to this form: another target, or a component; null where it applies. */
export function onlyAmplitudes({ form, target }: Bench): Mark | null {
  if (target !== "amplitude")
    return notApplicable(`This is looked at for amplitudes, and the form is ${named[target]}.`);
  if (form.negativeLegs !== null)
    return notApplicable("This is looked at for superamplitudes, and the form is one component.");
  return null;
}

const named = {
  amplitude: "an amplitude",
  even: "a parity-even part",
  log: "the integrand of a logarithm",
  zero: "an identity",
} as const;

export const fitsBudget = ({ series }: Bench, evaluations: number): boolean =>
  series.operations * evaluations <= markBudget;

/** Where `evaluations` of the form in series are more than a mark may take. */
export function overBudget(bench: Bench, evaluations: number): Mark | null {
  const { series } = bench;
  if (fitsBudget(bench, evaluations)) return null;
  const count = (x: number): string => x.toLocaleString("en");
  return untested(
    `It would take ${evaluations} evaluations in Laurent series of ${count(series.operations)} multiplications each, more than the ${count(markBudget)} that one mark may take.`,
  );
}

/** "(6,1,0)": n, k, L. */
export const keyOf = ({ n, k, loops }: { n: number; k: number; loops: number }): string => `(${n},${k},${loops})`;

export const superamplitude = (n: number, k: number, loops: number): Question => ({
  n,
  k,
  loops,
  negativeLegs: null,
  target: "amplitude",
});

/** A smaller amplitude: zero where there is none of this k, else from the first source that covers it. */
export type Lower =
  | { readonly kind: "zero" }
  | { readonly kind: "source"; readonly question: Question; readonly source: Source }
  | { readonly kind: "unknown"; readonly question: Question };

export function lowerAmplitude(question: Question): Lower {
  if (question.k < 0 || question.k > question.n - 4) return { kind: "zero" };
  const [source] = answering(question);
  if (source === undefined || source.cost(question) > lowerBudget) return { kind: "unknown", question };
  return { kind: "source", question, source };
}

/** Its value modulo the prime; null at a bad point. */
export function valueOfLower(
  lower: Exclude<Lower, { kind: "unknown" }>,
  point: Point<number>,
  prime: number,
): number | null {
  return lower.kind === "zero" ? 0 : lower.source.evaluate(lower.question, point, prime);
}

/** "the (5,1,0) amplitude by on-shell recursion", or that there is none. */
export const lowerName = (lower: Lower): string =>
  lower.kind === "zero"
    ? "0, as there is no smaller amplitude of this degree"
    : lower.kind === "source"
      ? `the ${keyOf(lower.question)} amplitude (${lower.source.name})`
      : `the ${keyOf(lower.question)} amplitude`;

/** The state of a mark whose right-hand side is not known. */
export const missingSource = (question: Question): Mark =>
  untested(`No source of truth knows the smaller amplitude ${keyOf(question)} that this is compared with.`);

/** "the 31-bit prime 1305414917". */
export function primeText(primes: ReadonlySet<number>): string {
  const [first, ...others] = primes;
  return others.length === 0 ? `the 31-bit prime ${first}` : `31-bit primes (${[...primes].join(", ")})`;
}

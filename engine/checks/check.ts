/** The check of a form: every n of its range, put together into one report (ENGINE section 4, CONTRACT "The report"). */
import { fingerprint } from "../evaluate/fingerprint";
import { formAt } from "../evaluate/form";
import { amplitudeKey, componentText, digestOf, type Form, sizesOf } from "../notation";
import type { Diagnostic } from "../result";
import { evaluatorName, FormTooLarge } from "./evaluator";
import { markChecks } from "./marks";
import type { Comparison, Diagnosis, Mark, MarkCode, Report } from "./report";
import { checkSize, type SizeEvidence, type SizeResult } from "./size";

export interface AcceptedForm {
  /** Identifier: "n6k1L0-3v1", or the file it was read from. */
  readonly name: string;
  readonly form: Form;
}

export interface CheckOptions {
  /** All primes and points of the check follow from it: drawn after the form was handed in, and recorded. */
  readonly seed: string;
  /** Accepted forms to compare with; those of another amplitude, component or target are passed over. */
  readonly accepted?: readonly AcceptedForm[];
  /** Names of the sources of truth to ask; all where it is left out. */
  readonly sources?: readonly string[];
  /** Field operations that the comparisons may take at each n. */
  readonly budget?: number;
  readonly progress?: (progress: { readonly stage: string; readonly done: number; readonly total: number }) => void;
  readonly cancelled?: () => boolean;
}

/** A report with the numbers it rests on; `engine/certificate` makes the replayable record of it. */
export interface CheckRecord {
  readonly report: Report;
  readonly evidence: readonly SizeEvidence[];
  /** The accepted forms that were compared. */
  readonly compared: readonly AcceptedForm[];
}

export class CheckCancelled extends Error {
  constructor() {
    super("The check was cancelled.");
  }
}

/** Operations at one n, unless a caller says otherwise: half a minute of the tree walker. */
export const defaultBudget = 300_000_000;

/** An open range is checked up to this n, or for four values of n where it begins later. */
const largestOpenN = 10;

const stagesPerSize = 4 + markChecks.length;

/**
 * Checks a form that was read without faults. A pure function of its arguments.
 * @throws CheckCancelled when `cancelled` says so between two steps.
 */
export function checkForm(form: Form, options: CheckOptions): CheckRecord {
  try {
    return checkSizes(form, options);
  } catch (error) {
    if (!(error instanceof FormTooLarge)) throw error;
    return { report: unreadable(error.diagnostics), evidence: [], compared: [] };
  }
}

function checkSizes(form: Form, options: CheckOptions): CheckRecord {
  const sizes = sizesOf(form, largestOpenN);
  const digest = digestOf(form);
  const total = sizes.length * stagesPerSize;
  let done = 0;
  const alive = (): void => {
    if (options.cancelled?.()) throw new CheckCancelled();
  };
  const step = (stage: string): void => {
    alive();
    options.progress?.({ stage, done: Math.min(done, total), total });
    done += 1;
  };
  const compared = new Map<string, AcceptedForm>();
  const results: SizeResult[] = [];
  for (const n of sizes) {
    const accepted = (options.accepted ?? []).filter((a) => comparable(form, a.form, n));
    const outcome = checkSize(formAt(form, n), {
      seed: options.seed,
      target: form.target,
      accepted: accepted.map(({ name, form: other }) => ({ name, form: formAt(other, n) })),
      ...(options.sources === undefined ? {} : { sources: options.sources }),
      step,
      alive,
      budget: options.budget ?? defaultBudget,
    });
    if ("vanishing" in outcome)
      return { report: unreadable([vanishingDenominator(outcome.vanishing, form, n)]), evidence: [], compared: [] };
    for (const a of accepted) if (outcome.comparisons.some((c) => c.with === a.name)) compared.set(a.name, a);
    results.push(outcome);
  }
  const shown = results.find((r) => r.n >= 6) ?? results.at(-1);
  if (shown === undefined) throw new Error("checkForm: a form with no n to check");
  step("fingerprint");
  return {
    report: reportOf(form, digest, results, shown),
    evidence: results.map((r) => r.evidence),
    compared: [...compared.values()],
  };
}

/** The report of input that could not be read, or that has no value at any point. */
export function unreadable(diagnostics: readonly Diagnostic[]): Report {
  const [first] = diagnostics;
  const more = diagnostics.length > 1 ? ` (and ${diagnostics.length - 1} more)` : "";
  return {
    verdict: "unreadable",
    comparisons: [],
    leftOut: [],
    marks: {},
    poles: [],
    diagnosis: [],
    diagnostics: diagnostics.map((d) => ({
      code: d.code,
      message: d.message,
      ...(d.span === undefined ? {} : { span: [d.span[0], d.span[1]] as [number, number] }),
      ...(d.help === undefined ? {} : { help: d.help }),
      ...(d.suggestion === undefined
        ? {}
        : {
            suggestion: {
              span: [d.suggestion.span[0], d.suggestion.span[1]] as [number, number],
              replacement: d.suggestion.replacement,
            },
          }),
    })),
    summary: `Not readable: ${first?.message ?? "no reason is known."}${more}`,
  };
}

function vanishingDenominator(span: readonly [number, number], form: Form, n: number): Diagnostic {
  const text = form.notation.slice(span[0], span[1]);
  const shown = text.length > 60 ? `${text.slice(0, 57)}...` : text;
  return {
    code: "denominator-vanishes",
    span,
    message: `The denominator of ${shown} is zero at every point${typeof form.amplitude.n === "number" ? "" : ` for n = ${n}`}.`,
    help: "Look for a repeated label (an index bound one too far, such as j = n with j+1 = 1), or for a difference of equal terms.",
  };
}

/** Whether an accepted form is of the same function at this n. */
function comparable(form: Form, other: Form, n: number): boolean {
  const { amplitude } = other;
  const inRange =
    typeof amplitude.n === "number"
      ? amplitude.n === n
      : n >= amplitude.n.from && (amplitude.n.to === null || n <= amplitude.n.to);
  return (
    inRange &&
    amplitude.k === form.amplitude.k &&
    amplitude.loops === form.amplitude.loops &&
    other.target === form.target &&
    JSON.stringify(other.component) === JSON.stringify(form.component)
  );
}

function reportOf(form: Form, digest: string, results: readonly SizeResult[], shown: SizeResult): Report {
  const ranged = typeof form.amplitude.n !== "number";
  const verdict = worst(results);
  const reason = verdict === "undecided" ? results.find((r) => r.verdict === "undecided")?.reason : undefined;
  const print = fingerprint(formAt(form, shown.n));
  const comparisons = results.flatMap((r) => r.comparisons.map((c) => (ranged ? c : withoutN(c))));
  const disagreeing = results.find((r) => r.verdict === "disagrees");
  const diagnosis = disagreeing?.diagnosis ?? [];
  const component = componentText(form, shown.n);
  return {
    verdict,
    ...(reason === undefined ? {} : { reason }),
    amplitude: {
      key: amplitudeKey(form),
      n: typeof form.amplitude.n === "number" ? form.amplitude.n : null,
      k: form.amplitude.k,
      loops: form.amplitude.loops,
    },
    target: form.target,
    ...(component === null ? {} : { component }),
    digest,
    ...(print.kind === "fingerprint" ? { fingerprint: print.text } : {}),
    ...(ranged ? { at: shown.n } : {}),
    terms: shown.terms,
    operations: shown.operations,
    range: results.map((r) => r.n),
    evaluator: evaluatorName,
    comparisons,
    leftOut: results.flatMap((r) => r.leftOut.map((l) => (ranged ? { ...l, n: r.n } : l))),
    marks: marksOf(results, shown),
    poles: [...shown.poles],
    diagnosis: [...diagnosis],
    diagnostics: [],
    summary: summary(form, verdict, comparisons, diagnosis, results),
  };
}

function worst(results: readonly SizeResult[]): "agrees" | "disagrees" | "undecided" {
  if (results.some((r) => r.verdict === "disagrees")) return "disagrees";
  return results.some((r) => r.verdict === "undecided") ? "undecided" : "agrees";
}

function withoutN({ n: _, ...comparison }: Comparison): Comparison {
  return comparison;
}

/** The marks of the n shown; one that fails at another n fails, and says where. */
function marksOf(results: readonly SizeResult[], shown: SizeResult): Report["marks"] {
  const marks: Partial<Record<MarkCode, Mark>> = {};
  for (const { code } of markChecks) {
    const mark = shown.marks[code];
    if (mark === undefined) continue;
    const failing = results.find((r) => r.marks[code]?.state === "fails");
    const there = failing?.marks[code];
    if (there !== undefined && failing !== undefined && mark.state !== "fails")
      marks[code] = { ...there, evidence: `At n = ${failing.n}: ${there.evidence}` };
    else if (results.length > 1) marks[code] = { ...mark, evidence: `At n = ${shown.n}: ${mark.evidence}` };
    else marks[code] = mark;
  }
  return marks;
}

function summary(
  form: Form,
  verdict: "agrees" | "disagrees" | "undecided",
  comparisons: readonly Comparison[],
  diagnosis: readonly Diagnosis[],
  results: readonly SizeResult[],
): string {
  const [first, last] = [results[0]?.n, results.at(-1)?.n];
  const range = typeof form.amplitude.n === "number" ? "" : ` for every n from ${first} to ${last}`;
  if (verdict === "agrees") {
    const names = [...new Set(comparisons.map((c) => c.with))];
    const bounds = comparisons.map((c) => Number(c.bound?.slice(3) ?? 0));
    return `Agrees with ${list(names)}${range}: a probabilistic identity check with bound 2^-${Math.min(...bounds)}, not a symbolic proof.`;
  }
  if (verdict === "disagrees") {
    const where = results.find((r) => r.verdict === "disagrees");
    const at = where !== undefined && results.length > 1 ? ` at n = ${where.n}` : "";
    const broken =
      where === undefined ? [] : markChecks.filter((m) => m.constraint && where.marks[m.code]?.state === "fails");
    if (diagnosis[0] !== undefined) return `Disagrees${at}: ${diagnosis[0].message}`;
    if (broken[0] !== undefined) return `Disagrees${at}: an amplitude ${broken[0].says}, and this form does not.`;
    return `Disagrees${at} with ${list(comparisons.filter((c) => !c.agrees).map((c) => c.with))}.`;
  }
  const reason = results.find((r) => r.verdict === "undecided")?.reason;
  if (reason === "budget")
    return "Undecided: every comparison would take more operations than the budget of this check.";
  if (reason === "bound")
    return "Undecided: the expressions are so large that no number of points modulo 31-bit primes gives the bound asked for.";
  const fixed = results.every((r) => r.marks.twoParticleCuts?.state === "holds");
  return `Undecided: there is no source of truth and no accepted form to compare with, and no constraint fails.${fixed ? " The form is fixed by its two-particle cuts, all of which hold." : ""}`;
}

function list(names: readonly string[]): string {
  if (names.length <= 1) return names[0] ?? "nothing";
  return `${names.slice(0, -1).join(", ")} and ${names.at(-1)}`;
}

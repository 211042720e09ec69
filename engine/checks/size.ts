/** The check of a form at one n: weights, values against the truth, marks, and what is wrong where it disagrees. */
import type { FormAtN } from "../evaluate/form";
import { sizeBound } from "../evaluate/size";
import { countTerms } from "../notation/count";
import { mostTerms } from "../notation/limits";
import type { Span } from "../result";
import { answering, type Question, type SizeBound, type Source } from "../sources";
import type { Bench } from "./bench";
import { boundText, fewestSamples, missProbability, samplesNeeded } from "./bound";
import { type DiagnosisCase, diagnose, drawProbes } from "./diagnosis";
import { type PreparedForm, prepare } from "./evaluator";
import { markChecks } from "./marks";
import { findPoles } from "./poles";
import type { Comparison, Diagnosis, Mark, MarkCode, Pole, Target } from "./report";
import { drawSamples, type Sampled } from "./sampling";
import { type Comparand, fromForm, fromSource } from "./truth";
import { checkWeights } from "./weights";

/** What was found at one n. */
export interface SizeResult {
  readonly n: number;
  readonly verdict: "agrees" | "disagrees" | "undecided";
  readonly reason?: "nothing-to-compare" | "budget" | "bound";
  readonly comparisons: readonly Comparison[];
  readonly marks: Partial<Record<MarkCode, Mark>>;
  readonly poles: readonly Pole[];
  readonly diagnosis: readonly Diagnosis[];
  readonly terms: number;
  readonly operations: number;
  readonly evidence: SizeEvidence;
}

/** The numbers behind a verdict: everything needed to draw the samples again and to compare values. */
export interface SizeEvidence {
  readonly n: number;
  readonly samples: readonly { readonly draw: number; readonly prime: number; readonly value: number }[];
  readonly truths: readonly { readonly with: string; readonly values: readonly number[] }[];
}

export interface SizeOptions {
  readonly seed: string;
  readonly target: Target;
  readonly accepted: readonly { readonly name: string; readonly form: FormAtN }[];
  /** Names of the sources to ask; all that cover the question where it is left out. */
  readonly sources?: readonly string[];
  /** Called between steps with the stage; throws to cancel. */
  readonly step: (stage: string) => void;
  /** Operations that comparisons and marks may take; the cheapest comparisons come first. */
  readonly budget: number;
}

export type SizeOutcome = SizeResult | { readonly vanishing: Span };

export function checkSize(form: FormAtN, options: SizeOptions): SizeOutcome {
  const { seed, target } = options;
  options.step("weights");
  const weights = checkWeights(form, target);
  const question: Question = { n: form.n, k: form.k, loops: form.loops, negativeLegs: form.negativeLegs, target };
  const truthOf = (q: Question): Comparand | null => cheapest(answering(q), q);
  const budget = { left: options.budget };
  const diagnosing = (bench: Bench | null, truths: readonly Comparand[]): readonly Diagnosis[] => {
    options.step("diagnosis");
    const [truth] = truths;
    const probes = bench === null || truth === undefined ? [] : drawProbes(seed, form, truth);
    const spend = (operations: number): boolean => {
      budget.left -= operations;
      return budget.left >= 0;
    };
    const found: DiagnosisCase = { seed, form, question, weights, bench, truths, probes, truthOf, spend };
    return diagnose(found);
  };

  const degree = form.negativeLegs === null ? form.k : 0;
  if (!weights.homogeneousInEta || (weights.degree !== null && weights.degree !== degree))
    return withoutValue(form, diagnosing(null, []));

  const poles = findPoles(form);
  const prepared = prepare(form);
  const size = sizeBound(form);
  const truths = chosenTruths(question, options, size, prepared, budget);
  const miss = truths.comparands.map((c) => missProbability(size, c.size));
  const own = missProbability(size, size);
  const needed = miss.map(samplesNeeded);
  const count = Math.max(fewestSamples, ...needed.map((m) => m ?? fewestSamples), samplesNeeded(own) ?? fewestSamples);

  options.step("values");
  const sampled = drawSamples(seed, prepared, truths.comparands, count);
  if ("span" in sampled) return { vanishing: sampled.span };
  const bench: Bench = {
    seed,
    form,
    target,
    prepared,
    samples: sampled.samples,
    values: sampled.values,
    poles,
    miss: own,
  };
  const comparisons = truths.comparands.map((c, i) => compare(form.n, c, sampled, i, miss[i] ?? 1));
  const disagrees = comparisons.some((c) => !c.agrees);

  const marks: Partial<Record<MarkCode, Mark>> = {};
  for (const check of markChecks) {
    options.step(check.code);
    marks[check.code] = check.run(bench);
  }
  const broken = markChecks.filter((check) => check.constraint && marks[check.code]?.state === "fails");
  const uncertain = needed.includes(null);
  const verdict =
    disagrees || broken.length > 0 || weights.faults.length > 0
      ? "disagrees"
      : comparisons.length === 0 || uncertain
        ? "undecided"
        : "agrees";
  const reason =
    verdict !== "undecided" ? undefined : uncertain ? "bound" : truths.leftOut > 0 ? "budget" : "nothing-to-compare";
  return {
    n: form.n,
    verdict,
    ...(reason === undefined ? {} : { reason }),
    comparisons,
    marks,
    poles,
    diagnosis: verdict === "disagrees" ? diagnosing(bench, truths.comparands) : [],
    terms: sampled.values[0]?.terms.length ?? 0,
    operations: prepared.operations,
    evidence: evidenceOf(form.n, truths.comparands, sampled),
  };
}

/** A form of another Grassmann degree than its amplitude has no value to compare: its weights are the finding. */
function withoutValue(form: FormAtN, diagnosis: readonly Diagnosis[]): SizeResult {
  return {
    n: form.n,
    verdict: "disagrees",
    comparisons: [],
    marks: {},
    poles: findPoles(form),
    diagnosis,
    terms: countTerms(form.formula, form, mostTerms),
    operations: 0,
    evidence: { n: form.n, samples: [], truths: [] },
  };
}

/** Sources and accepted forms, the cheapest first, as many as the budget allows. */
function chosenTruths(
  question: Question,
  options: SizeOptions,
  size: SizeBound,
  prepared: PreparedForm,
  budget: { left: number },
): { readonly comparands: readonly Comparand[]; readonly leftOut: number } {
  const known = answering(question).filter((s) => options.sources === undefined || options.sources.includes(s.name));
  const all = [
    ...known.map((s) => fromSource(s, question)).sort((a, b) => a.cost - b.cost),
    ...options.accepted.map(({ name, form }) => fromForm(name, form)),
  ];
  const comparands: Comparand[] = [];
  for (const c of all) {
    const samples = samplesNeeded(missProbability(size, c.size)) ?? fewestSamples;
    const cost = samples * (c.cost + (comparands.length === 0 ? prepared.operations : 0));
    if (cost > budget.left) continue;
    budget.left -= cost;
    comparands.push(c);
  }
  return { comparands, leftOut: all.length - comparands.length };
}

function cheapest(known: readonly Source[], question: Question): Comparand | null {
  const [first] = known.map((s) => fromSource(s, question)).sort((a, b) => a.cost - b.cost);
  return first ?? null;
}

function compare(n: number, comparand: Comparand, sampled: Sampled, index: number, miss: number): Comparison {
  const truths = sampled.truths[index] ?? [];
  const agrees = sampled.values.every((value, i) => value.sum === truths[i]);
  const primes = new Set(sampled.samples.map((s) => s.prime)).size;
  return {
    with: comparand.name,
    kind: comparand.kind,
    agrees,
    points: sampled.samples.length,
    primes,
    n,
    ...(agrees ? { bound: boundText(miss, sampled.samples.length) } : {}),
    ...(comparand.reference === undefined ? {} : { reference: comparand.reference }),
  };
}

function evidenceOf(n: number, comparands: readonly Comparand[], sampled: Sampled): SizeEvidence {
  return {
    n,
    samples: sampled.samples.map(({ prime }, i) => ({
      draw: sampled.draws[i] ?? 0,
      prime,
      value: sampled.values[i]?.sum ?? 0,
    })),
    truths: comparands.map((c, i) => ({ with: c.name, values: sampled.truths[i] ?? [] })),
  };
}

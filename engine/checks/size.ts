/** The check of a form at one n: weights, values against the truth, marks, and what is wrong where it disagrees. */
import type { FormAtN } from "../evaluate/form";
import { sizeBound } from "../evaluate/size";
import { countTerms } from "../notation/count";
import { mostTerms } from "../notation/limits";
import type { Span } from "../result";
import type { Question } from "../sources";
import type { Bench } from "./bench";
import { boundText, fewestSamples, missProbability, samplesNeeded } from "./bound";
import { type DiagnosisCase, diagnose, drawProbes } from "./diagnosis";
import { prepare } from "./evaluator";
import { groundsOf } from "./ground";
import { markChecks } from "./marks";
import { findDivisors, findPoles } from "./poles";
import type { Comparison, Diagnosis, LeftOut, Mark, MarkCode, Pole, Target } from "./report";
import { drawSamples, type Sampled } from "./sampling";
import { prepareSeries } from "./seriesEvaluator";
import { type Chosen, type Comparand, cheapestTruth, chooseTruths } from "./truth";
import { measurePoles } from "./valuation";
import { checkWeights } from "./weights";

/** What was found at one n. */
export interface SizeResult {
  readonly n: number;
  readonly verdict: "agrees" | "disagrees" | "undecided";
  readonly reason?: "nothing-to-compare" | "budget" | "bound";
  readonly comparisons: readonly Comparison[];
  readonly leftOut: readonly Omit<LeftOut, "n">[];
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
  /** Called often within a step; throws to cancel. */
  readonly alive: () => void;
  /** Operations that comparisons and marks may take; the cheapest comparisons come first. */
  readonly budget: number;
}

export type SizeOutcome = SizeResult | { readonly vanishing: Span };

export function checkSize(form: FormAtN, options: SizeOptions): SizeOutcome {
  const { seed, target } = options;
  options.step("weights");
  const weights = checkWeights(form, target);
  const question: Question = { n: form.n, k: form.k, loops: form.loops, negativeLegs: form.negativeLegs, target };
  const budget = { left: options.budget };
  const diagnosing = (bench: Bench | null, truths: readonly Comparand[]): readonly Diagnosis[] => {
    options.step("diagnosis");
    const [truth] = truths;
    const probes = bench === null || truth === undefined ? [] : drawProbes(seed, form, truth);
    const spend = (operations: number): boolean => {
      budget.left -= operations;
      return budget.left >= 0;
    };
    const found: DiagnosisCase = {
      seed,
      form,
      question,
      weights,
      bench,
      truths,
      probes,
      truthOf: cheapestTruth,
      spend,
    };
    return diagnose(found);
  };

  const degree = form.negativeLegs === null ? form.k : 0;
  if (!weights.homogeneousInEta || (weights.degree !== null && weights.degree !== degree))
    return withoutValue(form, diagnosing(null, []));

  const prepared = prepare(form);
  const series = prepareSeries(prepared);
  const ground = groundsOf(seed, form);
  const size = sizeBound(form);
  const own = missProbability(size, size);
  const { chosen, leftOut, cost } = chooseTruths(question, size, options.accepted, budget.left, options.sources);
  budget.left -= cost;
  const comparands = chosen.map((c) => c.comparand);
  const samples = Math.max(samplesNeeded(own) ?? fewestSamples, ...chosen.map((c) => c.samples));

  options.step("values");
  const sampled = drawSamples(seed, prepared, chosen, samples);
  if ("span" in sampled) return { vanishing: sampled.span };
  options.step("poles");
  const poles = measurePoles(
    form,
    findDivisors(form),
    series,
    ground,
    sampled.values[0]?.terms.length ?? 1,
    options.alive,
  );
  const bench: Bench = {
    seed,
    form,
    target,
    prepared,
    series,
    ground,
    samples: sampled.samples,
    values: sampled.values,
    poles,
    miss: own,
  };
  const comparisons = chosen.map((c, i) => compare(form.n, c, sampled, sampled.truths[i] ?? []));
  const disagrees = comparisons.some((c) => !c.agrees);

  const marks: Partial<Record<MarkCode, Mark>> = {};
  for (const check of markChecks) {
    options.step(check.code);
    marks[check.code] = check.run(bench);
  }
  const broken = markChecks.filter((check) => check.constraint && marks[check.code]?.state === "fails");
  // An accepted form that was left out must not be contradicted later: only a source of truth can stand in for it.
  const missing = leftOut.some((l) => options.accepted.some((a) => a.name === l.with));
  const enough = missing ? comparisons.some((c) => c.kind === "source") : comparisons.length > 0;
  const verdict =
    disagrees || broken.length > 0 || weights.faults.length > 0 ? "disagrees" : enough ? "agrees" : "undecided";
  const reason = verdict === "undecided" ? (leftOut[0]?.reason ?? "nothing-to-compare") : undefined;
  return {
    n: form.n,
    verdict,
    ...(reason === undefined ? {} : { reason }),
    comparisons,
    leftOut,
    marks,
    poles,
    diagnosis: verdict === "disagrees" ? diagnosing(bench, comparands) : [],
    terms: sampled.values[0]?.terms.length ?? 0,
    operations: prepared.operations,
    evidence: evidenceOf(form.n, chosen, sampled),
  };
}

/** A form of another Grassmann degree than its amplitude has no value to compare: its weights are the finding. */
function withoutValue(form: FormAtN, diagnosis: readonly Diagnosis[]): SizeResult {
  return {
    n: form.n,
    verdict: "disagrees",
    comparisons: [],
    leftOut: [],
    marks: {},
    poles: findPoles(form),
    diagnosis,
    terms: countTerms(form.formula, form, mostTerms),
    operations: 0,
    evidence: { n: form.n, samples: [], truths: [] },
  };
}

function compare(n: number, { comparand, miss }: Chosen, sampled: Sampled, truths: readonly number[]): Comparison {
  const agrees = truths.every((truth, i) => sampled.values[i]?.sum === truth);
  const primes = new Set(sampled.samples.slice(0, truths.length).map((s) => s.prime)).size;
  return {
    with: comparand.name,
    kind: comparand.kind,
    agrees,
    points: truths.length,
    primes,
    n,
    ...(agrees ? { bound: boundText(miss, truths.length) } : {}),
    ...(comparand.reference === undefined ? {} : { reference: comparand.reference }),
    ...(comparand.lineage === undefined ? {} : { lineage: comparand.lineage }),
  };
}

function evidenceOf(n: number, chosen: readonly Chosen[], sampled: Sampled): SizeEvidence {
  return {
    n,
    samples: sampled.samples.map(({ prime }, i) => ({
      draw: sampled.draws[i] ?? 0,
      prime,
      value: sampled.values[i]?.sum ?? 0,
    })),
    truths: chosen.map(({ comparand }, i) => ({ with: comparand.name, values: sampled.truths[i] ?? [] })),
  };
}

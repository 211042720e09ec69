/** What a form is compared with: the sources of truth that cover its amplitude, and the accepted forms of the same amplitude. */
import type { FormAtN } from "../evaluate/form";
import { sizeBound } from "../evaluate/size";
import { answering, type Question, type SizeBound, type Source } from "../sources";
import { missProbability, samplesNeeded } from "./bound";
import { type PreparedForm, prepare, type Sample } from "./evaluator";

/** Something with values at samples that the form's values must equal. */
export interface Comparand {
  readonly name: string;
  readonly kind: "source" | "form";
  readonly reference?: string;
  readonly lineage?: string;
  readonly size: SizeBound;
  /** Operations for one sample. */
  readonly cost: number;
  /** Residues, null at a bad point. */
  evaluate(samples: readonly Sample[]): readonly (number | null)[];
}

export function fromSource(source: Source, question: Question): Comparand {
  return {
    name: source.name,
    kind: "source",
    reference: source.reference,
    lineage: source.lineage,
    size: source.size(question),
    cost: source.cost(question),
    evaluate: (samples) => samples.map(({ prime, point }) => source.evaluate(question, point, prime)),
  };
}

export function fromForm(name: string, form: FormAtN): Comparand {
  const prepared: PreparedForm = prepare(form);
  return {
    name,
    kind: "form",
    size: sizeBound(form),
    cost: prepared.operations,
    evaluate: (samples) => prepared.evaluate(samples).map((o) => (o.kind === "value" ? o.sum : null)),
  };
}

/** A comparand that is asked, with the probability that one sample misses a difference and the samples that make it certain. */
export interface Chosen {
  readonly comparand: Comparand;
  readonly miss: number;
  readonly samples: number;
}

export interface Choice {
  readonly chosen: readonly Chosen[];
  /** What applies and is not asked: too costly for the budget, or too large for the bound to be reached. */
  readonly leftOut: readonly { readonly with: string; readonly reason: "budget" | "bound" }[];
  /** Operations of all that is asked, the form's own left aside. */
  readonly cost: number;
}

/** All that applies and fits the budget: the cheapest source of each lineage, then the other sources, then the accepted forms. */
export function chooseTruths(
  question: Question,
  form: SizeBound,
  accepted: readonly { readonly name: string; readonly form: FormAtN }[],
  budget: number,
  names?: readonly string[],
): Choice {
  const known = answering(question).filter((s) => names === undefined || names.includes(s.name));
  const byCost = known.map((s) => fromSource(s, question)).sort((a, b) => a.cost - b.cost);
  const first = byCost.filter((c, i) => byCost.findIndex((d) => d.lineage === c.lineage) === i);
  const others = byCost.filter((c) => !first.includes(c));
  const chosen: Chosen[] = [];
  const leftOut: { with: string; reason: "budget" | "bound" }[] = [];
  let cost = 0;
  for (const comparand of [...first, ...others, ...accepted.map(({ name, form: other }) => fromForm(name, other))]) {
    const miss = missProbability(form, comparand.size);
    const samples = samplesNeeded(miss);
    if (samples === null) leftOut.push({ with: comparand.name, reason: "bound" });
    else if (cost + samples * comparand.cost > budget) leftOut.push({ with: comparand.name, reason: "budget" });
    else {
      cost += samples * comparand.cost;
      chosen.push({ comparand, miss, samples });
    }
  }
  return { chosen, leftOut, cost };
}

/** The cheapest source of a question, null where none covers it. */
export function cheapestTruth(question: Question): Comparand | null {
  const [first] = answering(question)
    .map((s) => fromSource(s, question))
    .sort((a, b) => a.cost - b.cost);
  return first ?? null;
}

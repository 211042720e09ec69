/** What a form is compared with: the sources of truth that cover its amplitude, and the accepted forms of the same amplitude. */
import type { FormAtN } from "../evaluate/form";
import { sizeBound } from "../evaluate/size";
import type { Question, SizeBound, Source } from "../sources";
import { type PreparedForm, prepare, type Sample } from "./evaluator";

/** Something with values at samples that the form's values must equal. */
export interface Comparand {
  readonly name: string;
  readonly kind: "source" | "form";
  readonly reference?: string;
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

/** Does a task; pure, and run in a thread because it can take long. */
import { derive } from "../../../engine/derive";
import { formAt, type PointSource, seedUsed, valueReply, valuesOf } from "../../../engine/evaluate";
import { randomness, rationals, realDoubles } from "../../../engine/fields";
import { rationalMomenta, scatteringPoint } from "../../../engine/kinematics";
import { countTerms, latexLines, printFormula, readEntryValue } from "../../../engine/notation";
import { mostTerms } from "../../../engine/notation/limits";
import type { EvaluateReply } from "../../_contract";
import type { Computed, DeriveTask, EvaluateTask, Task } from "./task";

export const work = (task: Task): Computed => (task.what === "derive" ? derived(task) : values(task));

function derived({ request }: DeriveTask): Computed {
  const found = derive(request);
  if (!found.ok) return { kind: "refused", diagnostics: found.diagnostics };
  const { formula, references, ...entry } = found.value;
  return {
    kind: "derived",
    derived: {
      document: { ...entry, notation: printFormula(formula), references: references.map((paper) => ({ ...paper })) },
      terms: countTerms(formula, request, mostTerms),
      latex: latexLines(formula),
    },
  };
}

/** Momenta of legs as text, and the document that the engine reads. */
type Drawn = Pick<EvaluateReply, "momenta" | "signature">;

function draw(
  n: number,
  { count, energy, seed }: Extract<EvaluateTask["source"], { kind: "phaseSpace" }>,
  exact: boolean,
): Drawn {
  const random = randomness(seed);
  const point = (): string[][] =>
    exact
      ? rationalMomenta(n, random).map((p) => p.map(rationals.toText))
      : scatteringPoint(n, energy, random).map((p) => p.map(realDoubles.toText));
  return { momenta: Array.from({ length: count }, point), signature: exact ? "2,2" : "1,3" };
}

function values({ entry, n, source, numbers, helicities, many }: EvaluateTask): Computed {
  const read = readEntryValue(entry);
  if (!read.ok) return { kind: "refused", diagnostics: read.diagnostics };
  const form = formAt(read.value, n);
  const drawn = source.kind === "phaseSpace" ? draw(n, source, numbers === "rational") : {};
  const from: PointSource =
    source.kind === "phaseSpace" ? { kind: "momenta", document: drawn, seed: source.seed } : source;
  const table = valuesOf({ form, source: from, numbers, helicities });
  if (!table.ok) return { kind: "refused", diagnostics: table.diagnostics };
  const seed = source.kind === "phaseSpace" ? source.seed : seedUsed(form, from);
  return { kind: "values", reply: { ...valueReply(table.value, many, seed), ...drawn } as EvaluateReply };
}

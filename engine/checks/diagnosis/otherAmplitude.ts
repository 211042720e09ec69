/** The form is right for another (n, k, L): with one or two legs fewer, or of another degree. */
import { relabelPoint, sizeKey } from "../../kinematics";
import type { Question } from "../../sources";
import { drawOverOnePrime } from "../draws";
import { prepare, type Sample } from "../evaluator";
import type { Diagnosis } from "../report";
import { allEqual, type DiagnosisCase, probeCount } from "./case";

export function otherAmplitude(c: DiagnosisCase): readonly Diagnosis[] {
  const { form, weights } = c;
  if (form.negativeLegs !== null || !weights.homogeneousInEta) return [];
  const k = weights.degree ?? form.k;
  const candidates: { readonly n: number; readonly drop: readonly number[] }[] = [{ n: form.n, drop: [] }];
  for (let a = form.n; a >= 1; a--) candidates.push({ n: form.n - 1, drop: [a] });
  candidates.push({ n: form.n - 2, drop: [form.n - 1, form.n] });
  for (const { n, drop } of candidates) {
    if (!Number.isInteger(k) || n < 4 || k > n - 4 || (n === form.n && k === form.k)) continue;
    const question: Question = { n, k, loops: form.loops, negativeLegs: null, target: "amplitude" };
    if (!matches(c, question, drop)) continue;
    const key = sizeKey(question);
    const legs = drop.length === 0 ? "" : ` of the legs without ${drop.join(" and ")}`;
    return [
      { code: "other-amplitude", key, message: `The form is the amplitude ${key}${legs}, not ${sizeKey(form)}.` },
    ];
  }
  return [];
}

/** Whether the form, at points of its own n and the k of the question, is the amplitude asked for of the legs that are left. */
function matches({ form, seed, truthOf, spend }: DiagnosisCase, question: Question, drop: readonly number[]): boolean {
  const truth = truthOf(question);
  const prepared = prepare({ ...form, k: question.k });
  if (truth === null || !spend((truth.cost + prepared.operations) * probeCount)) return false;
  const samples = drawOverOnePrime(seed, `other ${sizeKey(question)}`, prepared.form, probeCount);
  const kept = Array.from({ length: form.n }, (_, i) => i + 1).filter((a) => !drop.includes(a));
  const fewer = samples.map((sample): Sample => ({ ...sample, point: withLegs(sample.point, kept) }));
  const expected = truth.evaluate(fewer);
  return !expected.includes(null) && allEqual(prepared.evaluate(samples), expected as number[]);
}

/** The point with only these legs. */
function withLegs(point: Sample["point"], legs: readonly number[]): Sample["point"] {
  if (legs.length === point.n) return point;
  const first = relabelPoint(point, [...legs, ...Array.from({ length: point.n - legs.length }, () => 1)]);
  return {
    ...first,
    n: legs.length,
    twistors: first.twistors.slice(0, legs.length),
    chi: first.chi.slice(0, legs.length),
  };
}

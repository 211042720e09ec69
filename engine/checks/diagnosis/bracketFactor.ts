/** The form is the truth times a power of one bracket, up to sign. */
import type { Field } from "../../fields";
import { angle, bracket, lambdaTilde, spinorBracket } from "../../kinematics";
import type { Sample } from "../evaluator";
import type { Diagnosis } from "../report";
import type { DiagnosisCase } from "./case";

const powers = [1, -1, 2, -2, 3, -3, 4, -4];

export function bracketFactor({ form, probes }: DiagnosisCase): readonly Diagnosis[] {
  const [probe] = probes;
  if (probe === undefined || probes.length < 2) return [];
  for (const candidate of candidates(form.n, form.loops)) {
    const values = probes.map(({ sample }) => candidate.value(sample));
    for (const power of powers) {
      const signs = probes.map(({ sample: { field }, value, truth }, i) => {
        const factor = raised(field, values[i] ?? 0, power);
        if (factor === null) return 0;
        const expected = field.multiply(truth, factor);
        return value.sum === expected ? 1 : value.sum === field.negate(expected) ? -1 : 0;
      });
      const [sign] = signs;
      if (!sign || signs.some((s) => s !== sign)) continue;
      const times = power === 1 ? candidate.text : `${candidate.text}^${power}`;
      return [
        {
          code: "bracket-factor",
          bracket: candidate.text,
          power,
          ...(sign === -1 ? { factor: "-1" } : {}),
          message: `The form is ${sign === -1 ? "-1 times " : ""}${times} times the truth: the bracket ${candidate.text} stands ${power > 0 ? "once too often above the bar" : "once too often below the bar"}${Math.abs(power) > 1 ? `, ${Math.abs(power)} times over` : ""}.`,
        },
      ];
    }
  }
  return [];
}

interface Candidate {
  readonly text: string;
  readonly value: (sample: Sample) => number;
}

/** <a b c d>, <AB a b>, <AB CD>, <a b> and [a b] of all labels and loop lines. */
function* candidates(n: number, loops: number): Generator<Candidate> {
  const twistor = ({ point }: Sample, a: number) => point.twistors[a - 1]!;
  // Where lambda-tilde has no value the bracket counts as zero, and no power of zero is a factor.
  const tilde = (s: Sample, a: number) => lambdaTilde(s.field, s.point.twistors, a) ?? ([0, 0] as const);
  for (let a = 1; a <= n; a++)
    for (let b = a + 1; b <= n; b++) {
      yield { text: `<${a} ${b}>`, value: (s) => angle(s.field, twistor(s, a), twistor(s, b)) };
      yield {
        text: `[${a} ${b}]`,
        value: (s) => spinorBracket(s.field, tilde(s, a), tilde(s, b)),
      };
      for (let l = 0; l < loops; l++) {
        const [first, second] = [2 * l, 2 * l + 1].map((i) => "ABCDEFGH".charAt(i));
        yield {
          text: `<${first}${second} ${a} ${b}>`,
          value: (s) => bracket(s.field, ...s.point.lines[l]!, twistor(s, a), twistor(s, b)),
        };
      }
      for (let c = b + 1; c <= n; c++)
        for (let d = c + 1; d <= n; d++)
          yield {
            text: `<${a} ${b} ${c} ${d}>`,
            value: (s) => bracket(s.field, twistor(s, a), twistor(s, b), twistor(s, c), twistor(s, d)),
          };
    }
  for (let l = 0; l < loops; l++)
    for (let m = l + 1; m < loops; m++) {
      const words = [l, m].map((i) => "ABCDEFGH".slice(2 * i, 2 * i + 2));
      yield {
        text: `<${words.join(" ")}>`,
        value: (s) => bracket(s.field, ...s.point.lines[l]!, ...s.point.lines[m]!),
      };
    }
}

function raised(field: Field<number>, base: number, power: number): number | null {
  const unit = power > 0 ? base : field.inverse(base);
  if (unit === null) return null;
  let result = field.one;
  for (let i = 0; i < Math.abs(power); i++) result = field.multiply(result, unit);
  return result;
}

/** Dependence on the loop lines only, not on the two points that span each: weights cannot show it (MARKS, line dependence). */
import { randomness } from "../../fields";
import { mixLine } from "../../kinematics";
import type { Bench } from "../bench";
import type { Sample } from "../evaluator";
import type { Mark } from "../report";
import { testInvariance } from "./invariance";

export function lineIndependent(bench: Bench): Mark {
  const { loops } = bench.form;
  if (loops === 0) return { state: "notApplicable", evidence: "A tree form holds no loop line." };
  const mixing = (sample: Sample) => {
    const random = randomness(`${bench.seed}|line points|${sample.prime}`);
    const draw = () => Number(random.below(BigInt(sample.prime)));
    return Array.from(
      { length: loops },
      () =>
        [
          [draw(), draw()],
          [draw(), draw()],
        ] as const,
    );
  };
  return testInvariance(bench, {
    when: "other points are taken on the loop lines, up to the weight -4 of each line",
    move: (sample) =>
      mixing(sample).reduce((point, matrix, line) => mixLine(sample.field, point, line, matrix), sample.point),
    factor: (sample) => {
      const { field } = sample;
      let factor = field.one;
      for (const [[a, b], [c, d]] of mixing(sample)) {
        const inverse = field.inverse(field.subtract(field.multiply(a, d), field.multiply(b, c)));
        // A singular matrix (one in 2^30) would be a bad point: zero matches no value but zero.
        const once = inverse ?? field.zero;
        const twice = field.multiply(once, once);
        factor = field.multiply(factor, field.multiply(twice, twice));
      }
      return factor;
    },
  });
}

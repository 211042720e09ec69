/** Dual conformal symmetry: the value is unchanged when all twistors are moved by one matrix of determinant 1. */
import { kindsOf } from "../../evaluate/form";
import { type Field, type Randomness, randomness } from "../../fields";
import { transformPoint } from "../../kinematics";
import type { Bench } from "../bench";
import type { Mark } from "../report";
import { testInvariance } from "./invariance";

const withInfinityTwistor = ["angle", "square", "string", "mandelstam", "distance"];

export function dualConformal(bench: Bench): Mark {
  if (bench.form.negativeLegs !== null)
    return {
      state: "notApplicable",
      evidence: "A component is not invariant by itself: it holds the MHV denominator.",
    };
  const mark = testInvariance(bench, {
    when: "all twistors, loop points and references are moved by one matrix of determinant 1",
    move: ({ prime, field, point }) => {
      const random = randomness(`${bench.seed}|matrix|${prime}`);
      const lowered = transformPoint(
        field,
        point,
        triangular(field, random, (row, column) => row > column),
      );
      return transformPoint(
        field,
        lowered,
        triangular(field, random, (row, column) => row < column),
      );
    },
  });
  if (mark.state !== "holds") return mark;
  const kinds = kindsOf(bench.form.formula);
  const manifest = !withInfinityTwistor.some((kind) => kinds.has(kind));
  return {
    ...mark,
    manifest,
    evidence: `${mark.evidence} ${manifest ? "It is manifest: no infinity twistor is written." : "It is not manifest: infinity twistors are written, and cancel."}`,
  };
}

/** A random 4 x 4 matrix with ones on the diagonal and random entries on one side of it: its determinant is 1. */
function triangular(
  field: Field<number>,
  random: Randomness,
  side: (row: number, column: number) => boolean,
): number[][] {
  const indices = [0, 1, 2, 3];
  return indices.map((row) =>
    indices.map((column) => {
      if (row === column) return field.one;
      return side(row, column) ? Number(random.below(field.characteristic)) : field.zero;
    }),
  );
}

/**
 * Logarithmic singularities: on every stratum the pole is at most as strong as the measure allows (1412.8478; MARKS
 * "Logarithmic"). Necessary, not sufficient. For trees every pole must be simple.
 */
import { precisionOf, valuationOf } from "../../fields/primeSeries";
import { type Twistor, wrapLabel } from "../../kinematics";
import type { Bench } from "../bench";
import { type Ground, mostAttempts } from "../ground";
import type { Mark } from "../report";
import { type Approach, atSomeGround, directionsOf, legTwistor, linePath, mixture } from "./linePaths";
import { notApplicable, onlyAmplitudes, overBudget, untested } from "./lower";
import { isOpen } from "./spuriousCancel";

/** Where a line is taken, and the largest order of pole there: the sum of the weights of the coordinates that leave the stratum. */
interface Stratum {
  readonly says: string;
  readonly weight: number;
  readonly path: (ground: Ground) => ReturnType<typeof linePath>;
}

export function logarithmic(bench: Bench): Mark {
  const { loops } = bench.form;
  const other = onlyAmplitudes(bench);
  if (other !== null) return other;
  if (loops === 0) return simplePoles(bench);
  const strata = strataOf(bench.form.n, loops);
  const costly = overBudget(bench, strata.length);
  if (costly !== null) return costly;
  for (const { says, weight, path } of strata) {
    const order = atSomeGround(bench, mostAttempts, (ground) => orderAlong(bench, ground, path(ground), weight));
    if (order === "bad") return untested(`${says}, a denominator vanishes at every point tried.`);
    if (order < -weight)
      return {
        state: "fails",
        evidence: `${says}, the value goes as e^${order}; a logarithmic singularity goes as e^-${weight} at most.`,
      };
  }
  return {
    state: "holds",
    evidence: `On ${strata.length} strata no pole is stronger than that of a logarithmic singularity: one Laurent series each, modulo the 31-bit prime ${bench.ground(0).prime}. This is necessary, not sufficient.`,
  };
}

function simplePoles({ poles }: Bench): Mark {
  if (poles.length === 0) return notApplicable("The form has no denominator.");
  const higher = poles.filter((pole) => (pole.order ?? 0) > 1);
  if (higher.length > 0) {
    const named = higher.slice(0, 4).map((pole) => `${pole.bracket} (order ${pole.order})`);
    return { state: "fails", evidence: `${higher.length} poles are not simple: ${named.join(", ")}.` };
  }
  const open = poles.filter(isOpen).length;
  if (open > 0) return untested(`The orders of ${open} of ${poles.length} poles were not measured.`);
  return {
    state: "holds",
    evidence: `Each of the ${poles.length} poles is simple or cancels. This is necessary, not sufficient.`,
  };
}

function orderAlong(bench: Bench, ground: Ground, path: ReturnType<typeof linePath>, weight: number): number | "bad" {
  const found = bench.series.evaluate(ground.field, path, ({ sum }) => precisionOf(sum) >= -weight);
  if (found === null || precisionOf(found.sum) < -weight) return "bad";
  return Math.min(-weight, valuationOf(found.sum) ?? -weight);
}

function strataOf(n: number, loops: number): readonly Stratum[] {
  const legs = Array.from({ length: n }, (_, a) => a + 1);
  const generic = (ground: Ground, end: 0 | 1): Approach => ({
    at: ground.point.lines[0]![end],
    by: [0, 0, 0, 0],
  });
  const leaving = (ground: Ground, end: 0 | 1, at: Twistor<number>): Approach => ({
    at,
    by: directionsOf(ground, 0)[end],
  });
  const along = (ground: Ground, i: number): Twistor<number> =>
    mixture(ground, [i, i + 1], [1, ground.numbers(`stratum ${i}`, 1)[0]!]);
  const two = (ends: (ground: Ground) => readonly [Approach, Approach]) => (ground: Ground) =>
    linePath(ground.point, 0, ends(ground));

  const strata: Stratum[] = legs.flatMap((i) => [
    {
      says: `Where AB meets the line (${i} ${wrapLabel(n, i + 1)})`,
      weight: 1,
      path: two((g) => [leaving(g, 0, along(g, i)), generic(g, 1)]),
    },
    {
      says: `Where AB goes through leg ${i}`,
      weight: 2,
      path: two((g) => [leaving(g, 0, legTwistor(g, i)), generic(g, 1)]),
    },
    {
      says: `Where AB lies in the plane bar(${i})`,
      weight: 2,
      path: two((g) => {
        const numbers = g.numbers(`plane stratum ${i}`, 6);
        const inPlane = (from: number) => mixture(g, [i - 1, i, i + 1], numbers.slice(from, from + 3));
        return [leaving(g, 0, inPlane(0)), leaving(g, 1, inPlane(3))];
      }),
    },
    {
      says: `Where AB is the line (${i} ${wrapLabel(n, i + 1)})`,
      weight: 4,
      path: two((g) => [leaving(g, 0, legTwistor(g, i)), leaving(g, 1, legTwistor(g, i + 1))]),
    },
    {
      // A leaves with e inside the plane and with e^2 out of it: the weights are 1, 2 and 1.
      says: `Where AB approaches leg ${i} within the plane bar(${i})`,
      weight: 4,
      path: (g) => {
        const [p, q, x] = g.numbers(`weighted ${i}`, 3) as [number, number, number];
        const [r, s] = directionsOf(g, 0);
        return linePath(g.point, 0, [
          { at: legTwistor(g, i), by: mixture(g, [i - 1, i + 1], [p, q]), curving: r },
          { at: mixture(g, [i - 1, i + 1], [1, x]), by: s },
        ]);
      },
    },
  ]);
  for (const i of legs)
    for (const j of legs) {
      const next = wrapLabel(n, j + 1);
      if (j === i || next === i) continue;
      strata.push({
        says: `Where AB goes through leg ${i} and meets the line (${j} ${next})`,
        weight: 3,
        path: two((g) => [leaving(g, 0, legTwistor(g, i)), leaving(g, 1, along(g, j))]),
      });
      if (j > i + 1 && !(i === 1 && j === n))
        strata.push({
          says: `Where AB is the line (${i} ${j})`,
          weight: 4,
          path: two((g) => [leaving(g, 0, legTwistor(g, i)), leaving(g, 1, legTwistor(g, j))]),
        });
    }
  if (loops > 1) {
    const onOther = (g: Ground, by: number): Twistor<number> =>
      g.point.lines[1]![0].map((x, at) => g.field.add(x, g.field.multiply(by, g.point.lines[1]![1][at]!)));
    strata.push({
      says: "Where AB meets CD",
      weight: 1,
      path: two((g) => [leaving(g, 0, onOther(g, g.numbers("other line", 1)[0]!)), generic(g, 1)]),
    });
    strata.push({
      says: "Where AB is CD",
      weight: 4,
      path: two((g) => {
        const [x, y] = g.numbers("other line", 2) as [number, number];
        return [leaving(g, 0, onOther(g, x)), leaving(g, 1, onOther(g, y))];
      }),
    });
  }
  return strata;
}

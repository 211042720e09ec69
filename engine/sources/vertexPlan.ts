/** The expansion of trees in MHV vertices as a plan (1009.1854). */
import { type Plan, PlanBuilder, type Term, timesTerms, unit } from "./plan";
import { binomial } from "./treePlan";

/** A propagator between the regions x_i, between legs i and i+1, and x_j; indices from 0, i < j. */
export type Chord = readonly [number, number];

/** Ways to cut an n-gon by k diagonals that do not cross, C(n-3,k) C(n+k-1,k) / (k+1). */
export const diagramCount = (n: number, k: number): number =>
  Math.round((binomial(n - 3, k) * binomial(n + k - 1, k)) / (k + 1));

/** Every set of k diagonals of the n-gon that do not cross. */
export function diagrams(n: number, k: number): Chord[][] {
  const chords: Chord[] = [];
  for (let i = 0; i < n; i++) {
    for (let j = i + 2; j < n; j++) if (j - i < n - 1) chords.push([i, j]);
  }
  const crosses = ([a, b]: Chord, [c, d]: Chord) => (a < c && c < b && b < d) || (c < a && a < d && d < b);
  const extend = (chosen: Chord[], from: number): Chord[][] => {
    if (chosen.length === k) return [chosen];
    const found: Chord[][] = [];
    for (let at = from; at < chords.length; at++) {
      const chord = chords[at]!;
      if (!chosen.some((other) => crosses(chord, other))) found.push(...extend([...chosen, chord], at + 1));
    }
    return found;
  };
  return extend([], 0);
}

/**
 * The sum over diagrams of the product over propagators (i, j) of [* i i' j j'], where i' = i+1 unless another propagator (i, k)
 * ends in the same region between this one and leg i+1: then i' = (i i+1) cap (* k k+1) for the next such propagator.
 *
 * Why: on the line (i i+1) an invariant depends on its two points p, q only through 1/(<* p j j+1><* q j j+1>), and
 * <* p j j+1> is the spinor product of p with the propagator. The vertices between the propagators P1, ..., Pm that end in
 * one region, in order from leg i to leg i+1, need <i P1><P1 P2>...<Pm i+1>; one shifted point for each of P1 to Pm-1 gives that.
 * Base points are the legs and, at index n, the reference.
 */
export function vertexPlan(n: number, k: number): Plan {
  const builder = new PlanBuilder(n + 1);
  const next = (region: number): number => (region + 1) % n;
  const distance = (from: number, to: number): number => (to - from + n) % n;
  const farEnd = ([i, j]: Chord, region: number): number => (i === region ? j : i);

  const endPoints = (diagram: readonly Chord[], chord: Chord, region: number): [number, number] => {
    const own = distance(region, farEnd(chord, region));
    const nearer = diagram
      .filter((other) => other.includes(region))
      .map((other) => farEnd(other, region))
      .filter((end) => distance(region, end) < own)
      .sort((x, y) => distance(region, y) - distance(region, x));
    const neighbour = nearer[0];
    if (neighbour === undefined) return [region, next(region)];
    return [region, builder.meet([region, next(region)], [n, neighbour, next(neighbour)])];
  };

  const terms = diagrams(n, k).flatMap((diagram) =>
    diagram.reduce<Term[]>(
      (product, chord) => {
        const [i, j] = chord;
        const factor = builder.invariant(n, ...endPoints(diagram, chord, i), ...endPoints(diagram, chord, j));
        return timesTerms(product, [factor]);
      },
      [unit],
    ),
  );
  return builder.finish(terms);
}

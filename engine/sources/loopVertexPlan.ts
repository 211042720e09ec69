/** The expansion of one-loop integrands in MHV vertices as a plan (1009.1854). */
import { type Plan, PlanBuilder, type Term, timesTerms, unit } from "./plan";

/** A propagator between regions x_from and x_to that has the legs from+1..to on the side away from the loop; indices from 0. */
export type Arc = readonly [from: number, to: number];

/** Spokes are the regions, ascending, that share a propagator with the loop's region (AB). */
export interface LoopDiagram {
  readonly spokes: readonly number[];
  readonly arcs: readonly Arc[];
}

/**
 * Every planar diagram with at least two spokes and `propagators` propagators: between one spoke and the next, arcs that do
 * not cross. Arcs around a single leg would be a vertex with two legs; arcs around all legs but one would be a bubble
 * on that leg, which has no place in the integrand. Both are left out.
 */
export function loopDiagrams(n: number, propagators: number): LoopDiagram[] {
  const found: LoopDiagram[] = [];
  const choose = (spokes: number[], from: number): void => {
    if (spokes.length >= 2 && spokes.length <= propagators) {
      const sectors = spokes.map((spoke, at): [number, number] => {
        const end = spokes[(at + 1) % spokes.length]!;
        return [spoke, ((end - spoke + n - 1) % n) + 1];
      });
      const arcs = sectors.flatMap(([start, length]) => arcsIn(start, length));
      for (const chosen of nonCrossing(arcs, propagators - spokes.length)) {
        found.push({ spokes, arcs: chosen.map(([start, end]): Arc => [start % n, end % n]) });
      }
    }
    if (spokes.length === propagators) return;
    for (let next = from; next < n; next++) choose([...spokes, next], next + 1);
  };
  const arcsIn = (start: number, length: number): Arc[] => {
    const arcs: Arc[] = [];
    for (let from = start; from < start + length; from++) {
      for (let to = from + 2; to <= start + length; to++) if (to - from <= n - 2) arcs.push([from, to]);
    }
    return arcs;
  };
  choose([], 0);
  return found;
}

/** Sets of `count` of the arcs no two of which cross; ends are not reduced modulo n, so that sectors do not mix. */
function nonCrossing(arcs: readonly Arc[], count: number): Arc[][] {
  const crosses = ([a, b]: Arc, [c, d]: Arc) => (a < c && c < b && b < d) || (c < a && a < d && d < b);
  const extend = (chosen: Arc[], from: number): Arc[][] => {
    if (chosen.length === count) return [chosen];
    return arcs
      .slice(from)
      .flatMap((arc, step) =>
        chosen.some((other) => crosses(arc, other)) ? [] : extend([...chosen, arc], from + step + 1),
      );
  };
  return extend([], 0);
}

/**
 * The sum over diagrams with k+2 propagators of the product of [* i i' j j'] over arcs and [* A A' i i'] over spokes, to be
 * integrated over the Grassmann parts of A and B: with those as two more unit vectors, the determinant does it.
 *
 * In every region the points i' are those of the tree expansion: i' = i+1 for the last propagator before leg i+1, else the
 * meet of (i i+1) with the plane of the next one, (* k k+1) or (* A B). The loop's region has no legs and needs the cyclic product
 * <P2 P1><P3 P2>...<P1 Pr> of its propagators, seen from the vertices around it against the order of the legs:
 * A' = (A B) cap (* k k+1) for the spoke k before, the first preceded by the last. The integrand is minus this sum: the
 * orientation of the measure <AB d^2A><AB d^2B> in which the box is positive.
 * Base points: the legs, then at index n the reference, A and B.
 */
export function loopVertexPlan(n: number, k: number): Plan {
  const builder = new PlanBuilder(n + 3);
  const [reference, lineA, lineB] = [n, n + 1, n + 2];
  const next = (region: number): number => (region + 1) % n;
  const length = ([from, to]: Arc): number => (to - from + n) % n;
  type Propagator = Arc | number;

  /** The propagators that end in a region, from leg i to leg i+1. */
  const around = (diagram: LoopDiagram, region: number): Propagator[] => [
    ...diagram.arcs.filter(([, to]) => to === region).sort((x, y) => length(x) - length(y)),
    ...diagram.spokes.filter((spoke) => spoke === region),
    ...diagram.arcs.filter(([from]) => from === region).sort((x, y) => length(y) - length(x)),
  ];
  const endPoints = (diagram: LoopDiagram, propagator: Propagator, region: number): [number, number] => {
    const all = around(diagram, region);
    const neighbour = all[all.indexOf(propagator) + 1];
    if (neighbour === undefined) return [region, next(region)];
    const far = typeof neighbour === "number" ? -1 : neighbour[0] === region ? neighbour[1] : neighbour[0];
    const [p, q] = far < 0 ? [lineA, lineB] : [far, next(far)];
    return [region, builder.meet([region, next(region)], [reference, p, q])];
  };

  const terms = loopDiagrams(n, k + 2).flatMap((diagram) => {
    const arcs = diagram.arcs.map((arc) =>
      builder.invariant(reference, ...endPoints(diagram, arc, arc[0]), ...endPoints(diagram, arc, arc[1])),
    );
    const spokes = diagram.spokes.map((spoke, at) => {
      const before = diagram.spokes.at(at - 1)!;
      const onLine = builder.meet([lineA, lineB], [reference, before, next(before)]);
      return builder.invariant(reference, lineA, onLine, ...endPoints(diagram, spoke, spoke));
    });
    return [...arcs, ...spokes].reduce<Term[]>((product, factor) => timesTerms(product, [factor]), [unit]);
  });
  return builder.finish(terms);
}

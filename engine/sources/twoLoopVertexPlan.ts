/** The expansion of the two-loop MHV integrand in MHV vertices as a plan (1009.1854). */
import { type Plan, PlanBuilder, type Term, timesTerms } from "./plan";

/** One end of a propagator: a region x_i of the legs, or a loop. */
type Region = number | "AB" | "CD";
type Propagator = readonly [Region, Region];

/** The propagators that end in one region, in their order around it. */
interface TwoLoopDiagram {
  readonly propagators: readonly Propagator[];
  readonly around: ReadonlyMap<Region, readonly Propagator[]>;
}

/**
 * Every planar diagram of four propagators in which both loops have at least two and every vertex has at least three legs.
 * One loop, the outer one, has spokes to x_i and x_j; the other lies on the side of the legs i+1..j. Either it has one spoke
 * into the regions i..j and a propagator in common with the outer loop, or two spokes; the latter diagrams can be read with
 * either loop as the outer one, and are counted with AB.
 */
export function twoLoopDiagrams(n: number): TwoLoopDiagram[] {
  const found: TwoLoopDiagram[] = [];
  for (let i = 0; i < n; i++) {
    for (let width = 1; width < n; width++) {
      const inside = Array.from({ length: width + 1 }, (_, step) => (i + step) % n);
      const j = inside.at(-1)!;
      for (const [at, k] of inside.entries()) {
        found.push(joined("AB", "CD", i, j, k), joined("CD", "AB", i, j, k));
        for (const l of inside.slice(at + 1)) found.push(apart(i, j, k, l));
      }
    }
  }
  return found;
}

/** The outer loop with spokes to x_i and x_j, the inner one with a spoke to x_k and a propagator in common. */
function joined(outer: Region, inner: Region, i: number, j: number, k: number): TwoLoopDiagram {
  const [first, last, spoke, common]: Propagator[] = [
    [i, outer],
    [j, outer],
    [k, inner],
    [outer, inner],
  ];
  const around = legRegions(i, [first!, last!], [spoke!]);
  around.set(outer, [first!, common!, last!]).set(inner, [common!, spoke!]);
  return { propagators: [first!, last!, common!, spoke!], around };
}

/** AB with spokes to x_i and x_j, CD on the side of i+1..j with spokes to x_k and x_l. */
function apart(i: number, j: number, k: number, l: number): TwoLoopDiagram {
  const [first, last, near, far]: Propagator[] = [
    [i, "AB"],
    [j, "AB"],
    [k, "CD"],
    [l, "CD"],
  ];
  const around = legRegions(i, [first!, last!], [near!, far!]);
  around.set("AB", [first!, last!]).set("CD", [near!, far!]);
  return { propagators: [first!, last!, near!, far!], around };
}

/** The regions of legs: an inner spoke in region i is nearer to leg i+1 than the outer one, in region j farther. */
function legRegions(i: number, outer: readonly Propagator[], inner: readonly Propagator[]): Map<Region, Propagator[]> {
  const around = new Map<Region, Propagator[]>(outer.map((spoke) => [spoke[0], [spoke]]));
  for (const spoke of inner) {
    const there = around.get(spoke[0]) ?? [];
    around.set(spoke[0], spoke[0] === i ? [...there, spoke] : [spoke, ...there]);
  }
  return around;
}

/**
 * The sum over diagrams of the product of the invariants of their propagators, [* p p' q q'] with the points of both ends as in
 * the trees (regions of legs) and at one loop (regions of loops): p' comes from the next propagator towards leg i+1, or from
 * the one before around a loop. Base points: the legs, then at index n the reference, A, B, C, D.
 */
export function twoLoopVertexPlan(n: number): Plan {
  const builder = new PlanBuilder(n + 5);
  const pair = (region: Region): [number, number] =>
    region === "AB" ? [n + 1, n + 2] : region === "CD" ? [n + 3, n + 4] : [region, (region + 1) % n];
  const otherEnd = ([p, q]: Propagator, region: Region): Region => (p === region ? q : p);

  const endPoints = (diagram: TwoLoopDiagram, propagator: Propagator, region: Region): [number, number] => {
    const all = diagram.around.get(region)!;
    const at = all.indexOf(propagator);
    const neighbour = typeof region === "number" ? all[at + 1] : all.at(at - 1);
    const [first, second] = pair(region);
    if (neighbour === undefined) return [first, second];
    return [first, builder.meet([first, second], [n, ...pair(otherEnd(neighbour, region))])];
  };

  const terms = twoLoopDiagrams(n).flatMap((diagram) =>
    diagram.propagators
      .map((propagator): Term[] => [
        builder.invariant(
          n,
          ...endPoints(diagram, propagator, propagator[0]),
          ...endPoints(diagram, propagator, propagator[1]),
        ),
      ])
      .reduce((product, factor) => timesTerms(product, factor)),
  );
  return builder.finish(terms);
}

/**
 * The tree recursion with its sub-amplitudes kept apart (hep-th/0501052; in momentum twistors 1008.2958, section 2): amplitudes of
 * the same legs are one, and a term is a path through them. 226,512 terms of (16,6) are made of some 100,000 sub-amplitudes.
 */
import { type RowTable, rowTables } from "./exteriorTables";
import { type Plan, PlanBuilder } from "./plan";
import { splitLegs, treeExists } from "./treePlan";

/** One channel of the recursion: an invariant (by its number in the plan) times at most two sides; sides that are 1 are left out. */
export interface Channel {
  readonly invariant: number;
  /** The side with fewer terms first. */
  readonly sides: readonly SubAmplitude[];
}

/** The amplitude of some legs, k >= 1: that of all legs but the last one (null where it vanishes), and the channels. */
export interface SubAmplitude {
  readonly k: number;
  readonly shorter: SubAmplitude | null;
  readonly channels: readonly Channel[];
  readonly terms: number;
  /** Invariants met when all terms are gone through as paths that share their beginnings, and those that end no path. */
  readonly steps: number;
  readonly innerSteps: number;
}

export interface SharedTree {
  readonly k: number;
  /** Of products with a row, by degree. */
  readonly tables: readonly RowTable[];
  /** Points and invariants; it has no terms of its own. */
  readonly plan: Plan;
  /** In an order in which everything that one is made of comes before it. */
  readonly subAmplitudes: readonly SubAmplitude[];
  /** The amplitude of all legs. */
  readonly whole: SubAmplitude;
}

/** The (n,k) tree, 1 <= k <= n-4, k <= 16. */
export function sharedTree(n: number, k: number): SharedTree {
  const builder = new PlanBuilder(n);
  const known = new Map<string, SubAmplitude>();
  const subAmplitudes: SubAmplitude[] = [];
  const amplitude = (legs: readonly number[], degree: number): SubAmplitude | null => {
    if (degree === 0) return null;
    const key = `${degree}:${legs}`;
    const found = known.get(key);
    if (found !== undefined) return found;
    const shorter = treeExists(legs.length - 1, degree) ? amplitude(legs.slice(0, -1), degree) : null;
    const channels: Channel[] = [];
    for (let j = 2; j <= legs.length - 3; j++) {
      for (let kR = 0; kR < degree; kR++) {
        const kL = degree - 1 - kR;
        if (!treeExists(j + 1, kR) || !treeExists(legs.length - j + 1, kL)) continue;
        const split = splitLegs(builder, legs, j, kR > 0, kL > 0);
        const [invariant] = builder.invariant(...split.invariant).invariants as readonly [number];
        const sides = [amplitude(split.right, kR), amplitude(split.left, kL)].filter((side) => side !== null);
        channels.push({ invariant, sides: sides.sort((a, b) => a.terms - b.terms) });
      }
    }
    const made = { k: degree, shorter, channels, ...countPaths(shorter, channels) };
    subAmplitudes.push(made);
    known.set(key, made);
    return made;
  };
  const legs = Array.from({ length: n }, (_, leg) => leg);
  const whole = amplitude(legs, k);
  if (whole === null) throw new Error(`sharedTree: expected k >= 1, got ${k}`);
  return { k, tables: rowTables(k), plan: builder.finish([]), subAmplitudes, whole };
}

function countPaths(
  shorter: SubAmplitude | null,
  channels: readonly Channel[],
): Pick<SubAmplitude, "terms" | "steps" | "innerSteps"> {
  let terms = shorter?.terms ?? 0;
  let steps = shorter?.steps ?? 0;
  let innerSteps = shorter?.innerSteps ?? 0;
  for (const { sides } of channels) {
    const [first, second] = sides;
    terms += (first?.terms ?? 1) * (second?.terms ?? 1);
    steps += 1 + (first?.steps ?? 0) + (first?.terms ?? 0) * (second?.steps ?? 0);
    if (first !== undefined)
      innerSteps += 1 + (second === undefined ? first.innerSteps : first.steps + first.terms * second.innerSteps);
  }
  return { terms, steps, innerSteps };
}

/**
 * A sum over products of R-invariants (and at most one loop factor each), worked out once for all points: which meets and
 * invariants occur and which terms they form. Sub-amplitudes with the same legs share everything.
 */

/** The point where line (a b) meets plane (c d e). `part` says whether its Grassmann part comes from the line or the plane. */
export interface Meet {
  readonly line: readonly [number, number];
  readonly plane: readonly [number, number, number];
  readonly part: "line" | "plane";
}

/** <AB (a b c) cap (a d e)>^2 / (<AB a b><AB b c><AB c a><AB a d><AB d e><AB e a>), points by index: [A, B, a, b, c, d, e]. */
export type Kermit = readonly [number, number, number, number, number, number, number];

/** [a b c d e], points by index. */
export type Invariant = readonly [number, number, number, number, number];

/** One product: indices into the plan's invariants and kermits. */
export interface Term {
  readonly invariants: readonly number[];
  readonly kermits: readonly number[];
}

export interface Plan {
  /** Points 0..basePoints-1 are given (legs first), the meets follow in an order in which each uses earlier ones only. */
  readonly basePoints: number;
  readonly meets: readonly Meet[];
  readonly invariants: readonly Invariant[];
  readonly kermits: readonly Kermit[];
  readonly terms: readonly Term[];
}

/** The empty product, 1. */
export const unit: Term = { invariants: [], kermits: [] };

export const timesTerms = (left: readonly Term[], right: readonly Term[]): Term[] =>
  left.flatMap((x) =>
    right.map((y) => ({ invariants: [...x.invariants, ...y.invariants], kermits: [...x.kermits, ...y.kermits] })),
  );

/** Collects the objects of a plan, each once. */
export class PlanBuilder {
  private readonly meets: Meet[] = [];
  private readonly invariants: Invariant[] = [];
  private readonly kermits: Kermit[] = [];
  private readonly known = new Map<string, number>();

  constructor(private readonly basePoints: number) {}

  /** The index of the point (a b) cap (c d e). */
  meet(line: Meet["line"], plane: Meet["plane"], part: Meet["part"] = "line"): number {
    return this.once(`${part} ${line} ${plane}`, () => this.basePoints - 1 + this.meets.push({ line, plane, part }));
  }

  /** The term made of the one invariant [a b c d e]. */
  invariant(...points: Invariant): Term {
    return { invariants: [this.once(`r ${points}`, () => this.invariants.push(points) - 1)], kermits: [] };
  }

  /** The term made of one loop factor. */
  kermit(...points: Kermit): Term {
    return { invariants: [], kermits: [this.once(`k ${points}`, () => this.kermits.push(points) - 1)] };
  }

  finish(terms: readonly Term[]): Plan {
    return {
      basePoints: this.basePoints,
      meets: this.meets,
      invariants: this.invariants,
      kermits: this.kermits,
      terms,
    };
  }

  private once(key: string, make: () => number): number {
    const found = this.known.get(key);
    if (found !== undefined) return found;
    const index = make();
    this.known.set(key, index);
    return index;
  }
}

/** The plan without the terms that fail the test, and without the invariants, kermits and meets that only those used. */
export function keepTerms(plan: Plan, keep: (term: Term) => boolean): Plan {
  const terms = plan.terms.filter(keep);
  const invariantsUsed = new Set(terms.flatMap((term) => term.invariants));
  const kermitsUsed = new Set(terms.flatMap((term) => term.kermits));
  const pointsUsed = new Set<number>();
  const use = (point: number): void => {
    if (pointsUsed.has(point)) return;
    pointsUsed.add(point);
    const meet = plan.meets[point - plan.basePoints];
    if (meet !== undefined) for (const part of [...meet.line, ...meet.plane]) use(part);
  };
  for (const index of invariantsUsed) for (const point of plan.invariants[index]!) use(point);
  for (const index of kermitsUsed) for (const point of plan.kermits[index]!) use(point);

  const builder = new PlanBuilder(plan.basePoints);
  const moved = new Map<number, number>(Array.from({ length: plan.basePoints }, (_, point) => [point, point]));
  const to = (point: number): number => moved.get(point)!;
  plan.meets.forEach(({ line, plane, part }, index) => {
    if (!pointsUsed.has(plan.basePoints + index)) return;
    const image = builder.meet([to(line[0]), to(line[1])], [to(plane[0]), to(plane[1]), to(plane[2])], part);
    moved.set(plan.basePoints + index, image);
  });
  return builder.finish(
    terms.map((term) => ({
      invariants: term.invariants.flatMap((index) => {
        const [a, b, c, d, e] = plan.invariants[index]!;
        return builder.invariant(to(a), to(b), to(c), to(d), to(e)).invariants;
      }),
      kermits: term.kermits.flatMap((index) => {
        const [p, q, a, b, c, d, e] = plan.kermits[index]!;
        return builder.kermit(to(p), to(q), to(a), to(b), to(c), to(d), to(e)).kermits;
      }),
    })),
  );
}

/** Remembers what `make` gave for the last few keys, so that many points of one amplitude share one plan. */
export function remembering<T>(capacity: number, make: (key: string) => T): (key: string) => T {
  const kept = new Map<string, T>();
  return (key) => {
    const value = kept.get(key) ?? make(key);
    kept.delete(key);
    kept.set(key, value);
    if (kept.size > capacity) kept.delete(kept.keys().next().value!);
    return value;
  };
}

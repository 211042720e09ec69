/**
 * Soft and collinear limits of tree components by their textbook factors (Phys. Rept. 200 (1991) 301, "Multiparton amplitudes in
 * gauge theories"; hep-ph/9601359, "Calculating scattering amplitudes efficiently"), in the convention s(a b) = <a b>[a b].
 *
 * Spinors take the limit holomorphically: for a leg of positive helicity lambda_a -> e lambda_a and the amplitude goes as e^-2 times
 * <a-1 a+1>/(<a-1 a><a a+1>); neighbours with lambda_a, lambda_b = x P, y P leave <a b>^-1 times x^p y^q, p and q given by the
 * helicities. For the other helicities and for [a b] the same with lambda and lambdatilde exchanged. Momentum is conserved along the
 * way by lambdatilde (lambda) of two other legs.
 */
import type { Field } from "../../fields";
import { type PrimeSeries, type PrimeSeriesField, precisionOf, valuationOf } from "../../fields/primeSeries";
import { type LegSpinors, type Point, type Spinor, spinorBracket, twistorsOfSpinors } from "../../kinematics";
import type { Bench } from "../bench";
import { conserve } from "../divisorPaths";
import { type Ground, mostAttempts } from "../ground";
import type { Mark } from "../report";
import { type Lower, lowerAmplitude, missingSource, notApplicable, overBudget, untested, valueOfLower } from "./lower";

/** One limit of one component. Which spinors move is `side`: they are called lambda below, and their partners tilde. */
interface Limit {
  readonly says: string;
  /** The order of the leading term, -2 (soft) or -1 (collinear). */
  readonly order: number;
  readonly lower: Lower;
  readonly side: "angle" | "square";
  /** Legs (from 0) whose tilde may not be changed to conserve momentum. */
  readonly kept: readonly number[];
  /** The spinors at parameter e, before momentum is made to be conserved. */
  readonly move: <T>(field: Field<T>, legs: readonly LegSpinors<T>[], e: T, free: Free<T>) => LegSpinors<T>[];
  /** At e = 0: the spinors of the smaller amplitude, and what its value is multiplied by. */
  readonly end: (
    field: Field<number>,
    legs: readonly LegSpinors<number>[],
    before: readonly LegSpinors<number>[],
    free: Free<number>,
  ) => { readonly legs: readonly LegSpinors<number>[]; readonly factor: number };
}

/** Residues that a limit may use. */
interface Free<T> {
  readonly ratio: T;
  readonly direction: Spinor<T>;
}

export function componentSoft(bench: Bench): Mark {
  const { n } = bench.form;
  if (n < 5) return notApplicable("There is no amplitude with three legs for this to lead to.");
  return testComponentLimits(
    bench,
    "soft",
    Array.from({ length: n }, (_, a) => softLimit(bench, a)),
  );
}

export function componentCollinear(bench: Bench): Mark {
  const { n } = bench.form;
  if (n < 5) return notApplicable("There is no amplitude with three legs for this to lead to.");
  const limits = Array.from({ length: n }, (_, a) =>
    (["angle", "square"] as const).map((side) => collinearLimit(bench, a, side)),
  );
  return testComponentLimits(bench, "collinear", limits.flat());
}

function testComponentLimits(bench: Bench, kind: "soft" | "collinear", limits: readonly Limit[]): Mark {
  const costly = overBudget(bench, limits.length);
  if (costly !== null) return costly;
  let prime = 0;
  for (const limit of limits) {
    const { lower } = limit;
    if (lower.kind === "unknown") return missingSource(lower.question);
    let found: "equal" | "unequal" | "bad" = "bad";
    for (let attempt = 0; found === "bad" && attempt < mostAttempts; attempt++) {
      prime = bench.ground(attempt).prime;
      found = compare(bench, limit, lower, bench.ground(attempt));
    }
    if (found === "bad") return untested(`${limit.says}, a denominator vanishes at every point tried.`);
    if (found === "unequal")
      return { state: "fails", evidence: `${limit.says}, the value does not go as the ${kind} factor says.` };
  }
  const factors = kind === "soft" ? "eikonal factor" : "splitting factors";
  return {
    state: "holds",
    evidence: `All ${limits.length} ${kind} limits give the textbook ${factors} times the component with ${bench.form.n - 1} legs, each as the leading coefficient of a Laurent series modulo the 31-bit prime ${prime}.`,
  };
}

function compare(
  bench: Bench,
  limit: Limit,
  lower: Exclude<Lower, { kind: "unknown" }>,
  ground: Ground,
): "equal" | "unequal" | "bad" {
  const { n } = bench.form;
  const others = Array.from({ length: n }, (_, a) => a).filter((a) => !limit.kept.includes(a));
  const [b, c] = [others[0]!, others.at(-1)!];
  const [ratio, first, second] = ground.numbers("component limit", 3) as [number, number, number];
  const free = { ratio, direction: [first, second] } as const;
  const turned = <T>(legs: readonly LegSpinors<T>[]) => (limit.side === "angle" ? legs : legs.map(exchanged));
  const before = turned(
    ground.point.twistors.map((z): LegSpinors<number> => ({ lambda: [z[0]!, z[1]!], tilde: [z[2]!, z[3]!] })),
  );
  const path = (series: PrimeSeriesField): Point<PrimeSeries> => {
    const legs = conserve<PrimeSeries>(
      series,
      limit.move<PrimeSeries>(series, before, series.linear(0, 1), free),
      b,
      c,
    );
    return { ...ground.point, twistors: twistorsOfSpinors(series, turned(legs)) };
  };
  const found = bench.series.evaluate(ground.field, path, ({ sum }) => precisionOf(sum) > limit.order);
  if (found === null || precisionOf(found.sum) <= limit.order) return "bad";
  const valuation = valuationOf(found.sum);
  if (valuation !== null && valuation < limit.order) return "unequal";
  const { field } = ground;
  const end = limit.end(field, conserve(field, limit.move(field, before, 0, free), b, c), before, free);
  const twistors = twistorsOfSpinors(field, turned(end.legs));
  const value = valueOfLower(lower, { ...ground.point, n: n - 1, twistors }, ground.prime);
  if (value === null) return "bad";
  const expected = ground.field.multiply(end.factor, value);
  return found.field.coefficient(found.sum, limit.order) === expected ? "equal" : "unequal";
}

const exchanged = <T>({ lambda, tilde }: LegSpinors<T>): LegSpinors<T> => ({ lambda: tilde, tilde: lambda });

/** The component with these negative legs (from 0) and leg `left` left out. */
function lowerComponent(bench: Bench, left: number, negative: ReadonlySet<number>): Lower {
  const n = bench.form.n - 1;
  const negativeLegs = [...negative].filter((a) => a !== left).map((a) => (a > left ? a : a + 1));
  negativeLegs.sort((a, b) => a - b);
  return lowerAmplitude({ n, k: negativeLegs.length - 2, loops: 0, negativeLegs, target: "amplitude" });
}

const negativeOf = (bench: Bench): Set<number> => new Set((bench.form.negativeLegs ?? []).map((a) => a - 1));

function softLimit(bench: Bench, a: number): Limit {
  const { n } = bench.form;
  const negative = negativeOf(bench);
  const [before, after] = [(a + n - 1) % n, (a + 1) % n];
  return {
    says: `When leg ${a + 1} becomes soft`,
    order: -2,
    lower: lowerComponent(bench, a, negative),
    side: negative.has(a) ? "square" : "angle",
    kept: [a],
    move: (field, legs, e) =>
      legs.map((leg, at) =>
        at === a ? { ...leg, lambda: [field.multiply(e, leg.lambda[0]), field.multiply(e, leg.lambda[1])] } : leg,
      ),
    end: (field, legs, original) => {
      const bracket = (x: number, y: number): number => spinorBracket(field, original[x]!.lambda, original[y]!.lambda);
      const inverse = field.inverse(field.multiply(bracket(before, a), bracket(a, after))) ?? 0;
      return {
        legs: legs.filter((_, at) => at !== a),
        factor: field.multiply(bracket(before, after), inverse),
      };
    },
  };
}

/** lambda_b -> ratio lambda_a for b = a+1; the pair becomes P with lambda_P = lambda_a, tilde_P = tilde_a + ratio tilde_b. */
function collinearLimit(bench: Bench, a: number, side: "angle" | "square"): Limit {
  const { n } = bench.form;
  const b = (a + 1) % n;
  const negative = negativeOf(bench);
  // On the square side helicities are read the other way round.
  const flipped = (leg: number): boolean => negative.has(leg) === (side === "angle");
  const [first, second] = [flipped(a), flipped(b)];
  const combined = new Set(negative);
  combined.delete(b);
  const pairIsNegative = (first || second) === (side === "angle");
  if (pairIsNegative) combined.add(a);
  else combined.delete(a);
  return {
    says: `When ${side === "angle" ? "lambda" : "lambdatilde"} of legs ${a + 1} and ${b + 1} become parallel`,
    order: -1,
    // Two legs of the helicity that the numerator suppresses leave no pole.
    lower: first && second ? { kind: "zero" } : lowerComponent(bench, b, combined),
    side,
    kept: [a, b],
    move: (field, legs, e, { ratio, direction }) =>
      legs.map((leg, at) => {
        if (at !== b) return leg;
        const component = (i: 0 | 1) =>
          field.add(field.multiply(ratio, legs[a]!.lambda[i]), field.multiply(e, direction[i]));
        return { ...leg, lambda: [component(0), component(1)] };
      }),
    end: (field, legs, _, { ratio, direction }) => {
      const [one, two] = [legs[a]!, legs[b]!];
      const tilde = ([0, 1] as const).map((i) => field.add(one.tilde[i], field.multiply(ratio, two.tilde[i])));
      const pair: LegSpinors<number> = { lambda: one.lambda, tilde: [tilde[0]!, tilde[1]!] };
      // x = 1 and y = ratio: 1/(x y), x^3/y or y^3/x, over <a b> = e <lambda_a direction>.
      const below = spinorBracket(field, one.lambda, direction);
      const cube = field.multiply(ratio, field.multiply(ratio, ratio));
      const numerator = second ? cube : 1;
      const denominator = second ? below : field.multiply(ratio, below);
      return {
        legs: legs.map((leg, at) => (at === a ? pair : leg)).filter((_, at) => at !== b),
        factor: field.multiply(numerator, field.inverse(denominator) ?? 0),
      };
    },
  };
}

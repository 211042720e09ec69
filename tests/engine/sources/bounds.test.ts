import { describe, expect, it } from "vitest";
import type { Point } from "../../../engine/kinematics/point";
import { answering, type Question } from "../../../engine/sources";
import { Modulus } from "../../../engine/sources/arithmetic";
import { addBits, addBounds, multiplyBounds, polynomial, reciprocal, sizeOf } from "../../../engine/sources/bound";
import { PlanBuilder } from "../../../engine/sources/plan";
import { planBound, superGrading } from "../../../engine/sources/planBound";
import { primes, randomPoint } from "../../support/randomPoint";
import { amplitude, component } from "./questions";
import { reconstruct } from "./rationalFunction";

const prime = primes[0];
const m = new Modulus(prime);

/** Polynomials in many variables, written out: monomial to coefficient. */
type Expanded = ReadonlyMap<string, bigint>;
const variable = (name: string): Expanded => new Map([[name, 1n]]);
function sum(...parts: readonly Expanded[]): Expanded {
  const total = new Map<string, bigint>();
  for (const part of parts) for (const [key, c] of part) total.set(key, (total.get(key) ?? 0n) + c);
  return new Map([...total].filter(([, c]) => c !== 0n));
}
function times(a: Expanded, b: Expanded, sign = 1n): Expanded {
  const total = new Map<string, bigint>();
  for (const [x, c] of a) {
    for (const [y, d] of b) {
      const key = [...x.split(" "), ...y.split(" ")].sort().join(" ");
      total.set(key, (total.get(key) ?? 0n) + sign * c * d);
    }
  }
  return new Map([...total].filter(([, c]) => c !== 0n));
}
const orders = (items: readonly number[]): [number[], bigint][] =>
  items.length === 0
    ? [[[], 1n]]
    : items.flatMap((item, at) =>
        orders(items.toSpliced(at, 1)).map(([rest, sign]): [number[], bigint] => [
          [item, ...rest],
          at % 2 === 0 ? sign : -sign,
        ]),
      );
const four = (rows: readonly (readonly Expanded[])[]): Expanded =>
  sum(
    ...orders([0, 1, 2, 3]).map(([order, sign]) =>
      times(times(rows[0]![order[0]!]!, rows[1]![order[1]!]!, sign), times(rows[2]![order[2]!]!, rows[3]![order[3]!]!)),
    ),
  );
const degreeOf = (a: Expanded) => Math.max(...[...a.keys()].map((key) => key.split(" ").length));
const bitsOf = (a: Expanded) => Math.log2(Number([...a.values()].reduce((total, c) => total + (c < 0n ? -c : c), 0n)));

describe("bounds on polynomials that are written out", () => {
  it("hold for an R-invariant, exactly", () => {
    // delta has 5 x 24 monomials with coefficients 1 and -1, to the fourth power; each of five brackets has 24.
    const builder = new PlanBuilder(5);
    const size = sizeOf(planBound(builder.finish([builder.invariant(0, 1, 2, 3, 4)]), superGrading(1)));
    expect(size.degree).toBe(20);
    expect(size.denominatorDegree).toBe(20);
    expect(size.heightBits).toBeCloseTo(4 * Math.log2(120), 6);
    expect(size.denominatorHeightBits).toBeCloseTo(5 * Math.log2(24), 6);
  });

  it("hold for the delta function of an R-invariant with a meet", () => {
    const builder = new PlanBuilder(6);
    const inner = builder.meet([3, 4], [0, 1, 5]);
    const size = sizeOf(planBound(builder.finish([builder.invariant(0, 1, 2, 3, inner)]), superGrading(1)));
    const legs = [0, 1, 2, 3, 4, 5].map((leg) => [0, 1, 2, 3, 4].map((i) => variable(`${leg}.${i}`)));
    const [alongA, alongB] = [
      four([legs[4]!, legs[0]!, legs[1]!, legs[5]!]),
      four([legs[3]!, legs[0]!, legs[1]!, legs[5]!]),
    ];
    const meet = legs[3]!.map((z, i) => sum(times(z, alongA), times(legs[4]![i]!, alongB, -1n)));
    const five = [legs[0]!, legs[1]!, legs[2]!, legs[3]!, meet];
    const delta = sum(
      ...five.map((_, i) => times(four([1, 2, 3, 4].map((step) => five[(i + step) % 5]!)), five[i]![4]!)),
    );
    expect(size.degree / 4).toBe(degreeOf(delta));
    expect(size.heightBits / 4).toBeGreaterThanOrEqual(bitsOf(delta));
  });

  it("come to a common denominator once", () => {
    const half = (numerator: number) => multiplyBounds(polynomial(1, numerator), reciprocal("q", 2, 3));
    const other = multiplyBounds(polynomial(1, 0), reciprocal("q", 2, 3), reciprocal("r", 4, 5));
    const size = sizeOf(addBounds([half(1), half(2), other]));
    expect(size).toMatchObject({ degree: 5, denominatorDegree: 6, denominatorHeightBits: 8 });
    // Numerators: 2^1 2^5 + 2^2 2^5 + 2^0 = 193.
    expect(2 ** size.heightBits).toBeCloseTo(193, 4);
    expect(addBits([])).toBe(0);
  });
});

/** The value along a line through two points is a rational function of one variable with no larger degrees. */
describe("degrees of the sources", () => {
  const along = (from: Point<number>, to: Point<number>, x: number): Point<number> => {
    const mix = (a: readonly number[], b: readonly number[]) => a.map((z, i) => m.add(z, m.multiply(x, b[i]!)));
    const mixRows = (a: readonly (readonly number[])[], b: readonly (readonly number[])[]) =>
      a.map((row, i) => mix(row, b[i]!));
    const mixLine = (
      a: readonly [readonly number[], readonly number[]],
      b: readonly [readonly number[], readonly number[]],
    ) => [mix(a[0], b[0]), mix(a[1], b[1])] as const;
    return {
      ...from,
      twistors: mixRows(from.twistors, to.twistors),
      chi: from.chi.map((rows, i) => mixRows(rows, to.chi[i]!)),
      lines: from.lines.map((line, i) => mixLine(line, to.lines[i]!)),
      referenceTwistor: mix(from.referenceTwistor, to.referenceTwistor),
      referenceChi: mixRows(from.referenceChi, to.referenceChi),
      referenceLine: mixLine(from.referenceLine, to.referenceLine),
    };
  };
  const questions: Question[] = [
    amplitude(5, 1, 0),
    amplitude(6, 1, 0),
    amplitude(6, 2, 0),
    amplitude(7, 3, 0),
    component(5, [1, 3]),
    component(5, [1, 3, 4]),
    component(6, [1, 2, 4]),
    amplitude(4, 0, 1),
    amplitude(6, 0, 1),
    amplitude(5, 1, 1),
    amplitude(4, 0, 2),
    amplitude(5, 0, 2),
    amplitude(4, 0, 3),
    { ...amplitude(5, 0, 1), target: "even" },
    { ...amplitude(4, 0, 2), target: "log" },
  ];
  it.each(questions)("stay within the stated ones for %j", (question) => {
    const { n, k, loops } = question;
    const [from, to] = [randomPoint(n, k, loops, 1, prime), randomPoint(n, k, loops, 2, prime)];
    for (const source of answering(question)) {
      const size = source.size(question);
      // Cancellations make the true degrees much smaller than the stated ones, so few samples do; null would be an overflow.
      const samples = Math.min(size.degree + size.denominatorDegree, 340) + 6;
      const found = reconstruct(m, samples, 4, (x) => source.evaluate(question, along(from, to, x), prime)!);
      expect(found, source.name).not.toBeNull();
      expect(found!.numerator.length - 1, source.name).toBeLessThanOrEqual(size.degree);
      expect(found!.denominator.length - 1, source.name).toBeLessThanOrEqual(size.denominatorDegree);
      expect(size.heightBits, source.name).toBeGreaterThanOrEqual(0);
    }
  });
});

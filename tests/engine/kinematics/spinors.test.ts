import { describe, expect, it } from "vitest";
import { MERSENNE_61, primeField, randomness } from "../../../engine/fields";
import {
  angle,
  barLabels,
  cyclicRange,
  dualDistance,
  dualPointOfLeg,
  lambdaOf,
  lambdaTilde,
  type Momentum,
  momentumSquared,
  randomPoint,
  type Spinor,
  spinorBracket,
  spinorString,
  squareContractions,
  totalMomentum,
  wrapLabel,
} from "../../../engine/kinematics";

const field = primeField(MERSENNE_61);
const { add, multiply, negate } = field;

const n = 7;
const point = randomPoint(field, { n, k: 0, loops: 0 }, randomness("spinors"));
const lambda = (a: number): Spinor<bigint> => lambdaOf(point.twistors[wrapLabel(n, a) - 1]!);
const tilde = (a: number): Spinor<bigint> => lambdaTilde(field, point.twistors, wrapLabel(n, a))!;
const momentum = (...legs: number[]): Momentum<bigint> =>
  totalMomentum(
    field,
    legs.map((a) => ({ lambda: lambda(a), tilde: tilde(a) })),
  );
const ang = (a: number, b: number) => spinorBracket(field, lambda(a), lambda(b));
const sq = (a: number, b: number) => spinorBracket(field, tilde(a), tilde(b));
const s = (...legs: number[]) => momentumSquared(field, momentum(...legs));

describe("spinors of momentum twistors", () => {
  it("conserve momentum", () => {
    expect(momentum(...cyclicRange(n, 1, n))).toEqual([
      [0n, 0n],
      [0n, 0n],
    ]);
  });

  it("give s(a b) = <a b>[a b], and s of more legs as the sum over pairs (massless momenta)", () => {
    expect(s(2, 5)).toBe(multiply(ang(2, 5), sq(2, 5)));
    expect(s(2, 3, 5)).toBe(add(add(s(2, 3), s(2, 5)), s(3, 5)));
    expect(s(4)).toBe(0n);
  });

  it("give x2(i j) = s(i..j-1) = <i-1 i j-1 j>/(<i-1 i><j-1 j>)", () => {
    for (const [i, j] of [
      [1, 3],
      [2, 6],
      [3, 7],
      [5, 2],
    ] as const) {
      const distance = dualDistance(
        field,
        dualPointOfLeg(field, point.twistors, i),
        dualPointOfLeg(field, point.twistors, j),
      );
      expect(distance).toBe(s(...cyclicRange(n, i, j - 1)));
    }
  });

  it("contract strings by their definition, <a|P|b] = sum <a c>[c b]", () => {
    const sum = (legs: number[], term: (c: number) => bigint) => legs.reduce((total, c) => add(total, term(c)), 0n);
    expect(spinorString(field, "angle", lambda(1), [momentum(2, 3)], tilde(4))).toBe(
      sum([2, 3], (c) => multiply(ang(1, c), sq(c, 4))),
    );
    expect(spinorString(field, "square", tilde(1), [momentum(2, 3)], lambda(4))).toBe(
      sum([2, 3], (c) => multiply(sq(1, c), ang(c, 4))),
    );
    expect(spinorString(field, "angle", lambda(1), [momentum(2, 3), momentum(4, 5)], lambda(6))).toBe(
      sum([2, 3], (c) => sum([4, 5], (d) => multiply(multiply(ang(1, c), sq(c, d)), ang(d, 6)))),
    );
    expect(spinorString(field, "square", tilde(1), [momentum(2, 3), momentum(4, 5), momentum(7)], lambda(6))).toBe(
      sum([2, 3], (c) => sum([4, 5], (d) => multiply(multiply(multiply(sq(1, c), ang(c, d)), sq(d, 7)), ang(7, 6)))),
    );
    // <a|P P|b> = P^2 <a b> up to the sign of this contraction order.
    const p = momentum(2, 3);
    expect(spinorString(field, "angle", lambda(1), [p, p], lambda(6))).toBe(
      negate(multiply(momentumSquared(field, p), ang(1, 6))),
    );
    expect([0, 1, 2, 3].map((m) => squareContractions("angle", m))).toEqual([0, 1, 1, 2]);
    expect([0, 1, 2, 3].map((m) => squareContractions("square", m))).toEqual([1, 1, 2, 2]);
  });

  it("say where a denominator vanishes", () => {
    const twistors = [...point.twistors];
    twistors[3] = twistors[2]!;
    expect(angle(field, twistors[2]!, twistors[3])).toBe(0n);
    expect(lambdaTilde(field, twistors, 3)).toBeNull();
    expect(lambdaTilde(field, twistors, 6)).not.toBeNull();
    expect(dualDistance(field, dualPointOfLeg(field, twistors, 4), dualPointOfLeg(field, twistors, 1))).toBeNull();
  });
});

describe("labels", () => {
  it("go around the circle", () => {
    expect([-7, 0, 1, 6, 7, 13].map((a) => wrapLabel(6, a))).toEqual([5, 6, 1, 6, 1, 1]);
    expect(barLabels(6, 1)).toEqual([6, 1, 2]);
    expect(cyclicRange(6, 5, 2)).toEqual([5, 6, 1, 2]);
    expect(cyclicRange(6, 3, 3)).toEqual([3]);
    expect(cyclicRange(6, 3, 2)).toEqual([3, 4, 5, 6, 1, 2]);
  });
});

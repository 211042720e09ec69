import { describe, expect, it } from "vitest";
import type { Point } from "../../../engine/kinematics/point";
import { answering, type Question } from "../../../engine/sources";
import { Modulus } from "../../../engine/sources/arithmetic";
import { parityImage } from "../../../engine/sources/even";
import { chiralPentagons } from "../../../engine/sources/oneLoopMhv";
import { primes, randomPoint, residues } from "../../support/randomPoint";
import { amplitude } from "./questions";
import { orderAtZero, reconstruct } from "./rationalFunction";

const prime = primes[0];
const m = new Modulus(prime);
const asked = (n: number, loops: number, target: Question["target"]): Question => ({
  ...amplitude(n, 0, loops),
  target,
});
const valuesOf = (question: Question, point: Point<number>) =>
  answering(question).map((source) => source.evaluate(question, point, prime));

describe("even parts", () => {
  // hep-ph/9403226: the even part is half the boxes; parity of the kermits and of the chiral pentagons must reach the same.
  it.each([4, 5, 6, 7, 9])("agree between the parity map and half the boxes at n = %d", (n) => {
    const values = valuesOf(asked(n, 1, "even"), randomPoint(n, 0, 1, n, prime));
    expect(values.length).toBeGreaterThanOrEqual(3);
    expect(new Set(values).size).toBe(1);
    expect(values[0]).not.toBe(0);
  });

  it("are the whole integrand at n = 4 only", () => {
    for (const [n, whole] of [
      [4, true],
      [5, false],
    ] as const) {
      const point = randomPoint(n, 0, 1, 3, prime);
      const value = chiralPentagons.evaluate(amplitude(n, 0, 1), point, prime);
      expect(valuesOf(asked(n, 1, "even"), point)[0] === value).toBe(whole);
    }
  });

  it.each([
    [5, 2],
    [6, 2],
    [4, 3],
  ])("are even at n = %d with %d loops", (n, loops) => {
    const point = randomPoint(n, 0, loops, n, prime);
    const [image, factor] = parityImage(m, point, n);
    const [here] = valuesOf(asked(n, loops, "even"), point);
    const [there] = valuesOf(asked(n, loops, "even"), image);
    expect(m.multiply(factor, there!)).toBe(here);
    for (const value of valuesOf(asked(n, loops, "even"), point)) expect(value).toBe(here);
  });
});

describe("logarithms", () => {
  it.each([
    [4, 3],
    [5, 2],
    [7, 2],
  ])(
    "agree between local integrands, vertices and, at n = 4, dual-conformal integrals: n = %d, %d sources",
    (n, many) => {
      const values = valuesOf(asked(n, 2, "log"), randomPoint(n, 0, 2, 8, prime));
      expect(values).toHaveLength(many);
      expect(new Set(values).size).toBe(1);
      expect(values[0]).not.toBe(0);
    },
  );

  // 1012.6032 and 1412.8478: with AB near leg i and in its plane an amplitude goes as e^-2, the logarithm as e^-1.
  it.each([
    [4, 2],
    [5, 2],
    [6, 2],
    [4, 3],
  ])("are milder than the amplitude in the collinear region at n = %d with %d loops", (n, loops) => {
    const point = randomPoint(n, 0, loops, 6 * n + loops, prime);
    const next = residues(n + loops, prime);
    const x = next();
    const [r, s] = [Array.from({ length: 4 }, next), Array.from({ length: 4 }, next)];
    const [before, here, after] = [point.twistors[0]!, point.twistors[1]!, point.twistors[2]!];
    const orderOf = (question: Question) => {
      const source = answering(question)[0]!;
      return orderAtZero(
        reconstruct(m, 70, 4, (e) => {
          const a = here.map((z, at) => m.add(z, m.multiply(e, r[at]!)));
          const b = before.map((z, at) => m.add(m.add(z, m.multiply(x, after[at]!)), m.multiply(e, s[at]!)));
          return source.evaluate(question, { ...point, lines: [[a, b], ...point.lines.slice(1)] }, prime)!;
        })!,
      );
    };
    expect(orderOf(asked(n, loops, "amplitude"))).toBe(-2);
    expect(orderOf(asked(n, loops, "log"))).toBe(-1);
  });
});

describe("answering", () => {
  it("knows no source where there is none", () => {
    expect(answering(amplitude(5, 1, 2))).toEqual([]);
    expect(answering(amplitude(5, 0, 3))).toEqual([]);
    expect(answering({ ...amplitude(6, 1, 1), target: "even" })).toEqual([]);
    expect(answering({ ...amplitude(6, 0, 1), negativeLegs: [1, 2] })).toEqual([]);
  });

  it("expects zero of an identity", () => {
    const question: Question = { ...amplitude(6, 1, 0), target: "zero" };
    expect(answering(question).map((source) => source.name)).toEqual(["zero"]);
    expect(valuesOf(question, randomPoint(6, 1, 0, 1, prime))).toEqual([0]);
  });

  it("has two lineages for whatever is meant to be checked in two ways", () => {
    const questions: Question[] = [
      amplitude(7, 1, 0),
      amplitude(8, 3, 0),
      amplitude(6, 2, 1),
      amplitude(6, 0, 1),
      amplitude(4, 0, 2),
      amplitude(7, 0, 2),
      { ...amplitude(7, 2, 0), negativeLegs: [1, 2, 4, 6] },
      asked(5, 1, "even"),
      asked(4, 2, "log"),
      asked(6, 2, "log"),
      asked(6, 2, "even"),
    ];
    for (const question of questions) {
      expect(new Set(answering(question).map((source) => source.lineage)).size).toBeGreaterThanOrEqual(2);
    }
  });
});

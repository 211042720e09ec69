import { describe, expect, it } from "vitest";
import { evaluateForm } from "../../../engine/evaluate/evaluate";
import { type Rational, randomness, rational, rationals, series, smallPrimeField } from "../../../engine/fields";
import { randomPoint } from "../../../engine/kinematics";
import type { Point } from "../../../engine/kinematics/point";
import {
  type Complex,
  evaluateTape,
  evaluateTapeComplex,
  evaluateTapeReal,
  interpretTape,
  MERSENNE_31,
} from "../../../engine/tape";
import { ensureKernel } from "../../../engine/tape/kernel/build.mjs";
import { formOf, published } from "../../support/forms";
import { tapeOf } from "../conformance/evaluators";

const prime = 2147483629;
const field = smallPrimeField(prime);

function map<S, T>(point: Point<S>, f: (x: S) => T): Point<T> {
  return {
    ...point,
    twistors: point.twistors.map((z) => z.map(f)),
    chi: point.chi.map((flavours) => flavours.map((row) => row.map(f))),
    lines: point.lines.map(([a, b]) => [a.map(f), b.map(f)] as const),
    referenceTwistor: point.referenceTwistor.map(f),
    referenceChi: point.referenceChi.map((row) => row.map(f)),
    referenceLine: [point.referenceLine[0].map(f), point.referenceLine[1].map(f)],
  };
}

/** A point with small integers, so that rationals and doubles can be compared. */
const smallPoint = (form: { n: number; k: number; loops: number }, seed: string): Point<Rational> =>
  map(randomPoint(smallPrimeField(1073741827), form, randomness(seed)), (x) => rational(BigInt((x % 19) - 9)));

const toDouble = ({ numerator, denominator }: Rational) => Number(numerator) / Number(denominator);

describe("the kernel", () => {
  it("was built from the sources that are there", async () => {
    expect(await ensureKernel()).toBe(false);
  });

  it.each([1, 3, 4, 5, 63, 64, 65, 200])("takes %i points, each with its value in its place", (count) => {
    const form = formOf(published.nmhv, { n: 7, k: 1 });
    const points = Array.from({ length: count }, (_, i) => ({
      prime: i % 3 === 0 ? MERSENNE_31 : prime,
      point: randomPoint(smallPrimeField(i % 3 === 0 ? MERSENNE_31 : prime), form, randomness(`block ${i}`)),
    }));
    const { values, evaluator, field: name } = evaluateTape(tapeOf(form), points);
    expect(evaluator).toBe("WebAssembly SIMD tape");
    expect(name).toBe(count === 1 ? "integers modulo 2^31-1" : "integers modulo primes of 31 bits");
    expect(values!.map((value) => value.kind === "value" && value.sum)).toEqual(
      points.map(({ point, prime: p }) => {
        const value = evaluateForm(smallPrimeField(p), form, point);
        return value.kind === "value" && value.sum;
      }),
    );
  });

  it("names the first vanishing denominator of the source, and spoils no other point", () => {
    const notation = "1/<1 2 3 4> + 1/<1 2 3 5> + 1/(1/<2 3 4 5>)";
    const form = formOf(notation, { n: 5, k: 0 });
    const good = randomPoint(field, form, randomness("good"));
    // Leg 5 on leg 4: of the denominators <1 2 3 4>, <1 2 3 5>, <2 3 4 5> the last vanishes. Leg 4 on leg 3: the first and the last.
    const bent = (to: number, from: number) => ({
      ...good,
      twistors: good.twistors.map((z, a) => (a === to - 1 ? good.twistors[from - 1]! : z)),
    });
    const points = [good, bent(5, 4), bent(4, 3), good, bent(5, 3)].map((point) => ({ point, prime }));
    const values = evaluateTape(tapeOf(form), points).values!;
    const text = values.map((value) => (value.kind === "value" ? "" : notation.slice(...value.span)));
    expect(text).toEqual(["", "<2 3 4 5>", "<1 2 3 4>", "", "<1 2 3 5>"]);
    expect(values[0]).toEqual(values[3]);
    const walker = evaluateForm(field, form, good);
    expect(values[0]).toEqual({ kind: "value", sum: walker.kind === "value" && walker.sum, terms: null });
  });

  it("finds a denominator that is zero at every point, also one that nothing uses", () => {
    for (const [notation, where] of [
      ["1/(<1 2 3 4> - <2 3 4 1> - 2 <1 2 3 4>)", "(<1 2 3 4> - <2 3 4 1> - 2 <1 2 3 4>)"],
      ["<1 2 3 4>/<1 1 2 3>", "<1 1 2 3>"],
      ["1 + 0/(<1 2 3 4> - <1 2 3 4>)", "(<1 2 3 4> - <1 2 3 4>)"],
    ] as const) {
      const form = formOf(notation, { n: 4, k: 0 });
      const [value] = evaluateTape(tapeOf(form), [{ point: randomPoint(field, form, randomness("zero")), prime }])
        .values!;
      expect(value!.kind).toBe("zero-denominator");
      expect(where).toContain(value!.kind === "value" ? "?" : notation.slice(...value!.span));
    }
  });

  it("gives a denominator with deltas no value", () => {
    const form = formOf("1/[1 2 3 4 5]", { n: 5, k: 1 });
    const [value] = evaluateTape(tapeOf(form), [{ point: randomPoint(field, form, randomness("d")), prime }]).values!;
    expect(value!.kind).toBe("zero-denominator");
  });

  it("reports progress and stops when told to", () => {
    const form = formOf(published.nmhv, { n: 40, k: 1 });
    const points = Array.from({ length: 8 }, (_, i) => ({
      prime,
      point: randomPoint(field, form, randomness(`p${i}`)),
    }));
    const tape = tapeOf(form);
    const seen: number[] = [];
    let total = 0;
    evaluateTape(tape, points, {
      progress: (progress) => {
        seen.push(progress.done);
        total = progress.total;
      },
    });
    expect(total).toBeGreaterThan(1);
    expect(seen).toEqual(Array.from({ length: total }, (_, i) => i + 1));
    let calls = 0;
    const stopped = evaluateTape(tape, points, { cancelled: () => ++calls === 1 });
    expect(stopped.values).toBe(null);
    expect(calls).toBe(1);
  });

  it("refuses primes out of range and points of another size", () => {
    const form = formOf("<1 2 3 4>", { n: 5, k: 0 });
    const tape = tapeOf(form);
    const point = randomPoint(field, form, randomness("range"));
    expect(() => evaluateTape(tape, [{ point, prime: 101 }])).toThrow(
      "expected a prime between 2^30 and 2^31, got 101",
    );
    expect(() => evaluateTape(tape, [{ point: { ...point, n: 6 }, prime }])).toThrow("expected points for (5,0,0)");
  });
});

describe("doubles", () => {
  const forms = [
    formOf(published.nmhv, { n: 7, k: 1 }),
    formOf(published.kermits, { n: 6, k: 0, loops: 1 }),
    formOf("<1|2+3|4]^3 / ([2 3] s(2 3 4)) + (7/3)^40", { n: 6, k: 0 }),
  ];

  it.each(forms)("real and complex values are the rational ones, rounded", (form) => {
    const tape = tapeOf(form);
    const points = Array.from({ length: 5 }, (_, i) => smallPoint(form, `doubles ${i}`));
    const exact = points.map((point) => evaluateForm(rationals, form, point));
    const real = evaluateTapeReal(
      tape,
      points.map((point) => map(point, toDouble)),
    ).values!;
    const complex = evaluateTapeComplex(
      tape,
      points.map((point) => map(point, (x): Complex => [toDouble(x), 0])),
    ).values!;
    let compared = 0;
    exact.forEach((value, i) => {
      expect(real[i]!.kind).toBe(value.kind);
      const [x, z] = [real[i]!, complex[i]!];
      if (value.kind !== "value" || x.kind !== "value" || z.kind !== "value") return;
      const expected = toDouble(value.sum);
      const size = Math.max(...value.terms.map((term) => Math.abs(toDouble(term))));
      expect(Math.abs(x.sum - expected)).toBeLessThanOrEqual(1e-11 * size);
      expect(Math.hypot(z.sum[0] - expected, z.sum[1])).toBeLessThanOrEqual(1e-11 * size);
      compared += 1;
    });
    expect(compared).toBeGreaterThan(0);
  });

  it("complex arithmetic is that of Gaussian integers", () => {
    // <1 2> = z w for lambda_1 = (z, 0) and lambda_2 = (0, w): (1+2i)(3-4i) = 11+2i, and its inverse is (11-2i)/125.
    const form = formOf("<1 2> + 1/<1 2>", { n: 4, k: 0 });
    const zero: Complex = [0, 0];
    const unit = [zero, zero, zero, zero];
    const twistors = [[[1, 2], zero, zero, zero], [zero, [3, -4], zero, zero], unit, unit] as Complex[][];
    const point: Point<Complex> = {
      n: 4,
      k: 0,
      loops: 0,
      twistors,
      chi: twistors.map(() => [[], [], [], []]),
      lines: [],
      referenceTwistor: unit,
      referenceChi: [[], [], [], []],
      referenceLine: [unit, unit],
    };
    const [value] = evaluateTapeComplex(tapeOf(form), [point], { terms: true }).values!;
    if (value?.kind !== "value") throw new Error("expected a value");
    expect(value.terms).toEqual([
      [11, 2],
      [expect.closeTo(11 / 125, 12), expect.closeTo(-2 / 125, 12)],
    ]);
  });
});

describe("series", () => {
  it("run on the same tape: a simple pole of [1 2 3 4 5] on <1 2 3 4> = 0", () => {
    const form = formOf("[1 2 3 4 5]", { n: 6, k: 1 });
    const ring = series(field, 4);
    const base = randomPoint(field, form, randomness("pole"));
    // Leg 4 in the plane of 1, 2, 3, moved off it by e times a general direction.
    const [one, two, three, four] = base.twistors as [number[], number[], number[], number[]];
    const inPlane = one.map((x, i) => field.add(field.add(x, two[i]!), three[i]!));
    const point = map(base, ring.constant);
    const moved = inPlane.map((x, i) =>
      ring.add(ring.constant(x), ring.multiply(ring.parameter, ring.constant(four[i]!))),
    );
    const value = interpretTape(tapeOf(form), ring, {
      ...point,
      twistors: point.twistors.map((z, a) => (a === 3 ? moved : z)),
    });
    if (value.kind !== "value") throw new Error("expected a value");
    expect(value.sum.valuation).toBe(-1);
  });
});

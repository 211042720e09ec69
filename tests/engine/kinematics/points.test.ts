import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { MERSENNE_61, primeField, randomness, rational, rationals, smallPrimeField } from "../../../engine/fields";
import {
  bracket,
  exchangeLoops,
  mapPoint,
  mixLine,
  publicPoint,
  randomPoint,
  readPoints,
  reflectPoint,
  relabelPoint,
  replaceReferences,
  rotatePoint,
  transformPoint,
} from "../../../engine/kinematics";

/** A coordinate by the contract's words, with the platform's SHA-256. */
function coordinate(key: string, m: number, name: string): bigint {
  const hex = createHash("sha256").update(`equiform-points-1|${key}|${m}|${name}`).digest("hex");
  return BigInt(`0x${hex.slice(0, 32)}`) % MERSENNE_61;
}

describe("public points", () => {
  it("have the coordinates that their names hash to", () => {
    const size = { n: 7, k: 2, loops: 2 };
    const point = publicPoint(size, 3);
    const at = (name: string) => coordinate("n7k2L2", 3, name);
    expect(point.twistors[2]).toEqual([at("Z3.1"), at("Z3.2"), at("Z3.3"), at("Z3.4")]);
    expect(point.twistors).toHaveLength(7);
    expect(point.chi[6]![3]).toEqual([at("chi7.4.1"), at("chi7.4.2")]);
    expect(point.lines).toHaveLength(2);
    expect(point.lines[0]![1][3]).toBe(at("B.4"));
    expect(point.lines[1]![0][0]).toBe(at("C.1"));
    expect(point.referenceTwistor[1]).toBe(at("*.2"));
    expect(point.referenceChi[0]).toEqual([at("*chi.1.1"), at("*chi.1.2")]);
    expect(point.referenceLine[0][2]).toBe(at("X1.3"));
    expect(point.referenceLine[1][0]).toBe(at("X2.1"));
  });
});

describe("random points", () => {
  it("have the shape of the amplitude and canonical coordinates", () => {
    const field = smallPrimeField(1073741827);
    const point = randomPoint(field, { n: 8, k: 3, loops: 1 }, randomness("shape"));
    expect(point.twistors.map((z) => z.length)).toEqual(new Array(8).fill(4));
    expect(point.chi.map((chi) => chi.map((row) => row.length))).toEqual(new Array(8).fill([3, 3, 3, 3]));
    expect(point.lines).toHaveLength(1);
    expect(point.twistors.flat().every((x) => Number.isInteger(x) && x >= 0 && x < 1073741827)).toBe(true);
    expect(randomPoint(field, { n: 8, k: 3, loops: 1 }, randomness("shape"))).toEqual(point);
    const readable = randomPoint(rationals, { n: 4, k: 0, loops: 0 }, randomness("rational"));
    expect(readable.twistors.flat().every((x) => x.denominator === 1n && x.numerator ** 2n <= 10n ** 6n)).toBe(true);
  });
});

describe("maps of points", () => {
  const field = primeField(MERSENNE_61);
  const size = { n: 5, k: 1, loops: 2 };
  const random = randomness("maps");
  const [point, other] = [randomPoint(field, size, random), randomPoint(field, size, random)];

  it("rotation and reflection carry the chi", () => {
    const rotated = rotatePoint(point, 2);
    expect(rotated.twistors).toEqual([3, 4, 5, 1, 2].map((a) => point.twistors[a - 1]));
    expect(rotated.chi).toEqual([3, 4, 5, 1, 2].map((a) => point.chi[a - 1]));
    expect(rotatePoint(rotated, -2)).toEqual(point);
    const reflected = reflectPoint(point);
    expect(reflected.twistors[0]).toEqual(point.twistors[4]);
    expect(reflected.chi[0]).toEqual(point.chi[4]);
    expect(reflectPoint(reflected)).toEqual(point);
    expect(relabelPoint(point, [2, 1, 3, 4, 5]).chi[0]).toEqual(point.chi[1]);
    expect(() => relabelPoint(point, [1, 2])).toThrow("expected 5 labels, got 2");
  });

  it("loops are exchanged, and references replaced, alone", () => {
    expect(exchangeLoops(point, [1, 0])).toEqual({ ...point, lines: [point.lines[1], point.lines[0]] });
    expect(() => exchangeLoops(point, [0])).toThrow("expected 2 numbers, got 1");
    const replaced = replaceReferences(point, other);
    expect(replaced.twistors).toBe(point.twistors);
    expect(replaced.referenceTwistor).toBe(other.referenceTwistor);
    expect(replaced.referenceChi).toBe(other.referenceChi);
    expect(replaced.referenceLine).toBe(other.referenceLine);
  });

  it("a linear map multiplies every bracket by its determinant", () => {
    const matrix = [
      [2n, 1n, 0n, 0n],
      [0n, 3n, 1n, 0n],
      [0n, 0n, 5n, 1n],
      [1n, 0n, 0n, 7n],
    ];
    const image = transformPoint(field, point, matrix);
    // 2*3*5*7 - 1: the diagonal, and the cycle of length four.
    const check = (of: (p: typeof point) => readonly (readonly bigint[])[]) => {
      const [a, b, c, d] = of(point);
      const [e, f, g, h] = of(image);
      expect(bracket(field, e!, f!, g!, h!)).toBe(field.multiply(209n, bracket(field, a!, b!, c!, d!)));
    };
    check((p) => p.twistors);
    check((p) => [...p.lines[0]!, ...p.referenceLine]);
    check((p) => [p.referenceTwistor, ...p.lines[1]!, p.twistors[4]!]);
    expect(image.chi).toBe(point.chi);
  });

  it("mixing the points of a line multiplies its brackets by ad - bc", () => {
    const mixed = mixLine(field, point, 1, [
      [2n, 3n],
      [5n, 11n],
    ]);
    const of = (p: typeof point) => bracket(field, p.lines[1]![0], p.lines[1]![1], p.twistors[0]!, p.twistors[1]!);
    expect(of(mixed)).toBe(field.multiply(7n, of(point)));
    expect(mixed.lines[0]).toEqual(point.lines[0]);
    expect(() =>
      mixLine(field, point, 2, [
        [1n, 0n],
        [0n, 1n],
      ]),
    ).toThrow("expected a loop below 2, got 2");
  });

  it("convert coordinate by coordinate", () => {
    const small = randomPoint(rationals, size, randomness("convert"));
    const image = mapPoint(small, (x) => field.fromInteger(x.numerator));
    expect(image.chi[3]![1]![0]).toBe(field.fromInteger(small.chi[3]![1]![0]!.numerator));
    expect(image.n).toBe(5);
  });
});

describe("points documents", () => {
  const use = {
    twistors: true,
    chi: true,
    lines: false,
    referenceTwistor: false,
    referenceChi: false,
    referenceLine: false,
  };
  const size = { n: 4, k: 1, loops: 0 };
  const twistors = [
    ["1", "0", "3/2", "5"],
    ["-4/6", "1", "0", "2"],
    ["0", "+3", "1", "1"],
    ["2", "2", "-1/-3", "0"],
  ];
  const chi = [0, 1, 2, 3].map(() => [["1"], ["2"], ["0"], ["1"]]);

  it("are read exactly, and what is not needed may be left out", () => {
    const read = readPoints({ points: [{ twistors, chi }] }, size, use);
    if (!read.ok) throw new Error(JSON.stringify(read.diagnostics));
    const [point] = read.value;
    expect(point!.twistors[1]![0]).toEqual(rational(-2n, 3n));
    expect(point!.twistors[3]![2]).toEqual(rational(1n, 3n));
    expect(point!.twistors[2]![1]).toEqual(rational(3n));
    expect(point!.chi[0]![1]![0]).toEqual(rational(2n));
    expect(point!.referenceTwistor).toHaveLength(4);
  });

  const first = (json: unknown, over: Partial<typeof use> = {}, loops = 0) => {
    const read = readPoints(json, { ...size, loops }, { ...use, ...over });
    return read.ok ? "accepted" : `${read.diagnostics[0]!.code}: ${read.diagnostics[0]!.message}`;
  };
  const withNumber = (number: unknown) => ({
    points: [{ twistors: [[number, "0", "1", "1"], ...twistors.slice(1)], chi }],
  });

  it.each([
    [withNumber("1/0"), "points-shape: points[0].twistors[0][0]: expected a denominator other than 0"],
    [withNumber("1/-00"), "points-shape: points[0].twistors[0][0]: expected a denominator other than 0"],
    [withNumber("1.5"), 'points-shape: points[0].twistors[0][0]: expected "p" or "p/q" with integers p and q'],
    [withNumber(1), 'points-shape: points[0].twistors[0][0]: expected a number as text, "p" or "p/q"'],
    [withNumber("1".repeat(2001)), "points-shape: points[0].twistors[0][0]: expected at most 2000 characters"],
    [{ points: [{ twistors: [["1", "2", "3"]], chi }] }, "points-shape: points[0].twistors[0]: expected 4 components"],
    [{ points: [{ twistors: twistors.slice(1), chi }] }, "points-count: points[0]: twistors has 3 entries, expected 4"],
    [{ points: [{ twistors }] }, "points-missing: points[0]: chi is missing, and the form reads it"],
    [
      { points: [{ twistors, chi: chi.map(() => [["1", "1"], ["2"], ["0"], ["1"]]) }] },
      "points-count: points[0]: chi[0][0] has 2 numbers, expected 1",
    ],
    [{ points: [{ twistors, chi, lines: [["1"]] }] }, "points-shape: points[0].lines[0]: expected a pair of twistors"],
  ])("say what is wrong and where: %#", (json, message) => {
    expect(first(json)).toBe(message);
  });

  it("ask for the lines and references that a form reads", () => {
    const json = { points: [{ twistors, chi }] };
    expect(first(json, { lines: true }, 1)).toBe("points-missing: points[0]: lines is missing, and the form reads it");
    expect(first(json, { referenceTwistor: true })).toContain("referenceTwistor is missing");
    for (const json of [null, [], "x", { points: 3 }, { points: [{ spinors: [] }] }, {}]) {
      expect(first(json)).toMatch(/^points-shape: /);
    }
  });
});

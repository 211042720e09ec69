import { describe, expect, it } from "vitest";
import { type Complex, type Rational, toComplexDouble } from "../../../engine/fields";
import { checkMomenta, exactSpacetime, type FourMomentum, nearSingular, readMomenta } from "../../../engine/kinematics";
import { asComplex, physical, scatteringPoints } from "../../support/physics";

type Numbers = readonly (readonly number[])[];
const doubles = (momenta: Numbers) => momenta.map((p) => asComplex(p as unknown as FourMomentum<number>));
const messages = (momenta: Numbers): string[] =>
  checkMomenta(physical, doubles(momenta), "momenta[0]").diagnostics.map(({ code, message }) => `${code}: ${message}`);

const good = [
  [-5, 0, 0, -5],
  [-5, 0, 0, 5],
  [5, 3, 0, 4],
  [5, -3, 0, -4],
];

describe("the check of momenta", () => {
  it("finds nothing wrong with a scattering point, and states how well it holds", () => {
    expect(messages(good)).toEqual([]);
    for (const momenta of scatteringPoints(7, 20, "good")) {
      const { diagnostics, deviation } = checkMomenta(physical, momenta.map(asComplex), "x");
      expect(diagnostics).toEqual([]);
      expect(deviation).toBeLessThan(1e-14);
    }
    // Nine digits typed: 5.00000001 for 5 in one component.
    const rounded = good.map((p, a) => (a === 2 ? [5, 3 + 2e-9, 0, 4] : p));
    const { diagnostics, deviation } = checkMomenta(physical, doubles(rounded), "x");
    expect(diagnostics).toEqual([]);
    expect(deviation).toBeGreaterThan(2e-10);
    expect(deviation).toBeLessThan(5e-10);
  });

  it("names the leg that is not massless, and by how much", () => {
    // p^2 = 5.1^2 - 25 = 1.01, E^2 + p^2 = 51.01; the energies miss by 0.1, of the largest length sqrt(51.01).
    expect(messages(good.map((p, a) => (a === 2 ? [5.1, 3, 0, 4] : p)))).toEqual([
      "momenta-mass: momenta[0]: leg 3 is not massless: p^2 = 1.01, which is 2.0e-2 of E^2 + x^2 + y^2 + z^2 (at most 1e-9 is taken).",
      "momenta-conservation: momenta[0]: the momenta do not add up to zero: their sum is (0.1, 0, 0, 0), 1.4e-2 of the largest momentum (at most 1e-9 is taken).",
    ]);
  });

  it("says so where the first two legs were given as incoming", () => {
    const incoming = good.map((p, a) => (a < 2 ? p.map((x) => -x) : p));
    const [found, ...rest] = checkMomenta(physical, doubles(incoming), "momenta[0]").diagnostics;
    expect(rest).toEqual([]);
    expect(found?.code).toBe("momenta-conservation");
    expect(found?.help).toMatch(/legs 1 and 2 are incoming/);
    const other = good.map((p, a) => (a === 3 ? [5, 3, 0, 4] : p));
    expect(checkMomenta(physical, doubles(other), "momenta[0]").diagnostics[0]?.help).not.toMatch(/legs 1 and 2/);
  });

  it("refuses too few legs, a zero leg, infinity and NaN", () => {
    expect(messages(good.slice(1))[0]).toMatch(/^momenta-count: momenta\[0\]: there are 3 legs/);
    expect(messages([...good, [0, 0, 0, 0]])).toEqual([
      "momenta-zero: momenta[0]: leg 5 has no energy and no momentum.",
    ]);
    for (const bad of [Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(messages(good.map((p, a) => (a === 1 ? [bad, 0, 0, 5] : p))).length).toBeGreaterThan(0);
    }
  });

  it("is exact for rational numbers: what misses by 10^-30 is refused, and allowed in double precision", () => {
    const document = {
      momenta: [good.map((p, a) => (a === 3 ? ["5", "-3", "0", "-3.999999999999999999999999999999"] : p))],
    };
    const read = readMomenta(document, 4);
    if (!read.ok) throw new Error(read.diagnostics[0]?.message);
    const exact = read.value.points[0]!;
    expect(checkMomenta(exactSpacetime("1,3"), exact, "x").diagnostics.map(({ code }) => code)).toEqual([
      "momenta-mass",
      "momenta-conservation",
    ]);
    const rounded = exact.map((p) => p.map(toComplexDouble) as unknown as FourMomentum<Complex<number>>);
    expect(checkMomenta(physical, rounded, "x").diagnostics).toEqual([]);
  });
});

describe("points near a singular place", () => {
  it("names soft legs and nearly collinear neighbours, also around the end", () => {
    const small = 1e-7;
    // sqrt(2) 10^-7 over sqrt(2) 5.
    const soft = [...good, [small, 0, small, 0]];
    expect(nearSingular(physical, doubles(soft))).toEqual(["leg 5 is soft, 2.0e-8 of the largest momentum"]);
    const close = 1e-6;
    const [c, s] = [Math.cos(close), Math.sin(close)];
    const collinear = [
      [2, 2 * c, 2 * s, 0],
      [1, 0, 0, 1],
      [1, 0, 0, -1],
      [3, 3, 0, 0],
    ];
    // s = 2 E E' (1 - cos) over the lengths sqrt(2) E sqrt(2) E', that is close^2/2.
    expect(nearSingular(physical, doubles(collinear))).toEqual([
      "legs 4 and 1 are nearly collinear, s(4 1) = 5.0e-13 of the product of their sizes",
    ]);
    expect(nearSingular(physical, doubles(good))).toEqual([]);
  });
});

describe("momenta documents", () => {
  const leg = ["1", "0", "0", "1"];
  const four = [leg, leg, leg, leg];
  const read = (json: unknown): readonly (readonly FourMomentum<Complex<Rational>>[])[] => {
    const result = readMomenta(json, 4);
    if (!result.ok) throw new Error(result.diagnostics[0]?.message);
    return result.value.points;
  };

  it("hold integers, fractions, decimals, numbers and pairs, read exactly", () => {
    const [[p]] = read({ momenta: [[["-3/4", "1.25e-2", 0.1, ["2", "-1/3"]], leg, leg, leg]] }) as [
      [FourMomentum<Complex<Rational>>],
    ];
    expect(p.map(({ re, im }) => [re.numerator, re.denominator, im.numerator, im.denominator])).toEqual([
      [-3n, 4n, 0n, 1n],
      [1n, 80n, 0n, 1n],
      [1n, 10n, 0n, 1n],
      [2n, 1n, -1n, 3n],
    ]);
  });

  it("have signature (1,3) unless they say (2,2)", () => {
    const signature = (extra: object) => {
      const result = readMomenta({ momenta: [four], ...extra }, 4);
      return result.ok ? result.value.signature : null;
    };
    expect(signature({})).toBe("1,3");
    expect(signature({ signature: "2,2", seed: "s", energy: 1, weight: 0.5 })).toBe("2,2");
  });

  it.each<[unknown, string]>([
    [null, "momenta-shape: "],
    [{ momenta: "x" }, "momenta-shape: momenta: expected a list of points"],
    [{ momenta: ["x"] }, "momenta-shape: momenta[0]: expected a list of momenta, one for each leg"],
    [{ momenta: [[leg.slice(1)]] }, "momenta-shape: momenta[0][0]: expected four components E, x, y, z"],
    [{ momenta: [[["a", "0", "0", "1"]]] }, 'momenta-shape: momenta[0][0][0]: expected "p", "p/q" with q other than 0'],
    [
      { momenta: [[["1/0", "0", "0", "1"]]] },
      'momenta-shape: momenta[0][0][0]: expected "p", "p/q" with q other than 0',
    ],
    [{ momenta: [[["1e401", "0", "0", "1"]]] }, 'momenta-shape: momenta[0][0][0]: expected "p", "p/q"'],
    [{ momenta: [[["", "0", "0", "1"]]] }, 'momenta-shape: momenta[0][0][0]: expected "p", "p/q"'],
    [{ momenta: [[[".", "0", "0", "1"]]] }, 'momenta-shape: momenta[0][0][0]: expected "p", "p/q"'],
    [{ momenta: [[[["1"], "0", "0", "1"]]] }, 'momenta-shape: momenta[0][0][0]: expected a pair ["re", "im"]'],
    [{ momenta: [[[true, "0", "0", "1"]]] }, "momenta-shape: momenta[0][0][0]: expected a number"],
    [{ momenta: [[["1".repeat(2001), "0", "0", "1"]]] }, "momenta-shape: momenta[0][0][0]: expected"],
    [{ momenta: [four], signature: "3,1" }, 'momenta-shape: signature: expected "1,3" or "2,2"'],
    [{ momenta: [four], unit: "GeV" }, "momenta-shape: "],
    [
      { momenta: [four, [leg, leg, leg]] },
      "momenta-count: momenta[1]: there are 3 legs, the form has 4, and an amplitude has at least 4.",
    ],
    [{ momenta: [[...four, leg]] }, "momenta-count: momenta[0]: there are 5 legs, the form has 4."],
  ])("faults are named, case %#", (json, message) => {
    const result = readMomenta(json, 4);
    const [first] = result.ok ? [] : result.diagnostics;
    expect(`${first?.code}: ${first?.message}`).toContain(message);
    expect(first?.help?.length).toBeGreaterThan(20);
  });
});

import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  type Complex,
  complexDoubles,
  gaussianRationals,
  magnitude,
  type Rational,
  randomness,
  rationals,
} from "../../../engine/fields";
import {
  balancedSpinors,
  bispinorOf,
  doubleSpacetime,
  exactSpacetime,
  type FourMomentum,
  fourMomentumOf,
  lambdaTilde,
  massSquared,
  momentaOfTwistors,
  rationalMomenta,
  rationalSpinors,
  type Spinor,
  spinorBracket,
  spinorsOfTwistors,
  twistorsOfMomenta,
} from "../../../engine/kinematics";
import { asComplex, dot, invariant, physical, scatteringPoints } from "../../support/physics";

const { add, conjugate, multiply, negate, subtract } = complexDoubles;
const far = (a: Complex<number>, b: Complex<number>): number => magnitude(subtract(a, b));
const farthest = (a: readonly Complex<number>[], b: readonly Complex<number>[]): number =>
  Math.max(...a.map((x, i) => far(x, b[i]!)));

const part = fc.double({ min: -10, max: 10, noNaN: true, noDefaultInfinity: true });
const any = fc.tuple(part, part, part, part) as fc.Arbitrary<FourMomentum<number>>;
/** Massless, of either sign of the energy, not soft. */
const massless = fc
  .tuple(part, part, part, fc.boolean())
  .filter(([x, y, z]) => Math.hypot(x, y, z) > 1e-3)
  .map(([x, y, z, incoming]): FourMomentum<number> => [Math.hypot(x, y, z) * (incoming ? -1 : 1), x, y, z]);

/** The momentum of two spinors, written out: E, x, y, z from (p11 + p22)/2 and so on in signature (1,3). */
function written(lambda: Spinor<Complex<number>>, tilde: Spinor<Complex<number>>): Complex<number>[] {
  const [a, b, c, d] = [0, 0, 1, 1].map((i, at) => multiply(lambda[i as 0 | 1], tilde[(at % 2) as 0 | 1]));
  const half = complexDoubles.real(0.5);
  const minusHalfI = { re: 0, im: -0.5 };
  return [
    multiply(half, add(a!, d!)),
    multiply(half, add(b!, c!)),
    multiply(minusHalfI, subtract(c!, b!)),
    multiply(half, subtract(a!, d!)),
  ];
}

describe("bispinors of momenta", () => {
  it("have p^2 = E^2 - x^2 - y^2 - z^2 as determinant, and come back", () => {
    fc.assert(
      fc.property(any, (p) => {
        const square = massSquared(physical, asComplex(p));
        const back = fourMomentumOf(physical, bispinorOf(physical, asComplex(p)));
        return far(square, complexDoubles.real(dot(p, p))) < 1e-11 && farthest(back, asComplex(p)) < 1e-13;
      }),
    );
  });

  it("have p^2 = E^2 - x^2 + y^2 - z^2 in signature (2,2), exactly", () => {
    const space = exactSpacetime("2,2");
    const p = [7n, 2n, 3n, 5n].map((x) => gaussianRationals.fromInteger(x)) as unknown as FourMomentum<
      Complex<Rational>
    >;
    expect(gaussianRationals.toText(massSquared(space, p))).toBe(String(49 - 4 + 9 - 25));
    expect(fourMomentumOf(space, bispinorOf(space, p)).map(gaussianRationals.toText)).toEqual(["7", "2", "3", "5"]);
  });
});

describe("spinors of momenta", () => {
  it("give the momentum back; for real ones lambdatilde is the conjugate of lambda times the sign of the energy", () => {
    fc.assert(
      fc.property(massless, (p) => {
        const { lambda, tilde } = balancedSpinors(bispinorOf(physical, asComplex(p)))!;
        const sign = complexDoubles.real(Math.sign(p[0]));
        const size = Math.abs(p[0]);
        return (
          farthest(written(lambda, tilde), asComplex(p)) <= 1e-14 * size &&
          farthest(
            tilde,
            lambda.map((x) => multiply(sign, conjugate(x))),
          ) <=
            1e-14 * Math.sqrt(size)
        );
      }),
    );
  });

  it("begin with a positive component, and p and -p share lambda", () => {
    fc.assert(
      fc.property(massless, (p) => {
        const minus = p.map((x) => -x) as unknown as FourMomentum<number>;
        const [a, b] = [p, minus].map((q) => balancedSpinors(bispinorOf(physical, asComplex(q)))!);
        const lead = magnitude(a!.lambda[0]) > 1e-60 * magnitude(a!.lambda[1]) ? a!.lambda[0] : a!.lambda[1];
        return (
          lead.re > 0 &&
          Math.abs(lead.im) <= 1e-15 * lead.re &&
          farthest(a!.lambda, b!.lambda) === 0 &&
          farthest(a!.tilde, b!.tilde.map(negate)) === 0
        );
      }),
    );
  });

  // E (1,0,0,1) has lambda = (sqrt(2E), 0), E (1,0,0,-1) has (0, sqrt(2E)), E (1,1,0,0) has sqrt(E) (1, 1), E (1,0,1,0) sqrt(E) (1, i).
  it.each([
    [[2, 0, 0, 2], [2, 0, 0, 0], 1],
    [[2, 0, 0, -2], [0, 0, 2, 0], 1],
    [[-2, 0, 0, -2], [2, 0, 0, 0], -1],
    [[-2, 0, 0, 2], [0, 0, 2, 0], -1],
    [[9, 9, 0, 0], [3, 0, 3, 0], 1],
    [[9, 0, 9, 0], [3, 0, 0, 3], 1],
    [[-9, 0, -9, 0], [3, 0, 0, 3], -1],
  ])("of %j are %j", (p, [a, b, c, d], sign) => {
    const { lambda, tilde } = balancedSpinors(bispinorOf(physical, asComplex(p as unknown as FourMomentum<number>)))!;
    const expected = [
      { re: a!, im: b! },
      { re: c!, im: d! },
    ];
    expect(farthest(lambda, expected)).toBeLessThan(1e-15);
    expect(
      farthest(
        tilde,
        expected.map((x) => multiply(complexDoubles.real(sign), conjugate(x))),
      ),
    ).toBeLessThan(1e-15);
  });

  it("of complex momenta give them back", () => {
    const complexMassless = fc
      .tuple(fc.tuple(part, part), fc.tuple(part, part), fc.tuple(part, part), fc.tuple(part, part))
      .map(
        (xs) =>
          xs.map(([re, im]) => ({ re, im })) as [Complex<number>, Complex<number>, Complex<number>, Complex<number>],
      )
      .filter((xs) => xs.every((x) => magnitude(x) > 0.1));
    fc.assert(
      fc.property(complexMassless, ([a, b, c, d]) => {
        const p = written([a, b], [c, d]) as unknown as FourMomentum<Complex<number>>;
        const { lambda, tilde } = balancedSpinors(bispinorOf(physical, p))!;
        return farthest(written(lambda, tilde), p) <= 1e-13 * Math.max(...p.map(magnitude));
      }),
    );
  });

  it("have |<a b>|^2 = |s(a b)| and <a b>[a b] = s(a b) = 2 p_a.p_b", () => {
    for (const momenta of scatteringPoints(6, 20, "brackets")) {
      const spinors = momenta.map((p) => balancedSpinors(bispinorOf(physical, asComplex(p)))!);
      for (let a = 1; a <= 6; a++) {
        for (let b = a + 1; b <= 6; b++) {
          const [p, q] = [spinors[a - 1]!, spinors[b - 1]!];
          const angle = spinorBracket(complexDoubles, p.lambda, q.lambda);
          const square = spinorBracket(complexDoubles, p.tilde, q.tilde);
          const s = invariant(momenta, a, b);
          expect(far(multiply(angle, square), complexDoubles.real(s))).toBeLessThan(1e-14);
          expect(Math.abs(magnitude(angle) ** 2 - Math.abs(s))).toBeLessThan(1e-14);
        }
      }
    }
  });

  it("are none for the zero momentum", () => {
    expect(balancedSpinors(bispinorOf(physical, asComplex([0, 0, 0, 0])))).toBeNull();
    const zero = gaussianRationals.zero;
    expect(
      rationalSpinors(gaussianRationals, [
        [zero, zero],
        [zero, zero],
      ]),
    ).toBeNull();
    expect(() => twistorsOfMomenta(physical, [asComplex([0, 0, 0, 0])], balancedSpinors)).toThrow(/leg 1/);
  });
});

describe("momentum twistors of momenta", () => {
  // 0905.1473: lambdatilde from three twistors.
  it.each([4, 5, 6, 8, 12])("give lambdatilde and the momenta back at n = %d", (n) => {
    for (const momenta of scatteringPoints(n, 20, `twistors ${n}`)) {
      const complexMomenta = momenta.map(asComplex);
      const twistors = twistorsOfMomenta(physical, complexMomenta, balancedSpinors);
      const spinors = complexMomenta.map((p) => balancedSpinors(bispinorOf(physical, p))!);
      const angles = spinors.map((s, a) =>
        magnitude(spinorBracket(complexDoubles, s.lambda, spinors[(a + 1) % n]!.lambda)),
      );
      // Rounding is enlarged where neighbours are nearly parallel.
      const worst = 1e-13 / Math.min(...angles) ** 2;
      spinors.forEach(({ tilde }, a) => {
        expect(farthest(lambdaTilde(complexDoubles, twistors, a + 1)!, tilde)).toBeLessThan(worst);
      });
      const back = momentaOfTwistors(physical, twistors)!;
      back.forEach((p, a) => {
        expect(farthest(p, complexMomenta[a]!)).toBeLessThan(worst);
      });
    }
  });

  it("have x2(i j) = s(i..j-1): <i-1 i j-1 j> / (<i-1 i><j-1 j>) is an invariant of momenta", () => {
    const momenta = scatteringPoints(6, 1, "dual")[0]!;
    const z = twistorsOfMomenta(physical, momenta.map(asComplex), balancedSpinors);
    const minor = (a: number, b: number, i: number, j: number) =>
      subtract(multiply(z[a]![i]!, z[b]![j]!), multiply(z[a]![j]!, z[b]![i]!));
    // <1 2 3 4>, by Laplace expansion over the first two rows.
    const pairs = [
      [0, 1, 2, 3, 1],
      [0, 2, 1, 3, -1],
      [0, 3, 1, 2, 1],
      [1, 2, 0, 3, 1],
      [1, 3, 0, 2, -1],
      [2, 3, 0, 1, 1],
    ] as const;
    const bracket = pairs.reduce(
      (sum, [i, j, l, m, sign]) =>
        add(sum, multiply(complexDoubles.real(sign), multiply(minor(0, 1, i, j), minor(2, 3, l, m)))),
      complexDoubles.zero,
    );
    const below = complexDoubles.inverse(multiply(minor(0, 1, 0, 1), minor(2, 3, 0, 1)))!;
    // x_2 - x_4 = p_2 + p_3.
    expect(far(multiply(bracket, below), complexDoubles.real(invariant(momenta, 2, 3)))).toBeLessThan(1e-12);
  });

  it("are exact for rational momenta, in signature (2,2) and in (1,3)", () => {
    const space = exactSpacetime("2,2");
    for (const n of [4, 5, 7]) {
      const momenta = rationalMomenta(n, randomness(`exact ${n}`)).map(
        (p) => p.map(gaussianRationals.real) as unknown as FourMomentum<Complex<Rational>>,
      );
      const twistors = twistorsOfMomenta(space, momenta, (p) => rationalSpinors(gaussianRationals, p));
      expect(twistors.every((z) => z.every(({ im }) => rationals.isZero(im)))).toBe(true);
      const texts = (ps: readonly (readonly Complex<Rational>[])[]) => ps.map((p) => p.map(gaussianRationals.toText));
      expect(texts(momentaOfTwistors(space, twistors)!)).toEqual(texts(momenta));
    }
    // Two Pythagorean directions, 3-4-5 and 8-15-17, in the rest frame.
    const physicalExact = exactSpacetime("1,3");
    const scattering = [
      [-85, 0, 0, -85],
      [-85, 0, 0, 85],
      [85, 51, 0, 68],
      [85, -51, 0, -68],
    ].map((p) => p.map((x) => gaussianRationals.fromInteger(BigInt(x)))) as unknown as FourMomentum<
      Complex<Rational>
    >[];
    const twistors = twistorsOfMomenta(physicalExact, scattering, (p) => rationalSpinors(gaussianRationals, p));
    expect(momentaOfTwistors(physicalExact, twistors)).toEqual(scattering);
    expect(
      spinorsOfTwistors(gaussianRationals, twistors)!.map(({ lambda }) => lambda.map(gaussianRationals.toText)),
    ).toEqual([
      ["1", "0"],
      ["0", "1"],
      ["1", "1/3"],
      ["1", "-3"],
    ]);
  });

  it("are none to come back from where neighbours are parallel", () => {
    const p = asComplex([1, 0, 0, 1]);
    const twistors = twistorsOfMomenta(doubleSpacetime("1,3"), [p, p, p, p], balancedSpinors);
    expect(spinorsOfTwistors(complexDoubles, twistors)).toBeNull();
    expect(momentaOfTwistors(physical, twistors)).toBeNull();
  });
});

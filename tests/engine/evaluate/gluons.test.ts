/** Squared gluon amplitudes, summed over helicities and colours, from colour-ordered components of forms at phase-space points. */
import { describe, expect, it } from "vitest";
import { evaluateForm, type FormAtN } from "../../../engine/evaluate";
import { allHelicities } from "../../../engine/evaluate/helicity";
import { evaluateApproximately } from "../../../engine/evaluate/precision";
import {
  type Complex,
  complexDoubles,
  gaussianRationals,
  magnitude,
  randomness,
  rationals,
} from "../../../engine/fields";
import {
  exactSpacetime,
  type FourMomentum,
  rationalMomenta,
  rationalSpinors,
  twistorsOfMomenta,
} from "../../../engine/kinematics";
import { asComplex, formOf, invariant, pointOf, scatteringPoints, treeForm } from "../../support/physics";

/** All orders of 1..n that begin with 1: the traces that differ. */
function orders(n: number): number[][] {
  const extend = (done: readonly number[], left: readonly number[]): number[][] =>
    left.length === 0
      ? [[...done]]
      : left.flatMap((a) =>
          extend(
            [...done, a],
            left.filter((b) => b !== a),
          ),
        );
  return extend(
    [1],
    Array.from({ length: n - 1 }, (_, i) => i + 2),
  );
}

/**
 * The sum over colours of Tr(T^s1 ... T^sn) Tr(T^t1 ... T^tn)^* in U(N), generators with Tr(T^a T^b) = delta^ab and so
 * sum_a T^a_ij T^a_kl = delta_il delta_jk: N to the number of closed index lines. The added photon decouples from gluon amplitudes,
 * so that in the sum over orders U(N) and SU(N) are the same.
 */
function colourFactor(s: readonly number[], t: readonly number[], N: number): number {
  const n = s.length;
  const placeInT = new Map(t.map((label, place) => [label, place]));
  // The line that leaves leg s_i comes in at s_{i+1} and goes on, in the reversed trace, to the leg before it in t.
  const next = s.map((_, i) => {
    const place = placeInT.get(s[(i + 1) % n]!)!;
    return s.indexOf(t[(place - 1 + n) % n]!);
  });
  const seen = new Set<number>();
  let lines = 0;
  for (let i = 0; i < n; i++) {
    if (seen.has(i)) continue;
    lines++;
    for (let at = i; !seen.has(at); at = next[at]!) seen.add(at);
  }
  return N ** lines;
}

/** The component with the legs in the given order; helicities go with the legs. */
function ordered(
  form: FormAtN,
  momenta: readonly FourMomentum<number>[],
  order: readonly number[],
  negative: readonly number[],
): Complex<number> {
  const point = pointOf(
    order.map((label) => asComplex(momenta[label - 1]!)),
    form.k,
  );
  const places = order.flatMap((label, i) => (negative.includes(label) ? [i + 1] : []));
  const found = evaluateApproximately(form, point, places);
  if (found.kind !== "value") throw new Error(found.kind);
  return found.value;
}

/** Sum over helicities and colours of |sum over orders of trace times amplitude|^2, coupling 1. */
function squared(n: number, momenta: readonly FourMomentum<number>[], N: number): number {
  const all = orders(n);
  const factors = all.map((s) => all.map((t) => colourFactor(s, t, N)));
  let sum = 0;
  for (let k = 0; k <= n - 4; k++) {
    const form = treeForm(n, k);
    for (const negative of allHelicities(n, k)) {
      const amplitudes = all.map((order) => ordered(form, momenta, order, negative));
      for (const [i, a] of amplitudes.entries()) {
        for (const [j, b] of amplitudes.entries()) sum += factors[i]![j]! * (a.re * b.re + a.im * b.im);
      }
    }
  }
  return sum;
}

const cycle = (momenta: readonly FourMomentum<number>[], order: readonly number[]): number =>
  order.reduce((product, label, i) => product * invariant(momenta, label, order[(i + 1) % order.length]!), 1);

describe("gluon scattering", () => {
  it("colour factors count index lines: N^n for a trace with itself, N^2 for four legs read backwards", () => {
    expect(colourFactor([1, 2, 3, 4], [1, 2, 3, 4], 3)).toBe(81);
    expect(colourFactor([1, 2, 3, 4], [1, 4, 3, 2], 3)).toBe(9);
    expect(colourFactor([1, 2, 3], [1, 2, 3], 5)).toBe(125);
    expect(colourFactor([1, 2, 3], [1, 3, 2], 5)).toBe(5);
  });

  // The textbook cross section: |M|^2 is proportional to 3 - tu/s^2 - su/t^2 - st/u^2.
  it.each([2, 3, 5])("gg -> gg for N = %d is 3 - tu/s^2 - su/t^2 - st/u^2 times 16 N^2 (N^2 - 1)", (N) => {
    for (const momenta of scatteringPoints(4, 3, "gg gg")) {
      const [s, t, u] = [invariant(momenta, 1, 2), invariant(momenta, 2, 3), invariant(momenta, 1, 3)];
      const textbook = 3 - (t * u) / s ** 2 - (s * u) / t ** 2 - (s * t) / u ** 2;
      expect(squared(4, momenta, N) / (16 * N ** 2 * (N ** 2 - 1) * textbook)).toBeCloseTo(1, 10);
    }
  });

  // Phys. Rev. Lett. 56 (1986) 2459: sum over i > j of s_ij^4 times the sum over orders of 1/(s_12 s_23 s_34 s_45 s_51).
  it("gg -> ggg for N = 3 is N^3 (N^2 - 1) times 2 sum of s_ij^4 times the sum over orders of 1/(s12 s23 s34 s45 s51)", () => {
    for (const momenta of scatteringPoints(5, 1, "gg ggg")) {
      let fourth = 0;
      for (let i = 1; i <= 5; i++) for (let j = i + 1; j <= 5; j++) fourth += invariant(momenta, i, j) ** 4;
      const chains = orders(5).reduce((sum, order) => sum + 1 / cycle(momenta, order), 0);
      expect(squared(5, momenta, 3) / (27 * 8 * 2 * fourth * chains)).toBeCloseTo(1, 9);
    }
  });
});

describe("five gluons at 1,000 points of phase space", () => {
  it("the typed MHV component squared is s12^4/(s12 s23 s34 s45 s51) to 12 digits, and has the digits it claims", () => {
    const form = formOf("<1 2>^4 / (<1 2><2 3><3 4><4 5><5 1>)", 5, 0, [1, 2]);
    for (const momenta of scatteringPoints(5, 1000, "five gluons")) {
      const found = evaluateApproximately(form, pointOf(momenta.map(asComplex), 0), null);
      if (found.kind !== "value") throw new Error(found.kind);
      const closed = invariant(momenta, 1, 2) ** 4 / cycle(momenta, [1, 2, 3, 4, 5]);
      const relative = Math.abs(magnitude(found.value) ** 2 / closed - 1);
      // Where two neighbours are nearly parallel their invariant, a small difference of products of doubles, has lost digits itself.
      const smallest = Math.min(...[1, 2, 3, 4, 5].map((i) => Math.abs(invariant(momenta, i, (i % 5) + 1))));
      const lost = (1e-15 * invariant(momenta, 1, 2)) / smallest;
      expect(relative).toBeLessThan(Math.max(1e-12, lost));
      expect(relative).toBeLessThan(Math.max(3 * 10 ** -found.digits, lost));
    }
  });

  it("the conjugate component, from the superamplitude, has the same square", () => {
    const form = treeForm(5, 1);
    for (const momenta of scatteringPoints(5, 50, "conjugate")) {
      const found = evaluateApproximately(form, pointOf(momenta.map(asComplex), 1), [3, 4, 5]);
      if (found.kind !== "value") throw new Error(found.kind);
      const closed = invariant(momenta, 1, 2) ** 4 / cycle(momenta, [1, 2, 3, 4, 5]);
      expect(Math.abs(magnitude(found.value) ** 2 / closed - 1)).toBeLessThan(10 ** -(found.digits - 1));
    }
  });
});

describe("exact points", () => {
  it("in signature (2,2) the MHV component times its conjugate is s12^4/(s12 s23 s34 s45 s51), a rational number, exactly", () => {
    const space = exactSpacetime("2,2");
    const momenta = rationalMomenta(5, randomness("exact product")).map(
      (p) => p.map(gaussianRationals.real) as unknown as FourMomentum<Complex<typeof rationals.zero>>,
    );
    const twistors = twistorsOfMomenta(space, momenta, (p) => rationalSpinors(gaussianRationals, p));
    const zeros = twistors[0]!.map(() => gaussianRationals.zero);
    const point = {
      n: 5,
      k: 0,
      loops: 0,
      twistors,
      chi: [],
      lines: [],
      referenceTwistor: zeros,
      referenceChi: [],
      referenceLine: [zeros, zeros] as const,
    };
    const exactValue = (text: string) => {
      const evaluation = evaluateForm(gaussianRationals, formOf(text, 5, 0, [1, 2]), point);
      if (evaluation.kind !== "value") throw new Error("a denominator vanishes");
      return evaluation.sum;
    };
    const product = gaussianRationals.multiply(
      exactValue("<1 2>^4 / (<1 2><2 3><3 4><4 5><5 1>)"),
      exactValue("[1 2]^4 / ([1 2][2 3][3 4][4 5][5 1])"),
    );
    // s_ab = 2 p_a.p_b = 2 (E E - x x + y y - z z), from the momenta themselves.
    const s = (a: number, b: number) => {
      const [p, q] = [momenta[a - 1]!, momenta[b - 1]!];
      const terms = p.map((x, i) => rationals.multiply(x.re, q[i]!.re));
      const sum = terms.reduce(
        (total, term, i) => (i % 2 === 0 ? rationals.add(total, term) : rationals.subtract(total, term)),
        rationals.zero,
      );
      return rationals.add(sum, sum);
    };
    const cube = rationals.multiply(s(1, 2), rationals.multiply(s(1, 2), s(1, 2)));
    const below = [s(2, 3), s(3, 4), s(4, 5), s(5, 1)].reduce(rationals.multiply);
    expect(gaussianRationals.toText(product)).toBe(
      rationals.toText(rationals.multiply(cube, rationals.inverse(below)!)),
    );
  });
});

describe("orders of legs", () => {
  it("the photon decouples: the sum over the places of leg 1 among the others vanishes (Nucl. Phys. B298 (1988) 653)", () => {
    const form = treeForm(6, 1);
    const momenta = scatteringPoints(6, 1, "photon")[0]!;
    const others = [2, 3, 4, 5, 6];
    const terms = others.map((_, i) =>
      ordered(form, momenta, [...others.slice(0, i + 1), 1, ...others.slice(i + 1)], [1, 3, 5]),
    );
    const sum = terms.reduce(complexDoubles.add, complexDoubles.zero);
    const size = Math.max(...terms.map(magnitude));
    expect(magnitude(sum) / size).toBeLessThan(1e-8);
    expect(magnitude(complexDoubles.subtract(sum, terms[0]!)) / size).toBeGreaterThan(1e-3);
  });

  // Nucl. Phys. B312 (1989) 616: A(1, alpha, n, beta) = (-1)^|beta| times the sum of A(1, sigma, n) over the shuffles of alpha with
  // beta backwards.
  it("the last leg can be brought beside the first by shuffles", () => {
    const shuffles = (a: readonly number[], b: readonly number[]): number[][] =>
      a.length === 0 || b.length === 0
        ? [[...a, ...b]]
        : [
            ...shuffles(a.slice(1), b).map((rest) => [a[0]!, ...rest]),
            ...shuffles(a, b.slice(1)).map((rest) => [b[0]!, ...rest]),
          ];
    const form = treeForm(6, 1);
    const momenta = scatteringPoints(6, 1, "shuffles")[0]!;
    for (const [alpha, beta] of [
      [
        [2, 3],
        [4, 5],
      ],
      [[3], [5, 2, 4]],
    ] as const) {
      const left = ordered(form, momenta, [1, ...alpha, 6, ...beta], [2, 4, 6]);
      const terms = shuffles(alpha, [...beta].reverse()).map((sigma) =>
        ordered(form, momenta, [1, ...sigma, 6], [2, 4, 6]),
      );
      const sign = complexDoubles.real((-1) ** beta.length);
      const right = complexDoubles.multiply(sign, terms.reduce(complexDoubles.add, complexDoubles.zero));
      const size = Math.max(magnitude(left), ...terms.map(magnitude));
      expect(magnitude(complexDoubles.subtract(left, right)) / size).toBeLessThan(1e-8);
      expect(magnitude(left) / size).toBeGreaterThan(1e-6);
    }
  });
});

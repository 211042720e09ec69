/**
 * Leading singularities at k = 0 (1012.6032; MARKS "Unit leading singularities", the complete set): at AB = (i j) the residue is 1 at one
 * loop and an integrand of fewer loops above; the residue through Z_i is a polygon of known form, as is the one in the plane of i.
 */
import { bracket, type Line, meetOfPlanes, planeThrough, type Twistor } from "../../kinematics";
import type { Bench } from "../bench";
import { type Ground, mostAttempts } from "../ground";
import type { Mark } from "../report";
import { firstUnknown, sumOverSplittings } from "./distributions";
import { atSomeGround, directionsOf, leadingCoefficient, legTwistor, linePath, mixture } from "./linePaths";
import { missingSource, notApplicable, onlyAmplitudes, overBudget, untested } from "./lower";
import { legOf } from "./moves";
import { cutsOf } from "./twoParticleCuts";

interface Test {
  readonly says: string;
  readonly compare: (ground: Ground) => "equal" | "unequal" | "bad";
}

export function unitLeadingSingularities(bench: Bench): Mark {
  const { n, k, loops } = bench.form;
  const other = onlyAmplitudes(bench);
  if (other !== null) return other;
  if (loops === 0) return notApplicable("A tree has no loop line whose residues could be taken.");
  if (k > 0) return notApplicable("Leading singularities are all 1 or 0 for k = 0 only.");
  const pairs = cutsOf(n);
  const missing = firstUnknown(
    pairs.map(([i, j]) => [j - i + 1, n - (j - i) + 1] as const),
    loops - 1,
  );
  if (missing !== null) return missingSource(missing);
  const legs = Array.from({ length: n }, (_, a) => a + 1);
  const tests: Test[] = pairs.map(([i, j]) => ({
    says: `at AB = (${i} ${j})`,
    compare: (ground) => throughTwoLegs(bench, ground, i, j),
  }));
  if (loops === 1) {
    if (n > 4)
      for (const [i, j] of pairs)
        tests.push({ says: `at AB = bar(${i}) cap bar(${j})`, compare: (ground) => inTwoPlanes(bench, ground, i, j) });
    for (const i of legs) {
      tests.push({ says: `through leg ${i}`, compare: (ground) => throughLeg(bench, ground, i) });
      tests.push({ says: `in the plane bar(${i})`, compare: (ground) => inPlane(bench, ground, i) });
    }
  }
  const costly = overBudget(bench, tests.length);
  if (costly !== null) return costly;
  for (const test of tests) {
    const found = atSomeGround<"equal" | "unequal">(bench, mostAttempts, test.compare);
    if (found === "bad") return untested(`For the residue ${test.says} a denominator vanishes at every point tried.`);
    if (found === "unequal")
      return { state: "fails", evidence: `The residue ${test.says} is not that of an amplitude.` };
  }
  const what =
    loops === 1
      ? `${pairs.length} residues at AB = (i j), all 1,${n > 4 ? ` ${pairs.length} at bar(i) cap bar(j), all 0,` : ""} and the ${2 * n} polygons of residues through and in the plane of each leg`
      : `${pairs.length} residues at AB = (i j), each an integrand of fewer loops,`;
  return {
    state: "holds",
    evidence: `The ${what} are those of an amplitude, at one point each, modulo the 31-bit prime ${bench.ground(0).prime}.`,
  };
}

/** A = Z_i + e(a1 e1 + a2 e2), B = Z_j + e(b1 e1 + b2 e2): [M f1 f2 f3 f4] <i j e1 e2>^2 / det of the four slopes. */
function throughTwoLegs(bench: Bench, ground: Ground, i: number, j: number): "equal" | "unequal" | "bad" {
  const { field, point } = ground;
  const { multiply, subtract } = field;
  const four = (a: Twistor<number>, b: Twistor<number>, c: Twistor<number>, d: Twistor<number>) =>
    bracket(field, a, b, c, d);
  const z = (label: number) => legTwistor(ground, label);
  const [e1, e2] = directionsOf(ground, 0);
  const [a1, a2, b1, b2] = ground.numbers(`singularity ${i} ${j}`, 4) as [number, number, number, number];
  const plus = (x: number, y: number): Twistor<number> =>
    e1.map((c, at) => field.add(multiply(x, c), multiply(y, e2[at]!)));
  const path = linePath(point, 0, [
    { at: z(i), by: plus(a1, a2) },
    { at: z(j), by: plus(b1, b2) },
  ]);
  const leading = leadingCoefficient(bench.series, ground, path, -4);
  if (leading === "bad") return "bad";
  if (leading === "higher") return "unequal";
  // To first order f1, f2 move with A alone and f3, f4 with B alone.
  const ofA = (e: Twistor<number>, x: number) => four(e, z(j), z(x), z(x + 1));
  const ofB = (e: Twistor<number>, x: number) => four(z(i), e, z(x), z(x + 1));
  const slopes = [ofA(plus(a1, a2), i - 1), ofA(plus(a1, a2), i), ofB(plus(b1, b2), j - 1), ofB(plus(b1, b2), j)];
  const detA = subtract(multiply(ofA(e1, i - 1), ofA(e2, i)), multiply(ofA(e2, i - 1), ofA(e1, i)));
  const detB = subtract(multiply(ofB(e1, j - 1), ofB(e2, j)), multiply(ofB(e2, j - 1), ofB(e1, j)));
  const inverse = field.inverse(multiply(detA, detB));
  const frame = four(z(i), z(j), e1, e2);
  const legs = (from: number, count: number) => Array.from({ length: count }, (_, step) => legOf(point, from + step));
  const sides = [legs(i, j - i + 1), legs(j, point.n - (j - i) + 1)] as const;
  const expected = sumOverSplittings(ground, sides, point.lines.slice(1));
  if (inverse === null || expected === null) return "bad";
  const residue = multiply(multiply(slopes.reduce(multiply, leading), multiply(frame, frame)), inverse);
  return residue === expected ? "equal" : "unequal";
}

/** On the line where the planes bar(i) and bar(j) meet the same four brackets vanish, and the residue is 0. */
function inTwoPlanes(bench: Bench, ground: Ground, i: number, j: number): "equal" | "unequal" | "bad" {
  const { field, point } = ground;
  const z = (label: number) => legTwistor(ground, label);
  const plane = (label: number) => planeThrough(field, z(label - 1), z(label), z(label + 1));
  const [a, b] = pointsOn(ground, meetOfPlanes(field, plane(i), plane(j)));
  const [r, s] = directionsOf(ground, 0);
  const path = linePath(point, 0, [
    { at: a, by: r },
    { at: b, by: s },
  ]);
  const leading = leadingCoefficient(bench.series, ground, path, -4);
  return leading === "bad" ? "bad" : leading === 0 ? "equal" : "unequal";
}

/** Two points of a line given by its coordinates a_p b_q - a_q b_p: contractions with two covectors. */
function pointsOn(ground: Ground, line: Line<number>): readonly [Twistor<number>, Twistor<number>] {
  const { field } = ground;
  const [p01, p02, p03, p12, p13, p23] = line;
  const { negate, multiply } = field;
  const matrix = [
    [0, p01, p02, p03],
    [negate(p01), 0, p12, p13],
    [negate(p02), negate(p12), 0, p23],
    [negate(p03), negate(p13), negate(p23), 0],
  ];
  const contract = (w: readonly number[]): Twistor<number> =>
    matrix.map((row) => row.reduce((sum, x, at) => field.add(sum, multiply(x, w[at]!)), 0));
  const w = ground.numbers("points on a line", 8);
  return [contract(w.slice(0, 4)), contract(w.slice(4))];
}

/** A = Z_i + e(a1 e1 + a2 e2), B generic: the polygon of the other legs as seen from Z_i. */
function throughLeg(bench: Bench, ground: Ground, i: number): "equal" | "unequal" | "bad" {
  const { field, point } = ground;
  const { multiply, subtract, add } = field;
  const z = (label: number) => legTwistor(ground, label);
  const [e1, e2] = directionsOf(ground, 0);
  const [a1, a2] = ground.numbers(`polygon ${i}`, 2) as [number, number];
  const [, b] = point.lines[0]!;
  const by = e1.map((c, at) => add(multiply(a1, c), multiply(a2, e2[at]!)));
  const still = [0, 0, 0, 0];
  const path = linePath(point, 0, [
    { at: z(i), by },
    { at: b, by: still },
  ]);
  const leading = leadingCoefficient(bench.series, ground, path, -2);
  if (leading === "bad") return "bad";
  if (leading === "higher") return "unequal";
  const slope = (e: Twistor<number>, x: number) => bracket(field, e, b, z(x), z(x + 1));
  const det = subtract(multiply(slope(e1, i - 1), slope(e2, i)), multiply(slope(e2, i - 1), slope(e1, i)));
  let polygon: number | null = 0;
  for (let step = 2; step <= point.n - 2; step++) {
    const j = i + step;
    const square = bracket(field, z(i), z(i + 1), z(j), z(j + 1));
    const below = [bracket(field, z(i), b, z(i + 1), z(j)), bracket(field, z(i), b, z(j), z(j + 1))];
    below.push(bracket(field, z(i), b, z(j + 1), z(i + 1)));
    const inverse = field.inverse(below.reduce(multiply));
    polygon = inverse === null || polygon === null ? null : add(polygon, multiply(multiply(square, square), inverse));
  }
  const inverse = field.inverse(det);
  if (inverse === null || polygon === null) return "bad";
  const product = multiply(leading, multiply(slope(by, i - 1), slope(by, i)));
  const residue = multiply(multiply(product, bracket(field, z(i), b, e1, e2)), inverse);
  return residue === polygon ? "equal" : "unequal";
}

/** A and B in the plane bar(i), moved by e u W and e v W. */
function inPlane(bench: Bench, ground: Ground, i: number): "equal" | "unequal" | "bad" {
  const { field, point } = ground;
  const { multiply, subtract } = field;
  const z = (label: number) => legTwistor(ground, label);
  const numbers = ground.numbers(`plane ${i}`, 8);
  const around = [i - 1, i, i + 1];
  const [a, b] = [mixture(ground, around, numbers.slice(0, 3)), mixture(ground, around, numbers.slice(3, 6))];
  const [u, v] = [numbers[6]!, numbers[7]!];
  const [w] = directionsOf(ground, 0);
  const times = (x: number): Twistor<number> => w.map((c) => multiply(x, c));
  const path = linePath(point, 0, [
    { at: a, by: times(u) },
    { at: b, by: times(v) },
  ]);
  const leading = leadingCoefficient(bench.series, ground, path, -2);
  if (leading === "bad") return "bad";
  if (leading === "higher") return "unequal";
  const byU = (x: number) => bracket(field, w, b, z(x), z(x + 1));
  const byV = (x: number) => bracket(field, a, w, z(x), z(x + 1));
  const slope = (x: number) => field.add(multiply(u, byU(x)), multiply(v, byV(x)));
  const det = subtract(multiply(byU(i - 1), byV(i)), multiply(byV(i - 1), byU(i)));
  const below = around.map((p) => bracket(field, w, a, b, z(p))).reduce(multiply, det);
  const inverse = field.inverse(below);
  if (inverse === null) return "bad";
  const top = bracket(field, w, z(i - 1), z(i), z(i + 1));
  // [M f1 f2] / det against <W i-1 i i+1> / prod <W A B p>: both over the common denominator.
  const residue = multiply(multiply(leading, multiply(slope(i - 1), slope(i))), field.inverse(det) ?? 0);
  const expected = multiply(multiply(top, inverse), det);
  return residue === expected ? "equal" : "unequal";
}

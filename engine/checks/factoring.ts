/**
 * Brackets with meets, taken apart into plain brackets where they are products of them: in
 * <6 7 8 (3 4) cap (7 p q)> with p, q in the plane (7 8 1) the whole plane (7 p q) is that plane, which no rule on
 * the letters sees. A plain bracket <a b c d> is irreducible, so it divides whatever vanishes at a random point with <a b c d> = 0.
 */
import { type Field, randomness, smallPrimeField } from "../fields";
import { type PrimeSeries, primeSeries, valuationOf } from "../fields/primeSeries";
import {
  type Point as KinematicPoint,
  type Line,
  lineBracket,
  lineThrough,
  meetOfLineAndPlane,
  meetOfPlanes,
  type Plane,
  planeOf,
  planeThrough,
  type Twistor,
} from "../kinematics";
import { type Point, pointText } from "./brackets";

/** A factor of a bracket with its power. What is no product of plain brackets is the bracket divided by those `without` names. */
export interface Factor {
  readonly points: readonly Point[];
  readonly power: number;
  readonly without: readonly { readonly points: readonly Point[]; readonly power: number }[];
}

/** Factors are found modulo this prime at random points: all that matters is that they were not chosen. */
const field = smallPrimeField(2147483647);
/** A plain bracket in a product of brackets that people write stands there to a power below this. */
const seriesTerms = 8;

/** The factors of all brackets that differ in nothing but the names of their atoms, atoms numbered by first appearance. */
type Pattern = readonly { readonly four: readonly number[]; readonly power: number }[];

/** Takes brackets apart, each pattern once: the brackets of a recursion are a few patterns with ever other legs. */
export class Factoring {
  readonly #patterns = new Map<string, { readonly factors: Pattern; readonly complete: boolean } | null>();

  /** The factors of a bracket of four points; a bracket without meets is its own. */
  factorsOf(points: readonly Point[]): readonly Factor[] {
    const whole = { points, power: 1, without: [] };
    if (!points.some((p) => p.kind === "meet" || p.kind === "planes")) return [whole];
    const numbers = new Map<string, number>();
    const atoms: Point[] = [];
    const key = points.map((p) => patternOf(p, numbers, atoms)).join(" ");
    let pattern = this.#patterns.get(key);
    if (pattern === undefined) {
      pattern = factorPattern(points, numbers);
      this.#patterns.set(key, pattern);
    }
    if (pattern === null) return [whole];
    const named = pattern.factors.map(({ four, power }) => ({
      points: four.map((number) => atoms[number]!).sort((a, b) => (pointText(a) < pointText(b) ? -1 : 1)),
      power,
      without: [],
    }));
    named.sort((a, b) => compareTexts(a.points, b.points));
    return pattern.complete ? named : [...named, { points, power: 1, without: named }];
  }
}

function compareTexts(a: readonly Point[], b: readonly Point[]): number {
  for (const [i, p] of a.entries()) {
    const [x, y] = [pointText(p), pointText(b[i]!)];
    if (x !== y) return x < y ? -1 : 1;
  }
  return 0;
}

/** A point with its atoms as numbers; atoms that are new are numbered on. */
function patternOf(p: Point, numbers: Map<string, number>, atoms: Point[]): string {
  const all = (points: readonly Point[]): string => points.map((q) => patternOf(q, numbers, atoms)).join(" ");
  if (p.kind === "meet") return `(${all(p.line)}|${all(p.plane)})`;
  if (p.kind === "planes") return `${p.which}{${all(p.left)}|${all(p.right)}}`;
  const text = pointText(p);
  let number = numbers.get(text);
  if (number === undefined) {
    number = atoms.length;
    numbers.set(text, number);
    atoms.push(p);
  }
  return String(number);
}

/** The plain factors of a bracket with meets, null where it vanishes everywhere: its zero is found where it is evaluated. */
function factorPattern(
  points: readonly Point[],
  numbers: ReadonlyMap<string, number>,
): { readonly factors: Pattern; readonly complete: boolean } | null {
  const weights = new Map<string, number>();
  for (const atom of points.flatMap(atomsOf)) {
    const name = pointText(atom);
    weights.set(name, (weights.get(name) ?? 0) + 1);
  }
  const names = [...weights.keys()].sort();
  const random = randomness(`factors|${names.join(" ")}`);
  const draw = (): number => Number(random.below(field.characteristic));
  const drawn = new Map(names.map((name) => [name, [draw(), draw(), draw(), draw()] as Twistor<number>]));
  const at = (name: string): Twistor<number> => drawn.get(name)!;
  const mixing = [draw(), draw(), draw()];
  const direction: Twistor<number> = [draw(), draw(), draw(), draw()];

  const factors: { four: readonly number[]; power: number }[] = [];
  let left = [...weights.values()].reduce((a, b) => a + b, 0);
  for (const four of subsets(names)) {
    if (left === 0) break;
    const [a, b, c, d] = four as [string, string, string, string];
    if (four.some((name) => (weights.get(name) ?? 0) === 0)) continue;
    const inPlane = [0, 1, 2, 3].map((i) =>
      [a, b, c].reduce((sum, name, j) => field.add(sum, field.multiply(mixing[j]!, at(name)[i]!)), 0),
    );
    const value = bracketAt(field, points, (atom) => (pointText(atom) === d ? inPlane : at(pointText(atom))));
    if (value !== 0) continue;
    const series = primeSeries(field, seriesTerms);
    const moving = inPlane.map((x, i) => series.linear(x, direction[i]!));
    const power = valuationOf(
      bracketAt<PrimeSeries>(series, points, (atom) => (pointText(atom) === d ? moving : at(pointText(atom)))),
    );
    // A bracket that vanishes everywhere has every factor.
    if (power === null || !Number.isFinite(power)) return null;
    factors.push({ four: four.map((name) => numbers.get(name)!), power });
    for (const name of four) weights.set(name, (weights.get(name) ?? 0) - power);
    left -= 4 * power;
  }
  return { factors, complete: left === 0 };
}

function* subsets(names: readonly string[]): Generator<readonly string[]> {
  const m = names.length;
  for (let a = 0; a < m; a++)
    for (let b = a + 1; b < m; b++)
      for (let c = b + 1; c < m; c++)
        for (let d = c + 1; d < m; d++) yield [names[a]!, names[b]!, names[c]!, names[d]!];
}

function atomsOf(p: Point): readonly Point[] {
  if (p.kind === "meet") return [...p.line, ...p.plane].flatMap(atomsOf);
  // The two formal points of a line of two planes hold its six points once.
  if (p.kind === "planes") return p.which === 0 ? [...p.left, ...p.right].flatMap(atomsOf) : [];
  return [p];
}

/** The bracket at a kinematic point. */
export const bracketOf = <T>(ring: Field<T>, points: readonly Point[], point: KinematicPoint<T>): T =>
  bracketAt(ring, points, (atom) => {
    switch (atom.kind) {
      case "label":
        return point.twistors[atom.label - 1]!;
      case "letter":
        return point.lines[atom.line]![atom.which];
      case "star":
        return point.referenceTwistor;
      case "reference":
        return point.referenceLine[atom.which];
      default:
        throw new Error(`bracketOf: expected a point that is given, got ${atom.text}`);
    }
  });

/** <a b c d> with every atom (leg, loop point, reference) where `at` puts it. */
function bracketAt<T>(ring: Field<T>, points: readonly Point[], at: (atom: Point) => Twistor<T>): T {
  const pairs = pairsOf(points);
  const lines = pairs.map((pair) => lineOf(ring, pair, at));
  return lineBracket(ring, lines[0]!, lines[1]!);
}

/** Four points as two lines, the formal points of one line of two planes together. */
function pairsOf(points: readonly Point[]): readonly (readonly Point[])[] {
  const formal = points.filter((p) => p.kind === "planes");
  const others = points.filter((p) => p.kind !== "planes");
  const sorted = [...formal.filter((p) => p.which === 0).flatMap((p) => partners(formal, p)), ...others];
  return [sorted.slice(0, 2), sorted.slice(2)];
}

const partners = (formal: readonly Point[], p: Point): readonly Point[] => [
  p,
  ...formal.filter((q) => q.kind === "planes" && p.kind === "planes" && q.which === 1 && q.text === p.text).slice(0, 1),
];

function lineOf<T>(ring: Field<T>, pair: readonly Point[], at: (atom: Point) => Twistor<T>): Line<T> {
  const [p, q] = pair;
  if (p?.kind === "planes")
    return meetOfPlanes(ring, planeOfPoints(ring, p.left, at), planeOfPoints(ring, p.right, at));
  return lineThrough(ring, twistorOf(ring, p!, at), twistorOf(ring, q!, at));
}

function planeOfPoints<T>(ring: Field<T>, points: readonly Point[], at: (atom: Point) => Twistor<T>): Plane<T> {
  const formal = points.filter((p) => p.kind === "planes");
  if (formal.length > 0) {
    const other = points.find((p) => p.kind !== "planes");
    return planeOf(ring, lineOf(ring, formal, at), twistorOf(ring, other!, at));
  }
  const [a, b, c] = points.map((p) => twistorOf(ring, p, at));
  return planeThrough(ring, a!, b!, c!);
}

function twistorOf<T>(ring: Field<T>, p: Point, at: (atom: Point) => Twistor<T>): Twistor<T> {
  if (p.kind !== "meet") return at(p);
  return meetOfLineAndPlane(ring, lineOf(ring, p.line, at), planeOfPoints(ring, p.plane, at));
}

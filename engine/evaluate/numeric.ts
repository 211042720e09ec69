/** The value of every construct of the notation at one kinematic point, by its definition. */
import type { Field } from "../fields";
import { rational } from "../fields";
import {
  angle,
  combineChi,
  dualDistance,
  dualPointOfLeg,
  type GrassmannVectors,
  type Line,
  lambdaOf,
  lambdaTilde,
  leg,
  lineBracket,
  lineThrough,
  type Momentum,
  meet,
  meetOfPlanes,
  momentumSquared,
  muOf,
  type Plane,
  type Point,
  planeOf,
  type Spinor,
  type Supertwistor,
  spinorBracket,
  spinorString,
  squareContractions,
  totalMomentum,
} from "../kinematics";
import {
  type Algebra,
  type DualSlot,
  type Piece,
  type PointPiece,
  type SpinorSlot,
  type StringSlots,
  ZeroDenominator,
} from "./algebra";
import { type Value, ValueAlgebra } from "./values";

type Pieces<T> = readonly Piece<Supertwistor<T>, Line<T>>[];

/** Ids below this fit four to a machine number. */
const MOST_CACHED_IDS = 8192;

/** Interprets a formula at one point. `squareSign` -1 turns the sign of every square bracket. */
export class NumericAlgebra<T> implements Algebra<Value<T>, Supertwistor<T>, Line<T>> {
  readonly values: ValueAlgebra<T>;
  private readonly brackets = new Map<number, T>();
  private readonly fiveBrackets = new Map<string, Value<T>>();
  private readonly tildes = new Map<number, Spinor<T>>();

  constructor(
    private readonly field: Field<T>,
    private readonly point: Point<T>,
    private readonly squareSign: 1 | -1,
  ) {
    this.values = new ValueAlgebra(field, point.k);
  }

  integer(x: bigint): Value<T> {
    return this.values.constant(rational(x));
  }

  add(values: readonly Value<T>[]): Value<T> {
    return this.values.add(values);
  }

  negate(value: Value<T>): Value<T> {
    return this.values.negate(value);
  }

  multiply(values: readonly Value<T>[]): Value<T> {
    return this.values.multiply(values);
  }

  divide(numerator: Value<T>, denominator: Value<T>): Value<T> {
    return this.values.multiply([numerator, this.values.inverse(denominator)]);
  }

  power(base: Value<T>, exponent: number): Value<T> {
    return this.values.power(base, exponent);
  }

  externalPoint(label: number): Supertwistor<T> {
    return leg(this.point, label);
  }

  loopPoint(loop: number, which: 0 | 1): Supertwistor<T> {
    return { z: this.lineOf(loop)[which], chi: null };
  }

  referenceTwistor(): Supertwistor<T> {
    return { z: this.point.referenceTwistor, chi: this.point.referenceChi };
  }

  referencePoint(which: 0 | 1): Supertwistor<T> {
    return { z: this.point.referenceLine[which], chi: null };
  }

  meetOfLineAndPlane(line: Pieces<T>, plane: Pieces<T>): Supertwistor<T> {
    const [a, b] = pointsOf(line);
    const [c, d, e] = pointsOf(plane);
    const hasChi = a !== undefined && b !== undefined && (a.chi !== null || b.chi !== null);
    return meet(
      this.field,
      { line: this.line(line), points: hasChi ? [a, b] : null },
      {
        plane: this.plane(plane),
        points: c !== undefined && d !== undefined && e !== undefined ? [c, d, e] : null,
      },
    );
  }

  meetOfPlanes(first: Pieces<T>, second: Pieces<T>): Line<T> {
    return meetOfPlanes(this.field, this.plane(first), this.plane(second));
  }

  fourBracket(pieces: Pieces<T>): Value<T> {
    const points = pieces.filter((piece) => piece.slots === 1);
    if (points.length === 4)
      return this.values.scalar(this.cachedBracket(points[0]!, points[1]!, points[2]!, points[3]!));
    const lines = pieces.filter((piece) => piece.slots === 2).map((piece) => piece.value);
    if (points.length === 2) lines.push(lineThrough(this.field, points[0]!.value.z, points[1]!.value.z));
    return this.values.scalar(lineBracket(this.field, lines[0]!, lines[1]!));
  }

  fiveBracket(points: readonly PointPiece<Supertwistor<T>>[]): Value<T> {
    const key = points.map((piece) => piece.id).join();
    const known = this.fiveBrackets.get(key);
    if (known !== undefined) return known;
    const coefficients = this.fourBrackets(points);
    const denominator = coefficients.reduce((product, x) => this.field.multiply(product, x), this.field.one);
    const inverse = this.field.inverse(denominator);
    if (inverse === null) throw new ZeroDenominator();
    const value = this.deltaWith(inverse, coefficients, points);
    this.fiveBrackets.set(key, value);
    return value;
  }

  delta(points: readonly PointPiece<Supertwistor<T>>[]): Value<T> {
    return this.deltaWith(this.field.one, this.fourBrackets(points), points);
  }

  angleBracket(pieces: Pieces<T>): Value<T> {
    return this.values.scalar(this.line(pieces)[0]);
  }

  squareBracket(left: SpinorSlot, right: SpinorSlot): Value<T> {
    const value = spinorBracket(this.field, this.tilde(left), this.tilde(right));
    return this.values.scalar(this.squareSign === 1 ? value : this.field.negate(value));
  }

  spinorString({ left, first, middle, last }: StringSlots): Value<T> {
    const right = (left === "angle") === (middle.length % 2 === 0) ? "angle" : "square";
    const end = (side: "angle" | "square", slot: SpinorSlot): Spinor<T> =>
      side === "square" ? this.tilde(slot) : lambdaOf(this.slotTwistor(slot));
    const momenta = middle.map((legs) => this.momentum(legs));
    const value = spinorString(this.field, left, end(left, first), momenta, end(right, last));
    const flips = this.squareSign === -1 && squareContractions(left, middle.length) % 2 === 1;
    return this.values.scalar(flips ? this.field.negate(value) : value);
  }

  mandelstam(legs: readonly number[]): Value<T> {
    return this.values.scalar(momentumSquared(this.field, this.momentum(legs)));
  }

  dualDistance(left: DualSlot, right: DualSlot): Value<T> {
    const line = (slot: DualSlot): Line<T> =>
      slot.kind === "leg"
        ? dualPointOfLeg(this.field, this.point.twistors, slot.label)
        : lineThrough(this.field, ...this.lineOf(slot.loop));
    const value = dualDistance(this.field, line(left), line(right));
    if (value === null) throw new ZeroDenominator();
    return this.values.scalar(value);
  }

  /** The product of <AB>^-4 over all loop lines: the measure of a form in dual points. */
  dualMeasure(): Value<T> {
    let product = this.field.one;
    for (const [a, b] of this.point.lines) {
      const inverse = this.field.inverse(angle(this.field, a, b));
      if (inverse === null) throw new ZeroDenominator();
      const square = this.field.multiply(inverse, inverse);
      product = this.field.multiply(product, this.field.multiply(square, square));
    }
    return this.values.scalar(product);
  }

  private lineOf(loop: number): Point<T>["lines"][number] {
    const line = this.point.lines[loop];
    if (line === undefined)
      throw new Error(`lineOf: expected a point with loop line ${loop}, got ${this.point.loops} lines`);
    return line;
  }

  private line(pieces: Pieces<T>): Line<T> {
    const [first, second] = pieces;
    if (first?.slots === 2) return first.value;
    if (first?.slots !== 1 || second?.slots !== 1) throw new Error("line: expected a line or two points");
    return lineThrough(this.field, first.value.z, second.value.z);
  }

  private plane(pieces: Pieces<T>): Plane<T> {
    const points = pieces.filter((piece) => piece.slots === 1);
    const line = pieces.find((piece) => piece.slots === 2);
    if (line !== undefined) return planeOf(this.field, line.value, points[0]!.value.z);
    const [a, b, c] = points;
    return planeOf(this.field, lineThrough(this.field, b!.value.z, c!.value.z), a!.value.z);
  }

  /** The bracket of four points, remembered under their ids in ascending order. */
  private cachedBracket(...points: readonly PointPiece<Supertwistor<T>>[]): T {
    const sorted = [...points];
    let odd = false;
    for (let i = 1; i < sorted.length; i++) {
      for (let j = i; j > 0 && sorted[j - 1]!.id > sorted[j]!.id; j--) {
        [sorted[j - 1], sorted[j]] = [sorted[j]!, sorted[j - 1]!];
        odd = !odd;
      }
    }
    if (sorted.some((piece, i) => i > 0 && piece.id === sorted[i - 1]!.id)) return this.field.zero;
    const compute = (): T => {
      const [a, b, c, d] = sorted.map((piece) => piece.value.z);
      return lineBracket(this.field, lineThrough(this.field, a!, b!), lineThrough(this.field, c!, d!));
    };
    let value: T;
    if (sorted[3]!.id >= MOST_CACHED_IDS) value = compute();
    else {
      const key = sorted.reduce((sum, piece) => sum * MOST_CACHED_IDS + piece.id, 0);
      const known = this.brackets.get(key);
      value = known ?? compute();
      if (known === undefined) this.brackets.set(key, value);
    }
    return odd ? this.field.negate(value) : value;
  }

  /** For points a..e the coefficients of their etas in the delta: <bcde>, <cdea>, <deab>, <eabc>, <abcd>. */
  private fourBrackets(points: readonly PointPiece<Supertwistor<T>>[]): T[] {
    const at = (i: number): PointPiece<Supertwistor<T>> => points[i % 5]!;
    return points.map((_, i) => this.cachedBracket(at(i + 1), at(i + 2), at(i + 3), at(i + 4)));
  }

  private deltaWith(coefficient: T, brackets: readonly T[], points: readonly PointPiece<Supertwistor<T>>[]): Value<T> {
    const rows: GrassmannVectors<T> | null = combineChi(
      this.field,
      points.map((piece, i) => [brackets[i]!, piece.value.chi] as const),
    );
    const nothing = [0, 1, 2, 3].map(() => new Array<T>(this.point.k).fill(this.field.zero));
    return this.values.homogeneous(this.values.graded.delta(coefficient, rows ?? nothing));
  }

  private slotTwistor(slot: SpinorSlot): readonly T[] {
    return slot.kind === "leg" ? this.point.twistors[slot.label - 1]! : this.point.referenceTwistor;
  }

  private tilde(slot: SpinorSlot): Spinor<T> {
    if (slot.kind === "reference") return muOf(this.point.referenceTwistor);
    const known = this.tildes.get(slot.label);
    if (known !== undefined) return known;
    const spinor = lambdaTilde(this.field, this.point.twistors, slot.label);
    if (spinor === null) throw new ZeroDenominator();
    this.tildes.set(slot.label, spinor);
    return spinor;
  }

  private momentum(legs: readonly number[]): Momentum<T> {
    return totalMomentum(
      this.field,
      legs.map((label) => ({
        lambda: lambdaOf(this.point.twistors[label - 1]!),
        tilde: this.tilde({ kind: "leg", label }),
      })),
    );
  }
}

function pointsOf<T>(pieces: Pieces<T>): readonly Supertwistor<T>[] {
  return pieces.every((piece) => piece.slots === 1) ? pieces.map((piece) => piece.value as Supertwistor<T>) : [];
}

/** How large the polynomials are that each construct of the notation stands for, mirroring the evaluator construct by construct. */
import type { Algebra, DualSlot, Piece, PointPiece, SpinorSlot, StringSlots } from "./algebra";
import { type Bound, Factors, type Quotient, sumOfBits } from "./factors";

/** Bounds on each component of a point and of its Grassmann vectors (null where it has none). */
export interface PointSize extends Bound {
  readonly key: string;
  readonly chi: Bound | null;
}

/** Bounds on each Plücker coordinate. */
export interface LineSize extends Bound {
  readonly key: string;
}

type Pieces = readonly Piece<PointSize, LineSize>[];

const LOG2_3 = Math.log2(3);
const LOG2_6 = Math.log2(6);

const product = (...bounds: readonly Bound[]): Bound => ({
  degree: bounds.reduce((total, { degree }) => total + degree, 0),
  bits: bounds.reduce((total, { bits }) => total + bits, 0),
});
const terms = (count: number, bound: Bound): Bound => ({ degree: bound.degree, bits: bound.bits + Math.log2(count) });
const total = (bounds: readonly Bound[]): Bound => ({
  degree: bounds.reduce((most, { degree }) => Math.max(most, degree), 0),
  bits: sumOfBits(bounds.map(({ bits }) => bits)),
});

const COMPONENT: Bound = { degree: 1, bits: 0 };
const lineOfPoints = (a: Bound, b: Bound): Bound => terms(2, product(a, b));
/** <L M>: six products of Plücker coordinates. */
const lineBracket = (l: Bound, m: Bound): Bound => terms(6, product(l, m));

/** Interprets a formula as bounds on its size. The keys of equal polynomials are equal, so that common denominators stay small. */
export class SizeAlgebra implements Algebra<Quotient, PointSize, LineSize> {
  readonly factors = new Factors();
  private readonly shortKeys = new Map<string, string>();
  /** R-invariants by their points in ascending order, and their negatives. */
  private readonly fiveBrackets = new Map<string, readonly [Quotient, Quotient]>();

  constructor(private readonly n: number) {}

  integer(x: bigint): Quotient {
    if (x < 0n) return this.negate(this.integer(-x));
    if (x <= 1n) return this.factors.one();
    const hex = x.toString(16);
    const bits = 4 * (hex.length - 1) + Math.log2(Number.parseInt(hex[0]!, 16) + 1);
    return this.factors.quotient([this.factors.factor(`#${x}`, { degree: 0, bits })]);
  }

  add(values: readonly Quotient[]): Quotient {
    return this.factors.add(values);
  }

  /** The sign is kept as a factor of size one: a + b and a - b are different polynomials. */
  negate(value: Quotient): Quotient {
    return this.factors.multiply(value, this.factors.quotient([this.factors.factor("-", { degree: 0, bits: 0 })]));
  }

  multiply(values: readonly Quotient[]): Quotient {
    return values.reduce((a, b) => this.factors.multiply(a, b), this.factors.one());
  }

  divide(numerator: Quotient, denominator: Quotient): Quotient {
    return this.factors.multiply(numerator, this.factors.inverse(denominator));
  }

  power(base: Quotient, exponent: number): Quotient {
    return this.factors.power(base, exponent);
  }

  externalPoint(label: number): PointSize {
    return { key: `${label}`, ...COMPONENT, chi: COMPONENT };
  }

  loopPoint(loop: number, which: 0 | 1): PointSize {
    return { key: `L${loop}.${which}`, ...COMPONENT, chi: null };
  }

  referenceTwistor(): PointSize {
    return { key: "*", ...COMPONENT, chi: COMPONENT };
  }

  referencePoint(which: 0 | 1): PointSize {
    return { key: `X${which}`, ...COMPONENT, chi: null };
  }

  meetOfLineAndPlane(line: Pieces, plane: Pieces): PointSize {
    const [l, p] = [this.line(line), this.plane(plane)];
    const key = this.shortKey(`(${keys(line)})^(${keys(plane)})`);
    const z = { degree: l.degree + p.degree, bits: l.bits + p.bits + LOG2_3 };
    return { key, ...z, chi: this.chiOfMeet(line, plane, l, p) };
  }

  meetOfPlanes(first: Pieces, second: Pieces): LineSize {
    return {
      key: this.shortKey(`(${keys(first)})^(${keys(second)})`),
      ...terms(2, product(this.plane(first), this.plane(second))),
    };
  }

  fourBracket(pieces: Pieces): Quotient {
    const points = pieces.filter((piece) => piece.slots === 1).map(({ value }) => value);
    const lines: Bound[] = pieces.filter((piece) => piece.slots === 2).map(({ value }) => value);
    for (let i = 0; i + 1 < points.length; i += 2) lines.push(lineOfPoints(points[i]!, points[i + 1]!));
    return this.antisymmetric("four", pieces, lineBracket(lines[0]!, lines[1]!));
  }

  fiveBracket(points: readonly PointPiece<PointSize>[]): Quotient {
    const ids = points.map(({ id }) => id);
    let odd = false;
    // Few enough to sort by insertion, which tells the sign as well.
    for (let i = 1; i < ids.length; i++) {
      for (let j = i; j > 0 && ids[j - 1]! > ids[j]!; j--) {
        [ids[j - 1], ids[j]] = [ids[j]!, ids[j - 1]!];
        odd = !odd;
      }
    }
    const key = ids.join(" ");
    let known = this.fiveBrackets.get(key);
    if (known === undefined) {
      const even = this.ascendingFive(points, odd);
      known = [even, this.negate(even)];
      this.fiveBrackets.set(key, known);
    }
    return known[odd ? 1 : 0];
  }

  /** [a b c d e], minus it where `negative`: delta over five brackets, each of them a polynomial in all points but one. */
  private ascendingFive(points: readonly PointPiece<PointSize>[], negative: boolean): Quotient {
    const sorted = points.map(({ value }) => value).sort((p, q) => (p.key < q.key ? -1 : p.key > q.key ? 1 : 0));
    const denominator = sorted.map((_, i) => {
      const others = sorted.filter((__, j) => j !== i);
      const [a, b, c, d] = others as [PointSize, PointSize, PointSize, PointSize];
      const bound = lineBracket(lineOfPoints(a, b), lineOfPoints(c, d));
      return this.factors.factor(`four ${others.map(({ key }) => key).join(" ")}`, bound);
    });
    const inversions = points.reduce(
      (sum, { value }, i) => sum + points.slice(i).filter((later) => later.value.key < value.key).length,
      0,
    );
    const value = this.divide(
      this.delta(sorted.map((size) => ({ slots: 1, id: 0, value: size }))),
      this.factors.quotient(denominator),
    );
    return negative !== (inversions % 2 === 1) ? this.negate(value) : value;
  }

  /** Four rows, one a flavour, each of five products <bcde> chi_a; the determinants' own terms are counted in `sizeBound`. */
  delta(points: readonly PointPiece<PointSize>[]): Quotient {
    const parts = points.flatMap(({ value }, i) => {
      if (value.chi === null) return [];
      const [a, b, c, d] = points.filter((_, j) => j !== i).map((piece) => piece.value);
      return [product(value.chi, lineBracket(lineOfPoints(a!, b!), lineOfPoints(c!, d!)))];
    });
    const row = parts.length === 0 ? { degree: 0, bits: 0 } : total(parts);
    return this.antisymmetric("delta", points, { degree: 4 * row.degree, bits: 4 * row.bits });
  }

  angleBracket(pieces: Pieces): Quotient {
    return this.antisymmetric("angle", pieces, this.line(pieces));
  }

  squareBracket(left: SpinorSlot, right: SpinorSlot): Quotient {
    const [a, b] = [this.tilde(left), this.tilde(right)];
    const numerator = this.factors.factor(`[${slotKey(left)} ${slotKey(right)}]`, terms(2, product(a.top, b.top)));
    return this.factors.quotient([numerator], [...a.bottom, ...b.bottom]);
  }

  spinorString({ left, first, middle, last }: StringSlots): Quotient {
    const right = (left === "angle") === (middle.length % 2 === 0) ? "angle" : "square";
    const end = (side: "angle" | "square", slot: SpinorSlot) =>
      side === "square" ? this.tilde(slot) : { top: COMPONENT, bottom: [] };
    const parts = [end(left, first), ...middle.map((legs) => this.momentum(legs)), end(right, last)];
    const bound = terms(2 ** (middle.length + 1), product(...parts.map(({ top }) => top)));
    const key = `${left} ${slotKey(first)}|${middle.map((legs) => sortedLegs(legs)).join("|")}|${slotKey(last)}`;
    return this.factors.quotient(
      [this.factors.factor(key, bound)],
      parts.flatMap(({ bottom }) => bottom),
    );
  }

  mandelstam(legs: readonly number[]): Quotient {
    const { top, bottom } = this.momentum(legs);
    const numerator = this.factors.factor(`s ${sortedLegs(legs)}`, terms(2, product(top, top)));
    return this.factors.quotient([numerator], [...bottom, ...bottom]);
  }

  dualDistance(left: DualSlot, right: DualSlot): Quotient {
    const pieces = [left, right].map((slot) => this.dualPoint(slot));
    return this.divide(this.fourBracket(pieces.flat()), this.multiply(pieces.map((pair) => this.angleBracket(pair))));
  }

  /** <AB>^-4 for each of the loop lines. */
  dualMeasure(loops: number): Quotient {
    const lines = Array.from({ length: loops }, (_, loop) => this.angleBracket(this.dualPoint({ kind: "loop", loop })));
    return this.power(this.multiply(lines), -4);
  }

  /** A factor known by its pieces in ascending order, with the sign of the order they are in (lines of two slots move freely). */
  private antisymmetric(name: string, pieces: Pieces, bound: Bound): Quotient {
    const points = pieces.filter(({ slots }) => slots === 1).map(({ value }) => value.key);
    const inversions = points.reduce((sum, key, i) => sum + points.slice(i).filter((later) => later < key).length, 0);
    const sorted = pieces
      .map(({ value }) => value.key)
      .sort()
      .join(" ");
    const value = this.factors.quotient([this.factors.factor(`${name} ${sorted}`, bound)]);
    return inversions % 2 === 1 ? this.negate(value) : value;
  }

  /** Nested meets would have keys that grow exponentially. */
  private shortKey(key: string): string {
    let known = this.shortKeys.get(key);
    if (known === undefined) {
      known = `m${this.shortKeys.size}`;
      this.shortKeys.set(key, known);
    }
    return known;
  }

  private line(pieces: Pieces): Bound {
    const [first, second] = pieces;
    if (first?.slots === 2) return first.value;
    return lineOfPoints(first!.value, second!.value);
  }

  /** Three products of a Plücker coordinate and a component. */
  private plane(pieces: Pieces): Bound {
    const line = pieces.filter((piece) => piece.slots === 2);
    const points = pieces.filter((piece) => piece.slots === 1);
    const inner = line[0]?.value ?? lineOfPoints(points[1]!.value, points[2]!.value);
    const bound = product(inner, points[0]!.value);
    return { degree: bound.degree, bits: bound.bits + LOG2_3 };
  }

  private chiOfMeet(line: Pieces, plane: Pieces, l: Bound, p: Bound): Bound | null {
    const chis = (pieces: Pieces) => pieces.map((piece) => (piece.slots === 1 ? piece.value.chi : null));
    const onLine = chis(line);
    if (line.every(({ slots }) => slots === 1) && onLine.some((chi) => chi !== null)) {
      return total(onLine.flatMap((chi, i) => (chi === null ? [] : [terms(4, product(chi, p, line[1 - i]!.value))])));
    }
    if (plane.some(({ slots }) => slots === 2)) return null;
    const parts = chis(plane).flatMap((chi, i) => {
      if (chi === null) return [];
      const [a, b] = plane.filter((_, j) => j !== i).map(({ value }) => value);
      return [product(chi, lineBracket(lineOfPoints(a!, b!), l))];
    });
    return parts.length === 0 ? null : total(parts);
  }

  private dualPoint(slot: DualSlot): Piece<PointSize, LineSize>[] {
    const points =
      slot.kind === "leg"
        ? [this.externalPoint(this.before(slot.label)), this.externalPoint(slot.label)]
        : [this.loopPoint(slot.loop, 0), this.loopPoint(slot.loop, 1)];
    return points.map((value) => ({ slots: 1, id: 0, value }));
  }

  private before(label: number): number {
    return label === 1 ? this.n : label - 1;
  }

  /** <a a+1> as a factor. */
  private neighbours(label: number): number {
    const next = label === this.n ? 1 : label + 1;
    const key = [`${label}`, `${next}`].sort().join(" ");
    return this.factors.factor(`angle ${key}`, lineOfPoints(COMPONENT, COMPONENT));
  }

  /** Numerator of lambdatilde: three products of an angle bracket and a component of mu. */
  private tilde(slot: SpinorSlot): { top: Bound; bottom: number[] } {
    if (slot.kind === "reference") return { top: COMPONENT, bottom: [] };
    return {
      top: { degree: 3, bits: LOG2_6 },
      bottom: [this.neighbours(this.before(slot.label)), this.neighbours(slot.label)],
    };
  }

  /** sum of lambda lambdatilde over the product of all the angle brackets that occur. */
  private momentum(legs: readonly number[]): { top: Bound; bottom: number[] } {
    const bottom = [...new Set(legs.flatMap((label) => this.tilde({ kind: "leg", label }).bottom))];
    const all = this.factors.bound(bottom.flatMap((factor) => [factor, 1]));
    // Each summand lacks the two angle brackets of its own denominator, degree 2 and one bit each.
    const own = { degree: -4, bits: -2 };
    const summand = product(COMPONENT, this.tilde({ kind: "leg", label: 1 }).top, all, own);
    return { top: terms(legs.length, summand), bottom };
  }
}

const keys = (pieces: Pieces): string => pieces.map(({ value }) => value.key).join(" ");
const slotKey = (slot: SpinorSlot): string => (slot.kind === "leg" ? `${slot.label}` : "*");
const sortedLegs = (legs: readonly number[]): string => [...legs].sort((a, b) => a - b).join(" ");

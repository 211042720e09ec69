/** Points, lines and planes as graph nodes: brackets in one order with a sign, meets, and the Grassmann part of a point. */
import type { Graph, Ref } from "./graph";
import { INPUT, negated } from "./graph";
import { BASIS, CHI, LOOP_POINT, REFERENCE_CHI, REFERENCE_LINE_POINT, REFERENCE_TWISTOR, TWISTOR } from "./inputs";
import { TupleTable } from "./tuples";

/**
 * Things that stand together in a bracket, a group or an operand: points in order, and lines that are known by their Plücker
 * coordinates only (a line takes two slots, so that it may be moved past a point).
 */
export interface Figure {
  readonly points: readonly Ref[];
  readonly lines: readonly Ref[];
}

export const slotsOf = (figure: Figure): number => figure.points.length + 2 * figure.lines.length;

export const pointFigure = (point: Ref): Figure => ({ points: [point], lines: [] });

export class Geometry {
  private readonly legs: (Ref | undefined)[] = [];
  private readonly labelOfNode = new Map<number, number>();
  /** Brackets by their four points in ascending order. */
  private readonly brackets = new TupleTable();
  private readonly bracketRefs: (Ref | undefined)[] = [];
  private readonly four = new Int32Array(4);
  private readonly chiOfNode = new Map<number, Ref | null>();

  constructor(
    private readonly graph: Graph,
    private readonly n: number,
    private readonly k: number,
  ) {}

  leg(label: number): Ref {
    const known = this.legs[label];
    if (known !== undefined) return known;
    const leg = this.graph.input(TWISTOR, label - 1, 4);
    this.legs[label] = leg;
    this.labelOfNode.set(leg >> 1, label);
    return leg;
  }

  loopPoint(index: number): Ref {
    return this.graph.input(LOOP_POINT, index, 4);
  }

  referenceTwistor(): Ref {
    return this.graph.input(REFERENCE_TWISTOR, 0, 4);
  }

  referenceLinePoint(index: number): Ref {
    return this.graph.input(REFERENCE_LINE_POINT, index, 4);
  }

  private basis(index: number): Ref {
    return this.graph.input(BASIS, index, 4);
  }

  /** <a b c d>: sorted with a sign, zero for a repeated point. */
  bracket(a: Ref, b: Ref, c: Ref, d: Ref): Ref {
    let sign = (a ^ b ^ c ^ d) & 1;
    let [p, q, r, s] = [a & ~1, b & ~1, c & ~1, d & ~1];
    if (p > q) [p, q, sign] = [q, p, sign ^ 1];
    if (r > s) [r, s, sign] = [s, r, sign ^ 1];
    if (p > r) [p, r, sign] = [r, p, sign ^ 1];
    if (q > s) [q, s, sign] = [s, q, sign ^ 1];
    if (q > r) [q, r, sign] = [r, q, sign ^ 1];
    if (p === q || q === r || r === s) return this.graph.zero;
    this.four[0] = p;
    this.four[1] = q;
    this.four[2] = r;
    this.four[3] = s;
    const id = this.brackets.intern(this.four, 4);
    let bracket = this.bracketRefs[id];
    if (bracket === undefined) {
      bracket = this.fromLines(p, q, r, s);
      this.bracketRefs[id] = bracket;
    }
    return bracket ^ sign;
  }

  /** <p q r s> = (pq)(rs) = (ps)(qr) = -(pr)(qs): from the lines that are there, else from lines that others will want. */
  private fromLines(p: Ref, q: Ref, r: Ref, s: Ref): Ref {
    const { graph } = this;
    const first = this.worth(p, q) + this.worth(r, s);
    const second = this.worth(p, s) + this.worth(q, r);
    const third = this.worth(p, r) + this.worth(q, s);
    if (first >= second && first >= third) return graph.bracket(graph.line(p, q), graph.line(r, s));
    if (second >= third) return graph.bracket(graph.line(p, s), graph.line(q, r));
    return negated(graph.bracket(graph.line(p, r), graph.line(q, s)));
  }

  /** 2 for a line that is there, 1 for one of neighbouring legs. */
  private worth(a: Ref, b: Ref): number {
    if (this.graph.hasLine(a, b)) return 2;
    const labels = [this.labelOfNode.get(a >> 1), this.labelOfNode.get(b >> 1)];
    if (labels[0] === undefined || labels[1] === undefined) return 0;
    const distance = Math.abs(labels[0] - labels[1]);
    return distance === 1 || distance === this.n - 1 ? 1 : 0;
  }

  /** The bracket of things with four slots. */
  bracketOf({ points, lines }: Figure): Ref {
    if (points.length === 4) return this.bracket(points[0]!, points[1]!, points[2]!, points[3]!);
    if (points.length === 2) {
      if (points[0]! >> 1 === points[1]! >> 1) return this.graph.zero;
      return this.graph.bracket(this.graph.line(points[0]!, points[1]!), lines[0]!);
    }
    return this.graph.bracket(lines[0]!, lines[1]!);
  }

  /** <point plane>. */
  private atPlane(point: Ref, plane: Figure): Ref {
    return this.bracketOf({ ...plane, points: [point, ...plane.points] });
  }

  /** The point where a line (two slots) meets a plane (three slots). */
  meetOfLineAndPlane(line: Figure, plane: Figure): Ref {
    const { graph } = this;
    if (plane.lines.length === 0 && !line.points.some((point) => this.hasChi(point))) {
      // Where the line has no Grassmann part the meet has that of the plane's points.
      const [c, d, e] = plane.points as [Ref, Ref, Ref];
      const part = (p: Ref, q: Ref): Ref => negated(this.bracketOf({ ...line, points: [p, q, ...line.points] }));
      return graph.combine([part(d, e), part(e, c), part(c, d)], [c, d, e], 4);
    }
    if (line.points.length === 2) {
      const [a, b] = line.points as [Ref, Ref];
      return graph.combine([this.atPlane(b, plane), negated(this.atPlane(a, plane))], [a, b], 4);
    }
    // A line from two planes, and a plane through such a line: sum over i < j of L_ij (e_i <e_j plane> - e_j <e_i plane>).
    const heights = [0, 1, 2, 3].map((i) => this.atPlane(this.basis(i), plane));
    const sums = [graph.zero, graph.zero, graph.zero, graph.zero];
    for (const [at, i, j] of pluckerPairs) {
      const coordinate = graph.part(line.lines[0]!, at, 1);
      sums[i] = graph.add(sums[i]!, graph.multiply(coordinate, heights[j]!));
      sums[j] = graph.add(sums[j]!, negated(graph.multiply(coordinate, heights[i]!)));
    }
    return graph.combine(
      sums,
      [0, 1, 2, 3].map((i) => this.basis(i)),
      4,
    );
  }

  /** The line L of two planes, <P Q L> = <P first><Q second> - <Q first><P second>, as Plücker coordinates. */
  meetOfPlanes(first: Figure, second: Figure): Ref {
    const { graph } = this;
    if (first.lines.length === 0) {
      // (ab) <c second> + (bc) <a second> + (ca) <b second>
      const [a, b, c] = first.points as [Ref, Ref, Ref];
      return graph.combine(
        [this.atPlane(c, second), this.atPlane(a, second), this.atPlane(b, second)],
        [graph.line(a, b), graph.line(b, c), graph.line(c, a)],
        6,
      );
    }
    if (second.lines.length === 0) return negated(this.meetOfPlanes(second, first));
    const [through, line] = [first.points[0]!, first.lines[0]!];
    return graph.combine(
      pluckerPairs.map(([at]) => graph.part(line, at, 1)),
      pluckerPairs.map(([, i, j]) =>
        this.meetOfPlanes({ points: [through, this.basis(i), this.basis(j)], lines: [] }, second),
      ),
      6,
    );
  }

  /** <a b> of two points, or of one line: its first Plücker coordinate. */
  angle({ points, lines }: Figure): Ref {
    return points.length === 2 ? this.graph.minor(points[0]!, points[1]!) : this.graph.part(lines[0]!, 0, 1);
  }

  /** chi of a point, four flavours of k slots; null for a point without Grassmann part (it counts as zero). */
  chi(point: Ref): Ref | null {
    const node = point >> 1;
    let chi = this.chiOfNode.get(node);
    if (chi === undefined) {
      chi = this.chiOf(node);
      this.chiOfNode.set(node, chi);
    }
    return chi === null ? null : chi ^ (point & 1);
  }

  /** Whether a point has a Grassmann part, found without making it. */
  private hasChi(point: Ref): boolean {
    const { words, starts } = this.graph.nodes;
    const start = starts[point >> 1]!;
    if (this.graph.operation(point >> 1) === INPUT) {
      return words[start]! >> 8 === TWISTOR || words[start]! >> 8 === REFERENCE_TWISTOR;
    }
    for (let at = start + 3; at < starts[(point >> 1) + 1]!; at += 2) if (this.hasChi(words[at]!)) return true;
    return false;
  }

  private chiOf(node: number): Ref | null {
    const { graph, k } = this;
    const { words, starts } = graph.nodes;
    const start = starts[node]!;
    const end = starts[node + 1]!;
    if (graph.operation(node) === INPUT) {
      const kind = words[start]! >> 8;
      if (kind === TWISTOR) return graph.input(CHI, words[start + 1]!, 4 * k);
      return kind === REFERENCE_TWISTOR ? graph.input(REFERENCE_CHI, 0, 4 * k) : null;
    }
    // Every other point is a linear combination: signs, then (scalar, vector) pairs.
    const operands = Array.from(words.subarray(start + 2, end));
    const signs = words[start + 1]!;
    const scalars: Ref[] = [];
    const vectors: Ref[] = [];
    for (let i = 0; i < operands.length; i += 2) {
      const chi = this.chi(operands[i + 1]!);
      if (chi === null) continue;
      scalars.push(operands[i]! ^ ((signs >> (i / 2)) & 1));
      vectors.push(chi);
    }
    return vectors.length === 0 ? null : graph.combine(scalars, vectors, 4 * k);
  }

  /** The brackets <bcde>, <cdea>, <deab>, <eabc>, <abcd> of five points: the coefficients of chi_a, ..., chi_e. */
  fiveBrackets(points: readonly Ref[]): Ref[] {
    return [0, 1, 2, 3, 4].map((i) =>
      this.bracket(points[(i + 1) % 5]!, points[(i + 2) % 5]!, points[(i + 3) % 5]!, points[(i + 4) % 5]!),
    );
  }

  /** The argument of delta^{0|4} for five points, or null where it is zero whatever the point. */
  deltaRow(points: readonly Ref[], brackets: readonly Ref[]): Ref | null {
    const scalars: Ref[] = [];
    const vectors: Ref[] = [];
    points.forEach((point, i) => {
      const chi = brackets[i] === this.graph.zero ? null : this.chi(point);
      if (chi === null) return;
      scalars.push(brackets[i]!);
      vectors.push(chi);
    });
    return vectors.length === 0 ? null : this.graph.combine(scalars, vectors, 4 * this.k);
  }
}

/** Where the Plücker coordinate of e_i, e_j stands in a line: 12, 13, 14, 23, 42, 34. */
const pluckerPairs: readonly (readonly [at: number, i: number, j: number])[] = [
  [0, 0, 1],
  [1, 0, 2],
  [2, 0, 3],
  [3, 1, 2],
  [4, 3, 1],
  [5, 2, 3],
];

/** A loop line as the two points it is given by. */
export const loopLineFigure = (geometry: Geometry, loop: number): Figure => ({
  points: [geometry.loopPoint(2 * loop), geometry.loopPoint(2 * loop + 1)],
  lines: [],
});

/** `X` as the two points it is given by. */
export const referenceLineFigure = (geometry: Geometry): Figure => ({
  points: [geometry.referenceLinePoint(0), geometry.referenceLinePoint(1)],
  lines: [],
});

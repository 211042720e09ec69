/** Two-brackets, spinor strings, s and x2 on a graph, in the conventions of NOTATION. */
import type { Span } from "../result";
import type { Geometry } from "./geometry";
import type { Graph, Ref } from "./graph";
import { negated } from "./graph";

/** End of a string or slot of `[a b]`: a leg 1..n, or 0 for `*`. */
export type SpinorLabel = number;

/** A dual point as the two points of its line. */
export type DualLine = readonly [Ref, Ref];

export class Spinors {
  private readonly tildes = new Map<SpinorLabel, Ref>();

  constructor(
    private readonly graph: Graph,
    private readonly geometry: Geometry,
    private readonly n: number,
    /** -1 flips every square bracket, also inside strings. */
    private readonly squareSign: 1 | -1,
  ) {}

  private wrap(label: number): number {
    return ((((label - 1) % this.n) + this.n) % this.n) + 1;
  }

  private angleOfLegs(a: number, b: number): Ref {
    return this.graph.minor(this.geometry.leg(a), this.geometry.leg(b));
  }

  /** lambdatilde of a leg (arXiv:0905.1473, with poles <a-1 a> and <a a+1>), or of `*` (0): the last two components. */
  private tilde(label: SpinorLabel, span: Span): Ref {
    let tilde = this.tildes.get(label);
    if (tilde === undefined) {
      tilde = label === 0 ? this.graph.part(this.geometry.referenceTwistor(), 2, 2) : this.makeTilde(label, span);
      this.tildes.set(label, tilde);
    }
    return tilde;
  }

  private makeTilde(label: number, span: Span): Ref {
    const { graph } = this;
    const [before, after] = [this.wrap(label - 1), this.wrap(label + 1)];
    const left = graph.inverse(this.angleOfLegs(before, label), span);
    const right = graph.inverse(this.angleOfLegs(label, after), span);
    const mu = (leg: number): Ref => graph.part(this.geometry.leg(leg), 2, 2);
    const across = graph.multiply(this.angleOfLegs(after, before), graph.multiply(left, right));
    return graph.combine([left, across, right], [mu(before), mu(label), mu(after)], 2);
  }

  square(a: SpinorLabel, b: SpinorLabel, span: Span): Ref {
    const value = this.graph.minor(this.tilde(a, span), this.tilde(b, span));
    return this.squareSign === 1 ? value : negated(value);
  }

  /** `<a|P|b]` = sum over c in P of <a c>[c b], longer strings likewise: angle and square contractions in turn. */
  string(
    left: "angle" | "square",
    first: SpinorLabel,
    middle: readonly (readonly number[])[],
    last: SpinorLabel,
    span: Span,
  ): Ref {
    const { graph } = this;
    const spinor = (side: "angle" | "square", label: SpinorLabel): Ref =>
      side === "square" ? this.tilde(label, span) : this.geometry.leg(label);
    let side = left;
    let squares = 0;
    let current = spinor(side, first);
    for (const legs of middle) {
      const other = side === "angle" ? "square" : "angle";
      if (side === "square") squares += 1;
      // What is left of lambda_c lambdatilde_c once one of them is contracted is the other, the first two slots of Z_c for lambda.
      current = graph.combine(
        legs.map((leg) => graph.minor(current, spinor(side, leg))),
        legs.map((leg) => (other === "angle" ? graph.part(this.geometry.leg(leg), 0, 2) : this.tilde(leg, span))),
        2,
      );
      side = other;
    }
    if (side === "square") squares += 1;
    const value = graph.minor(current, spinor(side, last));
    return this.squareSign === -1 && squares % 2 === 1 ? negated(value) : value;
  }

  /** The square of a sum of momenta: sum over pairs of <a b>[a b], whatever the sign convention of square brackets. */
  mandelstam(legs: readonly number[], span: Span): Ref {
    const { graph } = this;
    const spinorsOf = legs.map((leg) => this.tilde(leg, span));
    let sum = graph.zero;
    for (let i = 0; i < legs.length; i++) {
      for (let j = i + 1; j < legs.length; j++) {
        const angle = this.angleOfLegs(legs[i]!, legs[j]!);
        sum = graph.add(sum, graph.multiply(angle, graph.minor(spinorsOf[i]!, spinorsOf[j]!)));
      }
    }
    return sum;
  }

  /** The dual point of leg i: the line (i-1 i). */
  dualPoint(label: number): DualLine {
    return [this.geometry.leg(this.wrap(label - 1)), this.geometry.leg(label)];
  }

  /** The squared distance of two dual points, <L M>/(<L><M>). */
  distance([a, b]: DualLine, [c, d]: DualLine, span: Span): Ref {
    const { graph } = this;
    const denominator = graph.multiply(graph.minor(a, b), graph.minor(c, d));
    return graph.multiply(this.geometry.bracket(a, b, c, d), graph.inverse(denominator, span));
  }
}

/**
 * The bound of the shared tree recursion, the same as that of its terms one by one: least common multiples, largest degrees and sums of
 * coefficients over all pairs of terms of two factors follow from those of each factor.
 */
import { addBits } from "./bound";
import { bracketSize, log2Factorial, type PointSize, pointSizes, rowSize, superGrading } from "./planBound";
import type { SizeBound } from "./source";
import type { SharedTree, SubAmplitude } from "./subamplitudes";

/** Of a sum of terms: denominators as (factor, power) pairs, and numerators over them, degrees and bits without the denominators'. */
interface Sum {
  readonly degree: number;
  readonly bits: number;
  readonly factors: Int32Array;
}

/** Every number of field operations is one product, with at most one sum. */
export function treeCost({ k, plan, whole }: SharedTree): number {
  const width = 4 * k;
  // A step multiplies the prefix by a row; the largest prefix has C(k, k/2) components a flavour.
  const step = Math.min(2 ** k, 4 * k) * width + 4;
  const products =
    plan.meets.length * (60 + 2 * width) +
    plan.invariants.length * (75 + 5 * width) +
    whole.innerSteps * step +
    whole.terms * (width + 5);
  return 2 * products;
}

export function treeBound(tree: SharedTree): SizeBound {
  return new TreeBound(tree).whole();
}

class TreeBound {
  private readonly points: readonly PointSize[];
  private readonly numbers = new Map<number, Map<number, number>>();
  private readonly degrees: number[] = [];
  private readonly bits: number[] = [];
  /** By invariant its five brackets, and its numerator less its denominator. */
  private readonly brackets: Int32Array;
  private readonly invariants: { degree: number; bits: number }[];
  private readonly sums = new Map<SubAmplitude, Sum>();
  /** Powers of the factors in a channel, and in the sum so far. */
  private readonly inChannel: Int32Array;
  private readonly inSum: Int32Array;

  constructor(private readonly tree: SharedTree) {
    const { plan, k } = tree;
    this.points = pointSizes(plan, superGrading(k));
    this.brackets = new Int32Array(5 * plan.invariants.length);
    this.invariants = plan.invariants.map((labels, invariant) => {
      const sorted = [...labels].sort((a, b) => a - b);
      const row = rowSize(this.points, labels);
      let [degree, bits] = [4 * row.degree, 4 * row.bits];
      for (let i = 0; i < 5; i++) {
        const factor = this.bracket(sorted.filter((_, at) => at !== i));
        this.brackets[5 * invariant + i] = factor;
        degree -= this.degrees[factor]!;
        bits -= this.bits[factor]!;
      }
      return { degree, bits };
    });
    this.inChannel = new Int32Array(this.degrees.length);
    this.inSum = new Int32Array(this.degrees.length);
  }

  whole(): SizeBound {
    for (const subAmplitude of this.tree.subAmplitudes) this.sums.set(subAmplitude, this.sum(subAmplitude));
    const { degree, bits, factors } = this.sums.get(this.tree.whole)!;
    let [denominatorDegree, denominatorBits] = [0, 0];
    for (let i = 0; i < factors.length; i += 2) {
      denominatorDegree += factors[i + 1]! * this.degrees[factors[i]!]!;
      denominatorBits += factors[i + 1]! * this.bits[factors[i]!]!;
    }
    return {
      degree: degree + denominatorDegree,
      denominatorDegree,
      heightBits: bits + denominatorBits + 4 * log2Factorial(this.tree.k),
      denominatorHeightBits: denominatorBits,
    };
  }

  /** The number of a bracket, its four points ascending. */
  private bracket(labels: readonly number[]): number {
    const [a, b, c, d] = labels as readonly [number, number, number, number];
    const high = a * 2 ** 20 + b;
    let known = this.numbers.get(high);
    if (known === undefined) {
      known = new Map();
      this.numbers.set(high, known);
    }
    const low = c * 2 ** 20 + d;
    const number = known.get(low);
    if (number !== undefined) return number;
    known.set(low, this.degrees.length);
    const [degree, bits] = bracketSize(this.points, labels);
    this.degrees.push(degree);
    this.bits.push(bits);
    return this.degrees.length - 1;
  }

  private sum({ shorter, channels }: SubAmplitude): Sum {
    const { inChannel, inSum, brackets } = this;
    const met: number[] = [];
    const raise = (factor: number, power: number): void => {
      if (inSum[factor]! === 0) met.push(factor);
      if (power > inSum[factor]!) inSum[factor] = power;
    };
    let degree = Number.NEGATIVE_INFINITY;
    const bits: number[] = [];
    const before = shorter === null ? undefined : this.sums.get(shorter)!;
    if (before !== undefined) {
      for (let i = 0; i < before.factors.length; i += 2) raise(before.factors[i]!, before.factors[i + 1]!);
      degree = before.degree;
      bits.push(before.bits);
    }
    for (const { invariant, sides } of channels) {
      const sums = sides.map((side) => this.sums.get(side)!);
      const own = this.invariants[invariant]!;
      degree = Math.max(
        degree,
        sums.reduce((total, side) => total + side.degree, own.degree),
      );
      bits.push(sums.reduce((total, side) => total + side.bits, own.bits));
      for (let i = 0; i < 5; i++) inChannel[brackets[5 * invariant + i]!]! += 1;
      for (const { factors } of sums) {
        for (let i = 0; i < factors.length; i += 2) inChannel[factors[i]!]! += factors[i + 1]!;
      }
      const settle = (factor: number): void => {
        if (inChannel[factor]! > 0) raise(factor, inChannel[factor]!);
        inChannel[factor] = 0;
      };
      for (let i = 0; i < 5; i++) settle(brackets[5 * invariant + i]!);
      for (const { factors } of sums) for (let i = 0; i < factors.length; i += 2) settle(factors[i]!);
    }
    const factors = new Int32Array(2 * met.length);
    met.forEach((factor, i) => {
      factors[2 * i] = factor;
      factors[2 * i + 1] = inSum[factor]!;
      inSum[factor] = 0;
    });
    return { degree, bits: addBits(bits), factors };
  }
}

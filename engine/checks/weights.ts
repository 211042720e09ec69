/**
 * Weights, inferred through a formula like units of measure before any number is computed (ENGINE section 4).
 *
 * A weight counts, for each label, each loop point, `*`, `X`, the infinity twistor and eta, how many times an expression scales
 * with it. Lambda-tilde of leg a scales as Z_a^-1, so momenta have weight 0 in their label; a two-bracket counts the infinity twistor
 * once, a square bracket -3 times (each lambda-tilde brings mu/lambda^2, ENGINE section 3.3), s and x2 -2 times.
 */
import { type FormAtN, inDualPoints } from "../evaluate/form";
import { enumerateBindings } from "../notation/bindings";
import {
  cyclicPlaces,
  definitionPlace,
  definitionsOf,
  type Place,
  scalarBody,
  startingPlace,
  symmetricPlaces,
} from "../notation/expand";
import { evaluateLabel, evaluateNumber } from "../notation/indices";
import type {
  Definition,
  DualPoint,
  Expression,
  IndexExpression,
  Item,
  MeetItem,
  Operand,
  Quantified,
  SpinorEnd,
} from "../notation/tree";
import type { Span } from "../result";

/** null is the weight of zero, which agrees with every weight. */
export type Weight = Int32Array | null;

export interface WeightFault {
  /** What the weights differ in: "3", "A", "*", "X", "infinity twistor", "eta". */
  readonly label: string;
  readonly message: string;
  readonly spans: readonly Span[];
  /** True where summands agree with each other and only the weight of the whole is not that of the amplitude. */
  readonly overall: boolean;
}

export interface WeightReport {
  readonly faults: readonly WeightFault[];
  /** Grassmann degree in units of four, null where summands differ in it or the form is zero. */
  readonly degree: number | null;
  /** False where two summands differ in Grassmann degree: then the form has no value. */
  readonly homogeneousInEta: boolean;
}

const mostFaults = 20;

/** Names of the entries of a weight, in order. */
export function weightNames(n: number, loops: number): readonly string[] {
  return [
    ...Array.from({ length: n }, (_, i) => String(i + 1)),
    ..."ABCDEFGH".slice(0, 2 * loops),
    "*",
    "X",
    "infinity twistor",
    "eta",
  ];
}

/** Infers the weights of a form at one n and compares them with those of its amplitude, component and target. */
export function checkWeights(form: FormAtN, target: string): WeightReport {
  return new Inference(form).run(target);
}

class Inference {
  readonly #names: readonly string[];
  readonly #size: number;
  readonly #star: number;
  readonly #faults: WeightFault[] = [];
  readonly #definitions: ReadonlyMap<string, Definition>;
  readonly #memo = new Map<string, Weight>();
  /** Of every R-invariant: weights are shared, and never changed once they are handed on. */
  readonly #invariantWeight: Int32Array;
  #etaDiffers = false;

  constructor(private readonly form: FormAtN) {
    this.#names = weightNames(form.n, form.loops);
    this.#size = this.#names.length;
    this.#star = form.n + 2 * form.loops;
    this.#definitions = definitionsOf(form.formula);
    this.#invariantWeight = this.#entry(this.#star + 3, 4);
  }

  run(target: string): WeightReport {
    const { n, loops, formula } = this.form;
    const written = this.#expression(formula.expression, startingPlace({ n, loops }));
    const summandsAgree = this.#faults.length === 0;
    const weight = written !== null && inDualPoints(this.form.formula) ? sum(written, this.#measure(), 1) : written;
    if (weight !== null && summandsAgree) this.#compareWhole(weight, target);
    const eta = weight === null || this.#etaDiffers ? null : (weight[this.#star + 3] ?? 0);
    return { faults: this.#faults, degree: eta === null ? null : eta / 4, homogeneousInEta: !this.#etaDiffers };
  }

  /** The factor prod <AB>^-4 that turns d^4x into the measure of the loop lines, for a form in dual points. */
  #measure(): Int32Array {
    const { n, loops } = this.form;
    const w = this.#entry(this.#star + 2, -4 * loops);
    for (let l = 0; l < 2 * loops; l++) w[n + l] = -4;
    return w;
  }

  #compareWhole(weight: Int32Array, target: string): void {
    const expected = this.#expected();
    const whole = this.form.formula.expression.span;
    for (let i = 0; i < this.#size; i++) {
      // An identity may have any weight but for its Grassmann degree, which says in which space its value lives.
      if (target === "zero" && i !== this.#star + 3) continue;
      if (weight[i] === expected[i]) continue;
      const name = this.#names[i] ?? "";
      this.#add({
        label: name,
        overall: true,
        spans: [whole],
        message: `The form has weight ${weight[i]} in ${spoken(name)}; ${this.form.negativeLegs ? "this component" : "this amplitude"} has ${expected[i]}.`,
      });
    }
  }

  #expected(): Int32Array {
    const { n, k, loops, negativeLegs } = this.form;
    const w = new Int32Array(this.#size);
    for (let l = 0; l < 2 * loops; l++) w[n + l] = -4;
    if (negativeLegs === null) w[this.#star + 3] = 4 * k;
    else {
      // An amplitude scales as t^(-2 h) when lambda -> t lambda, lambda-tilde -> lambda-tilde / t on a leg of helicity h.
      for (let a = 1; a <= n; a++) w[a - 1] = negativeLegs.includes(a) ? 2 : -2;
      w[this.#star + 2] = 4 * k + 4 - n;
    }
    return w;
  }

  #add(fault: WeightFault): void {
    if (this.#faults.length < mostFaults) this.#faults.push(fault);
  }

  #zero(): Int32Array {
    return new Int32Array(this.#size);
  }

  #expression(e: Expression, c: Place): Weight {
    switch (e.kind) {
      case "integer":
        return /^0+$/.test(e.value) ? null : this.#zero();
      case "index":
        return evaluateNumber(e, c.bindings) === 0n ? null : this.#zero();
      case "unknown":
        return this.#zero();
      case "add":
        return this.#same(e.summands.map((s) => [s.span, this.#expression(s, c)] as const));
      case "negate":
        return this.#expression(e.operand, c);
      case "multiply":
        return this.#product(e.factors, c);
      case "divide":
        return sum(this.#expression(e.numerator, c), this.#expression(e.denominator, c), -1);
      case "power": {
        const power = Number(evaluateNumber(e.exponent, c.bindings));
        if (power === 0) return this.#zero();
        return scaled(this.#expression(e.base, c), power);
      }
      case "sum":
        return this.#same(this.#images(e, c).map((image) => [e.body.span, this.#expression(e.body, image)] as const));
      case "product":
        return this.#images(e, c).reduce<Weight>(
          (w, image) => sum(w, this.#expression(e.body, image), 1),
          this.#zero(),
        );
      case "cyc":
        return this.#same(
          cyclicPlaces(c, this.form.n).map((at) => [e.body.span, this.#expression(e.body, at)] as const),
        );
      case "sym":
        return this.#same(
          symmetricPlaces(c, this.form.loops).map((at) => [e.body.span, this.#expression(e.body, at)] as const),
        );
      case "call":
        return this.#call(e.name, e.arguments, c, (inner) =>
          this.#expression(scalarBody(this.#definitions, e.name), inner),
        );
      case "four":
        return this.#items(e.items, c);
      case "five":
        return this.#invariantWeight;
      case "delta":
        return sum(scaled(this.#items(e.items, c), 4), this.#entry(this.#star + 3, 4), 1);
      case "angle":
        return sum(this.#items(e.items, c), this.#entry(this.#star + 2, 1), 1);
      case "square":
        return this.#ends(
          [
            ["square", e.left],
            ["square", e.right],
          ],
          -3,
          c,
        );
      case "string": {
        // The contractions alternate between angle and square, and begin with the bracket of the first end.
        const contractions = e.middle.length + 1;
        const angles = Math.floor((contractions + (e.left === "angle" ? 1 : 0)) / 2);
        return this.#ends(
          [
            [e.left, e.first],
            [e.right, e.last],
          ],
          angles - 3 * (contractions - angles),
          c,
        );
      }
      case "mandelstam":
      case "distance":
        return this.#entry(this.#star + 2, -2);
    }
  }

  #product(factors: readonly Expression[], c: Place): Weight {
    const total = this.#zero();
    let zero = false;
    for (const factor of factors) {
      // Every factor is looked at, also beside a zero: it may hold a fault.
      const weight = this.#expression(factor, c);
      if (weight === null) zero = true;
      else for (let i = 0; i < this.#size; i++) increase(total, i, weight[i]!);
    }
    return zero ? null : total;
  }

  /** Weights of summands that must be one weight; the first mismatch of each kind is a fault. */
  #same(weights: readonly (readonly [Span, Weight])[]): Weight {
    let first: readonly [Span, Int32Array] | null = null;
    for (const [span, w] of weights) {
      if (w === null) continue;
      if (first === null) {
        first = [span, w];
        continue;
      }
      const [firstSpan, firstWeight] = first;
      const at = firstWeight.findIndex((value, i) => value !== w[i]);
      if (at < 0) continue;
      if (firstWeight[this.#star + 3] !== w[this.#star + 3]) this.#etaDiffers = true;
      const name = this.#names[at] ?? "";
      const images = firstSpan[0] === span[0] && firstSpan[1] === span[1];
      this.#add({
        label: name,
        overall: false,
        spans: images ? [span] : [firstSpan, span],
        message: images
          ? `The terms of this sum do not have one weight: in ${spoken(name)} it is ${firstWeight[at]} for one and ${w[at]} for another.`
          : `These summands differ in weight: in ${spoken(name)} the first has ${firstWeight[at]}, the other ${w[at]}.`,
      });
    }
    return first === null ? null : first[1];
  }

  #entry(index: number, value: number): Int32Array {
    const w = this.#zero();
    w[index] = value;
    return w;
  }

  #images(q: Quantified, c: Place): Place[] {
    return [...enumerateBindings(q, c.bindings)].map((bindings) => ({ ...c, bindings }));
  }

  /** Weight of a definition's body, worked out once for each list of arguments and each place that `cyc` and `sym` move it to. */
  #call(
    name: string,
    args: readonly IndexExpression[],
    c: Place,
    body: (inner: Place, d: Definition) => Weight,
  ): Weight {
    const definition = this.#definitions.get(name);
    if (definition === undefined) throw new Error(`checkWeights: expected ${name} to be defined`);
    const inner = definitionPlace(definition, args, c, this.form.n);
    const values = definition.parameters.map((parameter) => inner.bindings.get(parameter));
    const key = `${name}|${values.join(",")}|${c.shift}|${c.permutation.join("")}`;
    const known = this.#memo.get(key);
    if (known !== undefined) return known;
    const weight = body(inner, definition);
    this.#memo.set(key, weight);
    return weight;
  }

  #items(items: readonly Item[], c: Place): Int32Array {
    const w = this.#zero();
    for (const item of items) this.#addItem(w, item, c);
    return w;
  }

  #addItem(w: Int32Array, item: Item, c: Place): void {
    switch (item.kind) {
      case "label":
        this.#addLabel(w, item.index, 1, c);
        break;
      case "loopPoint": {
        const letter = "ABCDEFGH".indexOf(item.letter);
        const line = c.permutation[Math.floor(letter / 2)] ?? 0;
        increase(w, this.form.n + 2 * line + (letter % 2), 1);
        break;
      }
      case "loopLine": {
        const line = c.permutation[item.loop] ?? 0;
        increase(w, this.form.n + 2 * line, 1);
        increase(w, this.form.n + 2 * line + 1, 1);
        break;
      }
      case "referenceTwistor":
        increase(w, this.#star, 1);
        break;
      case "referenceLine":
        increase(w, this.#star + 1, 1);
        break;
      case "meet":
        this.#addMeet(w, item, c);
        break;
      case "named": {
        const inner = this.#call(item.name, item.arguments, c, (place, d) => {
          const weight = this.#zero();
          if (d.value.kind === "geometry") {
            if (d.value.geometry.kind === "meet") this.#addMeet(weight, d.value.geometry, place);
            else this.#addOperand(weight, d.value.geometry, place);
          }
          return weight;
        });
        if (inner !== null) for (let i = 0; i < this.#size; i++) increase(w, i, inner[i] ?? 0);
      }
    }
  }

  #addMeet(w: Int32Array, meet: MeetItem, c: Place): void {
    this.#addOperand(w, meet.left, c);
    this.#addOperand(w, meet.right, c);
  }

  #addOperand(w: Int32Array, operand: Operand, c: Place): void {
    if (operand.kind === "group") for (const item of operand.items) this.#addItem(w, item, c);
    else for (const offset of [-1, 0, 1]) this.#addLabel(w, operand.index, 1, { ...c, shift: c.shift + offset });
  }

  #addLabel(w: Int32Array, index: IndexExpression, by: number, c: Place): void {
    increase(w, evaluateLabel(index, c.bindings, this.form.n, c.shift) - 1, by);
  }

  #ends(
    ends: readonly (readonly ["angle" | "square", SpinorEnd | DualPoint])[],
    infinity: number,
    c: Place,
  ): Int32Array {
    const w = this.#entry(this.#star + 2, infinity);
    for (const [side, end] of ends) {
      if (end.kind === "label") this.#addLabel(w, end.index, side === "angle" ? 1 : -1, c);
      else {
        // A reference lambda-tilde is mu of the reference twistor: one infinity twistor more than a leg's own.
        increase(w, this.#star, 1);
        increase(w, this.#star + 2, 1);
      }
    }
    return w;
  }
}

const increase = (w: Int32Array, index: number, by: number): void => {
  w[index] = (w[index] ?? 0) + by;
};

function sum(a: Weight, b: Weight, factor: number): Weight {
  if (a === null || b === null) return null;
  return a.map((value, i) => value + factor * (b[i] ?? 0));
}

const scaled = (w: Weight, factor: number): Weight => (w === null ? null : w.map((value) => factor * value));

function spoken(name: string): string {
  if (/^\d+$/.test(name)) return `leg ${name}`;
  if (name === "infinity twistor") return "the infinity twistor";
  return name;
}

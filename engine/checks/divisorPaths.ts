/**
 * Paths through a divisor: a generic point is put on it by moving one coordinate vector along a line to a root of the divisor
 * (MARKS "Poles with meets"), and leaves it with the series parameter e along the same line. Superamplitudes move a twistor (a leg's
 * chi stays), components a spinor, with two other lambdatilde making momentum conserved: there <a b> and [a b] are two divisors.
 */

import { evaluateForm } from "../evaluate";
import { ZeroDenominator } from "../evaluate/algebra";
import type { FormAtN } from "../evaluate/form";
import { NumericAlgebra } from "../evaluate/numeric";
import { Walker } from "../evaluate/walk";
import type { Field } from "../fields";
import type { PrimeSeries, PrimeSeriesField } from "../fields/primeSeries";
import { type LegSpinors, type Point, spinorBracket, type Twistor, twistorsOfSpinors } from "../kinematics";
import { parse } from "../notation/parse";
import type { Divisor } from "./divisor";
import { bracketOf } from "./factoring";
import type { Ground } from "./ground";
import { firstRoot, interpolate } from "./roots";

export type Path = (field: PrimeSeriesField) => Point<PrimeSeries>;

/** What moves: a leg, a loop point, a reference, and of which components. */
type Mover =
  | { readonly kind: "leg"; readonly label: number; readonly part: Part }
  | { readonly kind: "letter"; readonly line: number; readonly which: 0 | 1; readonly part: Part }
  | { readonly kind: "star"; readonly part: Part }
  | { readonly kind: "reference"; readonly part: Part };
/** All four components, the last two, or the first two. In a component the last two stand for lambdatilde. */
type Part = "all" | "last" | "first";

/** Makes a coordinate that moves from where it is and its direction. */
type Shift<T> = (at: number, direction: number) => T;

/** A divisor is a polynomial of this degree at most in the parameter of the line, or it is left alone. */
const mostDegree = 6;

/**
 * A path that leaves the divisor with e, or null where no line was found that meets it: its equation is not a polynomial along
 * any of them, or has no root modulo this prime.
 */
export function pathThrough(form: FormAtN, divisor: Divisor, ground: Ground): Path | null {
  const value = equationOf(form, divisor);
  if (value === null) return null;
  const { field } = ground;
  const isComponent = form.negativeLegs !== null;
  for (const mover of moversFor(form, divisor, isComponent)) {
    const along = isComponent ? spinorLine(form, ground, divisor, mover) : twistorLine(ground, mover);
    if (along === null) continue;
    const at = (t: number): number | null =>
      value(
        field,
        along(field, (x, direction) => field.add(x, field.multiply(t, direction))),
      );
    const polynomial = interpolate(field, at, mostDegree);
    if (polynomial === null || polynomial.length < 2) continue;
    const root = firstRoot(field, polynomial);
    if (root === null || at(root) !== 0) continue;
    return (series) =>
      along(series, (x, direction) => series.linear(field.add(x, field.multiply(root, direction)), direction));
  }
  return null;
}

/** The divisor as a function of the point; null at a bad point. */
function equationOf(
  form: FormAtN,
  { text, points, without, written }: Divisor,
): ((field: Field<number>, point: Point<number>) => number | null) | null {
  if (written !== null)
    return (field, point) => {
      const algebra = new NumericAlgebra(field, point, form.squareSign);
      try {
        return algebra.values.number(new Walker(algebra, form.formula, form).value(written.expression, written.place));
      } catch (reason) {
        if (reason instanceof ZeroDenominator) return null;
        throw reason;
      }
    };
  if (points !== null)
    return (field, point) => {
      let value = bracketOf(field, points, point);
      for (const other of without) {
        const inverse = field.inverse(bracketOf(field, other.points, point));
        if (inverse === null) return null;
        for (let i = 0; i < other.power; i++) value = field.multiply(value, inverse);
      }
      return value;
    };
  // Brackets of spinors are read from their text, which is in the notation.
  const parsed = parse(text);
  if (!parsed.ok) return null;
  const formula = parsed.value;
  return (field, point) => {
    const found = evaluateForm(field, { ...form, formula }, point);
    return found.kind === "value" ? found.sum : null;
  };
}

/** What may move, the likeliest to give a linear equation first. */
function moversFor(form: FormAtN, { text }: Divisor, isComponent: boolean): readonly Mover[] {
  const labels = [...new Set((text.match(/\d+/g) ?? []).map(Number))].filter((a) => a >= 1 && a <= form.n);
  const legs = labels.length > 0 ? labels : Array.from({ length: form.n }, (_, i) => i + 1);
  const ofLegs = (part: Part): Mover[] => legs.map((label) => ({ kind: "leg", label, part }));
  const star: Mover[] = text.includes("*")
    ? [
        { kind: "star", part: "all" },
        { kind: "star", part: "last" },
      ]
    : [];
  if (isComponent) return [...star, ...ofLegs("last"), ...ofLegs("first")];
  const letters = [...new Set(text.match(/[A-H]/g) ?? [])].map((letter): Mover => {
    const index = "ABCDEFGH".indexOf(letter);
    return { kind: "letter", line: index >> 1, which: (index & 1) as 0 | 1, part: "all" };
  });
  const reference: Mover[] = text.includes("X") ? [{ kind: "reference", part: "all" }] : [];
  return [
    ...star,
    ...letters.filter((m) => m.kind === "letter" && m.line < form.loops),
    ...reference,
    ...ofLegs("all"),
    ...ofLegs("last"),
  ];
}

const shifted = <T>(z: Twistor<number>, direction: Twistor<number>, part: Part, shift: Shift<T>): Twistor<T | number> =>
  z.map((x, i) => (part === "all" || (part === "last") === i >= 2 ? shift(x, direction[i]!) : x));

type Line = <T>(field: Field<T | number>, shift: Shift<T>) => Point<T | number>;

function twistorLine({ point, direction }: Ground, mover: Mover): Line {
  return (_, shift) => {
    switch (mover.kind) {
      case "leg":
        return {
          ...point,
          twistors: point.twistors.map((z, a) =>
            a + 1 === mover.label ? shifted(z, direction.twistors[a]!, mover.part, shift) : z,
          ),
        };
      case "letter": {
        const { line, which, part } = mover;
        const lines = point.lines.map((pair, l) => {
          if (l !== line) return pair;
          const moved = shifted(pair[which], direction.lines[l]![which], part, shift);
          return which === 0 ? ([moved, pair[1]] as const) : ([pair[0], moved] as const);
        });
        return { ...point, lines };
      }
      case "star":
        return {
          ...point,
          referenceTwistor: shifted(point.referenceTwistor, direction.referenceTwistor, mover.part, shift),
        };
      case "reference": {
        const [first, second] = point.referenceLine;
        const moved = shifted(first, direction.referenceLine[0], mover.part, shift);
        return { ...point, referenceLine: [moved, second] };
      }
    }
  };
}

/** Spinors with conserved momentum: lambdatilde of two legs, outside the divisor if possible, make the sum of momenta vanish. */
function spinorLine(form: FormAtN, ground: Ground, { text }: Divisor, mover: Mover): Line | null {
  const { point } = ground;
  if (mover.kind !== "leg") return twistorLine(ground, mover);
  const inDivisor = new Set((text.match(/\d+/g) ?? []).map(Number));
  const others = Array.from({ length: form.n }, (_, i) => i + 1).filter((a) => a !== mover.label);
  const [b, c] = [...others.filter((a) => !inDivisor.has(a)), ...others.filter((a) => inDivisor.has(a))];
  if (b === undefined || c === undefined) return null;
  return <T>(field: Field<T | number>, shift: Shift<T>) => {
    type V = T | number;
    const spinors: LegSpinors<V>[] = point.twistors.map((z, a) => {
      const [l1, l2, t1, t2] =
        a + 1 === mover.label ? shifted(z, ground.direction.twistors[a]!, mover.part, shift) : (z as Twistor<V>);
      return { lambda: [l1!, l2!], tilde: [t1!, t2!] };
    });
    return { ...point, twistors: twistorsOfSpinors(field, conserve(field, spinors, b - 1, c - 1)) };
  };
}

/** lambdatilde_b = -sum <c j> lambdatilde_j / <c b> over all other j, and likewise for c. */
export function conserve<T>(field: Field<T>, legs: readonly LegSpinors<T>[], b: number, c: number): LegSpinors<T>[] {
  const { add, multiply, negate } = field;
  const scale = field.inverse(spinorBracket(field, legs[c]!.lambda, legs[b]!.lambda));
  if (scale === null) throw new Error("conserve: two generic spinors are parallel");
  const tilde = (of: number, against: number, factor: T): readonly [T, T] => {
    const sums = [field.zero, field.zero] as [T, T];
    legs.forEach(({ lambda, tilde: own }, j) => {
      if (j === b || j === c) return;
      const weight = multiply(factor, spinorBracket(field, legs[against]!.lambda, lambda));
      sums[0] = add(sums[0], multiply(weight, own[0]));
      sums[1] = add(sums[1], multiply(weight, own[1]));
    });
    return of === b ? [negate(sums[0]), negate(sums[1])] : [sums[0], sums[1]];
  };
  // <b c> = -<c b>: the sign of the second is the other one.
  const [ofB, ofC] = [tilde(b, c, scale), tilde(c, b, scale)];
  return legs.map((leg, j) => (j === b ? { ...leg, tilde: ofB } : j === c ? { ...leg, tilde: ofC } : leg));
}

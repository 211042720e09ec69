/** The value of a form at a point: slow, obvious, the oracle that faster evaluators are compared with. */
import type { Field } from "../fields";
import type { Point } from "../kinematics";
import { expandTerms } from "../notation/expand";
import type { Span } from "../result";
import { ZeroDenominator } from "./algebra";
import { type FormAtN, inDualPoints } from "./form";
import { NumericAlgebra } from "./numeric";
import { Walker } from "./walk";

/**
 * `terms` are the values of the top-level terms in the order of `expandTerms`, signs included, and `sum` is the value of the form.
 * `degrees` lists the Grassmann degrees (units of four eta) that the terms have: [k] for a superamplitude form that is right.
 * A part of degree d below k is worth what it is for k = d; one above k is zero whatever it holds.
 * With `zero-denominator` the point is a bad one for this form: `span` is the denominator in the source, `text` explains where
 * more than the point may be to blame.
 */
export type Evaluation<T> =
  | { readonly kind: "value"; readonly terms: readonly T[]; readonly sum: T; readonly degrees: readonly number[] }
  | { readonly kind: "zero-denominator"; readonly span: Span; readonly text?: string };

/**
 * Evaluates a form whose formula was validated for its n, k and loops.
 * @param point of the same n, k and loops, holding what `pointUse(form)` names
 * @throws Error when point and form do not belong together, or the formula has unknowns
 */
export function evaluateForm<T>(field: Field<T>, form: FormAtN, point: Point<T>): Evaluation<T> {
  if (point.n !== form.n || point.k !== form.k || point.loops !== form.loops) {
    const [wanted, got] = [form, point].map(({ n, k, loops }) => `(${n},${k},${loops})`);
    throw new Error(`evaluateForm: expected a point for ${wanted}, got one for ${got}`);
  }
  const algebra = new NumericAlgebra(field, point, form.squareSign);
  const walker = new Walker(algebra, form.formula, form);
  const terms: T[] = [];
  const degrees = new Set<number>();
  let sum = field.zero;
  try {
    walker.span = form.formula.expression.span;
    const measure = inDualPoints(form.formula) ? [algebra.dualMeasure()] : [];
    for (const term of expandTerms(form.formula, form)) {
      const value = algebra.multiply([...measure, walker.value(term.expression, term)]);
      for (const degree of algebra.values.degrees(value)) degrees.add(degree);
      const number = algebra.values.number(value);
      const signed = term.sign === 1 ? number : field.negate(number);
      terms.push(signed);
      sum = field.add(sum, signed);
    }
  } catch (reason) {
    if (!(reason instanceof ZeroDenominator)) throw reason;
    const { explanation } = reason;
    return { kind: "zero-denominator", span: walker.span, ...(explanation === null ? {} : { text: explanation }) };
  }
  return { kind: "value", terms, sum, degrees: [...degrees].sort((a, b) => a - b) };
}

/** Bounds on the size of a form's value, on which the certainty of a comparison rests. */
import { expandTerms } from "../notation/expand";
import type { Quotient } from "./factors";
import { type FormAtN, inDualPoints } from "./form";
import { SizeAlgebra } from "./sizeAlgebra";
import { Walker } from "./walk";

/**
 * The value is N/D with N and D polynomials in the components of the point, coefficients integers: total degrees, and log2 of the
 * sum of the absolute values of the coefficients. D vanishes wherever `evaluateForm` meets a vanishing denominator.
 */
export interface FormSize {
  readonly degree: number;
  readonly denominatorDegree: number;
  readonly heightBits: number;
  readonly denominatorHeightBits: number;
}

/**
 * Upper bounds on the size of a form, from its structure: products add, sums go over the least common multiple of the
 * denominators, k deltas make four k x k determinants of k! products each.
 */
export function sizeBound(form: FormAtN): FormSize {
  const algebra = new SizeAlgebra(form.n);
  const walker = new Walker(algebra, form.formula, form);
  const { factors } = algebra;
  function* terms(): Generator<readonly Quotient[]> {
    for (const term of expandTerms(form.formula, form)) {
      const { expression } = term;
      const factors = expression.kind === "multiply" ? expression.factors : [expression];
      yield factors.map((factor) => walker.value(factor, term));
    }
  }
  const sum = factors.commonSum(terms());
  const measure = inDualPoints(form.formula) ? algebra.dualMeasure(form.loops) : factors.one();
  const [top, bottom] = [
    factors.bound(measure.top),
    factors.bound(factors.multiply(measure, { top: [], bottom: sum.bottom }).bottom),
  ];
  let determinants = 0;
  for (let i = 2; i <= form.k; i++) determinants += 4 * Math.log2(i);
  return {
    degree: top.degree + sum.top.degree,
    denominatorDegree: bottom.degree,
    heightBits: Math.ceil(top.bits + sum.top.bits + determinants),
    denominatorHeightBits: Math.ceil(bottom.bits),
  };
}

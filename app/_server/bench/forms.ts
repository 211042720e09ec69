/** Forms of the bench: parsed or derived, compiled. */

import { leg, Meets } from "../../../engine/derive/points";
import { Recursion } from "../../../engine/derive/recursion";
import { writeTerms } from "../../../engine/derive/write";
import { randomness, smallPrimeField } from "../../../engine/fields";
import { randomPoint } from "../../../engine/kinematics";
import type { Point } from "../../../engine/kinematics/point";
import { parse } from "../../../engine/notation/parse";
import { compile, type FormToCompile, type Tape } from "../../../engine/tape";

/** A superamplitude form at tree level. @throws Error where the notation is at fault */
export function treeForm(notation: string, n: number, k: number): FormToCompile {
  const formula = parse(notation);
  if (!formula.ok) throw new Error(formula.diagnostics.map(({ message }) => message).join("\n"));
  return { n, k, loops: 0, negativeLegs: null, squareSign: 1, formula: formula.value };
}

/** The tree recursion's form, however many terms it has. */
export function recursionForm(n: number, k: number): FormToCompile {
  const legs = Array.from({ length: n }, (_, i) => leg(i + 1));
  const formula = writeTerms(new Recursion(new Meets()).terms(legs, k, 0));
  return { n, k, loops: 0, negativeLegs: null, squareSign: 1, formula };
}

/** @throws Error where a form is refused */
export function tapeOf(form: FormToCompile): Tape {
  const tape = compile(form);
  if (!tape.ok) throw new Error(tape.diagnostics.map(({ message }) => message).join("\n"));
  return tape.value;
}

/** Points modulo several primes, one after the other. */
export function pointsFor(form: FormToCompile, count: number): { point: Point<number>; prime: number }[] {
  const primes = [2147483629, 2147483587, 2147483579, 2147483563];
  return Array.from({ length: count }, (_, i) => {
    const prime = primes[i % primes.length]!;
    return { prime, point: randomPoint(smallPrimeField(prime), form, randomness(`bench ${i}`)) };
  });
}

/** Which questions a source may be asked, and its point as super points. */
import type { Point } from "../kinematics/point";
import type { SuperPoint } from "./runPlan";
import type { Question } from "./source";

/** The largest number of legs a form may have. */
const largestN = 64;

/** The superamplitude itself (no component, target `amplitude`) with these loops, 4 <= n <= 64 and 0 <= k <= n-4. */
export const asksSuperamplitude = (question: Question, loops: number): boolean =>
  question.target === "amplitude" && question.negativeLegs === null && question.loops === loops && inRange(question);

/** A helicity component of a tree: k+2 distinct negative legs in 1..n. */
export function asksComponent(question: Question): boolean {
  const { negativeLegs, n, k } = question;
  return (
    question.target === "amplitude" &&
    question.loops === 0 &&
    inRange(question) &&
    negativeLegs !== null &&
    new Set(negativeLegs).size === k + 2 &&
    negativeLegs.length === k + 2 &&
    negativeLegs.every((leg) => Number.isInteger(leg) && leg >= 1 && leg <= n)
  );
}

export const inRange = ({ n, k }: Question): boolean =>
  Number.isInteger(n) && Number.isInteger(k) && n >= 4 && n <= largestN && k >= 0 && k <= n - 4;

/** @throws Error when the source was asked what it does not cover. */
export function assertCovered(name: string, covered: boolean, question: Question): void {
  if (!covered) throw new Error(`${name}: not covered: ${JSON.stringify(question)}`);
}

/** Leg a with the first k entries of its Grassmann vectors, at index a-1. */
export const legsOf = (point: Point<number>, n: number): SuperPoint[] =>
  Array.from({ length: n }, (_, leg) => ({ twistor: point.twistors[leg]!, chi: point.chi[leg] ?? [[], [], [], []] }));

/** Cyclic neighbours: the index a modulo n for indices 0..n-1. */
export const cyclic = (index: number, n: number): number => ((index % n) + n) % n;

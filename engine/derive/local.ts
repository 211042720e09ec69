/** Sums of integrands with local poles only, valid for every n (1012.6032). */
import type { Expression, Formula, LoopNumber } from "../notation/tree";
import { bar, chain, divide, four, index, label, loopLine, meet, multiply, referenceLine, sum } from "./build";

/** <line bar(i) cap bar(j)> */
const numerator = (line: LoopNumber, i: string, j: string): Expression => four(loopLine(line), meet(bar(i), bar(j)));

/** <line i-1 i>, <line i i+1>, <line j-1 j>, <line j j+1> */
const corners = (line: LoopNumber, i: string, j: string): Expression[] =>
  [i, j].flatMap((name) => [
    four(loopLine(line), label(name, -1), label(name)),
    four(loopLine(line), label(name), label(name, 1)),
  ]);

/** One-loop MHV integrand: chiral pentagons with a reference line X, summed over all i < j. */
export function chiralPentagons(): Formula {
  const order = chain(index(null, 1), ["<=", index("i")], ["<", index("j")], ["<=", index("n")]);
  const body = divide(
    multiply([numerator(0, "i", "j"), four(referenceLine, label("i"), label("j"))]),
    multiply([four(loopLine(0), referenceLine), ...corners(0, "i", "j")]),
  );
  return { definitions: [], expression: sum(["i", "j"], [order], body) };
}

/** Two-loop MHV integrand: chiral double pentagons, summed over cyclically ordered i, j, k, l with every rotation counted. */
export function doublePentagons(): Formula {
  const order = chain(index("i"), ["<", index("j")], ["<", index("k")], ["<", index("l")], ["<", index("i")]);
  const body = divide(
    multiply([
      numerator(0, "i", "j"),
      numerator(1, "k", "l"),
      four(...["i", "j", "k", "l"].map((name) => label(name))),
    ]),
    multiply([...corners(0, "i", "j"), four(loopLine(0), loopLine(1)), ...corners(1, "k", "l")]),
  );
  return { definitions: [], expression: sum(["i", "j", "k", "l"], [order], body) };
}

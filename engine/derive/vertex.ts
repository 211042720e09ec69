/** Vertex expansions with a reference twistor `*`, as sums valid for every n (1009.1854). */
import type { Formula } from "../notation/tree";
import {
  call,
  chain,
  define,
  divide,
  five,
  four,
  group,
  index,
  label,
  loopLine,
  meet,
  multiply,
  referenceTwistor,
  square,
  sum,
} from "./build";

/** NMHV tree: the sum over non-adjacent i < j of [* i i+1 j j+1]. */
export function nmhvVertexExpansion(): Formula {
  const body = five(referenceTwistor, label("i"), label("i", 1), label("j"), label("j", 1));
  const nonAdjacent = chain(index(null, 1), ["<=", index("i")]);
  const above = chain(index("i", 1), ["<", index("j")], ["<=", index("n")]);
  const notAround = chain(index("j"), ["<", { ...index("i", -1), terms: [...index("i").terms, ...index("n").terms] }]);
  return { definitions: [], expression: sum(["i", "j"], [nonAdjacent, above, notAround], body) };
}

/** One-loop MHV integrand: the sum over i < j of <AB (* i i+1) cap (* j j+1)>^2 over its six denominators. */
export function oneLoopVertexExpansion(): Formula {
  const loop = loopLine(0);
  const plane = (name: string) => group([referenceTwistor, label(name), label(name, 1)]);
  const sides = ["i", "j"].flatMap((name) => [
    four(loop, referenceTwistor, label(name)),
    four(loop, label(name), label(name, 1)),
    four(loop, label(name, 1), referenceTwistor),
  ]);
  const expression = divide(square(four(loop, meet(plane("i"), plane("j")))), multiply(sides));
  const order = chain(index(null, 1), ["<=", index("i")], ["<", index("j")], ["<=", index("n")]);
  return {
    definitions: [define("kermit", ["i", "j"], { kind: "scalar", expression })],
    expression: sum(["i", "j"], [order], call("kermit", index("i"), index("j"))),
  };
}

/** Derived forms against the sources of truth, which share no code with them: equality modulo a 31-bit prime at random points. */
import { describe, expect, it } from "vitest";
import { type DeriveRequest, derive } from "../../../engine/derive";
import { evaluateForm } from "../../../engine/evaluate";
import { randomness, smallPrimeField } from "../../../engine/fields";
import { randomPoint } from "../../../engine/kinematics";
import type { Formula } from "../../../engine/notation/tree";
import { answering } from "../../../engine/sources";

const prime = 1_879_048_201;
const field = smallPrimeField(prime);

/** For each source that knows the amplitude: its name, and whether the value is the form's at a random point. */
function comparisons({ n, k, loops }: DeriveRequest, formula: Formula): [string, boolean][] {
  const point = randomPoint(field, { n, k, loops }, randomness(`derive ${n} ${k} ${loops}`));
  const evaluation = evaluateForm(field, { n, k, loops, negativeLegs: null, squareSign: 1, formula }, point);
  if (evaluation.kind !== "value") throw new Error("a denominator vanishes");
  const question = { n, k, loops, negativeLegs: null, target: "amplitude" } as const;
  return answering(question).map((source) => [source.name, source.evaluate(question, point, prime) === evaluation.sum]);
}

function expectTruth(request: DeriveRequest, fewest = 1) {
  const derived = derive(request);
  if (!derived.ok) throw new Error("nothing was derived");
  const compared = comparisons(request, derived.value.formula);
  expect(compared.length, JSON.stringify(request)).toBeGreaterThanOrEqual(fewest);
  for (const [name, equal] of compared) expect(equal, `${JSON.stringify(request)} with ${name}`).toBe(true);
}

describe("derived forms have the value of the amplitude", () => {
  it("trees by recursion, every k, n = 4..9", () => {
    for (let n = 4; n <= 9; n++) {
      for (let k = 0; k <= n - 4; k++) expectTruth({ n, k, loops: 0, method: "recursion" });
    }
  });

  it("trees by recursion from every leg in both directions", () => {
    for (let leg = 1; leg <= 8; leg++) {
      expectTruth({ n: 8, k: 2, loops: 0, method: "recursion", leg, direction: "forward" });
      expectTruth({ n: 8, k: 2, loops: 0, method: "recursion", leg, direction: "backward" });
    }
  });

  it("one loop by recursion, every k, n = 4..7", () => {
    for (let n = 4; n <= 7; n++) {
      for (let k = 0; k <= n - 4; k++) expectTruth({ n, k, loops: 1, method: "recursion" });
    }
  });

  it("one loop by recursion from other legs", () => {
    for (const leg of [1, 3, 5]) {
      expectTruth({ n: 6, k: 1, loops: 1, method: "recursion", leg });
      expectTruth({ n: 6, k: 2, loops: 1, method: "recursion", leg, direction: "backward" });
    }
  });

  it("vertex expansions", () => {
    for (let n = 5; n <= 9; n++) expectTruth({ n, k: 1, loops: 0, method: "vertex" });
    for (let n = 4; n <= 7; n++) expectTruth({ n, k: 0, loops: 1, method: "vertex" }, 2);
  });

  it("local integrands", () => {
    for (let n = 4; n <= 7; n++) expectTruth({ n, k: 0, loops: 1, method: "local" }, 2);
    for (let n = 4; n <= 6; n++) expectTruth({ n, k: 0, loops: 2, method: "local" });
  });

  it("and a dropped term is seen", () => {
    const request = { n: 6, k: 1, loops: 1, method: "recursion" } as const;
    const derived = derive(request);
    if (!derived.ok || derived.value.formula.expression.kind !== "add") throw new Error("no sum was derived");
    const { definitions, expression } = derived.value.formula;
    const summands = expression.summands;
    for (const position of summands.keys()) {
      const mutant = {
        definitions,
        expression: { ...expression, summands: summands.filter((_, i) => i !== position) },
      };
      for (const [, equal] of comparisons(request, mutant)) expect(equal).toBe(false);
    }
  });
});

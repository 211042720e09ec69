import { describe, expect, it } from "vitest";
import { countBindings, enumerateBindings } from "../../../engine/notation/bindings";
import { unboundedIndices } from "../../../engine/notation/conditions";
import { countTerms } from "../../../engine/notation/count";
import { expandTerms, permutations } from "../../../engine/notation/expand";
import { bindingsFor, evaluateIndex, evaluateLabel, momentumLegs } from "../../../engine/notation/indices";
import type {
  Condition,
  Expression,
  Formula,
  IndexExpression,
  Quantified,
  Relation,
} from "../../../engine/notation/tree";

const span = [0, 0] as const;

/** An index expression from terms like "2 i", "-j", "n", "3". */
function index(text: string): IndexExpression {
  const terms: { name: string; factor: string }[] = [];
  let constant = 0;
  for (const [, sign, digits, name] of text.replaceAll(" ", "").matchAll(/([+-]?)(\d*)([a-z]?)/g)) {
    if (!digits && !name) continue;
    const size = Number(digits || 1) * (sign === "-" ? -1 : 1);
    if (name) terms.push({ name, factor: String(size) });
    else constant += size;
  }
  return { terms, constant: String(constant), span };
}

/** A chain such as "1 < i <= n". */
function chain(text: string): Condition {
  const parts = text.split(/(<=|!=|<|=)/);
  return {
    expressions: parts.filter((_, at) => at % 2 === 0).map(index),
    relations: parts.filter((_, at) => at % 2 === 1) as Relation[],
    span,
  };
}

const one: Expression = { kind: "integer", value: "1", span };
const over = (indices: string, conditions: string, body: Expression = one): Quantified => ({
  indices: indices.split(","),
  conditions: conditions.split(",").map(chain),
  body,
  span,
});
const sum = (indices: string, conditions: string, body: Expression = one): Expression => ({
  kind: "sum",
  ...over(indices, conditions, body),
});
const alone = (expression: Expression): Formula => ({ definitions: [], expression });
const points = (quantified: Quantified, n: number): string[] =>
  [...enumerateBindings(quantified, bindingsFor(n))].map((bindings) =>
    quantified.indices.map((name) => bindings.get(name)).join(""),
  );

describe("index expressions", () => {
  it("are integers as numbers and wrap around n as labels", () => {
    const bindings = new Map([...bindingsFor(6), ["i", 5n]]);
    expect(evaluateIndex(index("i+2"), bindings)).toBe(7n);
    expect(evaluateLabel(index("i+2"), bindings, 6)).toBe(1);
    expect(evaluateLabel(index("0"), bindings, 6)).toBe(6);
    expect(evaluateLabel(index("n-1"), bindings, 6)).toBe(5);
    expect(evaluateLabel(index("i"), bindings, 6, 4)).toBe(3);
    expect(evaluateLabel(index("-i-8"), bindings, 6)).toBe(5);
  });

  it("do not lose digits", () => {
    const bindings = new Map([...bindingsFor(7), ["i", 10n ** 40n]]);
    expect(evaluateIndex({ terms: [{ name: "i", factor: "3" }], constant: "-1", span }, bindings)).toBe(
      3n * 10n ** 40n - 1n,
    );
    // PARI/GP: (3*10^40-1) % 7 is 4
    expect(evaluateLabel({ terms: [{ name: "i", factor: "3" }], constant: "-1", span }, bindings, 7)).toBe(4);
  });

  it("make cyclic ranges of legs, both ends included", () => {
    const range = (from: string, to: string) =>
      momentumLegs([{ kind: "range", from: index(from), to: index(to), span }], bindingsFor(6), 6);
    expect(range("2", "4")).toEqual([2, 3, 4]);
    expect(range("5", "n+1")).toEqual([5, 6, 1]);
    expect(range("3", "2")).toEqual([3, 4, 5, 6, 1, 2]);
    expect(range("n", "n")).toEqual([6]);
  });
});

describe("what a sum runs over", () => {
  it.each([
    ["i,j", "1 < i,i+1 < j < n", 6, ["24", "25", "35"]],
    ["i,j", "2 <= i,i+2 <= j <= n-1", 6, ["24", "25", "35"]],
    ["j,m", "4 <= j < n,m = j+1", 7, ["45", "56", "67"]],
    ["i,j", "1 <= i,i+2 = j <= 3", 6, ["13"]],
    ["i", "1 < i < 2", 6, []],
    ["i", "1 <= i <= 4,i != 2,i != 3", 6, ["1", "4"]],
    ["i", "3 < n,1 <= i <= 2", 3, []],
    ["i", "n != 5,1 <= i <= 2", 5, []],
    ["i,j", "7 <= 2i+3j <= 8,1 <= i,1 <= j", 6, ["12", "21"]],
  ] as const)("sum(%s : %s) at n = %i", (indices, conditions, n, expected) => {
    expect(points(over(indices, conditions), n)).toEqual(expected);
    expect(countBindings(over(indices, conditions), bindingsFor(n), 100)).toBe(expected.length);
  });

  it("takes a chain that returns to its first index for a cyclic order", () => {
    expect(points(over("i,j", "i < j < i"), 3)).toEqual(["12", "13", "21", "23", "31", "32"]);
    expect(points(over("i,j,k", "i < j < k < i"), 4).slice(0, 4)).toEqual(["123", "124", "134", "231"]);
    // n choose 4, each with 4 rotations
    for (const [n, count] of [
      [4, 4],
      [5, 20],
      [6, 60],
      [7, 140],
    ] as const) {
      expect(countBindings(over("i,j,k,l", "i < j < k < l < i"), bindingsFor(n), 1000)).toBe(count);
    }
    expect(countBindings(over("i,j,k,l", "i < j < k < l < i,i < n"), bindingsFor(5), 1000)).toBe(16);
  });

  it("counts 12 indices in order out of 16 and stops at the limit out of 40", () => {
    const names = "abcdefghijkl".split("");
    const ordered = over(names.join(), `1 <= ${names.join("<")} <= n`);
    // PARI/GP: binomial(16, 12) is 1820
    expect(countBindings(ordered, bindingsFor(16), 10_000)).toBe(1820);
    expect(countBindings(ordered, bindingsFor(40), 10_000)).toBe(10_001);
  });

  it("does not try far candidates one by one", () => {
    const far = "1 <= i <= 1000000000,1 <= j <= 1000000000";
    expect(countBindings(over("i,j", `${far},i = 999999999+j`), bindingsFor(4), 100)).toBe(1);
    expect(countBindings(over("i,j", `${far},i < j,j < i`), bindingsFor(4), 100)).toBe(101);
    expect(countBindings(over("i,j", far), bindingsFor(4), 100)).toBe(101);
    expect(countBindings(over("i,j", `${far},2i = 2j+1`), bindingsFor(4), 100)).toBe(101);
  });

  it("needs two bounds for each index", () => {
    expect(unboundedIndices(over("i,j", "1 < i < n"))).toEqual([{ name: "j", below: false, above: false }]);
    expect(unboundedIndices(over("i", "1 <= i"))).toEqual([{ name: "i", below: true, above: false }]);
    expect(unboundedIndices(over("i,j", "i < j < i+3,1 < i,j < n"))).toEqual([]);
    expect(unboundedIndices(over("i,j", "i < j"))).toHaveLength(2);
    expect(unboundedIndices(over("i,j,k", "i < j < k < i"))).toEqual([]);
    expect(unboundedIndices(over("i", "i != 3,i = i"))).toHaveLength(1);
  });
});

describe("top-level terms", () => {
  const extent = { n: 5, loops: 2 };
  const invariant: Expression = {
    kind: "five",
    items: ["1", "2", "3", "4", "5"].map((text) => ({ kind: "label", index: index(text), span })),
    span,
  };
  const described = (formula: Formula, size = extent): string[] =>
    [...expandTerms(formula, size)].map(({ expression, sign, shift, permutation, bindings }) => {
      const names = [...bindings].filter(([name]) => name !== "n").map(([name, value]) => `${name}=${value}`);
      return `${sign > 0 ? "+" : "-"}${expression.kind} ${names.join(",")} ${shift} ${permutation.join("")}`;
    });

  it("write out additions, negatives, sums, cyc and sym, and leave products alone", () => {
    const product: Expression = { kind: "multiply", factors: [one, { kind: "cyc", body: one, span }], span };
    const inner: Expression = { kind: "add", summands: [product, { kind: "negate", operand: invariant, span }], span };
    const formula = alone({ kind: "negate", operand: inner, span });
    expect(described(formula)).toEqual(["-multiply  0 01", "+five  0 01"]);
    expect(countTerms(formula, extent, 10)).toBe(2);
  });

  it("let cyc move labels after their values and sym permute lines, inside sums too", () => {
    const both = alone(sum("i", "1 <= i <= 2", { kind: "sym", body: { kind: "cyc", body: one, span }, span }));
    expect(described(both, { n: 4, loops: 2 }).slice(0, 9)).toEqual([
      "+integer i=1 0 01",
      "+integer i=1 1 01",
      "+integer i=1 2 01",
      "+integer i=1 3 01",
      "+integer i=1 0 10",
      "+integer i=1 1 10",
      "+integer i=1 2 10",
      "+integer i=1 3 10",
      "+integer i=2 0 01",
    ]);
    expect(countTerms(both, { n: 4, loops: 2 }, 100)).toBe(16);
    const twice = alone({ kind: "cyc", body: { kind: "cyc", body: one, span }, span });
    expect([...expandTerms(twice, { n: 4, loops: 0 })].map(({ shift }) => shift)).toEqual([
      0, 1, 2, 3, 1, 2, 3, 0, 2, 3, 0, 1, 3, 0, 1, 2,
    ]);
  });

  it("apply an inner sym before an outer one", () => {
    expect(permutations(3).map((order) => order.join(""))).toEqual(["012", "021", "102", "120", "201", "210"]);
    const twice = alone({ kind: "sym", body: { kind: "sym", body: one, span }, span });
    const orders = [...expandTerms(twice, { n: 4, loops: 3 })].map(({ permutation }) => permutation.join(""));
    // outer 120 (0->1, 1->2, 2->0) after inner 021 (1->2, 2->1): 0->1, 1->0, 2->2
    expect(orders[3 * 6 + 1]).toBe("102");
    expect(new Set(orders).size).toBe(6);
  });

  it("write out definitions that are sums, with their arguments, at the place of use", () => {
    const call = (name: string, ...values: string[]): Expression => ({
      kind: "call",
      name,
      arguments: values.map(index),
      span,
    });
    const formula: Formula = {
      definitions: [
        { name: "single", parameters: [], value: { kind: "scalar", expression: invariant }, span },
        {
          name: "many",
          parameters: ["i"],
          value: { kind: "scalar", expression: sum("j", "i < j <= n", invariant) },
          span,
        },
      ],
      expression: { kind: "add", summands: [call("single"), sum("k", "3 <= k <= 4", call("many", "k"))], span },
    };
    expect(described(formula, { n: 5, loops: 0 })).toEqual([
      "+call  0 ",
      "+five i=3,j=4 0 ",
      "+five i=3,j=5 0 ",
      "+five i=4,j=5 0 ",
    ]);
    expect(countTerms(formula, { n: 5, loops: 0 }, 100)).toBe(4);
  });

  it("are counted without being written out", () => {
    const definitions = Array.from({ length: 60 }, (_, at) => {
      const before: Expression = at === 0 ? one : { kind: "call", name: `a${at - 1}`, arguments: [], span };
      return {
        name: `a${at}`,
        parameters: [],
        value: { kind: "scalar" as const, expression: { kind: "add" as const, summands: [before, before], span } },
        span,
      };
    });
    const formula: Formula = { definitions, expression: { kind: "call", name: "a59", arguments: [], span } };
    expect(countTerms(formula, extent, 300_000)).toBe(300_001);
    const far = alone(sum("i", "1 <= i <= 1000000000", sum("j", "1 <= j <= 1000000000")));
    expect(countTerms(far, extent, 300_000)).toBe(300_001);
    const nothing = alone(sum("i", "1 <= i <= 100000", sum("j,k", "1 <= j <= 1000000,1 <= k <= 1000000,2j = 2k+1")));
    expect(countTerms(nothing, extent, 300_000)).toBe(300_001);
  });
});

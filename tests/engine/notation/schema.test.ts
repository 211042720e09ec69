import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { withoutSpans } from "../../../engine/notation/digest";
import { formulaSchema, treeSchema } from "../../../engine/notation/schema";
import type { Formula } from "../../../engine/notation/tree";
import { formulas } from "../../support/arbitraries";

describe("the schema of the tree", () => {
  it("accepts every tree, with and without spans", () => {
    fc.assert(
      fc.property(formulas, (formula) => {
        expect(formulaSchema.safeParse(formula).success).toBe(true);
        expect(formulaSchema.safeParse(withoutSpans(formula)).success).toBe(true);
      }),
      { numRuns: 50, seed: 3 },
    );
  });

  it("refuses what is no tree", () => {
    const span = [0, 1] as const;
    const good: Formula = { definitions: [], expression: { kind: "integer", value: "12", span } };
    expect(formulaSchema.safeParse(good).success).toBe(true);
    const wrong: unknown[] = [
      {},
      { definitions: [] },
      { ...good, extra: 1 },
      { definitions: [], expression: { kind: "integer", value: 12, span } },
      { definitions: [], expression: { kind: "integer", value: "012", span } },
      { definitions: [], expression: { kind: "nothing", span } },
      { definitions: [], expression: { kind: "negate", operand: { kind: "index", name: "1", span }, span } },
      { definitions: [], expression: { kind: "add", summands: [good.expression], span } },
    ];
    for (const tree of wrong) expect(formulaSchema.safeParse(tree).success).toBe(false);
  });

  it("is published as JSON Schema with its parts by name", () => {
    const schema = treeSchema();
    expect(schema.$schema).toBe("https://json-schema.org/draft/2020-12/schema");
    expect(Object.keys(schema.$defs as object).sort()).toEqual([
      "Condition",
      "Definition",
      "DualPoint",
      "Expression",
      "Formula",
      "IndexExpression",
      "Item",
      "Items",
      "Meet",
      "Momentum",
      "Operand",
      "SpinorEnd",
    ]);
  });
});

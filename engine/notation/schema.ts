/** The syntax tree as a schema: what the JSON of an exported tree looks like, with or without spans. */
import { z } from "zod";

const integerText = z.string().regex(/^-?(0|[1-9]\d*)$/);
const name = z.string().regex(/^[A-Za-z][A-Za-z0-9_]*$/);
const span = z.tuple([z.int().min(0), z.int().min(0)]).optional();
const loop = z.union([z.literal(0), z.literal(1), z.literal(2), z.literal(3)]);

/** A node with its kind, its fields and perhaps its span; other fields are refused. */
const node = <Kind extends string, Shape extends z.core.$ZodShape>(kind: Kind, shape: Shape) =>
  z.strictObject({ kind: z.literal(kind), ...shape, span });

const index = z
  .strictObject({
    terms: z.array(z.strictObject({ name, factor: integerText.refine((factor) => factor !== "0") })),
    constant: integerText,
    span,
  })
  .meta({ id: "IndexExpression" });

const label = node("label", { index });
const referenceTwistor = node("referenceTwistor", {});
const loopLine = node("loopLine", { loop });

const item: z.ZodType = z
  .lazy(() =>
    z.discriminatedUnion("kind", [
      label,
      node("loopPoint", { letter: z.enum(["A", "B", "C", "D", "E", "F", "G", "H"]) }),
      loopLine,
      referenceTwistor,
      node("referenceLine", {}),
      meet,
      node("named", { name, arguments: z.array(index) }),
    ]),
  )
  .meta({ id: "Item" });
const items = z.array(item).meta({ id: "Items" });
const group = node("group", { items });
const operand = z.discriminatedUnion("kind", [group, node("bar", { index })]).meta({ id: "Operand" });
const meet = node("meet", { left: operand, right: operand }).meta({ id: "Meet" });

const momentum = z
  .discriminatedUnion("kind", [node("single", { index }), node("range", { from: index, to: index })])
  .meta({ id: "Momentum" });
const spinorEnd = z.discriminatedUnion("kind", [label, referenceTwistor]).meta({ id: "SpinorEnd" });
const dualPoint = z.discriminatedUnion("kind", [label, loopLine]).meta({ id: "DualPoint" });
const side = z.enum(["angle", "square"]);

const condition = z
  .strictObject({ expressions: z.array(index).min(2), relations: z.array(z.enum(["<", "<=", "=", "!="])).min(1), span })
  .refine(({ expressions, relations }) => expressions.length === relations.length + 1)
  .meta({ id: "Condition" });

const expression: z.ZodType = z
  .lazy(() => {
    const quantified = { indices: z.array(name).min(1), conditions: z.array(condition).min(1), body: expression };
    const use = { name, arguments: z.array(index) };
    return z.discriminatedUnion("kind", [
      node("integer", { value: z.string().regex(/^(0|[1-9]\d*)$/) }),
      node("index", { name }),
      node("add", { summands: z.array(expression).min(2) }),
      node("negate", { operand: expression }),
      node("multiply", { factors: z.array(expression).min(2) }),
      node("divide", { numerator: expression, denominator: expression }),
      node("power", { base: expression, exponent: expression }),
      node("sum", quantified),
      node("product", quantified),
      node("cyc", { body: expression }),
      node("sym", { body: expression }),
      node("call", use),
      node("unknown", use),
      node("four", { items }),
      node("five", { items }),
      node("delta", { items }),
      node("angle", { items }),
      node("square", { left: spinorEnd, right: spinorEnd }),
      node("string", {
        left: side,
        right: side,
        first: spinorEnd,
        last: spinorEnd,
        middle: z.array(z.array(momentum).min(1)).min(1),
      }),
      node("mandelstam", { momenta: z.array(momentum).min(1) }),
      node("distance", { left: dualPoint, right: dualPoint }),
    ]);
  })
  .meta({ id: "Expression" });

const definition = z
  .strictObject({
    name,
    parameters: z.array(name),
    value: z.discriminatedUnion("kind", [
      z.strictObject({ kind: z.literal("scalar"), expression }),
      z.strictObject({ kind: z.literal("geometry"), geometry: z.discriminatedUnion("kind", [meet, group]) }),
    ]),
    span,
  })
  .meta({ id: "Definition" });

/** The structure of a formula's tree. Names and slots are checked by the parser only. */
export const formulaSchema = z.strictObject({ definitions: z.array(definition), expression }).meta({
  id: "Formula",
  description: "The syntax tree of a formula: integers are decimal strings, nothing is expanded.",
});

/** The JSON Schema (draft 2020-12) of the tree. */
export const treeSchema = (): Record<string, unknown> =>
  z.toJSONSchema(formulaSchema, { target: "draft-2020-12" }) as Record<string, unknown>;

/** The document that answers a request for values: the same on the command line and from the server. */
import { type FormAtN, pointUse } from "./form";
import type { PointSource } from "./givenPoints";
import type { ValueColumn, ValueTable } from "./table";

/** One column: what does not apply is left out. */
function columnReply({ values, reasons, errors, digits }: ValueColumn): Record<string, unknown> {
  return {
    values,
    ...(errors === undefined ? {} : { errors }),
    ...(digits === undefined ? {} : { digits }),
    ...(reasons.length === 0 ? {} : { reasons }),
  };
}

/**
 * `{"values": [...]}` for one column; `{"components": [{"helicities", "values"}, ...]}` for many. With `errors` and `digits` in
 * double precision, `reasons` where a value is null, `warnings` where digits are lost, and `seed` where one was used.
 */
export function valueReply(table: ValueTable, many: boolean, seed: string | null): Record<string, unknown> {
  const [first] = table.columns;
  const named = (column: ValueColumn): Record<string, unknown> =>
    column.helicities === null ? columnReply(column) : { helicities: column.helicities, ...columnReply(column) };
  return {
    ...(many || first === undefined ? { components: table.columns.map(named) } : named(first)),
    ...(table.warnings.length === 0 ? {} : { warnings: table.warnings }),
    ...(seed === null ? {} : { seed }),
  };
}

/** The seed that the values depend on: with momenta it draws the references, where the form has any. */
export function seedUsed(form: FormAtN, source: PointSource): string | null {
  if (source.kind === "points") return null;
  const use = pointUse(form);
  return source.kind === "random" || use.referenceTwistor || use.referenceLine ? source.seed : null;
}

/** Number of gluon components of (n, k): C(n, k+2), without writing them out. */
export function countHelicities(n: number, k: number): number {
  let count = 1;
  for (let i = 1; i <= k + 2; i++) count = (count * (n - k - 2 + i)) / i;
  return count;
}

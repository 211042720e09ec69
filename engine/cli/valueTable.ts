/** How values at points are printed. */
import type { ValueColumn, ValueTable, WrittenNumber } from "../index";

/** One column as the reply of `value`: what does not apply is left out. */
function columnJson({ values, reasons, errors, digits }: ValueColumn): Record<string, unknown> {
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
export function tableJson(table: ValueTable, many: boolean, seed: string | null): Record<string, unknown> {
  const [first] = table.columns;
  const named = (column: ValueColumn): Record<string, unknown> =>
    column.helicities === null ? columnJson(column) : { helicities: column.helicities, ...columnJson(column) };
  return {
    ...(many || first === undefined ? { components: table.columns.map(named) } : named(first)),
    ...(table.warnings.length === 0 ? {} : { warnings: table.warnings }),
    ...(seed === null ? {} : { seed }),
  };
}

function numberText(x: WrittenNumber): string {
  if (typeof x === "string") return x;
  const [re, im] = x;
  return im.startsWith("-") ? `${re} - ${im.slice(1)} i` : `${re} + ${im} i`;
}

function cellText(column: ValueColumn, point: number): string {
  const value = column.values[point];
  if (value === null || value === undefined) {
    return `no value: ${column.reasons.find((reason) => reason.point === point)?.message ?? "not computed"}`;
  }
  const digits = column.digits?.[point];
  const error = column.errors?.[point];
  const precision =
    digits === null || digits === undefined
      ? ""
      : `   (error ${error}, ${digits} ${digits === 1 ? "digit" : "digits"})`;
  return `${numberText(value)}${precision}`;
}

/** A line for each point; with many components, for each point and component. */
export function tableText(table: ValueTable, many: boolean): string {
  const count = table.columns[0]?.values.length ?? 0;
  const lines: string[] = [];
  for (let point = 0; point < count; point++) {
    if (many) lines.push(`point ${point}`);
    for (const column of table.columns) {
      lines.push(`${many ? `  ${column.helicities}  ` : ""}${cellText(column, point)}`);
    }
  }
  return lines.map((line) => `${line}\n`).join("");
}

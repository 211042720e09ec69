/** How values at points are printed on a terminal. */
import type { ValueColumn, ValueTable, WrittenNumber } from "../index";

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

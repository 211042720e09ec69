/** A reply with values as rows, one for each point and component, and as CSV. */
import type { EvaluateReply } from "../../_contract";

export interface ValueRow {
  readonly point: number;
  readonly helicities: string;
  readonly re: string;
  /** "" where the number is real by its kind. */
  readonly im: string;
  readonly error: string;
  readonly digits: string;
  /** Why there is no value; then `re` and `im` are "". */
  readonly reason: string;
}

export function valueRows(reply: EvaluateReply): ValueRow[] {
  const columns = "components" in reply ? reply.components : [reply];
  const points = columns[0]?.values.length ?? 0;
  return Array.from({ length: points }, (_, point) => point).flatMap((point) =>
    columns.map((column): ValueRow => {
      const value = column.values[point] ?? null;
      const [re, im] = value === null ? ["", ""] : typeof value === "string" ? [value, ""] : value;
      return {
        point,
        helicities: column.helicities ?? "",
        re,
        im,
        error: column.errors?.[point] ?? "",
        digits: String(column.digits?.[point] ?? ""),
        reason: column.reasons?.find((reason) => reason.point === point)?.message ?? "",
      };
    }),
  );
}

const columns = ["point", "helicities", "re", "im", "error", "digits", "reason"] as const;

/** RFC 4180, with a line that names the columns. Texts are in quotation marks, numbers are not. */
export function valuesAsCsv(rows: readonly ValueRow[]): string {
  const quoted = (text: string): string => (text === "" ? "" : `"${text.replaceAll('"', '""')}"`);
  const lines = rows.map((row) =>
    columns.map((name) => (name === "helicities" || name === "reason" ? quoted(row[name]) : row[name])).join(","),
  );
  return [columns.join(","), ...lines].map((line) => `${line}\r\n`).join("");
}

const DIGITS = 15;

/**
 * A fraction "p/q" as a decimal of 15 digits, the last one rounded half away from zero: 1.25000000000000e+0. Null where the text is no
 * fraction.
 */
export function decimalOf(text: string): string | null {
  const parts = /^(-?)(\d+)(?:\/(\d+))?$/.exec(text);
  if (parts === null) return null;
  const [p, q] = [BigInt(parts[2] ?? "0"), BigInt(parts[3] ?? "1")];
  if (q === 0n) return null;
  if (p === 0n) return "0";
  // The exponent from the lengths, right or one too large.
  let exponent = p.toString().length - q.toString().length;
  const scaled = (power: number): bigint => {
    const shift = DIGITS - 1 - power;
    const [top, bottom] = shift >= 0 ? [p * 10n ** BigInt(shift), q] : [p, q * 10n ** BigInt(-shift)];
    return (2n * top + bottom) / (2n * bottom);
  };
  const smallest = 10n ** BigInt(DIGITS - 1);
  if (scaled(exponent) < smallest) exponent--;
  let digits = scaled(exponent).toString();
  // 9.99...95 is rounded to 10.00...: one digit more.
  if (digits.length > DIGITS) {
    exponent++;
    digits = digits.slice(0, DIGITS);
  }
  return `${parts[1]}${digits.charAt(0)}.${digits.slice(1)}e${exponent < 0 ? "-" : "+"}${Math.abs(exponent)}`;
}

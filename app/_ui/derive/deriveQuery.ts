/** What an address says of a form to be derived, and the address that says it. */
import type { DeriveQuery } from "../../_contract";

export const deriveFieldNames = ["n", "k", "loops", "method", "leg", "direction"] as const;
type Name = (typeof deriveFieldNames)[number];
export type DeriveFields = Record<Name, string>;

/** The six-leg NMHV tree, the smallest that shows what a shift does. */
export const exampleDerive: DeriveFields = { n: "6", k: "1", loops: "0", method: "recursion", leg: "", direction: "" };

/** Reads the known fields; a method that is asked for in an address of another page is called `derived` there. */
export function readDeriveFields(query: Readonly<Record<string, unknown>>): DeriveFields {
  const fields = { ...exampleDerive, n: "", k: "" };
  for (const name of deriveFieldNames) {
    const value = name === "method" ? (query.derived ?? query.method) : query[name];
    if (typeof value === "string" && value.trim() !== "") fields[name] = value.trim();
  }
  return fields;
}

/** A whole number, or the text itself for the request's schema to refuse. */
const whole = (text: string): unknown => (/^\d{1,4}$/.test(text) ? Number(text) : text);

/** The request of the fields; what does not fit the method (a leg of a vertex expansion) is left out. */
export function deriveRequestOf({
  n,
  k,
  loops,
  method,
  leg,
  direction,
}: DeriveFields): Record<keyof DeriveQuery, unknown> {
  const shift = method === "recursion";
  return {
    n: whole(n),
    k: whole(k),
    loops: whole(loops),
    method,
    leg: shift && leg !== "" ? whole(leg) : undefined,
    direction: shift && direction !== "" ? direction : undefined,
  };
}

/** The query that names a derived form: with `method` on the page that derives, with `derived` where it is taken over. */
export function deriveParameters(fields: DeriveFields, method: "method" | "derived"): URLSearchParams {
  const parameters = new URLSearchParams();
  for (const name of deriveFieldNames) {
    if (fields[name] !== "") parameters.set(name === "method" ? method : name, fields[name]);
  }
  return parameters;
}

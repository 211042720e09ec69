/** Forms from notation, for the tests of the evaluator. */
import { type FormAtN, formAt } from "../../../engine/evaluate";
import { parse } from "../../../engine/notation/parse";

/** The form that a formula states for (n, k, loops); a component names its helicities. */
export function form(
  key: readonly [n: number, k: number, loops: number],
  notation: string,
  options: { readonly component?: string; readonly squareSign?: 1 | -1 } = {},
): FormAtN {
  const parsed = parse(notation);
  if (!parsed.ok) throw new Error(`${notation}: ${JSON.stringify(parsed.diagnostics)}`);
  const [n, k, loops] = key;
  const component =
    options.component === undefined ? null : [...options.component].flatMap((x, i) => (x === "-" ? [i + 1] : []));
  return formAt({ amplitude: { k, loops }, component, squareSign: options.squareSign ?? 1, formula: parsed.value }, n);
}

/** Forms for tests: notation in, a form at one n out. */
import type { FormAtN } from "../../engine/evaluate/form";
import { parse } from "../../engine/notation/parse";

/** @throws Error with the diagnostics where the notation is at fault. */
export function formOf(
  notation: string,
  size: { readonly n: number; readonly k: number; readonly loops?: number },
  options: { readonly negativeLegs?: readonly number[]; readonly squareSign?: 1 | -1 } = {},
): FormAtN {
  const formula = parse(notation);
  if (!formula.ok) throw new Error(formula.diagnostics.map((d) => `${d.code}: ${d.message}`).join("\n"));
  return {
    n: size.n,
    k: size.k,
    loops: size.loops ?? 0,
    negativeLegs: options.negativeLegs ?? null,
    squareSign: options.squareSign ?? 1,
    formula: formula.value,
  };
}

/** Published forms by name, each with its source. */
export const published = {
  /** 1008.2958, section 2: three terms from a shift. */
  nmhv6: "[1 2 3 4 5] + [1 2 3 5 6] + [1 3 4 5 6]",
  /** 0807.1095: the NMHV amplitude for every n. */
  nmhv: "sum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]",
  /** 1009.1854: vertex expansion with a reference twistor. */
  vertex: "sum(i, j : 1 <= i, i+1 < j <= n, j != i+n-1) [* i i+1 j j+1]",
  /** 1008.2958: one-loop MHV integrand from recursion. */
  kermits:
    "sum(i, j : 1 < i < j < n) <AB (1 i i+1) cap (1 j j+1)>^2 / (<AB 1 i><AB i i+1><AB i+1 1><AB 1 j><AB j j+1><AB j+1 1>)",
  /** 1012.6032: one-loop MHV integrand from chiral pentagons with a reference line. */
  pentagons:
    "sum(i, j : 1 <= i < j <= n) <AB bar(i) cap bar(j)> <X i j> / (<AB X><AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>)",
  /** 1012.6032: two-loop MHV integrand. */
  doublePentagons:
    "sum(i, j, k, l : i < j < k < l < i) <AB bar(i) cap bar(j)><CD bar(k) cap bar(l)><i j k l> / (<AB i-1 i><AB i i+1><AB j-1 j><AB j j+1><AB CD><CD k-1 k><CD k k+1><CD l-1 l><CD l l+1>)",
} as const;

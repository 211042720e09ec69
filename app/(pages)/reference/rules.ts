/** The rules of the notation as the reference page lists them: what is written, and what it means. */
type Rules = readonly (readonly [written: string, meaning: string])[];

export const items: Rules = [
  ["3  n  i  i+1  n-1", "An external twistor. Arithmetic is written without spaces and wraps modulo n."],
  ["AB  CD  EF  GH", "The line of loop 1 to 4; its two points are A and B, C and D, ..."],
  ["*", "A reference twistor; the value of the whole formula must not depend on it."],
  ["X", "A reference line."],
  ["(a b) cap (c d e)", "The point where a line meets a plane. ∩ may be written for cap."],
  ["(a b c) cap (d e f)", "The line where two planes meet."],
  ["bar(i)", "The plane (i-1 i i+1), beside cap."],
];

export const brackets: Rules = [
  ["<a b c d>", "Determinant of four momentum twistors; ⟨ ⟩ may be written for < >."],
  ["[a b c d e]", "R-invariant, antisymmetric in its five entries."],
  ["delta(a b c d e)", "The numerator of the R-invariant."],
  ["<a b>  [a b]", "Brackets of two spinors; square brackets take external legs."],
  ["<a|b+c|d]  <a|2..4|d]", "Spinor strings; between the bars stand sums of momenta or ranges of them."],
  ["s(1 2 3)  s(i..j-1)", "The square of a sum of momenta."],
  ["x2(i j)  x2(i AB)  x2(AB CD)", "The squared distance of two dual points."],
];

export const expressions: Rules = [
  [
    "a b + c / d - 2 e^3",
    "Products by juxtaposition or *. After a quotient in one line, a / (b c) needs its parentheses.",
  ],
  [
    "sum(i, j : 1 < i < j < n) ...",
    "Sum over integers; every index bounded on both sides; the body is the product that follows.",
  ],
  ["sum(i, j, k : i < j < k < i) ...", "A chain that closes on itself: cyclically ordered labels."],
  ["prod(i : 1 <= i <= n) ...", "Product; its body is the one factor that follows."],
  ["cyc(...)", "The sum of the n cyclic images."],
  ["sym(...)", "The sum over the permutations of the loop lines."],
  ["let f(i, j) = ...;", "Defines a number, point, line or plane for use below."],
  ["# ...", "A comment to the end of the line."],
];

/** How large a formula may be. Each limit has its own code in `codes.ts`. */

/** UTF-16 code units of the source. */
export const mostSourceUnits = 2_000_000;
/** Parentheses, groups, signs and bodies inside one another, and quotients in one product. */
export const deepestNesting = 200;
/** Nodes of the tree inside one another once definitions are looked into. */
export const deepestTree = 1_000;
/** Top-level terms once sums, `cyc` and `sym` are written out, and summands written in one place. */
export const mostTerms = 300_000;
/** Steps that evaluating the formula once may take, definitions evaluated once for each list of arguments. */
export const mostSteps = 30_000_000;
/** Degree of a product or power in its brackets. */
export const highestDegree = 100_000;
/** Absolute value of an exponent. */
export const largestExponent = 1_000;
/** Digits of an integer. */
export const longestInteger = 1_000;
/** Indices of one `sum` or `prod`. */
export const mostIndices = 32;
/** Legs. */
export const mostLegs = 64;
export const fewestLegs = 4;
/** Loop lines. */
export const mostLoops = 4;
/** Diagnostics of one text; one more says that there are others. */
export const mostDiagnostics = 200;

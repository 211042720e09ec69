/** Versions of the rules (DATA rule 6). A change of `points` re-indexes, of `protocol` re-checks, of `engine` re-checks after a fix. */
export const pointsVersion = "1";
/** What a check does: samples, bounds, marks, diagnosis. */
export const protocolVersion = "1";
/** The evaluators that decide. */
export const engineVersion = "1";

/**
 * Which marks are tested for which kind of form, n, k and L, for the reference documentation. A test makes this table from forms of
 * every row and compares: where it differs, a mark has begun or ceased to be tested.
 */
import { type MarkCode, markCodes } from "../report";

export type CoverageKind = "superamplitude" | "component" | "even" | "log" | "zero";
export type Coverage = "tested" | "untested" | "notApplicable";

export interface CoverageRow {
  readonly kind: CoverageKind;
  readonly n: number;
  readonly k: number;
  readonly loops: number;
  readonly marks: Readonly<Record<MarkCode, Coverage>>;
}

const meaning: Readonly<Record<string, Coverage>> = { t: "tested", u: "untested", ".": "notApplicable" };

/** Kind, n, k, L, and one letter for each mark in the order of `markCodes`: tested, untested for want of a smaller amplitude, `.` does not apply. */
export const coverageTable: readonly string[] = [
  "superamplitude 4 0 0 ttt..t..........ttt",
  "superamplitude 5 0 0 ttt..t..tt......ttt",
  "superamplitude 5 1 0 ttt.ttt.ttt....tttt",
  "superamplitude 6 0 0 ttt..t..tt......ttt",
  "superamplitude 6 1 0 ttt.ttt.ttt....tttt",
  "superamplitude 6 2 0 ttt..tt.ttt....tttt",
  "superamplitude 7 0 0 ttt..t..tt......ttt",
  "superamplitude 7 1 0 ttt.ttt.ttt....tttt",
  "superamplitude 7 2 0 ttt..tt.ttt....tttt",
  "superamplitude 7 3 0 ttt..tt.ttt....tttt",
  "superamplitude 8 0 0 ttt..t..tt......ttt",
  "superamplitude 8 1 0 ttt.ttt.ttt....tttt",
  "superamplitude 8 2 0 ttt..tt.ttt....tttt",
  "superamplitude 8 3 0 ttt..tt.ttt....tttt",
  "superamplitude 8 4 0 ttt..tt.ttt....tttt",
  "superamplitude 4 0 1 ttt.tttt...tt..tttt",
  "superamplitude 4 0 2 tttt.t.t...ttt.tttt",
  "superamplitude 5 0 1 ttt.tttttt.tt..tttt",
  "superamplitude 5 1 1 ttt..ttttttt..ttttt",
  "superamplitude 5 0 2 ttut.t.ttt.ttt.tttt",
  "superamplitude 6 0 1 ttt.tttttt.tt..tttt",
  "superamplitude 6 1 1 ttt..ttttttt..ttttt",
  "superamplitude 6 2 1 ttt..ttttttt..ttttt",
  "superamplitude 6 0 2 ttut.t.ttt.ttt.tttt",
  "superamplitude 5 1 2 tttt.ttttttt...tttt",
  "superamplitude 4 0 3 tttt.t.t...ttt.tt..",
  "superamplitude 5 0 3 ttut.t.ttt.ttt.tt..",
  "component 4 0 0 .t...t.............",
  "component 5 0 0 .t...t..tt.........",
  "component 6 0 0 .t...t..tt.........",
  "component 5 1 0 .t...t..tt.........",
  "component 6 1 0 .t...tt.tt.........",
  "even 4 0 1 tt...t.t........t..",
  "even 5 0 1 tt...t.t........t..",
  "log 4 0 2 tt.t.t.t........t..",
  "log 5 0 2 tt.t.ttt........t..",
  "zero 6 1 0 tt...tt.........t..",
];

export const coverage: readonly CoverageRow[] = coverageTable.map((line) => {
  const [kind, n, k, loops, letters] = line.split(" ") as [CoverageKind, string, string, string, string];
  const marks = Object.fromEntries(markCodes.map((code, i) => [code, meaning[letters[i] ?? ""]]));
  return {
    kind,
    n: Number(n),
    k: Number(k),
    loops: Number(loops),
    marks: marks as Record<MarkCode, Coverage>,
  };
});

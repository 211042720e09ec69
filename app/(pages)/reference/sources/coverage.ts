/** What the engine's sources of truth cover, asked of the sources themselves. */
import type { Question, Source } from "../../../../engine/sources";

const kinds = ["amplitude", "component", "even", "log", "zero"] as const;

const nouns = {
  amplitude: "superamplitudes",
  component: "components",
  even: "parity-even parts",
  log: "logarithms",
  zero: "identities",
} as const;

const mostLegs = 64;

/** Degrees that are asked for at n: all for few legs; of many the first and last and one in the middle. */
function degrees(n: number): number[] {
  if (n <= 12) return Array.from({ length: n - 3 }, (_, k) => k);
  return [0, 1, 2, 3, Math.floor(n / 2) - 2, n - 7, n - 6, n - 5, n - 4];
}

function question(kind: (typeof kinds)[number], n: number, k: number, loops: number): Question {
  const negativeLegs = kind === "component" ? Array.from({ length: k + 2 }, (_, i) => i + 1) : null;
  return { n, k, loops, negativeLegs, target: kind === "component" ? "amplitude" : kind };
}

const known = new Map<Source, readonly string[]>();

/** What one source covers, in words: "superamplitudes: L = 1, k = 0, n from 4". */
export function coverageOf(source: Source): readonly string[] {
  const before = known.get(source);
  if (before !== undefined) return before;
  const lines = kinds.flatMap((kind) => {
    const parts = [0, 1, 2, 3, 4].flatMap((loops) => {
      const words = within((n, k) => source.covers(question(kind, n, k, loops)));
      return words === null ? [] : [`${loops === 0 ? "trees" : `L = ${loops}`}, ${words}`];
    });
    return parts.length === 0 ? [] : [`${nouns[kind]}: ${parts.join("; ")}`];
  });
  known.set(source, lines);
  return lines;
}

function within(covers: (n: number, k: number) => boolean): string | null {
  const found = new Map<number, number[]>();
  for (let n = 4; n <= mostLegs; n++) {
    // What covers nothing of few legs covers nothing of more.
    if (n > 12 && found.size === 0) return null;
    const covered = degrees(n).filter((k) => covers(n, k));
    if (covered.length > 0) found.set(n, covered);
  }
  const sizes = [...found.keys()];
  const [least, most] = [Math.min(...sizes), Math.max(...sizes)];
  const all = [...new Set([...found.values()].flat())].sort((a, b) => a - b);
  const missing = sizes.filter((n) => found.get(n)?.length !== degrees(n).length);
  const first = Math.min(...missing);
  const range = least === most ? `n = ${least}` : most === mostLegs ? `n from ${least}` : `n = ${least} to ${most}`;
  if (all.length <= 2) return `k = ${all.join(" and ")}, ${range}`;
  if (missing.length === 0) return `every k, ${range}`;
  return first === least
    ? `k from ${all[0]} to ${all.at(-1)}, ${range}`
    : `every k up to n = ${first - 1}, some beyond`;
}

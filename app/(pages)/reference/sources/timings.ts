/** What the bench found of sources and checks; the file says on which machine, the page how to make it again. */
import { z } from "zod";
import measured from "./timings.json";

const schema = z.object({
  machine: z.string(),
  entries: z.array(z.object({ name: z.string(), median: z.number(), unit: z.enum(["s", "operations"]) })),
  notes: z.array(z.string()),
});

const { machine, entries, notes } = schema.parse(measured);

export { machine, notes };

interface Amplitude {
  readonly n: number;
  readonly k: number;
  readonly loops: number;
}

export interface Timing extends Amplitude {
  readonly method: string;
  readonly seconds: number;
}

const named = /^(check|operations) n(\d+)k(\d+)L(\d): (.*?)(?: \(([^()]*)\))?$/;

const read = entries.map(({ name, median }) => {
  const [, what, n, k, loops, by = "", lineage = ""] = named.exec(name) ?? [];
  if (what === undefined) throw new Error(`timings.json: "${name}" names neither a check nor operations`);
  return { what, n: Number(n), k: Number(k), loops: Number(loops), by, lineage, value: median };
});

export const timings: readonly Timing[] = read
  .filter(({ what }) => what === "check")
  .map(({ n, k, loops, by, value }) => ({ n, k, loops, method: by, seconds: value }));

/** Operations at a point of each source of `columns`, null where it does not apply, and how many lineages apply. */
export interface CostRow extends Amplitude {
  readonly costs: readonly (number | null)[];
  readonly lineages: number;
}

export interface CostTable {
  readonly loops: number;
  readonly columns: readonly string[];
  readonly rows: readonly CostRow[];
}

export function costTable(loops: number): CostTable {
  const found = read.filter((entry) => entry.what === "operations" && entry.loops === loops);
  const columns = [...new Set(found.map(({ by }) => by))];
  const keys = [...new Set(found.map(({ n, k }) => `${n} ${k}`))];
  const rows = keys.map((key) => {
    const own = found.filter(({ n, k }) => `${n} ${k}` === key);
    const [n = 0, k = 0] = key.split(" ").map(Number);
    const costs = columns.map((column) => own.find(({ by }) => by === column)?.value ?? null);
    return { n, k, loops, costs, lineages: new Set(own.map(({ lineage }) => lineage)).size };
  });
  return { loops, columns, rows };
}

export const timeOf = (n: number, k: number, loops: number): Timing | null =>
  timings.find((timing) => timing.n === n && timing.k === k && timing.loops === loops) ?? null;

/** For each (k, L) the largest n that was measured below ten seconds, and the smallest above if one was. */
export function reaches(): readonly {
  readonly k: number;
  readonly loops: number;
  readonly below: Timing | null;
  readonly above: Timing | null;
}[] {
  const groups = new Map<string, Timing[]>();
  for (const timing of timings) {
    const key = `${timing.loops} ${timing.k}`;
    groups.set(key, [...(groups.get(key) ?? []), timing]);
  }
  return [...groups.values()].map((group) => {
    const ordered = [...group].sort((a, b) => a.n - b.n);
    const { k, loops } = ordered[0] as Timing;
    return {
      k,
      loops,
      below: ordered.filter(({ seconds }) => seconds < 10).at(-1) ?? null,
      above: ordered.find(({ seconds }) => seconds >= 10) ?? null,
    };
  });
}

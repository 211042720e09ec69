/** Amplitudes: the triangle of a loop order, one amplitude, and the list of those of which something is known. */
import type { AmplitudeList, AmplitudeView, Triangle } from "../../_contract";
import { read } from "../db";
import { type AmplitudeName, readAmplitudeKey } from "../identifiers";
import { type Principal, visibleTo } from "../principal";

type Counts = Pick<AmplitudeView, "accepted" | "held" | "checking">;

const none: Counts = { accepted: 0, held: 0, checking: 0 };

/** Counts by amplitude of the latest versions that `principal` may read; only amplitudes that have one are in the map. */
async function countForms(
  principal: Principal,
  amplitude: { key?: string; loops?: number },
): Promise<Map<string, Counts>> {
  const rows = await read().version.findMany({
    where: {
      latest: true,
      state: { in: ["accepted", "held", "checking"] },
      OR: [{ state: "accepted" }, { form: { groupId: { in: [...principal.groups] } } }],
      form: { ...visibleTo(principal), amplitude },
    },
    select: { state: true, form: { select: { amplitudeKey: true } } },
  });
  const counts = new Map<string, Counts>();
  for (const { state, form } of rows) {
    const before = counts.get(form.amplitudeKey) ?? none;
    const name = state as keyof Counts;
    counts.set(form.amplitudeKey, { ...before, [name]: before[name] + 1 });
  }
  return counts;
}

/** Largest loop order of the notation. */
const mostLoops = 4;

/** Rows that are shown even where nothing is stored: n = 4 to this one. */
const leastRows = 8;

/** The triangle of loop order `loops` (0..4) with what `principal` can see. */
export async function getTriangle(principal: Principal, loops: number): Promise<Triangle> {
  const [counts, orders] = await Promise.all([
    countForms(principal, { loops }),
    read().amplitude.findMany({
      where: { forms: { some: visibleTo(principal) } },
      distinct: ["loops"],
      select: { loops: true },
      orderBy: { loops: "asc" },
    }),
  ]);
  const names = [...counts.keys()].map((key) => readAmplitudeKey(key) as AmplitudeName);
  const largest = Math.max(leastRows, ...names.map((name) => name.n ?? 0));
  const entry = (k: number, key: string) => ({ k, key, ...(counts.get(key) ?? none) });
  return {
    loops,
    loopOrders: [...new Set([0, ...orders.map((row) => row.loops)])].filter((order) => order <= mostLoops),
    rows: Array.from({ length: largest - 3 }, (_, row) => {
      const n = row + 4;
      return { n, entries: Array.from({ length: n - 3 }, (_, k) => entry(k, `n${n}k${k}L${loops}`)) };
    }),
    everyN: names
      .filter((name) => name.n === null)
      .sort((a, b) => a.k - b.k)
      .map((name) => entry(name.k, name.key)),
  };
}

const viewOf = (name: AmplitudeName, counts: Counts): AmplitudeView => ({
  key: name.key,
  n: name.n,
  k: name.k,
  loops: name.loops,
  mirror: name.n === null ? null : `n${name.n}k${name.n - 4 - name.k}L${name.loops}`,
  ...counts,
});

/** The amplitude `key`, also where nothing is stored of it yet; null if `key` names none. */
export async function getAmplitude(principal: Principal, key: string): Promise<AmplitudeView | null> {
  const name = readAmplitudeKey(key);
  if (!name) return null;
  const counts = await countForms(principal, { key });
  return viewOf(name, counts.get(key) ?? none);
}

/** The amplitudes with forms that `principal` may read, by loop order, n (many n last) and k. The library has few: one page holds them. */
export async function listAmplitudes(principal: Principal): Promise<AmplitudeList> {
  const counts = await countForms(principal, {});
  const items = [...counts]
    .map(([key, of]) => viewOf(readAmplitudeKey(key) as AmplitudeName, of))
    .sort((a, b) => a.loops - b.loops || (a.n ?? Infinity) - (b.n ?? Infinity) || a.k - b.k);
  return { items, next: null };
}

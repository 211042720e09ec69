/** Small matters of English: lists, numbers with their noun, dates, what an amplitude is called. */

/** "a", "a and b", "a, b and c". */
export function listed(items: readonly string[]): string {
  if (items.length <= 1) return items[0] ?? "";
  return `${items.slice(0, -1).join(", ")} and ${items[items.length - 1]}`;
}

const small = ["no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine", "ten"];

/** "no forms", "one form", "two forms", "37 forms". */
export function numbered(count: number, noun: string, plural = `${noun}s`): string {
  return `${small[count] ?? count.toLocaleString("en")} ${count === 1 ? noun : plural}`;
}

/** First letter made a capital. */
export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** First letter made small, for a sentence in a sentence. */
export const decapital = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1);

/** "1 December 2025", in UTC so that server and reader see the same day. */
export const dated = (iso: string): string =>
  new Date(iso).toLocaleDateString("en-GB", { day: "numeric", month: "long", year: "numeric", timeZone: "UTC" });

export interface AmplitudeName {
  /** null for a form for every n. */
  readonly n: number | null;
  readonly k: number;
  readonly loops: number;
}

/** "MHV", "NMHV", "N²MHV", ... and the conjugate names at the other edge of the triangle. */
export function degree(k: number): string {
  if (k === 0) return "MHV";
  if (k === 1) return "NMHV";
  return `N${String(k).replaceAll(/\d/g, (digit) => "⁰¹²³⁴⁵⁶⁷⁸⁹".charAt(Number(digit)))}MHV`;
}

const loopWords = ["tree", "one loop", "two loops", "three loops", "four loops"];

/** "tree", "one loop", ... */
export const loopName = (loops: number): string => loopWords[loops] ?? `${loops} loops`;

/** "six legs, NMHV, tree". */
export function amplitudeName({ n, k, loops }: AmplitudeName): string {
  const legs = n === null ? "every number of legs" : `${small[n] ?? n} legs`;
  return `${legs}, ${degree(k)}, ${loopName(loops)}`;
}

/** The amplitude of a key `n6k1L0` or `nXk1L0`, or null where the text is no key. */
export function amplitudeOfKey(key: string): AmplitudeName | null {
  const parts = /^n(X|[1-9]\d?)k(0|[1-9]\d?)L([0-4])$/.exec(key);
  if (parts === null) return null;
  return { n: parts[1] === "X" ? null : Number(parts[1]), k: Number(parts[2]), loops: Number(parts[3]) };
}

/** LaTeX of the amplitude's symbol. */
export const amplitudeLatex = ({ n, k, loops }: AmplitudeName): string =>
  `\\mathcal{A}_{${n ?? "n"},${k}}${loops === 0 ? "" : `^{(${loops})}`}`;

/** What a form's formula is, where it is not the amplitude itself. */
export const targetNames = {
  amplitude: "the amplitude",
  even: "its parity-even part",
  log: "the integrand of its logarithm",
  zero: "an identity",
} as const;

/** Helicities as signs with thin spaces, or the negative legs in words; null for the superamplitude. */
export function componentName(component: string | { readonly minus: readonly number[] } | null): string | null {
  if (component === null) return null;
  if (typeof component === "string") return `helicities ${[...component.replaceAll("-", "−")].join("\u2009")}`;
  return `negative helicity on legs ${listed(component.minus.map(String))}`;
}

/** Makes and reads identifiers of amplitudes, forms and versions. */
import { randomBytes } from "node:crypto";
import { amplitudeKeyPattern, formIdPattern } from "../_contract";

const base32 = "abcdefghijklmnopqrstuvwxyz234567";

/** `length` random characters of base32, five random bits each. */
export function randomName(length: number): string {
  let name = "";
  for (const byte of randomBytes(length)) name += base32[byte & 31];
  return name;
}

/** An identifier of 130 random bits. */
export const randomId = (): string => randomName(26);

export interface AmplitudeName {
  readonly key: string;
  readonly n: number | null;
  readonly k: number;
  readonly loops: number;
}

/** Reads `n6k1L0` or `nXk1L0`; null if it is no amplitude's key (0 <= k <= n-4, n >= 4). */
export function readAmplitudeKey(key: string): AmplitudeName | null {
  if (!amplitudeKeyPattern.test(key)) return null;
  const [, n, k, loops] = /^n(\d+|X)k(\d+)L(\d+)$/.exec(key) as RegExpExecArray;
  const name = { key, n: n === "X" ? null : Number(n), k: Number(k), loops: Number(loops) };
  return name.n !== null && (name.n < 4 || name.n > 64 || name.k > name.n - 4) ? null : name;
}

/** The key of the forms of many n with the same k and loops. */
export const manyKey = (amplitude: { readonly k: number; readonly loops: number }): string =>
  `nXk${amplitude.k}L${amplitude.loops}`;

export interface FormName {
  /** Without the version. */
  readonly id: string;
  readonly amplitudeKey: string;
  /** Public number, or the random handle. */
  readonly number: number | null;
  readonly no: number | null;
}

/** Reads `n6k1L0-3` or `n6k1L0-3v2`. */
export function readFormId(text: string): FormName | null {
  const match = formIdPattern.exec(text);
  if (!match) return null;
  const [, key, name, no] = match as unknown as [string, string, string, string | undefined];
  return {
    id: `${key}-${name}`,
    amplitudeKey: key,
    number: name.startsWith("p") ? null : Number(name),
    no: no === undefined ? null : Number(no),
  };
}

/** The name under which a form is known: its public number, or the random handle while it has none. */
export const formIdOf = (form: {
  readonly amplitudeKey: string;
  readonly number: number | null;
  readonly handle: string;
}): string => (form.number === null ? form.handle : `${form.amplitudeKey}-${form.number}`);

/** Place of a form in lists: by loop order, n (forms of many n last), k, number. Digits sort alike under every collation. */
export function positionOf(amplitude: AmplitudeName, number: number | null, handle: string): string {
  const fixed = (value: number, width: number) => String(value).padStart(width, "0");
  const place = `${fixed(amplitude.loops, 2)}${fixed(amplitude.n ?? 999, 3)}${fixed(amplitude.k, 3)}`;
  return number === null
    ? `${place}999999999${handle.slice(handle.lastIndexOf("-") + 1)}`
    : `${place}${fixed(number, 9)}`;
}

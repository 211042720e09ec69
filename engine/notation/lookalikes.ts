/** Characters that look like the notation's own, and what a person who typed them meant. */

const pairs = (from: string, to: string): [string, string][] =>
  [...from].map((character, at) => [character, [...to][at]!]);

/** A pasted character -> the text of the notation. */
const meant: ReadonlyMap<string, string> = new Map([
  ...pairs("〈〉〈〉‹›＜＞［］（）", "<><><><>[]()"),
  ...pairs("−–—‐‑－﹣×·⋅∙∗＊÷∕⁄／＋＾，、；：＝｜∣│", "-------******///+^,,;:=|||"),
  ["∑", "sum"],
  ["Σ", "sum"],
  ["∏", "prod"],
  ["Π", "prod"],
  ["≤", "<="],
  ["⩽", "<="],
  ["≠", "!="],
  ["‥", ".."],
  ["…", ".."],
]);

/** Letters of other scripts -> the Latin letter of the same shape. */
const latin: ReadonlyMap<string, string> = new Map([
  ...pairs("АВСЕНХРОКМТУ", "ABCEHXPOKMTY"),
  ...pairs("аеорсхуіјѕһԁ", "aeopcxyijshd"),
  ...pairs("ΑΒΕΖΗΙΚΜΝΟΡΤΥΧ", "ABEZHIKMNOPTYX"),
  ...pairs("ονι", "ovi"),
]);

const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";
const subscripts = "₀₁₂₃₄₅₆₇₈₉";

/** The plain text that a character stands in for, or null when it resembles nothing. */
export function plainText(character: string): string | null {
  const known = meant.get(character) ?? latin.get(character);
  if (known !== undefined) return known;
  if (superscripts.includes(character)) return `^${superscripts.indexOf(character)}`;
  if (subscripts.includes(character)) return `${subscripts.indexOf(character)}`;
  // Full-width, circled, mathematical bold and the like have an ASCII letter or digit as their compatibility form.
  const plain = character.normalize("NFKC");
  return plain !== character && /^[0-9A-Za-z]$/.test(plain) ? plain : null;
}

/** Spaces that are not the plain one: a no-break space, an ideographic space ... */
export const isForeignSpace = (character: string): boolean =>
  /^[\u0085\u2028\u2029\p{Zs}]$/u.test(character) && character !== " ";

/** Characters without width: joiners, byte-order mark, soft hyphen, direction marks. */
export const isInvisible = (character: string): boolean => /^(?:\p{Cf}|\u034f|\u115f|\u3164|\ufe0f)$/u.test(character);

/** Canonical JSON: the JSON Canonicalization Scheme (RFC 8785), written in pieces so that a large tree is never one string. */

/**
 * The canonical text of a JSON value, piece by piece: no white space, members sorted by the UTF-16 code units of their names, strings
 * and numbers as ECMAScript writes them. Members that are `undefined` are left out.
 * @throws Error for what JSON cannot hold: a number that is not finite, a lone surrogate, a function, a symbol, a big integer.
 */
export function* canonicalPieces(value: unknown): Generator<string> {
  if (value === null || typeof value === "boolean") yield String(value);
  else if (typeof value === "string") yield quoted(value);
  else if (typeof value === "number") {
    if (!Number.isFinite(value)) throw new Error(`canonicalPieces: expected a finite number, got ${value}`);
    yield JSON.stringify(value);
  } else if (Array.isArray(value)) {
    yield "[";
    for (const [index, item] of value.entries()) {
      if (index > 0) yield ",";
      yield* canonicalPieces(item);
    }
    yield "]";
  } else if (typeof value === "object") {
    yield "{";
    let first = true;
    // The default order of strings is that of their UTF-16 code units.
    for (const name of Object.keys(value).sort()) {
      const member = (value as Record<string, unknown>)[name];
      if (member === undefined) continue;
      yield `${first ? "" : ","}${quoted(name)}:`;
      first = false;
      yield* canonicalPieces(member);
    }
    yield "}";
  } else throw new Error(`canonicalPieces: expected a JSON value, got a ${typeof value}`);
}

/** The canonical text of a JSON value as one string. @throws Error as `canonicalPieces` */
export const canonicalJson = (value: unknown): string => [...canonicalPieces(value)].join("");

function quoted(text: string): string {
  if (loneSurrogate.test(text)) throw new Error("canonicalPieces: expected well-formed Unicode, got a lone surrogate");
  return JSON.stringify(text);
}

/** A surrogate without its partner (with the u flag, pairs count as one character). */
const loneSurrogate = /\p{Surrogate}/u;

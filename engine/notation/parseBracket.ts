/** Reads four-brackets, R-invariants, their numerators and two-brackets. */
import type { Span } from "../result";
import { readItems, type Sized } from "./parseItem";
import { isString, readSquare, readString } from "./parseSpinors";
import { loopLetters, loopWords, type Reader } from "./reader";
import type { Expression, Item } from "./tree";

const placeholder = (span: Span): Expression => ({ kind: "integer", value: "1", span });

/** The tokens of a bracket that holds only words, numbers, `*` and commas, up to its end; null where it holds anything else. */
function plainWords(reader: Reader, first: number): { words: string[]; end: number } | null {
  const words: string[] = [];
  for (let at = first; ; at += 1) {
    const kind = reader.tokens.kind(at);
    if (kind === ">" || kind === "]" || kind === ")") return { words, end: at };
    if (kind === "integer" || kind === "name" || kind === "*") words.push(reader.tokens.text(at));
    else if (kind !== ",") return null;
    if (words.length > 40) return null;
  }
}

const isPoint = (reader: Reader, word: string): boolean =>
  reader.isIndex(word) || reader.definition(word) !== null || (word.length === 1 && loopLetters.includes(word));
const isLine = (word: string): boolean => loopWords.includes(word) || word === "X";

/** The words a run of letters and digits is made of when its spaces are put back, or null. */
function separate(reader: Reader, word: string): string[] | null {
  if (/^\d+$/.test(word)) return [...word];
  if (word === "*" || isLine(word) || isPoint(reader, word)) return [word];
  const parts: string[] = [];
  for (let at = 0; at < word.length; ) {
    const two = word.slice(at, at + 2);
    const part = loopWords.includes(two) ? two : word[at]!;
    if (!isLine(part) && !isPoint(reader, part) && !/^\d$/.test(part)) return null;
    parts.push(part);
    at += part.length;
  }
  return parts;
}

const slotsOf = (reader: Reader, words: readonly string[]): number =>
  words.reduce((sum, word) => {
    const kind = reader.definition(word)?.kind;
    return sum + (kind === "plane" ? 3 : isLine(word) || kind === "line" ? 2 : 1);
  }, 0);

/**
 * Reports labels written without spaces, `<AB12>` or `[12345]`, where putting the spaces back gives a bracket of an allowed size,
 * and passes the bracket. False where nothing of the kind is found.
 */
function passRunTogether(reader: Reader, start: number, allowed: readonly number[]): boolean {
  const plain = plainWords(reader, reader.at);
  if (plain === null || plain.words.length === 0) return false;
  const known = plain.words.every((word) => /^(\d+|\*)$/.test(word) || isLine(word) || isPoint(reader, word));
  if (known && allowed.includes(slotsOf(reader, plain.words))) return false;
  const separated: string[] = [];
  for (const word of plain.words) {
    const parts = separate(reader, word);
    if (parts === null) return false;
    separated.push(...parts);
  }
  if (separated.length === plain.words.length || !allowed.includes(slotsOf(reader, separated))) return false;
  const inside: Span = [reader.start, reader.tokens.start(plain.end)];
  reader.at = plain.end + 1;
  reader.faults.add("run-together", reader.from(start), "The labels of this bracket are written without spaces.", {
    help: "Separate labels and loop words with spaces.",
    suggestion: { span: inside, replacement: separated.join(" ") },
  });
  return true;
}

const closers: Readonly<Record<string, ">" | "]" | ")">> = { "<": ">", "[": "]", "(": ")" };

/** Takes the closing bracket; another kind, or none, is reported. True where all is well. */
function close(reader: Reader, start: number, opener: "<" | "[" | "("): boolean {
  const wanted = closers[opener]!;
  if (reader.take(wanted)) return true;
  if (reader.is(">") || reader.is("]") || (reader.is(")") && opener === "(")) {
    const found = reader.span;
    reader.next();
    reader.faults.add(
      "mixed-bracket",
      reader.from(start),
      `This bracket is opened with ${opener} and closed with ${reader.tokens.text(reader.at - 1)}.`,
      {
        suggestion: { span: found, replacement: wanted },
      },
    );
    return false;
  }
  const from = reader.at;
  const stray = reader.described;
  const place = reader.span;
  while (!endsSearch(reader)) reader.next();
  if (reader.is(wanted)) {
    reader.next();
    reader.faults.add("expected-item", place, `${stray} cannot stand here; a bracket holds labels, points and lines.`, {
      help: "Label arithmetic is written without spaces: i+1.",
    });
    return false;
  }
  reader.at = from;
  reader.faults.add("unclosed", reader.from(start), `This bracket is not closed: ${wanted} is missing.`, {
    suggestion: { span: [reader.end, reader.end], replacement: wanted },
  });
  return false;
}

const endsSearch = (reader: Reader): boolean =>
  reader.is(">") ||
  reader.is("]") ||
  reader.is(")") ||
  reader.is("<") ||
  reader.is("[") ||
  reader.is("(") ||
  reader.is(";") ||
  reader.is("/") ||
  reader.is("^") ||
  reader.is("end") ||
  reader.isName("let");

/** Points without a Grassmann part cannot stand in an R-invariant. */
function checkGrassmann(reader: Reader, items: readonly Sized<Item>[], what: string): void {
  for (const { item, grassmann } of items) {
    if (grassmann !== "none") continue;
    const source = reader.tokens.source.slice(...item.span);
    const message =
      item.kind === "referenceLine" || source.length > 60
        ? `${source.length > 60 ? "This line" : source} has no Grassmann part and cannot stand in ${what}.`
        : `${source} has no Grassmann part and cannot stand in ${what}.`;
    reader.faults.add("no-grassmann-part", item.span, message, {
      help: "A line from two planes and X have no chosen points; use points such as (1 2) cap (3 4 5).",
    });
  }
}

function reportSlots(reader: Reader, span: Span, slots: number, wanted: string): void {
  reader.faults.add("slot-count", span, `${wanted}; this one has ${slots === 0 ? "none" : slots}.`, {
    help: "A label or point fills one slot, a line such as AB two.",
  });
}

/** Reads a bracket from its "<" or "[" on. */
export function readBracket(reader: Reader): Expression {
  if (isString(reader)) return readString(reader);
  return reader.is("<") ? readAngle(reader) : readFive(reader);
}

function readAngle(reader: Reader): Expression {
  const start = reader.start;
  reader.next();
  if (passRunTogether(reader, start, [2, 4])) return placeholder(reader.from(start));
  const items = readItems(reader);
  const whole = close(reader, start, "<");
  const span = reader.from(start);
  const slots = items.reduce((sum, item) => sum + item.slots, 0);
  if (whole && slots !== 2 && slots !== 4) reportSlots(reader, span, slots, "An angle bracket has two or four slots");
  return { kind: slots === 2 ? "angle" : "four", items: items.map(({ item }) => item), span };
}

function readFive(reader: Reader): Expression {
  const start = reader.start;
  if (holdsTwo(reader)) return readSquare(reader);
  reader.next();
  if (passRunTogether(reader, start, [2, 5])) return placeholder(reader.from(start));
  const items = readItems(reader);
  const whole = close(reader, start, "[");
  const span = reader.from(start);
  const slots = items.reduce((sum, item) => sum + item.slots, 0);
  if (whole && slots === 2) {
    reader.faults.add("square-item", span, "A square bracket of two entries holds external legs only.", {
      help: "Write labels such as [1 2] or [i i+1].",
    });
  } else if (whole && slots !== 5)
    reportSlots(reader, span, slots, "A square bracket has two slots, an R-invariant five");
  else checkGrassmann(reader, items, "an R-invariant");
  return { kind: "five", items: items.map(({ item }) => item), span };
}

/** Whether the square bracket ahead holds two labels or `*`, each possibly with label arithmetic. */
function holdsTwo(reader: Reader): boolean {
  let at = reader.at + 1;
  const kind = (): string => reader.tokens.kind(at);
  const isLabel = (): boolean => kind() === "integer" || (kind() === "name" && reader.isIndex(reader.tokens.text(at)));
  for (let side = 0; side < 2; side += 1) {
    if (kind() === "*") at += 1;
    else if (isLabel()) {
      at += 1;
      const glued = (): boolean => reader.tokens.end(at - 1) === reader.tokens.start(at);
      while ((kind() === "+" || kind() === "-" || kind() === "*") && glued()) {
        at += 1;
        if (!isLabel() || !glued()) return false;
        at += 1;
      }
    } else return false;
    if (side === 0 && kind() === ",") at += 1;
  }
  return kind() === "]";
}

/** Reads `delta(a b c d e)` from its name on. */
export function readDelta(reader: Reader): Expression {
  const start = reader.start;
  reader.next();
  reader.next();
  if (passRunTogether(reader, start, [5])) return placeholder(reader.from(start));
  const items = readItems(reader);
  const whole = close(reader, start, "(");
  const span = reader.from(start);
  const slots = items.reduce((sum, item) => sum + item.slots, 0);
  if (whole && slots !== 5) reportSlots(reader, span, slots, "delta has five slots");
  else checkGrassmann(reader, items, "delta");
  return { kind: "delta", items: items.map(({ item }) => item), span };
}

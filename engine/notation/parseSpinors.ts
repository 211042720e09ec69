/** Reads spinor strings, square brackets, sums of momenta and squared distances. */
import type { Span } from "../result";
import { readLabel, startsLabel } from "./parseIndex";
import { loopLetters, loopWords, type Reader } from "./reader";
import type { DualPoint, Expression, IndexExpression, LoopNumber, Momentum, SpinorEnd } from "./tree";

const one = (span: Span): IndexExpression => ({ terms: [], constant: "1", span });

/** Whether the bracket that the current "<" or "[" opens is a spinor string: a "|" comes before it ends. */
export function isString(reader: Reader): boolean {
  for (let at = reader.at + 1; ; at += 1) {
    const kind = reader.tokens.kind(at);
    if (kind === "|") return true;
    if (kind === "<" || kind === "[" || kind === ">" || kind === "]" || kind === "(" || kind === ";" || kind === "end")
      return false;
  }
}

/** Reads an end of a string: a label, or `*` at a square end. */
function readEnd(reader: Reader, side: "angle" | "square" | null): SpinorEnd {
  const { span } = reader;
  if (reader.is("*")) {
    reader.next();
    if (side === "angle") {
      reader.faults.add("string-end", span, "A reference stands only at a square end of a string.", {
        help: "The * is a reference lambdatilde here.",
      });
    }
    return { kind: "referenceTwistor", span };
  }
  if (startsLabel(reader)) {
    const { index } = readLabel(reader);
    return { kind: "label", index, span: index.span };
  }
  if (reader.is("name")) reportLegs(reader);
  else {
    reader.faults.add(
      "string-end",
      span,
      `A spinor string begins and ends with a label, not with ${reader.described}.`,
    );
    if (!reader.is("|") && !reader.is(">") && !reader.is("]") && !reader.is(";") && !reader.is("end")) reader.next();
  }
  return { kind: "label", index: one(span), span };
}

/** Reports a name that is no external leg where only legs can stand, and passes it. */
function reportLegs(reader: Reader): void {
  const { span, text } = reader;
  reader.next();
  const isPoint = loopWords.includes(text) || (text.length === 1 && `${loopLetters}X`.includes(text));
  if (isPoint || reader.definition(text) !== null) {
    reader.faults.add(
      "square-item",
      span,
      `${text} has no spinors of its own here; only external legs can stand in this place.`,
      { help: "Write a label such as 3, i or n-1." },
    );
  } else reader.reportUnknown(text, span);
  if (reader.is("(") && reader.isGlued()) reader.skipGroup();
}

/** Reads a momentum of a middle entry: a number, an index or a range of these. */
function readPlainMomentum(reader: Reader): Momentum | null {
  const start = reader.start;
  const readName = (): IndexExpression | null => {
    if (!startsLabel(reader)) return null;
    const { span, text } = reader;
    const index: IndexExpression = reader.is("integer")
      ? { terms: [], constant: String(BigInt(text)), span }
      : { terms: [{ name: text, factor: "1" }], constant: "0", span };
    reader.next();
    return index;
  };
  const from = readName();
  if (from === null) return null;
  if (!reader.is("..")) return { kind: "single", index: from, span: from.span };
  reader.next();
  const to = readName();
  if (to === null) {
    reader.faults.add("open-range", reader.from(start), "This range of momenta has no end.", {
      help: "Write both ends: 2..4.",
    });
    return { kind: "single", index: from, span: from.span };
  }
  return { kind: "range", from, to, span: reader.from(start) };
}

/** Reads the entry between two bars of a string. */
function readEntry(reader: Reader): Momentum[] {
  const start = reader.start;
  const momenta: Momentum[] = [];
  const ends = (): boolean =>
    reader.is("|") ||
    reader.is(">") ||
    reader.is("]") ||
    reader.is(";") ||
    reader.is("end") ||
    reader.is("<") ||
    reader.is("[");
  for (;;) {
    const momentum = readPlainMomentum(reader);
    if (momentum !== null) {
      momenta.push(momentum);
      if (reader.take("+")) continue;
      if (ends()) return momenta;
    }
    const place = reader.span;
    while (!ends()) reader.next();
    const span = reader.from(start);
    if (momenta.length === 0 && span[0] === span[1]) {
      reader.faults.add("string-entry", [place[0] - 1, place[1]], "There is no momentum between these bars.", {
        help: "Write momenta joined by +, such as <1|2+3|4].",
      });
    } else {
      reader.faults.add(
        "string-entry",
        span,
        "The middle of a spinor string is a sum of momenta, without other arithmetic.",
        {
          help: "Join numbers, index names and ranges with +: <1|2+3..5|6].",
        },
      );
    }
    return momenta.length === 0 ? [{ kind: "single", index: one(span), span }] : momenta;
  }
}

/** Reads a spinor string, from its opening bracket on. */
export function readString(reader: Reader): Expression {
  const start = reader.start;
  const left = reader.is("<") ? "angle" : "square";
  reader.next();
  const first = readEnd(reader, left);
  const middle: (readonly Momentum[])[] = [];
  const skip = (): void => {
    while (!reader.is("|") && !reader.is(">") && !reader.is("]") && !reader.is(";") && !reader.is("end")) reader.next();
  };
  if (!reader.is("|")) {
    reader.faults.add("string-end", reader.span, `After the first end of a string comes "|", not ${reader.described}.`);
    skip();
  }
  let last: SpinorEnd | null = null;
  while (last === null && reader.take("|")) {
    if (isLastPart(reader)) last = readEnd(reader, closing(reader));
    else middle.push(readEntry(reader));
  }
  const right = reader.is(">") ? "angle" : "square";
  const closed = reader.take(">") || reader.take("]");
  const span = reader.from(start);
  if (!closed || last === null) {
    reader.faults.add("unclosed", span, "This spinor string is not closed.", {
      help: "It ends with a label and > or ], as in <1|2+3|4].",
    });
  } else if (middle.length === 0) {
    reader.faults.add("string-entry", span, "A spinor string has momenta between its ends.", {
      help: "Without any it is a bracket: <1 2> or [1 2].",
    });
  } else if ((middle.length % 2 === 1) === (left === right)) {
    const wanted = right === "angle" ? "]" : ">";
    const entries = middle.length === 1 ? "one middle entry" : `${middle.length} middle entries`;
    reader.faults.add(
      "string-parity",
      span,
      `A string with ${entries} that begins with ${left === "angle" ? "<" : "["} ends with ${wanted}.`,
      {
        suggestion: { span: [span[1] - 1, span[1]], replacement: wanted },
      },
    );
  }
  return { kind: "string", left, right, first, last: last ?? { kind: "label", index: one(span), span }, middle, span };
}

/** Whether no further bar comes before the string closes. */
function isLastPart(reader: Reader): boolean {
  for (let at = reader.at; ; at += 1) {
    const kind = reader.tokens.kind(at);
    if (kind === "|") return false;
    if (kind === ">" || kind === "]" || kind === "<" || kind === "[" || kind === ";" || kind === "end") return true;
  }
}

/** The bracket that closes the string, seen from its last end. */
function closing(reader: Reader): "angle" | "square" | null {
  for (let at = reader.at; ; at += 1) {
    const kind = reader.tokens.kind(at);
    if (kind === ">") return "angle";
    if (kind === "]") return "square";
    if (kind === "<" || kind === "[" || kind === ";" || kind === "end") return null;
  }
}

/** Reads a square bracket of two legs, whose "[" has been found to hold two items. */
export function readSquare(reader: Reader): Expression {
  const start = reader.start;
  reader.next();
  const readSide = (): SpinorEnd => {
    const side = readEnd(reader, "square");
    reader.take(",");
    return side;
  };
  const left = readSide();
  const right = readSide();
  if (!reader.take("]"))
    reader.faults.add(
      "slot-count",
      reader.from(start),
      "A square bracket holds two legs or the five entries of an R-invariant.",
    );
  return { kind: "square", left, right, span: reader.from(start) };
}

/** Reads one end of a range or a single momentum of `s( )`, with label arithmetic. */
function readMomentum(reader: Reader): Momentum {
  const start = reader.start;
  const { index, numbers } = readLabel(reader);
  if (numbers) {
    reader.faults.add(
      "label-arithmetic",
      index.span,
      "In s( ) momenta are separated by spaces; + between numbers would add labels.",
      {
        help: "s(1 2 3) is the square of p_1+p_2+p_3.",
        replacement: reader.tokens.source.slice(...index.span).replace(/\s*\+\s*/g, " "),
      },
    );
  }
  if (!reader.is("..")) return { kind: "single", index, span: index.span };
  reader.next();
  if (!startsLabel(reader)) {
    reader.faults.add("open-range", reader.from(start), "This range of momenta has no end.", {
      help: "Write both ends: s(1..3).",
    });
    return { kind: "single", index, span: index.span };
  }
  const to = readLabel(reader).index;
  return { kind: "range", from: index, to, span: reader.from(start) };
}

/** Reads `s(1 2 3)` from its name on. */
export function readMandelstam(reader: Reader): Expression {
  const start = reader.start;
  reader.next();
  reader.next();
  const momenta: Momentum[] = [];
  const from = reader.at;
  while (!reader.is(")") && !reader.is(";") && !reader.is("end")) {
    if (startsLabel(reader)) momenta.push(readMomentum(reader));
    else if (reader.is(",") && momenta.length > 0) reader.next();
    else if (reader.is("name")) reportLegs(reader);
    else {
      const what = reader.is("..")
        ? "This range of momenta has no beginning."
        : `s( ) holds labels and ranges, not ${reader.described}.`;
      reader.faults.add(reader.is("..") ? "open-range" : "expected-item", reader.span, what, {
        help: "Write s(1 2 3) or s(i..j-1).",
      });
      reader.next();
    }
  }
  const closed = reader.take(")");
  const span = reader.from(start);
  if (!closed) reader.faults.add("unclosed", span, "The parenthesis of s( ) is not closed.");
  else if (reader.at === from + 1)
    reader.faults.add("expected-item", span, "s( ) needs at least one momentum.", {
      help: "Write s(1 2 3) or s(i..j-1).",
    });
  return { kind: "mandelstam", momenta, span };
}

/** Reads `x2(i j)`, `x2(i AB)` or `x2(AB CD)` from its name on. */
export function readDistance(reader: Reader): Expression {
  const start = reader.start;
  reader.next();
  reader.next();
  const points: DualPoint[] = [];
  while (!reader.is(")") && !reader.is(";") && !reader.is("end")) {
    const { span, text } = reader;
    const line = reader.is("name") ? loopWords.indexOf(text) : -1;
    if (line >= 0) {
      reader.next();
      reader.lineInDistance ??= span;
      points.push({ kind: "loopLine", loop: line as LoopNumber, span });
    } else if (startsLabel(reader)) {
      const { index } = readLabel(reader);
      points.push({ kind: "label", index, span: index.span });
    } else if (reader.is(",") && points.length > 0) reader.next();
    else {
      if (
        reader.is("name") &&
        reader.definition(text) === null &&
        !(text.length === 1 && `${loopLetters}X`.includes(text))
      ) {
        reader.reportUnknown(text, span);
      } else {
        reader.faults.add(
          "distance-points",
          span,
          `A dual point is a label or a loop line such as AB, not ${reader.described}.`,
        );
      }
      points.push({ kind: "label", index: one(span), span });
      reader.next();
    }
  }
  const closed = reader.take(")");
  const span = reader.from(start);
  if (!closed) reader.faults.add("unclosed", span, "The parenthesis of x2( ) is not closed.");
  else if (points.length !== 2) {
    reader.faults.add(
      "distance-points",
      span,
      `x2( ) takes two dual points, and ${points.length === 0 ? "none" : points.length} ${points.length === 1 ? "is" : "are"} given.`,
      { help: "Write x2(i j), x2(i AB) or x2(AB CD)." },
    );
  }
  const missing: DualPoint = { kind: "label", index: one(span), span };
  return { kind: "distance", left: points[0] ?? missing, right: points[1] ?? missing, span };
}

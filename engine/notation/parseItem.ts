/** Reads what stands in brackets: labels, loop points and lines, references, meets, named points, lines and planes. */
import type { Span } from "../result";
import { readArguments, readLabel, startsLabel } from "./parseIndex";
import { type GrassmannPart, type Known, loopLetters, loopWords, type Reader } from "./reader";
import type { IndexExpression, Item, LoopLetter, LoopNumber, MeetItem, NamedItem, Operand } from "./tree";

/** An item with its size in slots and its Grassmann part. */
export interface Sized<T> {
  readonly item: T;
  readonly slots: number;
  readonly grassmann: GrassmannPart;
}

const slotsOf: Readonly<Record<Known["kind"], number>> = { scalar: 1, point: 1, line: 2, plane: 3 };

const isCap = (reader: Reader): boolean => reader.isName("cap");

/** Whether an item, or a meet's operand, can begin with the current token. */
export const startsItem = (reader: Reader): boolean =>
  reader.is("integer") || reader.is("name") || reader.is("*") || reader.is("(");

/** A label that stands in for something that could not be read. */
const placeholder = (span: Span): Sized<Item> => ({
  item: { kind: "label", index: { terms: [], constant: "1", span }, span },
  slots: 1,
  grassmann: "full",
});

/**
 * Reads one item, a meet as a whole. Only to be called where `startsItem` holds.
 * A plane is returned where `planes` allows it (alone in the parentheses of a meet's operand), else reported.
 */
export function readItem(reader: Reader, planes = false): Sized<Item> {
  const start = reader.start;
  if (reader.is("(") || reader.isName("bar")) return readMeetOrFault(reader, start);
  if (reader.is("*")) {
    reader.next();
    return { item: { kind: "referenceTwistor", span: reader.from(start) }, slots: 1, grassmann: "full" };
  }
  if (startsLabel(reader)) {
    const { index } = readLabel(reader);
    if (isCap(reader))
      return continueMeet(
        reader,
        groupOf({ item: { kind: "label", index, span: index.span }, slots: 1, grassmann: "full" }),
        start,
      );
    return { item: { kind: "label", index, span: index.span }, slots: 1, grassmann: "full" };
  }
  const item = readWord(reader);
  if (isCap(reader)) return continueMeet(reader, groupOf(item), start);
  if (item.slots === 3 && !planes) {
    reader.faults.add("plane-outside-cap", item.item.span, "A plane stands only beside cap.", {
      help: "Write its meet with a line or another plane: (1 2) cap P.",
    });
  }
  return item;
}

/** A bare loop word, letter, X or name of a definition; other names are reported. */
function readWord(reader: Reader): Sized<Item> {
  const { span, text } = reader;
  const line = loopWords.indexOf(text);
  if (line >= 0) {
    reader.next();
    reader.lineInBracket ??= span;
    return { item: { kind: "loopLine", loop: line as LoopNumber, span }, slots: 2, grassmann: "loop" };
  }
  if (text.length === 1 && loopLetters.includes(text)) {
    reader.next();
    reader.lineInBracket ??= span;
    return { item: { kind: "loopPoint", letter: text as LoopLetter, span }, slots: 1, grassmann: "loop" };
  }
  if (text === "X") {
    reader.next();
    return { item: { kind: "referenceLine", span }, slots: 2, grassmann: "none" };
  }
  return readNamed(reader);
}

function readNamed(reader: Reader): Sized<Item> {
  const { span, text: name } = reader;
  const definition = reader.definition(name);
  reader.next();
  if (definition === null) {
    if (name === "cap") {
      reader.faults.add("cap-operand", span, "There is nothing before this cap.", {
        help: "A meet is written (a b) cap (c d e).",
      });
      if (reader.is("(")) reader.skipGroup();
    } else if (
      name === "let" ||
      name === "sum" ||
      name === "prod" ||
      name === "cyc" ||
      name === "sym" ||
      name === "delta"
    ) {
      reader.faults.add("expected-item", span, `${name} cannot stand inside a bracket.`);
    } else {
      reader.reportUnknown(name, span);
      if (reader.is("(") && reader.isGlued()) reader.skipGroup();
    }
    return placeholder(span);
  }
  const values = readCallArguments(reader, name, definition, span);
  const whole = reader.from(span[0]);
  if (definition.kind === "scalar") {
    reader.faults.add("not-a-point", whole, `${name} is defined as a number, not as a point, line or plane.`, {
      help: `A point is defined with parentheses: let ${name} = (3);`,
    });
    return placeholder(whole);
  }
  const item: NamedItem = { kind: "named", name, arguments: values, span: whole };
  return { item, slots: slotsOf[definition.kind], grassmann: definition.grassmann };
}

/** The arguments after a definition's name; a wrong number is reported and mended with ones. */
export function readCallArguments(reader: Reader, name: string, definition: Known, span: Span): IndexExpression[] {
  const wanted = definition.parameters.length;
  const values = wanted > 0 && reader.is("(") ? readArguments(reader) : [];
  if (values.length !== wanted) {
    const given = values.length === 0 ? "none" : String(values.length);
    reader.faults.add(
      "argument-count",
      reader.from(span[0]),
      `${name} takes ${wanted} argument${wanted === 1 ? "" : "s"}, and ${given} ${values.length === 1 ? "is" : "are"} given.`,
      {
        help: `It is used as ${name}(${definition.parameters.join(", ")}).`,
      },
    );
  }
  return definition.parameters.map((_, at) => values[at] ?? { terms: [], constant: "1", span });
}

/** An item as an operand of a meet: one in parentheses and one without are the same. */
function groupOf(sized: Sized<Item>): Sized<Operand> {
  return { ...sized, item: { kind: "group", items: [sized.item], span: sized.item.span } };
}

/** Reads `(items)`, a line or plane. */
export function readGroup(reader: Reader): Sized<Extract<Operand, { kind: "group" }>> {
  const start = reader.start;
  reader.next();
  const items: Sized<Item>[] = reader.nested(() => readItems(reader, true));
  if (!reader.take(")")) {
    reader.faults.add(
      "unclosed",
      [start, start + 1],
      `This parenthesis is not closed; ${reader.described} comes first.`,
    );
  }
  return {
    item: { kind: "group", items: items.map(({ item }) => item), span: reader.from(start) },
    slots: items.reduce((sum, { slots }) => sum + slots, 0),
    grassmann: joinGrassmann(items),
  };
}

function joinGrassmann(items: readonly Sized<Item>[]): GrassmannPart {
  if (items.some(({ grassmann }) => grassmann === "none")) return "none";
  return items.length > 0 && items.every(({ grassmann }) => grassmann === "loop") ? "loop" : "full";
}

/** Reads items, separated by spaces or single commas, as long as there are any. */
export function readItems(reader: Reader, planes = false): Sized<Item>[] {
  const items: Sized<Item>[] = [];
  for (;;) {
    if (startsItem(reader)) {
      if (items.length > 0 && reader.isGlued() && (reader.is("integer") || reader.is("name")) && isWordBefore(reader)) {
        reader.faults.add("run-together", reader.span, `${reader.described} follows without a space.`, {
          help: "Separate items with spaces.",
          suggestion: { span: [reader.start, reader.start], replacement: " " },
        });
      }
      items.push(readItem(reader, planes));
    } else if (reader.is(",") && items.length > 0) {
      reader.next();
      if (!startsItem(reader)) {
        reader.faults.add(
          "expected-item",
          [reader.end - 1, reader.end],
          "A label, point or line is expected after this comma.",
        );
      }
    } else return items;
  }
}

const isWordBefore = (reader: Reader): boolean => reader.is("integer", -1) || reader.is("name", -1);

function readOperand(reader: Reader): Sized<Operand> | null {
  const start = reader.start;
  if (reader.is("(")) {
    const group = readGroup(reader);
    if (group.slots !== 2 && group.slots !== 3) {
      reader.faults.add(
        "group-size",
        group.item.span,
        `A line has two slots and a plane three; this has ${group.slots}.`,
      );
    }
    return group;
  }
  if (reader.isName("bar")) return readBar(reader);
  if (reader.is("name") && !startsLabel(reader) && !isCap(reader)) return groupOf(readWord(reader));
  reader.faults.add(
    "cap-operand",
    [start, Math.max(start + 1, reader.span[1])],
    `After cap comes a line or plane, not ${reader.described}.`,
    {
      help: "Each side of cap is a line or plane in parentheses, bar(i), a loop line such as AB, or a name for one.",
    },
  );
  if (startsLabel(reader)) readLabel(reader);
  return null;
}

function readBar(reader: Reader): Sized<Operand> {
  const start = reader.start;
  reader.next();
  if (!reader.is("(")) {
    reader.faults.add("missing-parenthesis", reader.from(start), "bar is followed by a label in parentheses: bar(i).");
    return {
      item: { kind: "bar", index: { terms: [], constant: "1", span: reader.from(start) }, span: reader.from(start) },
      slots: 3,
      grassmann: "full",
    };
  }
  const values = readArguments(reader);
  const span = reader.from(start);
  if (values.length !== 1)
    reader.faults.add("argument-count", span, "bar takes one label: bar(i) is the plane (i-1 i i+1).");
  const index = values[0] ?? { terms: [], constant: "1", span };
  return { item: { kind: "bar", index, span }, slots: 3, grassmann: "full" };
}

/** Reads a meet that begins with a parenthesis or bar; a group or bar that no cap follows is reported. */
function readMeetOrFault(reader: Reader, start: number): Sized<Item> {
  const left = reader.isName("bar") ? readBar(reader) : readGroup(reader);
  if (isCap(reader)) {
    if (left.slots !== 2 && left.slots !== 3) {
      reader.faults.add(
        "group-size",
        left.item.span,
        `A line has two slots and a plane three; this has ${left.slots}.`,
      );
    }
    return continueMeet(reader, left, start);
  }
  if (left.item.kind === "bar") {
    const label = reader.tokens.source.slice(...left.item.index.span);
    reader.faults.add("plane-outside-cap", left.item.span, "The plane bar(i) stands only beside cap.", {
      help: `Write its meet with a line or another plane: (1 2) cap bar(${label}).`,
    });
  } else {
    reader.faults.add("loose-group", left.item.span, "A line or plane in parentheses stands only beside cap.", {
      help: "Leave the parentheses out, or write what it meets: (a b) cap (c d e).",
    });
  }
  return placeholder(left.item.span);
}

/** Reads `cap` and the right operand. */
function continueMeet(reader: Reader, left: Sized<Operand>, start: number): Sized<Item> {
  reader.next();
  const right = readOperand(reader);
  const span = reader.from(start);
  if (isCap(reader)) {
    const second = reader.start;
    while (isCap(reader)) {
      reader.next();
      readOperand(reader);
    }
    reader.faults.add("cap-chain", reader.from(second), "A meet has two sides; a chain of them needs parentheses.", {
      help: "Write ((a b) cap (c d e) f) cap (g h i), say.",
    });
    return placeholder(reader.from(start));
  }
  if (right === null) return placeholder(span);
  const meet: MeetItem = { kind: "meet", left: left.item, right: right.item, span };
  if (left.slots === 3 && right.slots === 3) return { item: meet, slots: 2, grassmann: "none" };
  const [line, plane] = left.slots === 2 ? [left, right] : [right, left];
  if (line.slots === 2 && plane.slots === 3) {
    // The Grassmann part comes from the points of the line, and where it is a loop line from those of the plane.
    const source = line.grassmann === "loop" ? plane : line;
    return { item: meet, slots: 1, grassmann: source.grassmann };
  }
  const named = (slots: number): string => (slots === 1 ? "a point" : slots === 2 ? "a line" : "a plane");
  // A parenthesis of another size has been reported already.
  const isSized = ({ item, slots }: Sized<Operand>): boolean =>
    slots === 2 || slots === 3 || reader.tokens.source[item.span[0]] !== "(";
  if (isSized(left) && isSized(right)) {
    reader.faults.add(
      "cap-kinds",
      span,
      `A meet is of a line and a plane or of two planes; here are ${named(left.slots)} and ${named(right.slots)}.`,
      {
        help: "A line has two slots, a plane three.",
      },
    );
  }
  return placeholder(span);
}

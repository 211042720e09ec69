/** Reads `let name(i, j) = value;`. */
import type { Span } from "../result";
import { readExpression } from "./parseExpression";
import { readGroup, readItem } from "./parseItem";
import { isReserved, type Known, type Reader } from "./reader";
import type { Definition, DefinitionValue, Operand } from "./tree";

/** Reads a definition from `let` on, and makes its name known. Null where nothing could be made of it. */
export function readDefinition(reader: Reader): Definition | null {
  const start = reader.start;
  reader.next();
  const name = readDefinedName(reader);
  const parameters = name === null ? [] : readParameters(reader);
  if (name === null || !reader.is("=")) {
    if (name !== null)
      reader.faults.add(
        "expected-expression",
        reader.span,
        `After let ${name} comes = and its value, not ${reader.described}.`,
      );
    skipDefinition(reader);
    return null;
  }
  reader.next();
  const outer = reader.defining;
  reader.defining = name.text;
  const value = reader.within(parameters, () => readValue(reader));
  reader.defining = outer;
  if (reader.take(";")) {
    // The definition is complete.
  } else if (reader.isName("let") || reader.is("end")) {
    reader.faults.add(
      "missing-semicolon",
      [Math.max(0, reader.end - 1), reader.end],
      `The definition of ${name.text} does not end with a semicolon.`,
      {
        help: "Write a semicolon after the value.",
        suggestion: { span: [reader.end, reader.end], replacement: ";" },
      },
    );
  } else {
    reader.faults.add(
      "missing-semicolon",
      reader.span,
      `The definition of ${name.text} goes on with ${reader.described} where a semicolon is expected.`,
      { help: "A definition is let name = value;" },
    );
    skipDefinition(reader);
  }
  const span = reader.from(start);
  if (!name.usable) return null;
  if (reader.known.has(name.text)) {
    reader.faults.add("redefined", name.span, `${name.text} is defined twice.`, {
      help: "Use another name for the second.",
    });
    return null;
  }
  reader.known.set(name.text, { ...value.known, parameters, span });
  return { name: name.text, parameters, value: value.value, span };
}

function readDefinedName(reader: Reader): { text: string; span: Span; usable: boolean } | null {
  const { span, text } = reader;
  if (!reader.is("name") || text === "let") {
    reader.faults.add("expected-name", span, `After let comes a name, not ${reader.described}.`, {
      help: "Write let name = value; or let name(i, j) = value;",
    });
    return null;
  }
  reader.next();
  if (isReserved(text)) {
    reader.faults.add("reserved-name", span, `${text} has a fixed meaning and cannot be defined.`, {
      help: "Choose another name.",
    });
    return { text, span, usable: false };
  }
  if ((text === "s" || text === "x2") && reader.is("(")) {
    reader.faults.add(
      "reserved-name",
      span,
      `${text} before a parenthesis has a fixed meaning and cannot be defined.`,
      { help: "Choose another name." },
    );
    return { text, span, usable: false };
  }
  return { text, span, usable: true };
}

function readParameters(reader: Reader): string[] {
  const parameters: string[] = [];
  if (!reader.is("(")) return parameters;
  const open = reader.span;
  reader.next();
  if (reader.is(")"))
    reader.faults.add(
      "expected-name",
      [open[0], reader.span[1]],
      "A definition without parameters is written without parentheses.",
      { replacement: "" },
    );
  while (reader.is("name")) {
    const { span, text } = reader;
    reader.next();
    if (isReserved(text))
      reader.faults.add("reserved-name", span, `${text} cannot be the name of a parameter.`, {
        help: "Parameters are names such as i, j, k.",
      });
    else if (parameters.includes(text))
      reader.faults.add("duplicate-index", span, `The parameter ${text} is listed twice.`);
    else parameters.push(text);
    if (!reader.take(",")) break;
  }
  if (!reader.take(")")) {
    reader.faults.add(
      "expected-name",
      reader.span,
      `The parameters of a definition are names, separated by commas, not ${reader.described}.`,
    );
    while (!reader.is(")") && !reader.is("=") && !reader.is(";") && !reader.is("end")) reader.next();
    reader.take(")");
  }
  return parameters;
}

/** Passes the rest of a definition that could not be read. */
function skipDefinition(reader: Reader): void {
  while (!reader.is(";") && !reader.is("end") && !reader.isName("let")) reader.next();
  reader.take(";");
}

type Value = { readonly value: DefinitionValue; readonly known: Pick<Known, "kind" | "grassmann"> };

const kindOf = (slots: number): Known["kind"] => (slots === 1 ? "point" : slots === 2 ? "line" : "plane");

function readValue(reader: Reader): Value {
  const shape = shapeAhead(reader);
  if (shape === "meet") {
    const { item, slots, grassmann } = readItem(reader);
    if (item.kind === "meet") {
      return {
        value: { kind: "geometry", geometry: item },
        known: { kind: kindOf(slots), grassmann },
      };
    }
    const geometry: Operand & { kind: "group" } = { kind: "group", items: [item], span: item.span };
    return { value: { kind: "geometry", geometry }, known: { kind: kindOf(slots), grassmann } };
  }
  if (shape === "group") {
    const { item, slots, grassmann } = readGroup(reader);
    if (slots < 1 || slots > 3) {
      reader.faults.add(
        "group-size",
        item.span,
        `A point has one slot, a line two and a plane three; this has ${slots}.`,
      );
    }
    return {
      value: { kind: "geometry", geometry: item },
      known: { kind: kindOf(Math.min(3, Math.max(1, slots))), grassmann },
    };
  }
  return {
    value: { kind: "scalar", expression: readExpression(reader) },
    known: { kind: "scalar", grassmann: "full" },
  };
}

/**
 * Tells from the tokens ahead what the value is: a meet (cap stands outside all brackets), a group of items in one pair of parentheses,
 * or an expression.
 */
function shapeAhead(reader: Reader): "meet" | "group" | "expression" {
  let depth = 0;
  let holdsCap = false;
  let nested = false;
  let onlyItems = reader.is("(");
  let closedAt = -1;
  let at = reader.at;
  for (; ; at += 1) {
    const kind = reader.tokens.kind(at);
    if (kind === "end" || kind === ";") break;
    const text = kind === "name" ? reader.tokens.text(at) : "";
    if (text === "let") break;
    if (text === "cap") {
      if (depth === 0) return "meet";
      holdsCap = true;
    }
    if (kind === "(" || kind === "<" || kind === "[") {
      depth += 1;
      if (depth > 1 && !isCallAt(reader, at)) nested = true;
    } else if (kind === ")" || kind === ">" || kind === "]") {
      depth -= 1;
      if (depth === 0 && closedAt < 0) closedAt = at;
    }
    onlyItems &&= isItemToken(reader, at, text);
  }
  const isWhole = closedAt === at - 1 && closedAt > reader.at + 1 && !reader.is("-", 1) && !reader.is("+", 1);
  return onlyItems && isWhole && (!nested || holdsCap) ? "group" : "expression";
}

/** Whether the "(" at `at` holds the arguments of a definition or of bar. */
function isCallAt(reader: Reader, at: number): boolean {
  if (reader.tokens.kind(at) !== "(" || reader.tokens.kind(at - 1) !== "name") return false;
  const before = reader.tokens.text(at - 1);
  return before === "bar" || (reader.definition(before)?.parameters.length ?? 0) > 0;
}

function isItemToken(reader: Reader, at: number, name: string): boolean {
  const kind = reader.tokens.kind(at);
  if (kind !== "name") {
    return (
      kind === "integer" || kind === "(" || kind === ")" || kind === "," || kind === "+" || kind === "-" || kind === "*"
    );
  }
  if (name === "sum" || name === "prod" || name === "cyc" || name === "sym" || name === "delta") return false;
  if ((name === "s" || name === "x2") && reader.tokens.kind(at + 1) === "(") return false;
  return reader.definition(name)?.kind !== "scalar";
}

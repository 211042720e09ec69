/** Reads the head of `sum(i, j : ...)` and `prod(i : ...)`: indices and conditions. */

import type { Span } from "../result";
import { bareName, unboundedIndices } from "./conditions";
import { mostIndices } from "./limits";
import { readIndex } from "./parseIndex";
import { isReserved, type Reader } from "./reader";
import type { Condition, IndexExpression, Quantified, Relation } from "./tree";

type Head = Pick<Quantified, "indices" | "conditions">;

/** Reads `(indices : conditions)`, the parentheses included, and checks that each index is bounded. */
export function readHead(reader: Reader, word: string): Head {
  const open = reader.span;
  if (!reader.take("(")) {
    reader.faults.add(
      "missing-parenthesis",
      reader.from(open[0] - word.length),
      `${word} is followed by its indices and their conditions in parentheses.`,
      { help: `Write ${word}(i : 1 <= i <= n).` },
    );
    return { indices: [], conditions: [] };
  }
  const { indices, spans } = readIndices(reader);
  if (!reader.take(":")) {
    reader.faults.add(
      "missing-conditions",
      [open[0], reader.span[1]],
      `After the indices of ${word} comes a colon and their conditions.`,
      { help: `Write ${word}(i : 1 <= i <= n).` },
    );
    while (!reader.is(")") && !reader.is(";") && !reader.is("end")) reader.next();
    reader.take(")");
    return { indices: [], conditions: [] };
  }
  const conditions = reader.within(indices, () => readConditions(reader, indices));
  const closed = reader.take(")");
  if (!closed) {
    reader.faults.add(
      "unclosed",
      open,
      `The parenthesis after ${word} is not closed; ${reader.described} comes first.`,
    );
    while (!reader.is(")") && !reader.is(";") && !reader.is("end")) reader.next();
    reader.take(")");
  } else reportUnbounded(reader, { indices, conditions }, spans);
  return { indices, conditions };
}

function readIndices(reader: Reader): { indices: string[]; spans: Span[] } {
  const indices: string[] = [];
  const spans: Span[] = [];
  while (reader.is("name") || reader.is("integer")) {
    const { span, text } = reader;
    if (reader.is("integer") || isReserved(text)) {
      reader.faults.add("reserved-name", span, `${text} cannot be the name of an index.`, {
        help: "Indices are names such as i, j, k.",
      });
    } else if (indices.includes(text)) reader.faults.add("duplicate-index", span, `The index ${text} is listed twice.`);
    else {
      indices.push(text);
      spans.push(span);
    }
    reader.next();
    if (!reader.take(",") && reader.is("name"))
      reader.faults.add("expected-name", reader.span, "Indices are separated by commas.", {
        suggestion: { span: [reader.start, reader.start], replacement: ", " },
      });
  }
  if (indices.length > mostIndices) {
    reader.faults.add(
      "limit-indices",
      [spans[0]![0], spans.at(-1)![1]],
      `A sum or product has at most ${mostIndices} indices; this one has ${indices.length}.`,
      { help: "Use a sum inside the sum." },
    );
    return { indices: indices.slice(0, mostIndices), spans };
  }
  if (indices.length === 0)
    reader.faults.add("expected-name", reader.span, `The name of an index is expected here, not ${reader.described}.`);
  return { indices, spans };
}

function readConditions(reader: Reader, indices: readonly string[]): Condition[] {
  const conditions: Condition[] = [];
  do {
    const condition = readChain(reader, indices);
    if (condition !== null) conditions.push(condition);
  } while (reader.take(","));
  return conditions;
}

/** The relation at the current token, past it; null where there is none. Reversed and doubled ones are reported. */
function readRelation(reader: Reader): Relation | null {
  const { span, kind } = reader;
  if (kind === "<" || kind === "<=" || kind === "=" || kind === "!=") {
    reader.next();
    if (reader.is("=") || reader.is(">") || reader.is("<")) {
      const whole: Span = [span[0], reader.span[1]];
      const replacement =
        kind === "=" && reader.is("=")
          ? "="
          : kind === "<" && reader.is("=")
            ? "<="
            : kind === "<" && reader.is(">")
              ? "!="
              : null;
      reader.next();
      reader.faults.add("relation", whole, "Relations are < <= = and !=.", replacement === null ? {} : { replacement });
    }
    return kind;
  }
  if (kind !== ">" && kind !== ">=") return null;
  reader.next();
  reader.faults.add("relation", span, `Conditions are written with < and <=, not with ${kind}.`, {
    help: "Turn the chain around: 1 < i instead of i > 1.",
  });
  return kind === ">" ? "<" : "<=";
}

function readChain(reader: Reader, indices: readonly string[]): Condition | null {
  const start = reader.start;
  const expressions: IndexExpression[] = [readIndex(reader)];
  const relations: Relation[] = [];
  for (let relation = readRelation(reader); relation !== null; relation = readRelation(reader)) {
    relations.push(relation);
    expressions.push(readIndex(reader));
  }
  const span = reader.from(start);
  if (relations.length === 0) {
    reader.faults.add("relation", span, "A condition compares index expressions.", {
      help: "Write a chain such as 1 < i < n.",
    });
    return null;
  }
  const condition: Condition = { expressions, relations, span };
  checkCycle(reader, condition, indices);
  return condition;
}

/** A chain that returns to its first index is a cyclic order of distinct indices, joined by < alone. */
function checkCycle(reader: Reader, { expressions, relations, span }: Condition, indices: readonly string[]): void {
  const first = bareName(expressions[0]);
  if (expressions.length < 3 || first === null || first === "n" || first !== bareName(expressions.at(-1))) return;
  const names = expressions.slice(0, -1).map(bareName);
  const distinct = new Set(names).size === names.length;
  if (
    distinct &&
    relations.every((relation) => relation === "<") &&
    names.every((name) => name !== null && indices.includes(name))
  )
    return;
  reader.faults.add(
    "cyclic-order",
    span,
    "A chain that returns to its first index is a cyclic order: distinct indices of this sum, joined by <.",
    { help: "Write i < j < k < i, and other conditions separately." },
  );
}

function reportUnbounded(reader: Reader, head: Head, spans: readonly Span[]): void {
  const open = unboundedIndices({ ...head, body: { kind: "integer", value: "1", span: [0, 0] }, span: [0, 0] });
  for (const { name, below, above } of open) {
    const missing = !below && !above ? "lower and no upper" : below ? "upper" : "lower";
    reader.faults.add(
      "unbounded-index",
      spans[head.indices.indexOf(name)],
      `The index ${name} has no ${missing} bound.`,
      { help: `Bound it on both sides: 1 <= ${name} <= n.` },
    );
  }
}

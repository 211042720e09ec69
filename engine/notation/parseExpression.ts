/** Reads expressions: sums, products, quotients, powers, and everything that stands for a number. */
import type { Span } from "../result";
import { constantValue } from "./constants";
import { deepestNesting, largestExponent, mostTerms } from "./limits";
import { readBracket, readDelta } from "./parseBracket";
import { readArguments } from "./parseIndex";
import { readCallArguments, startsItem } from "./parseItem";
import { readDistance, readMandelstam } from "./parseSpinors";
import { readHead } from "./parseSum";
import { isReserved, type Reader } from "./reader";
import type { Expression } from "./tree";

const placeholder = (span: Span): Expression => ({ kind: "integer", value: "1", span });

/** Whether a factor can begin with the current token. */
function startsFactor(reader: Reader): boolean {
  if (reader.is("name")) return !reader.isName("let") && !reader.isName("cap");
  return reader.is("integer") || reader.is("(") || reader.is("<") || reader.is("[") || reader.is("?");
}

/** Reads a sum with its signs. Where no expression begins, that is reported. */
export function readExpression(reader: Reader): Expression {
  const start = reader.start;
  const summands: Expression[] = [readSigned(reader)];
  while (reader.is("+") || reader.is("-")) {
    if (summands.length === mostTerms) {
      reader.faults.fatal(
        "limit-terms",
        [start, reader.start],
        `There are more than ${mostTerms.toLocaleString("en")} terms in one sum.`,
        {
          help: "Write them as sums over indices, or check parts of the formula separately.",
        },
      );
    }
    const operator = reader.span;
    const negative = reader.is("-");
    reader.next();
    const summand = readSigned(reader, operator);
    summands.push(negative ? { kind: "negate", operand: summand, span: reader.from(operator[0]) } : summand);
  }
  return summands.length === 1 ? summands[0]! : { kind: "add", summands, span: reader.from(start) };
}

/** Reads a product after any number of signs. `operator` is the one before it, for the report that nothing follows. */
function readSigned(reader: Reader, operator: Span | null = null): Expression {
  const sign = reader.span;
  if (reader.take("+")) return reader.nested(() => readSigned(reader, sign));
  if (!reader.take("-")) return readProduct(reader, operator);
  const operand = reader.nested(() => readSigned(reader, sign));
  return { kind: "negate", operand, span: reader.from(sign[0]) };
}

/** Reports that something is missing, and passes a token that nothing else will. */
function reportMissing(reader: Reader, operator: Span | null): Expression {
  if (operator !== null) {
    reader.faults.add(
      "missing-operand",
      operator,
      `Nothing follows this ${reader.tokens.source.slice(...operator)} but ${reader.described}.`,
      { help: "Add what it acts on, or delete it." },
    );
  } else {
    reader.faults.add("expected-expression", reader.span, `An expression is expected here, not ${reader.described}.`);
  }
  const { span } = reader;
  if (!reader.is("+") && !reader.is("-") && !reader.is(")") && !reader.is(";") && !reader.isName("let")) reader.next();
  return placeholder(span);
}

/** Reads a product with quotients, from the left: a / b * c is (a/b) c. */
function readProduct(reader: Reader, operator: Span | null = null): Expression {
  const start = reader.start;
  if (!startsFactor(reader)) return reportMissing(reader, operator);
  let factors: Expression[] = [readFactor(reader)];
  let slash: Span | null = null;
  let lastSlash: Span = [start, start];
  let quotients = 0;
  const product = (): Expression =>
    factors.length === 1 ? factors[0]! : { kind: "multiply", factors, span: reader.from(start) };
  for (;;) {
    const sign = reader.span;
    if (factors.length > mostTerms) {
      reader.faults.fatal(
        "limit-terms",
        [start, reader.start],
        `There are more than ${mostTerms.toLocaleString("en")} factors in one product.`,
        { help: "Write them as powers or as products over indices." },
      );
    }
    if (reader.take("*")) {
      factors.push(readSignedFactor(reader, sign));
      slash = null;
    } else if (reader.take("/")) {
      const numerator = product();
      lastSlash = sign;
      if (reader.isName("sum")) {
        reader.faults.add(
          "needs-parentheses",
          reader.span,
          "A sum in a denominator needs parentheses: it would take all that follows.",
          { help: "Write a / (sum(...) ...)." },
        );
      }
      const denominator = readSignedFactor(reader, sign);
      quotients += 1;
      if (quotients > deepestNesting) reader.tooDeep(sign);
      factors = [{ kind: "divide", numerator, denominator, span: reader.from(start) }];
      // A quotient of two integers is a number like 1/2, and a factor may follow it.
      slash = numerator.kind === "integer" && denominator.kind === "integer" ? null : sign;
    } else if (startsFactor(reader)) {
      const integers = reader.is("integer") && reader.is("integer", -1);
      const place = reader.start;
      const previous = reader.end;
      const fraction = factors.length === 1 && factors[0]!.kind === "divide";
      const factor = readFactor(reader);
      if (slash !== null || (integers && fraction)) reportDivision(reader, lastSlash, factor.span);
      else if (integers) {
        reader.faults.add("two-integers", [previous, reader.end], "Two integers stand side by side.", {
          help: "Write * between them for their product.",
          suggestion: { span: [previous, place], replacement: " * " },
        });
      }
      factors.push(factor);
    } else return product();
  }
}

function reportDivision(reader: Reader, slash: Span, factor: Span): void {
  reader.faults.add(
    "ambiguous-division",
    [slash[0], factor[1]],
    "It is not clear whether this factor is divided or divides: papers disagree on a / b c.",
    {
      help: "Write a / (b c) or (a / b) c.",
      suggestion: { span: [factor[0], factor[0]], replacement: "* " },
    },
  );
}

/** Reads a factor after `*` or `/`, where a sign may stand. */
function readSignedFactor(reader: Reader, operator: Span): Expression {
  const sign = reader.span;
  if (reader.take("+")) return reader.nested(() => readSignedFactor(reader, sign));
  if (reader.take("-")) {
    const operand = reader.nested(() => readSignedFactor(reader, sign));
    return { kind: "negate", operand, span: reader.from(sign[0]) };
  }
  return startsFactor(reader) ? readFactor(reader) : reportMissing(reader, operator);
}

/** Reads a factor: something with or without an exponent, or a `sum` with all of the product that follows. */
function readFactor(reader: Reader): Expression {
  if (reader.isName("sum")) return readSum(reader);
  if (reader.isName("prod")) return readProd(reader);
  const start = reader.start;
  const base = readPrimary(reader);
  if (!reader.is("^")) return base;
  const exponent = readExponent(reader);
  const power: Expression = { kind: "power", base, exponent, span: reader.from(start) };
  if (reader.is("^")) {
    reader.faults.add("double-power", reader.span, "A power of a power needs parentheses.", {
      help: "Write (a^2)^3, or multiply the exponents.",
    });
    while (reader.is("^")) readExponent(reader);
  }
  return power;
}

function readSum(reader: Reader): Expression {
  const start = reader.start;
  reader.next();
  const head = readHead(reader, "sum");
  const body = reader.within(head.indices, () =>
    reader.nested(() => {
      if (reader.is("+") || reader.is("-")) reportSignedBody(reader, "sum");
      return readProductOrSigned(reader, [start, start + 3]);
    }),
  );
  return { kind: "sum", ...head, body, span: reader.from(start) };
}

function readProd(reader: Reader): Expression {
  const start = reader.start;
  reader.next();
  const head = readHead(reader, "prod");
  const body = reader.within(head.indices, () =>
    reader.nested(() => {
      if (reader.is("+") || reader.is("-")) reportSignedBody(reader, "prod");
      if (reader.isName("sum")) {
        reader.faults.add("needs-parentheses", reader.span, "A sum after prod(...) needs parentheses.", {
          help: "Write prod(...) (sum(...) ...).",
        });
      }
      return readSignedFactor(reader, [start, start + 4]);
    }),
  );
  return { kind: "product", ...head, body, span: reader.from(start) };
}

function reportSignedBody(reader: Reader, word: string): void {
  reader.faults.add("needs-parentheses", reader.span, `What follows ${word}(...) cannot begin with a sign.`, {
    help: `Put the sign before ${word}, or write ${word}(...) (-a).`,
  });
}

function readProductOrSigned(reader: Reader, word: Span): Expression {
  const sign = reader.span;
  if (reader.take("+") || reader.take("-")) return readSigned(reader, sign);
  return readProduct(reader, word);
}

/** Reads `^` and an exponent: an integer, or an index expression in parentheses. */
function readExponent(reader: Reader): Expression {
  const caret = reader.span;
  reader.next();
  const start = reader.start;
  const negative = reader.take("-");
  let exponent: Expression;
  if (reader.is("integer")) {
    exponent = { kind: "integer", value: plainInteger(reader.text), span: reader.span };
    reader.next();
  } else if (reader.is("name") && reader.isIndex(reader.text)) {
    exponent = { kind: "index", name: reader.text, span: reader.span };
    reader.next();
  } else if (reader.is("(")) {
    exponent = readPrimary(reader);
  } else {
    reader.faults.add(
      "exponent",
      [caret[0], Math.max(caret[1], reader.span[1])],
      `After ^ comes an integer, not ${reader.described}.`,
      { help: "Write a^2, a^(-1) or a^(i+1)." },
    );
    if (reader.is("name")) readPrimary(reader);
    return placeholder(reader.from(start));
  }
  if (negative) exponent = { kind: "negate", operand: exponent, span: reader.from(start) };
  return checkExponent(reader, exponent, reader.from(caret[0]));
}

/** An exponent is made of integers, indices, + - and *; one without indices is at most `largestExponent` in size. */
function checkExponent(reader: Reader, exponent: Expression, span: Span): Expression {
  const value = constantValue(exponent);
  if (value === "other") {
    reader.faults.add("exponent", span, "An exponent is an integer made of numbers and indices with +, - and *.", {
      help: "A root or a quotient is not rational; write a^2 or a^(i+1).",
    });
    return placeholder(span);
  }
  if (value !== "open" && (value > BigInt(largestExponent) || value < -BigInt(largestExponent))) {
    reader.faults.add(
      "limit-exponent",
      span,
      `An exponent is at most ${largestExponent.toLocaleString("en")} in size.`,
    );
    return placeholder(span);
  }
  return exponent;
}

const plainInteger = (text: string): string => text.replace(/^0+(?=\d)/, "");

/** Reads what can stand before an exponent. */
function readPrimary(reader: Reader): Expression {
  const { span } = reader;
  switch (reader.kind) {
    case "integer":
      reader.next();
      return { kind: "integer", value: plainInteger(reader.tokens.text(reader.at - 1)), span };
    case "<":
    case "[":
      return readBracket(reader);
    case "?":
      return readUnknown(reader);
    case "(":
      return readParenthesis(reader);
    default:
      return readNameAsNumber(reader);
  }
}

function readParenthesis(reader: Reader): Expression {
  const open = reader.span;
  reader.next();
  const inner = reader.nested(() => readExpression(reader));
  if (!reader.is(")")) {
    if (!reader.is("end") && !reader.is(";") && !reader.isName("let")) {
      reader.faults.add(
        "missing-parenthesis",
        reader.span,
        `A closing parenthesis is expected here, not ${reader.described}.`,
      );
      while (!reader.is(")") && !reader.is(";") && !reader.is("end") && !reader.isName("let")) reader.next();
      reader.take(")");
    } else reader.faults.add("unclosed", open, "This parenthesis is not closed.");
    return inner;
  }
  reader.next();
  if (reader.isName("cap")) {
    reader.next();
    if (startsItem(reader)) reader.is("(") ? reader.skipGroup() : reader.next();
    reader.faults.add(
      "not-a-number",
      reader.from(open[0]),
      "A meet is a point or line, not a number; it stands inside a bracket.",
    );
  }
  return inner;
}

function readUnknown(reader: Reader): Expression {
  const start = reader.start;
  reader.next();
  if (!reader.is("name") || !reader.isGlued()) {
    reader.faults.add("expected-name", reader.from(start), "After ? comes the name of an unknown: ?a.");
    return placeholder(reader.from(start));
  }
  const name = reader.text;
  reader.next();
  const values = reader.is("(") && reader.isGlued() ? readArguments(reader) : [];
  const span = reader.from(start);
  if (!reader.ansatz) {
    reader.faults.add(
      "unknown-outside-ansatz",
      span,
      `?${name} is an unknown, and unknowns stand only in an ansatz that is fitted.`,
      { help: "Give it a value, or fit the formula." },
    );
  }
  return { kind: "unknown", name, arguments: values, span };
}

/** Reads `cyc(e)` or `sym(e)`. */
function readImages(reader: Reader, kind: "cyc" | "sym"): Expression {
  const start = reader.start;
  reader.next();
  if (!reader.is("(")) {
    reader.faults.add(
      "missing-parenthesis",
      reader.from(start),
      `${kind} is followed by an expression in parentheses: ${kind}(a).`,
    );
    return startsFactor(reader) ? readFactor(reader) : placeholder(reader.from(start));
  }
  const body = readParenthesis(reader);
  return { kind, body, span: reader.from(start) };
}

function readNameAsNumber(reader: Reader): Expression {
  const { span, text: name } = reader;
  const call = reader.is("(", 1);
  if (name === "cyc" || name === "sym") return readImages(reader, name);
  if (call && name === "s") return readMandelstam(reader);
  if (call && name === "x2") return readDistance(reader);
  if (call && name === "delta") return readDelta(reader);
  if (reader.isIndex(name)) {
    reader.next();
    return { kind: "index", name, span };
  }
  const definition = reader.definition(name);
  reader.next();
  if (definition !== null) {
    const values = readCallArguments(reader, name, definition, span);
    const whole = reader.from(span[0]);
    if (definition.kind === "scalar") return { kind: "call", name, arguments: values, span: whole };
    reader.faults.add("not-a-number", whole, `${name} is a ${definition.kind}, and a number is needed here.`, {
      help: `Use it inside a bracket; let p = (${name}) gives it a second name.`,
    });
    return placeholder(whole);
  }
  if (name === "bar")
    reader.faults.add("plane-outside-cap", span, "A plane stands only beside cap, inside a bracket or definition.", {
      help: "As a plane of its own write (i-1 i i+1).",
    });
  else if (name === "delta")
    reader.faults.add(
      "missing-parenthesis",
      span,
      "delta is followed by five entries in parentheses: delta(1 2 3 4 5).",
    );
  else if (isReserved(name))
    reader.faults.add("not-a-number", span, `${name} stands for a point or line; it belongs inside a bracket.`, {
      help: "Write <AB 1 2>, say.",
    });
  else reader.reportUnknown(name, span);
  if (reader.is("(") && reader.isGlued()) reader.skipGroup();
  return placeholder(span);
}

/** Reads integer-linear expressions: labels in brackets, bounds of sums, arguments of definitions. */
import type { Span } from "../result";
import type { Reader } from "./reader";
import type { IndexExpression } from "./tree";

/** A linear combination while it is being read. */
class Linear {
  readonly factors = new Map<string, bigint>();
  constant = 0n;

  static ofInteger(value: bigint): Linear {
    const linear = new Linear();
    linear.constant = value;
    return linear;
  }

  static ofName(name: string): Linear {
    const linear = new Linear();
    linear.factors.set(name, 1n);
    return linear;
  }

  /** Adds `sign` times another one to this one. */
  add(other: Linear, sign: bigint): void {
    this.constant += sign * other.constant;
    for (const [name, factor] of other.factors) this.factors.set(name, (this.factors.get(name) ?? 0n) + sign * factor);
  }

  times(value: bigint): Linear {
    const product = new Linear();
    product.add(this, value);
    return product;
  }

  get isInteger(): boolean {
    return [...this.factors.values()].every((factor) => factor === 0n);
  }

  toIndex(span: Span): IndexExpression {
    const terms = [...this.factors]
      .filter(([, factor]) => factor !== 0n)
      .map(([name, factor]) => ({ name, factor: String(factor) }));
    return { terms, constant: String(this.constant), span };
  }
}

export const integerIndex = (value: string, span: Span): IndexExpression => ({ terms: [], constant: value, span });

/** An index name or integer; anything else is reported and read as 1. */
function readAtom(reader: Reader): Linear {
  const { span } = reader;
  if (reader.is("integer")) {
    const value = BigInt(reader.text);
    reader.next();
    return Linear.ofInteger(value);
  }
  if (reader.is("name")) {
    const name = reader.text;
    reader.next();
    if (reader.isIndex(name)) return Linear.ofName(name);
    if (reader.definition(name) !== null) {
      reader.faults.add(
        "not-index",
        span,
        `${name} is defined by let; only n, indices, parameters and integers can stand here.`,
      );
    } else reader.reportUnknown(name, span);
    return Linear.ofInteger(1n);
  }
  reader.faults.add("not-index", span, `An integer or an index is expected here, not ${reader.described}.`, {
    help: "Conditions and arguments are made of integers, indices and n with +, - and integer factors.",
  });
  if (!reader.is(")") && !reader.is(",") && !reader.is(";") && !reader.is("end")) reader.next();
  return Linear.ofInteger(1n);
}

/** Reads an integer-linear expression with spaces where one likes: `i+1`, `2 j - n`, `-(i + 3)`. */
export function readIndex(reader: Reader): IndexExpression {
  const start = reader.start;
  const linear = readLinear(reader);
  return linear.toIndex(reader.from(start));
}

function readLinear(reader: Reader): Linear {
  const total = new Linear();
  let sign = 1n;
  while (reader.is("+") || reader.is("-")) {
    if (reader.is("-")) sign = -sign;
    reader.next();
  }
  for (;;) {
    total.add(readProduct(reader), sign);
    if (!reader.is("+") && !reader.is("-")) return total;
    sign = reader.is("-") ? -1n : 1n;
    reader.next();
  }
}

function readProduct(reader: Reader): Linear {
  const start = reader.start;
  let product = readFactor(reader);
  for (;;) {
    if (reader.is("/") || reader.is("^")) {
      reader.faults.add("not-index", reader.span, `There is no ${reader.described} between indices.`, {
        help: "Use only +, - and integer factors.",
      });
      reader.next();
    } else if (!reader.take("*") && !reader.is("integer") && !reader.is("name") && !reader.is("(")) return product;
    const factor = readFactor(reader);
    if (factor.isInteger) product = product.times(factor.constant);
    else if (product.isInteger) product = factor.times(product.constant);
    else
      reader.faults.add("not-index", reader.from(start), "A product of two indices is not linear.", {
        help: "An index may be multiplied only by an integer.",
      });
  }
}

function readFactor(reader: Reader): Linear {
  if (!reader.is("(")) return readAtom(reader);
  const open = reader.span;
  reader.next();
  const inner = reader.nested(() => readLinear(reader));
  if (!reader.take(")")) reader.faults.add("unclosed", open, "This parenthesis is not closed.");
  return inner;
}

/** Whether a label can begin with the current token. */
export const startsLabel = (reader: Reader): boolean =>
  reader.is("integer") || (reader.is("name") && reader.isIndex(reader.text));

/**
 * Reads a label such as `3`, `i`, `i+1`, `n-1`, `2*i-1`, written without spaces. An operator with a space beside it is reported and read as arithmetic.
 * `numbers` tells that it is arithmetic between bare integers.
 */
export function readLabel(reader: Reader): { index: IndexExpression; numbers: boolean } {
  const start = reader.start;
  const total = new Linear();
  let sign = 1n;
  let parts = 0;
  let spaced = false;
  for (;;) {
    let part = readAtom(reader);
    parts += 1;
    const isProduct = reader.is("*") && reader.isGlued() && reader.is("name", 1) && reader.isGlued(1) && part.isInteger;
    if (isProduct && reader.isIndex(reader.tokens.text(reader.at + 1))) {
      reader.next();
      part = readAtom(reader).times(part.constant);
    }
    total.add(part, sign);
    if ((!reader.is("+") && !reader.is("-")) || !(reader.is("integer", 1) || reader.is("name", 1))) break;
    spaced ||= !reader.isGlued() || !reader.isGlued(1);
    sign = reader.is("-") ? -1n : 1n;
    reader.next();
  }
  const span = reader.from(start);
  if (spaced) {
    reader.faults.add("label-space", span, "Label arithmetic is written without spaces.", {
      help: "A space separates two labels.",
      replacement: reader.tokens.source.slice(...span).replace(/\s+/g, ""),
    });
  }
  return { index: total.toIndex(span), numbers: parts > 1 && total.factors.size === 0 };
}

/** Reads the arguments of a definition or unknown, the parentheses included. */
export function readArguments(reader: Reader): IndexExpression[] {
  const open = reader.span;
  const values: IndexExpression[] = [];
  reader.next();
  if (reader.take(")")) return values;
  do values.push(readIndex(reader));
  while (reader.take(","));
  if (!reader.take(")")) {
    reader.faults.add("unclosed", open, "The list of arguments is not closed.", {
      help: "Arguments are separated by commas and end with a parenthesis.",
    });
    while (!reader.is(")") && !reader.is(";") && !reader.is("end")) reader.next();
    reader.take(")");
  }
  return values;
}

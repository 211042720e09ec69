/** From text to tree: the parser's way in. */
import { type Diagnostic, failure, type Result, success } from "../result";
import { checkAnsatz } from "./ansatz";
import { Faults, stop } from "./faults";
import { checkHeight } from "./height";
import { tokenize } from "./lexer";
import { readDefinition } from "./parseDefinition";
import { readExpression } from "./parseExpression";
import { Reader } from "./reader";
import type { Definition, Expression, Formula } from "./tree";

export interface ParseOptions {
  /** Whether unknowns `?a` are allowed, as in a formula that is given to be fitted. */
  readonly ansatz?: boolean;
}

/** What could be read of a text. The formula is present where the text could be read to its end, with stand-ins where there are faults. */
export interface Reading {
  readonly formula: Formula | null;
  readonly diagnostics: readonly Diagnostic[];
}

/** Reads a text and reports every fault of syntax and of names; the formula is good only when there are no diagnostics. */
export function read(source: string, { ansatz = false }: ParseOptions = {}): Reading {
  const faults = new Faults();
  let formula: Formula | null = null;
  try {
    const tokens = tokenize(source, faults);
    if (tokens.count === 0) {
      if (!faults.any)
        faults.add("empty", [0, source.length], "There is no formula here.", {
          help: "Type one, such as [1 2 3 4 5].",
        });
      return { formula: null, diagnostics: faults.list() };
    }
    const reader = new Reader(tokens, faults, ansatz);
    const whole = readFormula(reader);
    checkMixedLines(reader);
    checkHeight(whole, faults);
    if (ansatz) checkAnsatz(whole, faults);
    formula = whole;
  } catch (reason) {
    if (reason !== stop) throw reason;
  }
  return { formula, diagnostics: faults.list() };
}

/**
 * The tree of a formula: syntax, names and the kinds of named things are checked, what depends on the amplitude is not (see `validate`).
 * Never throws for what a text contains; every fault found in one pass is reported, at most 200 of them.
 */
export function parse(source: string, options: ParseOptions = {}): Result<Formula> {
  const { formula, diagnostics } = read(source, options);
  return formula !== null && diagnostics.length === 0 ? success(formula) : failure(...diagnostics);
}

function readFormula(reader: Reader): Formula {
  const definitions: Definition[] = [];
  let expression: Expression | null = null;
  while (!reader.is("end")) {
    if (reader.isName("let")) {
      const definition = readDefinition(reader);
      if (definition !== null) definitions.push(definition);
      continue;
    }
    if (expression !== null) {
      reader.faults.add("unexpected", reader.span, `${reader.described} cannot stand here.`, {
        help: reader.is(";")
          ? "Only definitions end with a semicolon; the formula itself does not."
          : "A formula is definitions, each with its semicolon, and one expression.",
      });
      reader.next();
      if (reader.is("end")) break;
      if (reader.isName("let")) continue;
    }
    const next = readExpression(reader);
    expression ??= next;
    if (reader.is("=") && next === expression) reportEquation(reader);
  }
  const end = reader.tokens.source.length;
  if (expression === null) {
    if (!reader.faults.any)
      reader.faults.add(
        "no-expression",
        [Math.max(0, reader.end - 1), reader.end],
        "There is no expression after the definitions.",
        { help: "The last line of a formula is the expression itself, without let." },
      );
    expression = { kind: "integer", value: "1", span: [end, end] };
  }
  return { definitions, expression };
}

function reportEquation(reader: Reader): void {
  reader.faults.add("unexpected", reader.span, "An equals sign stands only in definitions and conditions.", {
    help: "Write let name = value; to define a name.",
  });
  reader.next();
  if (!reader.is("end") && !reader.isName("let")) readExpression(reader);
}

function checkMixedLines(reader: Reader): void {
  const { lineInBracket, lineInDistance } = reader;
  if (lineInBracket === null || lineInDistance === null) return;
  reader.faults.add(
    "mixed-lines",
    lineInDistance,
    "Loop lines stand in x2( ) here and in brackets elsewhere; one form uses one of the two.",
    {
      help: "x2(i AB) is <i-1 i A B>/(<i-1 i><AB>), and a form in dual points lacks <AB>^4 of one in brackets.",
    },
  );
}

/**
 * Reads LaTeX as it is pasted from papers and writes the notation. What it writes goes through the parser like anything typed; what it cannot read
 * is a fault with its place in the LaTeX.
 */
import { failure, type Result, type Span, success } from "../result";
import { Faults, stop } from "./faults";
import { type LatexToken, latexTokens, naming } from "./latexTokens";
import { Writer } from "./latexWriter";
import { deepestNesting, mostSourceUnits } from "./limits";
import { loopWords } from "./reader";

/** Inside a bracket items are separated by spaces and label arithmetic is not; in conditions `<` is a relation. */
type Mode = "plain" | "bracket" | "conditions";

const words: Readonly<Record<string, string>> = {
  "\\cap": "cap",
  "\\ast": "*",
  "\\star": "*",
  "\\cdot": "*",
  "\\times": "*",
};
const relations: Readonly<Record<string, string>> = {
  "\\le": "<=",
  "\\leq": "<=",
  "\\leqslant": "<=",
  "\\ne": "!=",
  "\\neq": "!=",
  "\\lt": "<",
  "\\gt": ">",
  "\\ge": ">=",
  "\\geq": ">=",
  "\\geqslant": ">=",
};
const dots: ReadonlySet<string> = new Set(["\\ldots", "\\cdots", "\\dots", "\\dotsc", "\\dotsb"]);
const bars: ReadonlySet<string> = new Set(["\\vert", "\\lvert", "\\rvert", "\\mid", "\\|"]);

/** Puts spaces between the digits of a bracket that would have a wrong number of slots without: 1234 -> 1 2 3 4. */
function separateDigits(inside: string, opener: string): string {
  if (/[|()]/.test(inside)) return inside;
  const items = inside.split(/\s+/).filter(Boolean);
  const slots = items.reduce((sum, item) => sum + (loopWords.includes(item) || item === "X" ? 2 : 1), 0);
  const allowed = opener === "<" ? [2, 4] : [2, 5];
  return allowed.includes(slots) ? inside : inside.replace(/\d+/g, (digits) => [...digits].join(" "));
}

/** The labels of a subscript such as 123 or i,i+1: digits without a separator are labels of their own. */
const subscriptLabels = (inside: string): string => {
  const plain = inside.replace(/[()]/g, " ").replaceAll(",", " ").trim();
  return /[\s,]/.test(inside.trim()) ? plain : plain.replace(/\d+/g, (digits) => [...digits].join(" "));
};

class LatexReader {
  private at = 0;
  private depth = 0;
  /** Indices of the sums around. */
  private readonly bound = new Set<string>();

  constructor(
    /** A copy of its own: a run of digits is taken apart where a command takes the first. */
    private readonly tokens: LatexToken[],
    private readonly faults: Faults,
    private readonly end: number,
  ) {}

  read(): string {
    const text = this.sequence("plain");
    if (this.at < this.tokens.length)
      this.faults.add("latex-braces", this.tokens[this.at]!.span, "This brace closes nothing.", {
        help: "Paste a whole formula.",
      });
    return text;
  }

  private get token(): LatexToken | undefined {
    return this.tokens[this.at];
  }

  private is(text: string): boolean {
    return this.token?.text === text;
  }

  private get place(): Span {
    return this.token?.span ?? [this.end, this.end];
  }

  private skipSpaces(): void {
    while (this.token?.kind === "space") this.at += 1;
  }

  /** Reads up to a closing brace or the end. `a \over b` is a fraction of all before and all after it. */
  private sequence(mode: Mode): string {
    let writer = new Writer();
    let above: string | null = null;
    for (let token = this.token; token !== undefined && token.text !== "}"; token = this.token) {
      if (token.text === "\\over") {
        this.at += 1;
        above = writer.text;
        writer = new Writer();
      } else this.element(writer, mode);
    }
    return above === null ? writer.text : `((${above}) / (${writer.text}))`;
  }

  /** The argument of a command: a group in braces or one token. */
  private argument(mode: Mode): string {
    this.skipSpaces();
    if (this.is("{")) return this.group(mode);
    const writer = new Writer();
    // Only the first digit of a run belongs to a command without braces: x^2 3 and x^23 mean the same.
    const token = this.token;
    if (token?.kind === "digits" && token.text.length > 1) {
      this.tokens[this.at] = {
        ...token,
        text: token.text.slice(1),
        span: [token.span[0] + 1, token.span[1]],
      };
      return token.text[0]!;
    }
    if (token === undefined) this.faults.add("latex-braces", this.place, "Something is missing at the end.");
    else this.element(writer, mode);
    return writer.text;
  }

  private group(mode: Mode): string {
    const open = this.place;
    this.at += 1;
    const text = this.sequence(mode);
    if (this.is("}")) this.at += 1;
    else this.faults.add("latex-braces", open, "This brace is not closed.");
    return text;
  }

  /** Reads one element and writes it; everything that lies inside something else passes through here. */
  private element(writer: Writer, mode: Mode): void {
    this.depth += 1;
    if (this.depth > deepestNesting) {
      this.faults.fatal("limit-nesting", this.place, `Brackets and commands may lie at most ${deepestNesting} deep.`);
    }
    this.elementInside(writer, mode);
    this.depth -= 1;
  }

  private elementInside(writer: Writer, mode: Mode): void {
    const token = this.token!;
    const { text, kind } = token;
    if (kind === "space") this.at += 1;
    else if (kind === "digits") {
      this.at += 1;
      writer.atom(text);
    } else if (kind === "command") this.command(writer, token, mode);
    else if (text === "{") this.braced(writer, mode);
    else if (text === "^") this.exponent(writer);
    else if (text === "<" && mode !== "conditions") this.bracket(writer, "<");
    else if (text === "[" && mode !== "conditions") this.bracket(writer, "[");
    else if (text === "(") this.parenthesis(writer, mode);
    else if (/^[A-Za-z]$/.test(text)) this.letter(writer);
    else if (text === "_") {
      this.at += 1;
      this.faults.add("latex-command", token.span, "This subscript belongs to nothing that has one in the notation.");
      this.argument("bracket");
    } else this.sign(writer, text, mode);
  }

  /** `{+}` is a plus sign; other groups are their contents. */
  private braced(writer: Writer, mode: Mode): void {
    if (dots.has(this.tokens[this.at + 1]?.text ?? "") && this.tokens[this.at + 2]?.text === "}") {
      this.at += 3;
      this.ellipsis(writer);
      return;
    }
    const text = this.group(mode);
    if (/^[+-]$/.test(text)) this.operator(writer, text, mode);
    else if (text !== "") writer.atom(text);
  }

  private operator(writer: Writer, text: string, mode: Mode): void {
    if (mode === "bracket") writer.tight(text);
    else writer.atom(text);
  }

  private sign(writer: Writer, text: string, mode: Mode): void {
    this.at += 1;
    if (text === "+" || text === "-" || text === "−") this.operator(writer, text === "−" ? "-" : text, mode);
    else if (text === "," || text === ";") {
      if (mode === "bracket") writer.separate();
      else if (text === ",") writer.suffix(",");
    } else if (text === "|") writer.tight("|");
    else if (text === "." && this.token === undefined) return;
    else writer.atom(text);
  }

  /** A bracket of spinors or twistors up to whichever bracket closes it; parentheses around a sum of momenta are dropped. */
  private bracket(writer: Writer, opener: "<" | "["): void {
    const open = this.place;
    this.at += 1;
    const inside = new Writer();
    const closes = (): string | null =>
      this.is("\\rangle") || this.is(">") ? ">" : this.is("]") || this.is("\\rbrack") ? "]" : null;
    while (this.token !== undefined && !this.is("}") && closes() === null) this.element(inside, "bracket");
    const closer = closes();
    if (closer === null) this.faults.add("unclosed", open, "This bracket is not closed.");
    else this.at += 1;
    const text = inside.text.trim();
    const content = text.includes("|")
      ? text.replace(/\|\s*\(([^()]*)\)\s*(?=\|)/g, "|$1").replace(/\s*\|\s*/g, "|")
      : separateDigits(text, opener);
    writer.atom(`${opener}${content}${closer ?? ""}`);
  }

  private parenthesis(writer: Writer, mode: Mode): void {
    const open = this.place;
    this.at += 1;
    const inside = new Writer();
    while (this.token !== undefined && !this.is("}") && !this.is(")")) this.element(inside, mode);
    if (this.is(")")) this.at += 1;
    else this.faults.add("unclosed", open, "This parenthesis is not closed.");
    const text = inside.text.trim();
    const isItems = mode === "bracket" && /^\d+$/.test(text) && text.length <= 3;
    const call = /^ ?[A-Za-z_][A-Za-z0-9_]+$/.test(writer.last) && !/^ ?(cap|AB|CD|EF|GH)$/.test(writer.last);
    if (call) writer.suffix(`(${text})`);
    else writer.atom(`(${isItems ? [...text].join(" ") : text})`);
  }

  private exponent(writer: Writer): void {
    this.at += 1;
    const text = this.argument("plain").trim();
    writer.suffix(/^\d+$/.test(text) ? `^${text}` : `^(${text.replace(/^\((.*)\)$/, "$1")})`);
  }

  /** A letter with its subscripts: s_{12}, x_{13}^2, p_1, or the letter itself. `AB` side by side is a loop line. */
  private letter(writer: Writer): void {
    const { text, span } = this.token!;
    this.at += 1;
    const next = this.token;
    if (next?.kind === "character" && loopWords.includes(text + next.text)) {
      this.at += 1;
      writer.atom(text + next.text);
    } else if (text === "x" && (next?.text === "_" || next?.text === "^")) this.distance(writer, span);
    else if (next?.text === "_") {
      this.at += 1;
      const subscript = this.argument("bracket");
      if (text === "s") writer.atom(`s(${subscriptLabels(subscript).replace(/\s*\.\.\s*/g, "..")})`);
      else writer.atom(`${text}${subscript.replace(/[^A-Za-z0-9]/g, "_")}`);
    } else writer.atom(text);
  }

  /** x_{ij}^2 with its two scripts in either order; an even power is a power of x2. */
  private distance(writer: Writer, span: Span): void {
    let below: string | null = null;
    let power: string | null = null;
    while ((below === null && this.is("_")) || (power === null && this.is("^"))) {
      const isBelow = this.is("_");
      this.at += 1;
      if (isBelow) below = subscriptLabels(this.argument("bracket"));
      else power = this.argument("plain").trim();
    }
    const size = power === null ? 0 : Number(power);
    if (below === null || !Number.isInteger(size) || size < 2 || size % 2 !== 0) {
      this.faults.add("latex-command", span, "x stands only in squared distances such as x_{13}^2.", {
        help: "Odd powers of x_{13} have no meaning in the notation.",
      });
      return;
    }
    writer.atom(`x2(${below})${size === 2 ? "" : `^${size / 2}`}`);
  }

  private command(writer: Writer, token: LatexToken, mode: Mode): void {
    const { text, span } = token;
    this.at += 1;
    const word = words[text];
    const relation = relations[text];
    if (word !== undefined) writer.atom(word);
    else if (relation !== undefined) writer.atom(relation);
    else if (text === "\\langle" || text === "\\lbrack") {
      this.at -= 1;
      this.bracket(writer, text === "\\langle" ? "<" : "[");
    } else if (text === "\\frac" || text === "\\dfrac" || text === "\\tfrac") this.fraction(writer);
    else if (text === "\\sum" || text === "\\prod") this.quantified(writer, text.slice(1), span);
    else if (text === "\\bar" || text === "\\overline") writer.atom(`bar(${this.argument("bracket").trim()})`);
    else if (dots.has(text)) this.ellipsis(writer);
    else if (bars.has(text)) writer.tight("|");
    else if (text === "\\delta") this.delta(writer);
    else if (naming.has(text)) this.name(writer);
    else if (text === "\\\\") {
      if (mode === "conditions") writer.suffix(",");
    } else if (text === "\\substack" || text === "\\hbox" || text === "\\mbox") writer.atom(this.argument(mode));
    else if (text === "\\{" || text === "\\}") writer.atom(text === "\\{" ? "(" : ")");
    else {
      this.faults.add("latex-command", span, `${text} has no meaning in the notation.`, {
        help: "Delete it, or write this part in the notation.",
      });
      while (this.is("_") || this.is("^")) {
        this.at += 1;
        this.argument("bracket");
      }
    }
  }

  private fraction(writer: Writer): void {
    const above = this.argument("plain").trim();
    const below = this.argument("plain").trim();
    const simple = /^\d+$/;
    writer.atom(simple.test(above) && simple.test(below) ? `(${above}/${below})` : `((${above}) / (${below}))`);
  }

  /** `2+...+5` and `1,...,3` are ranges, and so is `1\ldots 3`. */
  private ellipsis(writer: Writer): void {
    writer.dropSigns();
    this.skipSpaces();
    if (this.is("+") || this.is(",")) this.at += 1;
    else if (this.is("{") && this.tokens[this.at + 1]?.text === "+" && this.tokens[this.at + 2]?.text === "}")
      this.at += 3;
    writer.tight("..");
  }

  /** `\delta^{0|4}(...)` is the numerator of an R-invariant. */
  private delta(writer: Writer): void {
    this.skipSpaces();
    if (this.is("^")) {
      this.at += 1;
      this.argument("plain");
      this.skipSpaces();
    }
    const inside = new Writer();
    if (this.is("(")) this.parenthesis(inside, "bracket");
    writer.atom(`delta${inside.text}`);
  }

  /** A name of several letters in braces, with its subscript. */
  private name(writer: Writer): void {
    this.skipSpaces();
    let name = "";
    if (this.is("{")) {
      for (this.at += 1; this.token !== undefined && !this.is("}"); this.at += 1)
        name += this.token.kind === "command" ? "_" : this.token.text.trim();
      this.at += 1;
    }
    if (this.is("_")) {
      this.at += 1;
      name += this.argument("bracket").replace(/[^A-Za-z0-9]/g, "_");
    }
    const followed = this.is("(");
    writer.atom(name);
    if (followed) {
      const inside = new Writer();
      this.parenthesis(inside, "plain");
      writer.suffix(inside.text);
    }
  }

  /** `\sum_{1<i<j<n}` or `\sum_{i=1}^{n}`: the letters of the conditions that are not bound outside are its indices. */
  private quantified(writer: Writer, word: string, span: Span): void {
    let below = "";
    let above: string | null = null;
    for (this.skipSpaces(); this.is("_") || this.is("^"); this.skipSpaces()) {
      const isBelow = this.is("_");
      this.at += 1;
      if (isBelow) below = this.argument("conditions").trim();
      else above = this.argument("conditions").trim();
    }
    const conditions =
      above === null
        ? below
        : below.replace(/^(\w+)\s*=\s*(.+)$/, (_, index: string, from: string) => `${from} <= ${index} <= ${above}`);
    const names = [...conditions.matchAll(/[A-Za-z_]\w*/g)].map(([name]) => name);
    const indices = [...new Set(names)].filter((name) => name !== "n" && !this.bound.has(name));
    if (indices.length === 0) {
      this.faults.add("missing-conditions", span, `This ${word === "sum" ? "sum" : "product"} has no index under it.`, {
        help: "Write its bounds: \\sum_{1\\le i\\le n}.",
      });
      return;
    }
    for (const name of indices) this.bound.add(name);
    writer.atom(`${word}(${indices.join(", ")} : ${conditions.replace(/[\s,]+$/, "")})`);
  }
}

/** Everything up to a first equals sign outside brackets and conditions names the left-hand side, which the notation has no place for. */
function withoutLeftSide(tokens: readonly LatexToken[]): readonly LatexToken[] {
  let depth = 0;
  for (const [at, { text }] of tokens.entries()) {
    if (text === "{" || text === "(") depth += 1;
    else if (text === "}" || text === ")") depth -= 1;
    else if (text === "=" && depth === 0) return tokens.slice(at + 1);
  }
  return tokens;
}

/**
 * The notation for a LaTeX formula: brackets, fractions, sums and products with their conditions, meets, s_{123}, x_{13}^2, spinor strings. A
 * left-hand side and appearance are dropped. Faults are places in the LaTeX; the text returned still has to be parsed.
 */
export function fromLatex(latex: string): Result<string> {
  const faults = new Faults();
  try {
    if (latex.length > mostSourceUnits)
      faults.fatal(
        "limit-source",
        undefined,
        `The text has ${latex.length.toLocaleString("en")} characters; at most ${mostSourceUnits.toLocaleString("en")} are read.`,
      );
    const tokens = withoutLeftSide(latexTokens(latex));
    const text = new LatexReader([...tokens], faults, latex.length).read().trim();
    if (!faults.any) return success(text);
  } catch (reason) {
    if (reason !== stop) throw reason;
  }
  return failure(...faults.list());
}

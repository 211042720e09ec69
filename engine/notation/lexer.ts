/** Cuts a text into tokens and reports characters that do not belong. */
import type { Faults } from "./faults";
import { longestInteger, mostSourceUnits } from "./limits";
import { isForeignSpace, isInvisible, plainText } from "./lookalikes";

const kinds = [
  "end",
  "integer",
  "name",
  "<",
  ">",
  "<=",
  ">=",
  "=",
  "!=",
  "[",
  "]",
  "(",
  ")",
  "|",
  "+",
  "-",
  "*",
  "/",
  "^",
  ",",
  ";",
  ":",
  "?",
  "..",
] as const;

/** Kinds of tokens: the punctuation stands for itself. */
export type TokenKind = (typeof kinds)[number];

const numbers: ReadonlyMap<TokenKind, number> = new Map(kinds.map((kind, at) => [kind, at]));

const single = "<>=[]()|+-*/^,;:?";
const isDigit = (character: string): boolean => character >= "0" && character <= "9";
const isLetter = (character: string): boolean =>
  (character >= "a" && character <= "z") || (character >= "A" && character <= "Z");
const isWord = (character: string): boolean => isLetter(character) || isDigit(character) || character === "_";

/** The tokens of a text, in typed arrays side by side so that two million characters take a few tens of megabytes. */
export class Tokens {
  private readonly kinds: Uint8Array;
  private readonly starts: Uint32Array;
  private readonly ends: Uint32Array;
  private length = 0;
  /** Texts that differ from the source, because a look-alike was read as what it resembles. */
  private readonly texts = new Map<number, string>();

  constructor(readonly source: string) {
    // A superscript is two tokens, so there may be twice as many as characters, but reports end the reading long before.
    const room = source.length + 1_000;
    this.kinds = new Uint8Array(room);
    this.starts = new Uint32Array(room);
    this.ends = new Uint32Array(room);
  }

  add(kind: TokenKind, start: number, end: number, text?: string): void {
    const at = this.length;
    if (text !== undefined && text !== this.source.slice(start, end)) this.texts.set(at, text);
    this.kinds[at] = numbers.get(kind)!;
    this.starts[at] = start;
    this.ends[at] = end;
    this.length += 1;
  }

  get count(): number {
    return this.length;
  }

  /** Past the last token: `end`. */
  kind(at: number): TokenKind {
    return at >= 0 && at < this.length ? kinds[this.kinds[at]!]! : "end";
  }

  start(at: number): number {
    return at >= 0 && at < this.length ? this.starts[at]! : this.source.length;
  }

  end(at: number): number {
    return at >= 0 && at < this.length ? this.ends[at]! : this.source.length;
  }

  text(at: number): string {
    return this.texts.get(at) ?? this.source.slice(this.start(at), this.end(at));
  }
}

class Lexer {
  private at = 0;
  private readonly tokens: Tokens;

  constructor(
    private readonly source: string,
    private readonly faults: Faults,
  ) {
    this.tokens = new Tokens(source);
  }

  read(): Tokens {
    while (this.at < this.source.length) {
      const character = this.source[this.at]!;
      if (character === " " || character === "\n" || character === "\t" || character === "\r") this.at += 1;
      else if (character === "#") this.skipComment();
      else if (isWord(character) && character !== "_") this.word();
      else if (!this.punctuation(character)) this.foreign();
    }
    return this.tokens;
  }

  private skipComment(): void {
    const end = this.source.indexOf("\n", this.at);
    this.at = end < 0 ? this.source.length : end;
  }

  /** A name or integer; a look-alike letter or digit inside it is reported and read as the plain one. */
  private word(first?: string): void {
    const start = this.at;
    const parts: string[] = [];
    if (first !== undefined) {
      parts.push(first);
      this.at += this.current().length;
    }
    const numeric = isDigit(first ?? this.source[start]!);
    const belongs = numeric ? isDigit : isWord;
    if (first === undefined) {
      let end = start + 1;
      while (end < this.source.length && belongs(this.source[end]!)) end += 1;
      const next = this.source[end] ?? " ";
      if (next < "\u0080" && next !== "." && end - start <= longestInteger) {
        this.at = end;
        this.tokens.add(numeric ? "integer" : "name", start, end);
        return;
      }
    }
    while (this.at < this.source.length) {
      const from = this.at;
      while (this.at < this.source.length && belongs(this.source[this.at]!)) this.at += 1;
      if (this.at > from) parts.push(this.source.slice(from, this.at));
      if ((this.source[this.at] ?? " ") < "\u0080") break;
      const plain = plainText(this.current());
      if (plain?.length !== 1 || !belongs(plain)) break;
      this.lookAlike(plain);
      parts.push(plain);
      this.at += this.current().length;
    }
    this.emitWord(start, parts.join(""), numeric);
  }

  private emitWord(start: number, text: string, numeric: boolean): void {
    if (!numeric) {
      this.tokens.add("name", start, this.at, text);
      return;
    }
    const next = this.source[this.at + 1];
    if (this.source[this.at] === "." && next !== undefined && isDigit(next)) {
      this.at += 1;
      while (this.at < this.source.length && isDigit(this.source[this.at]!)) this.at += 1;
      this.faults.add(
        "decimal-point",
        [start, this.at],
        "Numbers in the notation are integers, without a decimal point.",
        {
          help: "Write a quotient of integers instead, such as 3/2 for one and a half.",
        },
      );
    }
    if (text.length > longestInteger) {
      this.faults.add(
        "limit-integer",
        [start, this.at],
        `An integer may have ${longestInteger.toLocaleString("en")} digits; this one has ${text.length.toLocaleString("en")}.`,
        {
          help: "Write it as a product or power of smaller integers.",
        },
      );
      this.tokens.add("integer", start, this.at, "1");
      return;
    }
    this.tokens.add("integer", start, this.at, text);
  }

  private punctuation(character: string): boolean {
    const start = this.at;
    const next = this.source[start + 1];
    const two =
      next === "=" && (character === "<" || character === ">" || character === "!")
        ? `${character}=`
        : character === "." && next === "."
          ? ".."
          : null;
    if (two !== null) {
      this.at += 2;
      if (two === ".." && this.source[this.at] === ".") {
        while (this.source[this.at] === ".") this.at += 1;
        this.faults.add("look-alike", [start, this.at], "A range is written with two dots.", { replacement: ".." });
      }
      this.tokens.add(two as TokenKind, start, this.at, two);
      return true;
    }
    if (!single.includes(character)) return false;
    this.at += 1;
    this.tokens.add(character as TokenKind, start, this.at);
    return true;
  }

  /** The whole character at the reading position, both halves of a surrogate pair. */
  private current(): string {
    return String.fromCodePoint(this.source.codePointAt(this.at) ?? 0);
  }

  private lookAlike(plain: string): void {
    const character = this.current();
    this.faults.add(
      "look-alike",
      [this.at, this.at + character.length],
      `"${character}" (${codePoint(character)}) is not the "${plain}" of the notation, though it looks like it.`,
      {
        help: `Type "${plain}".`,
        replacement: plain,
      },
    );
  }

  /** Anything outside the notation's own characters. */
  private foreign(): void {
    const character = this.current();
    const start = this.at;
    const end = start + character.length;
    const accepted = character === "⟨" ? "<" : character === "⟩" ? ">" : character === "∩" ? "name" : null;
    if (accepted !== null) {
      this.at = end;
      this.tokens.add(accepted, start, end, accepted === "name" ? "cap" : accepted);
      return;
    }
    const meant = plainText(character);
    if (meant !== null) {
      this.foreignText(meant);
      return;
    }
    this.at = end;
    this.reportForeign(character, [start, end]);
  }

  /** Reads a look-alike as what it resembles. */
  private foreignText(meant: string): void {
    this.lookAlike(meant);
    const start = this.at;
    if (meant.length === 1 && isWord(meant)) {
      this.word(meant);
      return;
    }
    this.at += this.current().length;
    if (meant.startsWith("^")) {
      this.tokens.add("^", start, this.at, "^");
      this.tokens.add("integer", start, this.at, meant.slice(1));
    } else if (isLetter(meant)) this.tokens.add("name", start, this.at, meant);
    else this.tokens.add(meant as TokenKind, start, this.at, meant);
  }

  private reportForeign(character: string, span: readonly [number, number]): void {
    if (/^[\ud800-\udfff]$/.test(character)) {
      this.faults.add(
        "lone-surrogate",
        span,
        `Half of a surrogate pair (${codePoint(character)}) is not a character.`,
        { replacement: "" },
      );
    } else if (isForeignSpace(character)) {
      this.faults.add(
        "look-alike",
        span,
        `This space (${codePoint(character)}) is not the plain space of the notation.`,
        { replacement: " " },
      );
    } else if (isInvisible(character)) {
      const between = isWord(this.source[span[0] - 1] ?? " ") && isWord(this.source[span[1]] ?? " ");
      this.faults.add("invisible-character", span, `There is an invisible character here (${codePoint(character)}).`, {
        help: "Delete it.",
        replacement: between ? " " : "",
      });
    } else if (/^\p{Cc}$/u.test(character)) {
      this.faults.add("control-character", span, `There is a control character here (${codePoint(character)}).`, {
        help: "Delete it.",
        replacement: "",
      });
    } else if (character === "\\") {
      while (this.at < this.source.length && isLetter(this.source[this.at]!)) this.at += 1;
      this.faults.add(
        "latex-in-notation",
        [span[0], this.at],
        `${this.source.slice(span[0], Math.min(this.at, span[0] + 20))} is LaTeX; the notation is plain text.`,
        {
          help: "Paste LaTeX where LaTeX is asked for, and it is turned into the notation.",
        },
      );
    } else {
      this.faults.add(
        "unknown-character",
        span,
        `"${character}" (${codePoint(character)}) has no meaning in the notation.`,
      );
    }
  }
}

const codePoint = (character: string): string =>
  `U+${character.codePointAt(0)!.toString(16).toUpperCase().padStart(4, "0")}`;

/**
 * The tokens of a text; faults go to `faults`, and the reading goes on behind them.
 * @throws stop (caught by `parse`) when the text is too long or holds too many faults.
 */
export function tokenize(source: string, faults: Faults): Tokens {
  if (source.length > mostSourceUnits) {
    faults.fatal(
      "limit-source",
      [mostSourceUnits, source.length],
      `The text has ${source.length.toLocaleString("en")} characters; at most ${mostSourceUnits.toLocaleString("en")} are read.`,
      {
        help: "Use sums over indices or definitions, or split the formula.",
      },
    );
  }
  return new Lexer(source, faults).read();
}

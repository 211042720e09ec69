/** Where the parser is in the tokens, and which names it knows there. */
import type { Span } from "../result";
import type { Faults } from "./faults";
import type { TokenKind, Tokens } from "./lexer";
import { deepestNesting } from "./limits";

/** Words with a fixed meaning everywhere. `s` and `x2` have one only before a parenthesis. */
export const keywords: ReadonlySet<string> = new Set(["n", "cap", "bar", "delta", "sum", "prod", "cyc", "sym", "let"]);
export const loopLetters = "ABCDEFGH";
export const loopWords: readonly string[] = ["AB", "CD", "EF", "GH"];

/** Whether a name may not be given to an index, a parameter or a definition. */
export const isReserved = (name: string): boolean =>
  keywords.has(name) || loopWords.includes(name) || (name.length === 1 && `${loopLetters}X`.includes(name));

/**
 * What a point, line or plane brings to an R-invariant: a full Grassmann part, the zero of loop points, or none that is defined.
 */
export type GrassmannPart = "full" | "loop" | "none";

/** What is known of a definition once it has been read. */
export interface Known {
  readonly kind: "scalar" | "point" | "line" | "plane";
  readonly parameters: readonly string[];
  readonly grassmann: GrassmannPart;
  readonly span: Span;
}

export class Reader {
  /** Index of the current token. */
  at = 0;
  /** Definitions read so far. */
  readonly known = new Map<string, Known>();
  /** Names defined anywhere in the text. */
  readonly announced = new Set<string>();
  /** The definition being read. */
  defining: string | null = null;
  /** First place of a loop line inside a bracket and inside x2. */
  lineInBracket: Span | null = null;
  lineInDistance: Span | null = null;
  private readonly scopes: (readonly string[])[] = [];
  private depth = 0;

  constructor(
    readonly tokens: Tokens,
    readonly faults: Faults,
    readonly ansatz: boolean,
  ) {
    for (let at = 0; at + 1 < tokens.count; at += 1) {
      if (tokens.kind(at) === "name" && tokens.text(at) === "let" && tokens.kind(at + 1) === "name") {
        this.announced.add(tokens.text(at + 1));
      }
    }
  }

  get kind(): TokenKind {
    return this.tokens.kind(this.at);
  }

  get text(): string {
    return this.tokens.text(this.at);
  }

  get start(): number {
    return this.tokens.start(this.at);
  }

  /** End of the token before the current one. */
  get end(): number {
    return this.at === 0 ? 0 : this.tokens.end(this.at - 1);
  }

  get span(): Span {
    return [this.start, this.tokens.end(this.at)];
  }

  /** The current token for a message: `")"`, or "the end". */
  get described(): string {
    if (this.kind === "end") return "the end";
    const text = this.text;
    return `"${text.length > 20 ? `${text.slice(0, 20)}...` : text}"`;
  }

  next(): void {
    if (this.kind !== "end") this.at += 1;
  }

  is(kind: TokenKind, ahead = 0): boolean {
    return this.tokens.kind(this.at + ahead) === kind;
  }

  isName(name: string, ahead = 0): boolean {
    return this.is("name", ahead) && this.tokens.text(this.at + ahead) === name;
  }

  take(kind: TokenKind): boolean {
    if (this.kind !== kind) return false;
    this.at += 1;
    return true;
  }

  /** Whether token `ahead` follows the one before it without a space. */
  isGlued(ahead = 0): boolean {
    const at = this.at + ahead;
    return at > 0 && at < this.tokens.count && this.tokens.end(at - 1) === this.tokens.start(at);
  }

  /** The span from a token's start to the end of what was read last. */
  from(start: number): Span {
    return [start, Math.max(start, this.end)];
  }

  /** Reads something that lies one level deeper. @throws stop beyond the deepest level. */
  nested<T>(read: () => T): T {
    this.depth += 1;
    if (this.depth > deepestNesting) this.tooDeep(this.span);
    const result = read();
    this.depth -= 1;
    return result;
  }

  tooDeep(span: Span): never {
    this.faults.fatal(
      "limit-nesting",
      span,
      `Parentheses, signs, quotients and sums may lie at most ${deepestNesting} deep.`,
      {
        help: "Give parts of the formula a name with let.",
      },
    );
  }

  /** Reads something in which these names are indices as well. */
  within<T>(names: readonly string[], read: () => T): T {
    this.scopes.push(names);
    const result = read();
    this.scopes.pop();
    return result;
  }

  /** Whether a name is `n`, an index or a parameter here. */
  isIndex(name: string): boolean {
    return name === "n" || this.scopes.some((names) => names.includes(name));
  }

  /** The definition a name stands for here; an index of the same name hides it. */
  definition(name: string): Known | null {
    return this.isIndex(name) ? null : (this.known.get(name) ?? null);
  }

  /** Reports a name that means nothing here, with the nearest name that does. */
  reportUnknown(name: string, span: Span): void {
    if (name === this.defining) {
      this.faults.add("recursion", span, `The definition of ${name} uses ${name} itself.`, {
        help: "A definition uses only names defined above it.",
      });
      return;
    }
    if (this.announced.has(name) && !this.known.has(name)) {
      this.faults.add("defined-later", span, `${name} is defined only further down.`, {
        help: `Move the definition of ${name} above this place.`,
      });
      return;
    }
    const candidates = [...this.known.keys(), ...this.scopes.flat()];
    const near = name.length < 3 ? undefined : candidates.find((candidate) => isNear(name, candidate));
    this.faults.add(
      "unknown-name",
      span,
      `Nothing here is called ${name.length > 40 ? `${name.slice(0, 40)}...` : name}.`,
      {
        help: near === undefined ? "Define it with let, or bind it as an index of a sum." : `Did you mean ${near}?`,
        ...(near === undefined ? {} : { replacement: near }),
      },
    );
  }

  /** Skips to the closing parenthesis of the group that the current "(" opens, past it; to the end of the definition where there is none. */
  skipGroup(): void {
    let depth = 0;
    do {
      if (this.is("(")) depth += 1;
      else if (this.is(")")) depth -= 1;
      else if (this.is("end") || this.is(";")) return;
      this.next();
    } while (depth > 0);
  }
}

/** Whether two names differ by one letter typed, left out, or changed, or two exchanged. */
function isNear(a: string, b: string): boolean {
  if (a === b || Math.abs(a.length - b.length) > 1 || a.length > 60) return false;
  let head = 0;
  while (head < a.length && a[head] === b[head]) head += 1;
  const [restA, restB] = [a.slice(head), b.slice(head)];
  return (
    restA.slice(1) === restB.slice(1) ||
    restA.slice(1) === restB ||
    restA === restB.slice(1) ||
    (restA.slice(2) === restB.slice(2) && restA[0] === restB[1] && restA[1] === restB[0])
  );
}

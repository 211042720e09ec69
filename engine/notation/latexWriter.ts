/** The text of the notation while it is put together from LaTeX. */

/** Collects the text of the notation with its spaces: no piece but an atom begins with one, and none ends with one. */
export class Writer {
  private readonly pieces: string[] = [];
  private glued = true;

  get text(): string {
    return this.pieces.join("");
  }

  get last(): string {
    return this.pieces.at(-1) ?? "";
  }

  /** A name, number or bracket. */
  atom(text: string): void {
    this.pieces.push(this.glued ? text : ` ${text}`);
    this.glued = false;
  }

  /** Something that takes no space on either side. */
  tight(text: string): void {
    this.pieces.push(text);
    this.glued = true;
  }

  /** Something that takes no space before it, but one after it. */
  suffix(text: string): void {
    this.pieces.push(text);
    this.glued = false;
  }

  /** Ends an item: what follows is another one. */
  separate(): void {
    this.glued &&= this.pieces.length === 0;
  }

  /** Takes back plus signs and commas that were written last. */
  dropSigns(): void {
    while (/^ ?[+,]$/.test(this.last)) this.pieces.pop();
  }
}

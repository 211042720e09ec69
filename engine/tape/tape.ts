/** A compiled form: the operations in the order they run, and what has to be in place before. */
import type { Span } from "../result";
import type { Constant } from "./graph";
import { describeInput, type TapeInput } from "./inputs";
import { COMBINE2, COMBINE5, opcodeOf } from "./opcodes";

/** Words of the head of a run: opcode, number of entries, parameter, 0. */
export const HEAD = 4;

/** Operations by kind, and what they amount to. */
export interface TapeCounts {
  /** Entries of each opcode by name. */
  readonly operations: Readonly<Record<string, number>>;
  /** All entries. */
  readonly entries: number;
  /** Field multiplications for one point, shares of batch inversions included. */
  readonly multiplications: number;
  readonly inversions: number;
  readonly runs: number;
  readonly slots: number;
  readonly terms: number;
}

export interface Tape {
  readonly n: number;
  readonly k: number;
  readonly loops: number;
  /** Runs of one operation, see `opcodes`. */
  readonly code: Int32Array;
  /** Where slices begin: positions of run heads, the end of the code last. A call to an evaluator runs one slice. */
  readonly slices: readonly number[];
  /** Slots of one point. */
  readonly slots: number;
  readonly inputs: readonly TapeInput[];
  /** Constants and the slots they stand in. */
  readonly constants: readonly (Constant & { readonly slot: number })[];
  /** Where each denominator stands in the source, in the order of the source. */
  readonly denominators: readonly Span[];
  readonly counts: TapeCounts;
  /** The tape as text, one operation a line. */
  print(): string;
}

/** Each run of a tape: opcode, parameter, and the positions of its entries. */
export function* runsOf(code: Int32Array): Generator<{ code: number; parameter: number; at: number; count: number }> {
  for (let at = 0; at < code.length; ) {
    const opcode = opcodeOf[code[at]!];
    if (opcode === undefined) throw new Error(`runsOf: expected an opcode at word ${at}, got ${code[at]}`);
    const count = code[at + 1]!;
    yield { code: opcode.code, parameter: code[at + 2]!, at: at + HEAD, count };
    at += HEAD + count * opcode.words;
  }
}

export function countOperations(code: Int32Array, k: number, slots: number): TapeCounts {
  const operations: Record<string, number> = {};
  let [entries, multiplications, runs] = [0, 0, 0];
  for (const run of runsOf(code)) {
    const opcode = opcodeOf[run.code]!;
    operations[opcode.name] = (operations[opcode.name] ?? 0) + run.count;
    entries += run.count;
    runs += 1;
    multiplications += run.count * opcode.multiplications(run.parameter, k);
  }
  return {
    operations,
    entries,
    multiplications,
    inversions: operations.invert ?? 0,
    runs,
    slots,
    terms: operations.term ?? 0,
  };
}

/** The tape as text: inputs, constants, then one line for each operation, `s12` a slot. */
export function printTape(tape: Omit<Tape, "print">): string {
  const lines = [
    `# ${tape.slots} slots, ${tape.counts.entries} operations, ${tape.counts.multiplications} multiplications`,
  ];
  for (const input of tape.inputs)
    lines.push(`s${input.slot} .. s${input.slot + input.width - 1} = ${describeInput(input)}`);
  for (const { slot, numerator, denominator } of tape.constants) {
    lines.push(`s${slot} = ${numerator}${denominator === 1n ? "" : `/${denominator}`}`);
  }
  for (const run of runsOf(tape.code)) {
    const { name, words } = opcodeOf[run.code]!;
    for (let i = 0; i < run.count; i++) {
      const entry = tape.code.subarray(run.at + i * words, run.at + (i + 1) * words);
      lines.push(printEntry(run.code, name, run.parameter, entry));
    }
  }
  return `${lines.join("\n")}\n`;
}

function printEntry(code: number, name: string, parameter: number, entry: Int32Array): string {
  const [out, a, b] = [entry[0]!, entry[1]!, entry[2]!];
  if (name === "term") return `term ${a === 1 ? "-" : "+"}s${out}`;
  if (name === "invert") return `s${out} = invert s${a}, denominator ${b}`;
  if (code >= COMBINE2 && code <= COMBINE5) {
    const parts: string[] = [];
    for (let i = 2; i < entry.length; i += 2) {
      parts.push(`${(a >> (i / 2 - 1)) & 1 ? "-" : "+"} s${entry[i]} s${entry[i + 1]}`);
    }
    return `s${out} = ${name} of ${parameter}: ${parts.join(" ")}`;
  }
  const degree = name === "wedge" || name === "pair" ? ` of degree ${parameter}` : "";
  return `s${out} = ${name}${degree} s${a} s${b}`;
}

/** What a command of the command line is: one file each, in the list of main.ts; help is made from the same table that is parsed. */

export interface Option {
  /** Without the dashes: "points". */
  readonly name: string;
  /** What stands for the value in help, absent for a switch: "FILE". */
  readonly value?: string;
  readonly help: string;
  readonly repeatable?: boolean;
}

export interface Io {
  readonly stdin: NodeJS.ReadableStream;
  readonly stdout: { write(text: string): unknown };
  readonly stderr: { write(text: string): unknown; readonly isTTY?: boolean };
}

/** Parsed words of one call. */
export interface Call {
  readonly positional: readonly string[];
  /** The last value given for an option, or null. */
  option(name: string): string | null;
  all(name: string): readonly string[];
  has(name: string): boolean;
  readonly json: boolean;
  readonly io: Io;
}

/** Exit status: 0 yes, 1 no, 2 unreadable input or bad usage, 3 undecided. */
export type Exit = 0 | 1 | 2 | 3;

export interface Command {
  readonly name: string;
  /** "FILE..." */
  readonly positional: string;
  readonly fewestPositional: number;
  readonly mostPositional: number;
  readonly summary: string;
  readonly options: readonly Option[];
  run(call: Call): Promise<Exit>;
}

/** Bad usage: printed with a pointer to --help, exit status 2. */
export class Usage extends Error {}

const jsonOption: Option = { name: "json", help: "print one JSON document on standard output and nothing else there" };
const helpOption: Option = { name: "help", help: "print this help" };

export function helpText(command: Command): string {
  const options = [...command.options, jsonOption, helpOption];
  const spelled = options.map((o) => `--${o.name}${o.value === undefined ? "" : ` ${o.value}`}`);
  const width = Math.max(...spelled.map((s) => s.length));
  return [
    `equiform ${command.name} ${command.positional}`.trimEnd(),
    "",
    command.summary,
    "",
    ...options.map((o, i) => `  ${(spelled[i] ?? "").padEnd(width)}  ${o.help}`),
    "",
    "A file name of - reads standard input. Exit status: 0 yes, 1 no, 2 unreadable input or bad usage, 3 undecided.",
    "",
  ].join("\n");
}

/** Splits the words of a call. `--name value` and `--name=value` are the same; `--` ends the options. @throws Usage */
export function parseCall(command: Command, words: readonly string[], io: Io): Call | "help" {
  const known = new Map([...command.options, jsonOption, helpOption].map((o) => [o.name, o]));
  const values = new Map<string, string[]>();
  const positional: string[] = [];
  let optionsEnded = false;
  for (let i = 0; i < words.length; i++) {
    const word = words[i] ?? "";
    if (optionsEnded || !word.startsWith("--")) {
      positional.push(word);
      continue;
    }
    if (word === "--") {
      optionsEnded = true;
      continue;
    }
    const [name = "", ...rest] = word.slice(2).split("=");
    const option = known.get(name);
    if (option === undefined) throw new Usage(`there is no option --${name}`);
    if (option.value === undefined) {
      if (rest.length > 0) throw new Usage(`--${name} takes no value`);
      values.set(name, [""]);
      continue;
    }
    let value = rest.join("=");
    if (rest.length === 0) {
      i += 1;
      if (i >= words.length) throw new Usage(`--${name} takes a value: ${option.value}`);
      value = words[i] ?? "";
    }
    const list = values.get(name);
    if (list === undefined) values.set(name, [value]);
    else if (option.repeatable) list.push(value);
    else throw new Usage(`--${name} is given twice`);
  }
  if (values.has("help")) return "help";
  if (positional.length < command.fewestPositional) throw new Usage(`expected ${command.positional}`);
  if (positional.length > command.mostPositional)
    throw new Usage(`too many arguments: ${positional.slice(command.mostPositional).join(" ")}`);
  return {
    positional,
    option: (name) => values.get(name)?.at(-1) ?? null,
    all: (name) => values.get(name) ?? [],
    has: (name) => values.has(name),
    json: values.has("json"),
    io,
  };
}

/** An option that is an integer in a range. @throws Usage */
export function integerOption(call: Call, name: string, low: number, high: number): number | null {
  const text = call.option(name);
  if (text === null) return null;
  if (!/^-?\d{1,15}$/.test(text)) throw new Usage(`--${name}: expected an integer, got ${text}`);
  const value = Number(text);
  if (value < low || value > high) throw new Usage(`--${name}: expected ${low} to ${high}, got ${text}`);
  return value;
}

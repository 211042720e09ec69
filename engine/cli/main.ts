/** The engine's commands: the only engine folder that reads and writes files. */
import { check } from "./check";
import { type Call, type Command, type Exit, helpText, type Io, parseCall, Usage } from "./command";
import { derive } from "./derive";
import { digest } from "./digest";
import { exportForm } from "./export";
import { points } from "./points";
import { replay } from "./replay";
import { value } from "./value";

export const commands: readonly Command[] = [check, value, points, derive, digest, exportForm, replay];

/** Runs one command; `words` are those after the program's name. Never throws for what a person typed. */
export async function main(words: readonly string[], io: Io): Promise<Exit> {
  const [name, ...rest] = words;
  if (name === undefined || name === "--help" || name === "help") {
    (name === undefined ? io.stderr : io.stdout).write(overview());
    return name === undefined ? 2 : 0;
  }
  const command = commands.find((c) => c.name === name);
  if (command === undefined) {
    io.stderr.write(`equiform: there is no command ${name}.\n\n${overview()}`);
    return 2;
  }
  let call: Call | "help";
  try {
    call = parseCall(command, rest, io);
    if (call === "help") {
      io.stdout.write(helpText(command));
      return 0;
    }
    return await command.run(call);
  } catch (error) {
    if (!(error instanceof Usage)) throw error;
    if (rest.includes("--json"))
      io.stdout.write(`${JSON.stringify({ diagnostics: [{ code: "usage", message: error.message }] }, null, 1)}\n`);
    io.stderr.write(`equiform ${command.name}: ${error.message}. See equiform ${command.name} --help.\n`);
    return 2;
  }
}

function overview(): string {
  const width = Math.max(...commands.map((c) => c.name.length));
  return [
    "equiform COMMAND ...: checks, evaluates, derives and exports forms of scattering amplitudes.",
    "",
    ...commands.map((c) => `  ${c.name.padEnd(width)}  ${c.summary}`),
    "",
    "equiform COMMAND --help prints the options of a command.",
    "",
  ].join("\n");
}

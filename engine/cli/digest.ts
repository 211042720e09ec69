/** `digest`: the identity of an entry document's content, and its fingerprint. */
import { amplitudeKey, digestOf, fingerprint, formAt, readEntry, sizesOf } from "../index";
import type { Call, Command, Exit } from "./command";
import { readText } from "./files";
import { diagnosticsText, printJson } from "./print";

export const digest: Command = {
  name: "digest",
  positional: "FILE",
  fewestPositional: 1,
  mostPositional: 1,
  summary: "Prints the digest of an entry document and its fingerprint, the values at the public points.",
  options: [],
  async run(call: Call): Promise<Exit> {
    const text = await readText(call.positional[0] ?? "-", call.io);
    const form = text.ok ? readEntry(text.value) : text;
    if (!form.ok) {
      if (call.json) printJson(call, { diagnostics: form.diagnostics });
      else call.io.stderr.write(`${diagnosticsText(form.diagnostics, null)}\n`);
      return 2;
    }
    // A form for many n has its fingerprint at the smallest n >= 6 of its range, or at the largest n, as in a report.
    const sizes = sizesOf(form.value, 10);
    const at = sizes.find((n) => n >= 6) ?? sizes.at(-1) ?? 4;
    const print = fingerprint(formAt(form.value, at));
    const result = {
      amplitude: amplitudeKey(form.value),
      digest: digestOf(form.value),
      at,
      fingerprint: print.kind === "fingerprint" ? print.text : null,
    };
    if (call.json) printJson(call, result);
    else
      call.io.stdout.write(
        `${result.digest}\n${result.fingerprint ?? "a denominator vanishes at every public point"} (${result.amplitude}, n = ${at})\n`,
      );
    return result.fingerprint === null ? 2 : 0;
  },
};

/** `export`: a form in another language. */
import { exporters, readEntry } from "../index";
import { type Call, type Command, type Exit, Usage } from "./command";
import { readText } from "./files";
import { diagnosticsText, printJson } from "./print";

const names = exporters.map((e) => e.name);

export const exportForm: Command = {
  name: "export",
  positional: "FILE",
  fewestPositional: 1,
  mostPositional: 1,
  summary: "Writes the form of an entry document in another language, on standard output.",
  options: [{ name: "to", value: "LANGUAGE", help: names.join(" or ") }],
  async run(call: Call): Promise<Exit> {
    const exporter = exporters.find((e) => e.name === call.option("to"));
    if (exporter === undefined) throw new Usage(`--to: expected ${names.join(" or ")}`);
    const text = await readText(call.positional[0] ?? "-", call.io);
    const form = text.ok ? readEntry(text.value) : text;
    if (!form.ok) {
      if (call.json) printJson(call, { diagnostics: form.diagnostics });
      else call.io.stderr.write(`${diagnosticsText(form.diagnostics, null)}\n`);
      return 2;
    }
    const written = exporter.write(form.value);
    if (call.json) printJson(call, { language: exporter.name, text: written });
    else call.io.stdout.write(written);
    return 0;
  },
};

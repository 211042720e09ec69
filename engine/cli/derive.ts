/** `derive`: writes a form by a published method, as an entry document. */
import { derive as deriveForm, deriveMethods, printFormula } from "../index";
import { type Call, type Command, type Exit, integerOption, Usage } from "./command";
import { diagnosticsText, printJson } from "./print";

export const derive: Command = {
  name: "derive",
  positional: "",
  fewestPositional: 0,
  mostPositional: 0,
  summary:
    "Writes a form of an amplitude by recursion, vertex expansion or local integrands, and prints its entry document.",
  options: [
    { name: "n", value: "N", help: "number of legs" },
    { name: "k", value: "K", help: "degree: N^kMHV" },
    { name: "loops", value: "L", help: "number of loops, 0 where it is left out" },
    { name: "method", value: "METHOD", help: `${deriveMethods.join(", ")}` },
    { name: "leg", value: "I", help: "recursion: the shifted leg, n where it is left out" },
    { name: "direction", value: "WAY", help: "recursion: forward (the default) or backward" },
  ],
  async run(call: Call): Promise<Exit> {
    const n = integerOption(call, "n", 4, 64);
    const k = integerOption(call, "k", 0, 60);
    if (n === null || k === null) throw new Usage("--n and --k are needed");
    const method = deriveMethods.find((m) => m === (call.option("method") ?? "recursion"));
    if (method === undefined) throw new Usage(`--method: expected ${deriveMethods.join(", ")}`);
    const direction = (["forward", "backward"] as const).find((d) => d === (call.option("direction") ?? "forward"));
    if (direction === undefined) throw new Usage("--direction: expected forward or backward");
    const leg = integerOption(call, "leg", 1, n);
    const derived = deriveForm({
      n,
      k,
      loops: integerOption(call, "loops", 0, 4) ?? 0,
      method,
      direction,
      ...(leg === null ? {} : { leg }),
    });
    if (!derived.ok) {
      if (call.json) printJson(call, { diagnostics: derived.diagnostics });
      else call.io.stderr.write(`${diagnosticsText(derived.diagnostics, null)}\n`);
      return 2;
    }
    const { formula, ...entry } = derived.value;
    printJson(call, { ...entry, notation: printFormula(formula) });
    return 0;
  },
};

/** `replay`: repeats a check from its certificate, without the server. */
import { replay as replayCertificate } from "../index";
import type { Call, Command, Exit } from "./command";
import { readText } from "./files";
import { diagnosticsText, printJson } from "./print";

export const replay: Command = {
  name: "replay",
  positional: "CERTIFICATE",
  fewestPositional: 1,
  mostPositional: 1,
  summary: "Recomputes everything that a certificate states, and says where the two differ.",
  options: [],
  async run(call: Call): Promise<Exit> {
    const text = await readText(call.positional[0] ?? "-", call.io);
    const result = text.ok ? replayCertificate(text.value) : text;
    if (!result.ok) {
      if (call.json) printJson(call, { replays: false, diagnostics: result.diagnostics });
      else call.io.stderr.write(`${diagnosticsText(result.diagnostics, null)}\n`);
      return 2;
    }
    const { certificate, differences } = result.value;
    const { verdict, summary } = certificate.report;
    if (call.json)
      printJson(call, { replays: differences.length === 0, verdict, digest: certificate.subject.digest, differences });
    else if (differences.length === 0)
      call.io.stdout.write(`Replays: every value, comparison and mark was found again.\n${summary}\n`);
    else
      call.io.stdout.write(
        `Does not replay: ${differences.length} ${differences.length === 1 ? "place differs" : "places differ"}.\n${differences
          .map((d) => `  ${d.path}: the certificate says ${d.stated}, the replay found ${d.recomputed}`)
          .join("\n")}\n`,
      );
    return differences.length === 0 ? 0 : 1;
  },
};

/** `check`: the whole check of entry documents. */
import { readdir } from "node:fs/promises";
import { join } from "node:path";
import {
  type AcceptedForm,
  canonicalJson,
  certify,
  checkForm,
  type Diagnostic,
  type Report,
  readEntry,
  unreadable,
} from "../index";
import type { Call, Command, Exit } from "./command";
import { fileFault, readText, writeText } from "./files";
import { diagnosticsText, printJson, reportText } from "./print";
import { freshSeed } from "./seed";

const exits: Readonly<Record<Report["verdict"], Exit>> = { agrees: 0, disagrees: 1, unreadable: 2, undecided: 3 };
/** Of several files the worst decides: unreadable, then disagrees, then undecided. */
const severity: readonly Exit[] = [2, 1, 3, 0];

export const check: Command = {
  name: "check",
  positional: "FILE...",
  fewestPositional: 1,
  mostPositional: 10_000,
  summary: "Checks entry documents against the sources of truth, and says what is wrong where one disagrees.",
  options: [
    { name: "library", value: "DIR", help: "count the entry documents in this folder among the accepted forms" },
    { name: "certificate", value: "OUT", help: "write the certificate of the check to this file (one FILE only)" },
  ],
  run,
};

async function run(call: Call): Promise<Exit> {
  const out = call.option("certificate");
  const library = call.option("library");
  const accepted: AcceptedForm[] = [];
  if (library !== null) {
    const read = await readLibrary(library, call);
    if ("diagnostics" in read) return fail(call, read.diagnostics);
    accepted.push(...read.forms);
  }
  if (out !== null && call.positional.length > 1)
    return fail(call, [
      { code: "usage", message: "--certificate takes one FILE.", help: "Check the files one by one." },
    ]);
  const reports: (Report & { file?: string })[] = [];
  const texts: string[] = [];
  for (const file of call.positional) {
    const { report, text } = await checkFile(file, accepted, out, call);
    reports.push(call.positional.length > 1 ? { file, ...report } : report);
    texts.push(`${call.positional.length > 1 ? `${file}\n` : ""}${reportText(report, notationOf(text))}`);
  }
  if (call.json) printJson(call, reports.length === 1 ? reports[0] : reports);
  else call.io.stdout.write(texts.join("\n"));
  const found = reports.map((r) => exits[r.verdict]);
  return severity.find((exit) => found.includes(exit)) ?? 0;
}

async function checkFile(
  file: string,
  accepted: readonly AcceptedForm[],
  out: string | null,
  call: Call,
): Promise<{ report: Report; text: string }> {
  const text = await readText(file, call.io);
  if (!text.ok) return { report: unreadable(text.diagnostics), text: "" };
  const form = readEntry(text.value);
  if (!form.ok) return { report: unreadable(form.diagnostics), text: text.value };
  const seed = freshSeed();
  const progress = call.io.stderr.isTTY
    ? ({ stage, done, total }: { stage: string; done: number; total: number }) =>
        call.io.stderr.write(`\r${file}: ${stage} ${done}/${total}   `)
    : undefined;
  const record = checkForm(form.value, { seed, accepted, ...(progress === undefined ? {} : { progress }) });
  if (progress !== undefined) call.io.stderr.write(`\r${" ".repeat(file.length + 40)}\r`);
  if (record.report.verdict === "unreadable") return { report: record.report, text: text.value };
  const certificate = certify(form.value, seed, record);
  if (out !== null) {
    const written = await writeText(out, `${canonicalJson(certificate)}\n`);
    if (!written.ok) return { report: unreadable(written.diagnostics), text: text.value };
  }
  return { report: { ...record.report, certificate: { ...certificate } }, text: text.value };
}

/** Every *.json below a folder, read as entry documents; a file that is none is a fault. */
async function readLibrary(
  folder: string,
  call: Call,
): Promise<{ forms: AcceptedForm[] } | { diagnostics: Diagnostic[] }> {
  const forms: AcceptedForm[] = [];
  const diagnostics: Diagnostic[] = [];
  let names: string[];
  try {
    names = (await readdir(folder, { recursive: true })).filter((name) => name.endsWith(".json")).sort();
  } catch {
    return { diagnostics: [fileFault(folder, "it is no folder that can be read")] };
  }
  for (const name of names) {
    const text = await readText(join(folder, name), call.io);
    const form = text.ok ? readEntry(text.value) : text;
    if (form.ok) forms.push({ name, form: form.value });
    else diagnostics.push(...form.diagnostics.map((d) => ({ ...d, message: `${name}: ${d.message}` })));
  }
  return diagnostics.length > 0 ? { diagnostics } : { forms };
}

function fail(call: Call, diagnostics: readonly Diagnostic[]): Exit {
  if (call.json) printJson(call, unreadable(diagnostics));
  else call.io.stderr.write(`${diagnosticsText(diagnostics, null)}\n`);
  return 2;
}

/** The notation of an entry document, for excerpts; null where the document is not JSON. */
function notationOf(text: string): string | null {
  try {
    const value = JSON.parse(text) as { notation?: unknown } | null;
    return typeof value?.notation === "string" ? value.notation : null;
  } catch {
    return null;
  }
}

/** The library that comes with the program: submitted through the normal door on the first start, with progress for all to see. */
import { createHash } from "node:crypto";
import type { SeedProgress } from "../../_contract";
import { read, write } from "../db";
import { submitForm } from "../forms/submit";
import { readFormId } from "../identifiers";
import { localUser } from "../principal";

/** An entry document of the seed library: its path inside the folder, and its text. */
export interface SeedFile {
  readonly path: string;
  readonly text: string;
}

/**
 * Submits every document that was not submitted before with the same content. May be stopped at any moment and called again: each
 * document is submitted once. A document that cannot be read is recorded with what is wrong and does not hold up the others.
 */
export async function submitSeeds(files: readonly SeedFile[]): Promise<void> {
  const digests = files.map(({ text }) => createHash("sha256").update(text).digest("hex"));
  // All are written down first, so that progress knows the whole.
  await write(async (transaction) => {
    for (const [i, { path }] of files.entries()) {
      const digest = digests[i] as string;
      const before = await transaction.seedDocument.findUnique({ where: { path } });
      if (before?.digest === digest) continue;
      await transaction.seedDocument.upsert({
        where: { path },
        create: { path, digest },
        update: { digest, formId: null, problem: null },
      });
    }
  });
  for (const [i, { path, text }] of files.entries()) {
    const row = await read().seedDocument.findUnique({ where: { path } });
    if (!row || row.formId !== null || row.problem !== null) continue;
    const result = await submitSeed(text, `seed-${digests[i]}`);
    await write((transaction) => transaction.seedDocument.update({ where: { path }, data: result }));
  }
}

async function submitSeed(text: string, idempotencyKey: string): Promise<{ formId: string } | { problem: string }> {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (error) {
    return { problem: `not JSON: ${(error as Error).message}` };
  }
  // The key is that of the content: a crash between submission and record repeats the answer, not the form.
  const submitted = await submitForm(localUser, value, { idempotencyKey, priority: -10 });
  if (submitted.ok) return { formId: submitted.value.form };
  const { detail, diagnostics } = submitted.problem;
  return { problem: diagnostics?.map((fault) => fault.message).join("; ") ?? detail };
}

/** How far the seed library has come. */
export async function seedProgress(): Promise<SeedProgress> {
  const documents = await read().seedDocument.findMany({ orderBy: { path: "asc" } });
  const names = documents.flatMap((row) => (row.formId === null ? [] : [readFormId(row.formId)]));
  const states = await read().version.findMany({
    where: {
      latest: true,
      form: { OR: names.flatMap((name) => (name ? [{ amplitudeKey: name.amplitudeKey, number: name.number }] : [])) },
    },
    select: { state: true },
  });
  const count = (state: string) => states.filter((row) => row.state === state).length;
  const unreadable = documents.flatMap(({ path, problem }) => (problem === null ? [] : [{ path, problem }]));
  return {
    total: documents.length,
    submitted: names.length,
    accepted: count("accepted"),
    held: count("held"),
    refused: count("refused"),
    unreadable,
    finished: names.length + unreadable.length === documents.length && count("checking") === 0,
  };
}

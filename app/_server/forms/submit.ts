/** Submission: form, version, check and job are stored in one transaction, or none of them. */
import type { SubmitReply } from "../../_contract";
import { queueCheck } from "../checks/enqueue";
import { type Transaction, write } from "../db";
import { faultOfKey, once } from "../idempotency";
import { formIdOf, manyKey, positionOf, randomId, randomName } from "../identifiers";
import { type Outcome, refuse } from "../outcome";
import { localGroup, type Principal } from "../principal";
import { bodyHash, readStoredEntry, type StoredEntry, searchable } from "./entry";

/**
 * Stores the entry document `value` as a new public form and queues its check. The reply names form, version and check. A document that
 * cannot be read is refused with its diagnostics and nothing is stored. With `idempotencyKey` a repeated call gets the first one's reply.
 */
export async function submitForm(
  principal: Principal,
  value: unknown,
  options: { readonly idempotencyKey?: string | undefined; readonly priority?: number } = {},
): Promise<Outcome<SubmitReply>> {
  if (!principal.groups.includes(localGroup))
    return refuse("forbidden", "Only members of the group may submit to its library.");
  const fault = faultOfKey(options.idempotencyKey);
  if (fault) return fault;
  const read = readStoredEntry(value);
  if (!read.ok)
    return refuse("unreadable-entry", "The entry document has faults; nothing was stored.", read.diagnostics);
  const repeatable = { principal, route: "POST forms", key: options.idempotencyKey, bodyHash: bodyHash(value) };
  return write((transaction) =>
    once(transaction, repeatable, () => store(transaction, principal, read.value, options.priority ?? 0)),
  );
}

async function store(
  transaction: Transaction,
  principal: Principal,
  entry: StoredEntry,
  priority: number,
): Promise<SubmitReply> {
  const { amplitude } = entry;
  // The row for many n serves as the lock of acceptances, so it exists before the first of them.
  const many = { key: manyKey(amplitude), n: null, k: amplitude.k, loops: amplitude.loops };
  await transaction.amplitude.upsert({ where: { key: many.key }, create: many, update: {} });
  const { nextNumber } = await transaction.amplitude.upsert({
    where: { key: amplitude.key },
    create: { ...amplitude, nextNumber: 2 },
    update: { nextNumber: { increment: 1 } },
  });
  const number = nextNumber - 1;
  const formId = randomId();
  const versionId = randomId();
  const checkId = randomId();
  const handle = `${amplitude.key}-p${randomName(16)}`;
  const id = formIdOf({ amplitudeKey: amplitude.key, number, handle });
  await transaction.form.create({
    data: {
      id: formId,
      handle,
      number,
      amplitudeKey: amplitude.key,
      rangeFrom: entry.rangeFrom,
      rangeTo: entry.rangeTo,
      component: entry.component,
      target: entry.target,
      groupId: localGroup,
      visibility: "public",
      position: positionOf(amplitude, number, handle),
      createdBy: principal.userId,
    },
  });
  await transaction.version.create({
    data: {
      id: versionId,
      formId,
      no: 1,
      latest: true,
      digest: entry.digest,
      source: entry.source,
      latex: JSON.stringify(entry.latex),
      firstLine: entry.latex[0] ?? "",
      lines: entry.latex.length,
      title: entry.title,
      method: entry.method,
      state: "checking",
      checkId,
    },
  });
  await transaction.searchText.create({
    data: { versionId, scope: "public", words: `${searchable(id)}\n${entry.words}` },
  });
  await queueCheck(transaction, { id: checkId, versionId, userId: principal.userId, priority });
  return { form: id, version: `${id}v1`, check: checkId, state: "checking" };
}

/** Reads one form: its latest version, or the one that is named. */

import type { Target } from "../../../engine/checks/report";
import type { FormView, Tombstone, VersionState } from "../../_contract";
import { acceptedBeside } from "../checks/beside";
import { placeOf } from "../checks/queue";
import { reportOf } from "../checks/read";
import { read } from "../db";
import { formIdOf, readFormId } from "../identifiers";
import { mayRead, type Principal, visibleTo } from "../principal";
import { membersOf } from "./entry";
import { amplitudeOf } from "./view";

async function findVersion(principal: Principal, text: string) {
  const name = readFormId(text);
  if (!name) return null;
  const form =
    name.number === null ? { handle: name.id, number: null } : { amplitudeKey: name.amplitudeKey, number: name.number };
  const row = await read().version.findFirst({
    where: { ...(name.no === null ? { latest: true } : { no: name.no }), form: { ...form, ...visibleTo(principal) } },
    include: {
      form: { include: { amplitude: true, group: true, versions: { orderBy: { no: "asc" } } } },
    },
  });
  return row;
}

/**
 * The form named `n6k1L0-3` (its latest version) or `n6k1L0-3v2`. A tombstone where a public number has a version that the caller may not
 * read (it was not accepted); null where nothing is named so, or nothing that the caller may know of.
 */
export async function getForm(principal: Principal, name: string): Promise<FormView | Tombstone | null> {
  const row = await findVersion(principal, name);
  if (!row) return null;
  const { form } = row;
  const id = formIdOf(form);
  const version = `${id}v${row.no}`;
  const state = row.state as VersionState;
  if (!mayRead(principal, form, state)) return { kind: "tombstone", id, version, state };
  const entry = membersOf(row.source);
  const check = await read().check.findUnique({
    where: { id: row.checkId },
    select: { report: true, verdict: true, certificate: true },
  });
  return {
    kind: "form",
    id,
    version,
    no: row.no,
    state,
    amplitude: amplitudeOf(form, entry),
    component: entry.component ?? null,
    target: form.target as Target,
    s: entry.s ?? "<ab>[ab]",
    title: row.title,
    notation: entry.notation,
    latex: JSON.parse(row.latex) as string[],
    method: row.method,
    note: entry.note ?? null,
    references: entry.references ?? [],
    digest: row.digest,
    terms: row.terms,
    check: row.checkId,
    report: reportOf(check?.report ?? null),
    hasCertificate: check?.certificate != null,
    equalForms: state === "accepted" ? await equalForms(row) : [],
    versions: form.versions
      .filter((other) => mayRead(principal, form, other.state))
      .map((other) => ({
        version: `${id}v${other.no}`,
        no: other.no,
        state: other.state as VersionState,
        digest: other.digest,
        createdAt: other.createdAt.toISOString(),
      })),
    group: { id: form.group.id, name: form.group.name },
    visibility: form.visibility as FormView["visibility"],
    createdAt: row.createdAt.toISOString(),
  };
}

/** The other forms that equal an accepted one: at one n all accepted forms of an amplitude, component and target are equal. */
async function equalForms(
  row: Parameters<typeof placeOf>[0] & { readonly formId: string },
): Promise<FormView["equalForms"]> {
  const beside = await acceptedBeside(read(), placeOf(row));
  const others = await read().version.findMany({
    where: { id: { in: beside.map((other) => other.versionId) }, formId: { not: row.formId }, latest: true },
    select: { title: true, terms: true, form: true },
    orderBy: { form: { position: "asc" } },
  });
  return others.map(({ title, terms, form }) => ({ id: formIdOf(form), title, terms }));
}

/** The certificate of a version as stored text (JSON); null where the form is unknown or its check has none. */
export async function getCertificate(principal: Principal, name: string): Promise<string | null> {
  const row = await findVersion(principal, name);
  if (!row || !mayRead(principal, row.form, row.state)) return null;
  const check = await read().check.findUnique({ where: { id: row.checkId }, select: { certificate: true } });
  return check?.certificate ?? null;
}

/** The entry document of a version that the caller may read, or null. */
export async function getEntry(principal: Principal, name: string): Promise<unknown> {
  const row = await findVersion(principal, name);
  return row && mayRead(principal, row.form, row.state) ? (JSON.parse(row.source) as unknown) : null;
}

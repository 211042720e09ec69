/** Makes what callers see of a form from database rows. */

import { type MarkCode, markCodes, type Target } from "../../../engine/checks/report";
import type { FormSummary, VersionState } from "../../_contract";
import { formIdOf } from "../identifiers";
import { type EntryMembers, membersOf } from "./entry";

/** The rows a summary is made of. */
export const summaryParts = { form: { include: { amplitude: true } }, marks: true } as const;

export interface SummaryRow {
  readonly id: string;
  readonly no: number;
  readonly state: string;
  readonly source: string;
  readonly title: string | null;
  readonly method: string | null;
  readonly terms: number | null;
  readonly spurious: number | null;
  readonly firstLine: string;
  readonly lines: number;
  readonly checkId: string;
  readonly createdAt: Date;
  readonly marks: readonly { readonly code: string; readonly state: string; readonly manifest: boolean | null }[];
  readonly form: FormRow;
}

export interface FormRow {
  readonly amplitudeKey: string;
  readonly number: number | null;
  readonly handle: string;
  readonly target: string;
  readonly amplitude: { readonly k: number; readonly loops: number };
}

/** The amplitude as the caller sees it. */
export function amplitudeOf(form: FormRow, { amplitude }: EntryMembers): FormSummary["amplitude"] {
  const { n } = amplitude;
  return {
    key: form.amplitudeKey,
    n: typeof n === "number" ? n : null,
    range: typeof n === "number" ? null : { from: n.from, to: n.to ?? null },
    k: form.amplitude.k,
    loops: form.amplitude.loops,
  };
}

const markOrder = new Map<string, number>(markCodes.map((code, place) => [code, place]));

export function summaryOf(row: SummaryRow): FormSummary {
  const entry = membersOf(row.source);
  const id = formIdOf(row.form);
  return {
    id,
    version: `${id}v${row.no}`,
    state: row.state as VersionState,
    amplitude: amplitudeOf(row.form, entry),
    component: entry.component ?? null,
    target: row.form.target as Target,
    title: row.title,
    method: row.method,
    references: entry.references ?? [],
    firstLine: row.firstLine,
    lines: row.lines,
    terms: row.terms,
    spuriousPoles: row.spurious,
    marks: row.marks
      .map(({ code, state, manifest }) => ({
        code: code as MarkCode,
        state: state as FormSummary["marks"][number]["state"],
        manifest,
      }))
      .sort((a, b) => (markOrder.get(a.code) ?? 0) - (markOrder.get(b.code) ?? 0)),
    check: row.checkId,
    createdAt: row.createdAt.toISOString(),
  };
}

/** The draft that the browser keeps of an unfinished submission, and the key that makes a repeated submission harmless. */
import { type Fields, fieldNames } from "./entryFields";

const place = "equiform-draft-1";

export interface Draft {
  readonly fields: Fields;
  /** Key of the last attempt to submit and what it sent, so that a retry after a reload is the same request. */
  readonly attempt: { readonly key: string; readonly body: string } | null;
}

/** The kept draft, or null where there is none or the browser keeps none. */
export function keptDraft(): Draft | null {
  try {
    const value: unknown = JSON.parse(localStorage.getItem(place) ?? "null");
    return isDraft(value) ? value : null;
  } catch {
    return null;
  }
}

/** Keeps the draft; a browser that refuses (full, private) leaves the page working without. */
export function keepDraft(draft: Draft): void {
  try {
    localStorage.setItem(place, JSON.stringify(draft));
  } catch {
    return;
  }
}

export function dropDraft(): void {
  try {
    localStorage.removeItem(place);
  } catch {
    return;
  }
}

function isDraft(value: unknown): value is Draft {
  if (typeof value !== "object" || value === null || !("fields" in value) || !("attempt" in value)) return false;
  const { fields, attempt } = value;
  if (typeof fields !== "object" || fields === null) return false;
  if (!fieldNames.every((name) => typeof (fields as Record<string, unknown>)[name] === "string")) return false;
  if (attempt === null) return true;
  if (typeof attempt !== "object" || attempt === undefined) return false;
  return "key" in attempt && typeof attempt.key === "string" && "body" in attempt && typeof attempt.body === "string";
}

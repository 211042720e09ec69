"use client";

import { useActionState, useCallback, useEffect, useId, useMemo, useRef, useState } from "react";
import type { Diagnostic } from "../../../engine/result";
import type { Problem, SubmitReply } from "../../_contract";
import { Diagnostics } from "../Diagnostics";
import { CodeField, type CodeFieldHandle } from "./CodeField";
import { dropDraft, keepDraft, keptDraft } from "./draft";
import { EntryFields } from "./EntryFields";
import { entryOf, type FieldName, type Fields } from "./entryFields";
import { PreviewPane } from "./PreviewPane";
import styles from "./SubmitForm.module.css";
import { usePreview } from "./usePreview";

/** What the server says of a submission it did not take: the problem, and the fields as they were sent. */
export interface Refusal {
  readonly fields: Fields;
  readonly problem: Pick<Problem, "detail" | "diagnostics">;
}

const none: readonly Diagnostic[] = [];

/** Sends the fields without script; redirects to the check, or gives back what is wrong. */
export type SubmitAction = (before: Refusal | null, data: FormData) => Promise<Refusal | null>;

/**
 * The form of the submit page. Without script it is a plain form that posts to `action`. With script it keeps a draft, shows
 * the formula as it is typed, and sends the entry document to the API; the idempotency key, made with the page, makes a double
 * click, a retry and a reload one submission.
 */
export function SubmitForm(props: {
  initial: Fields;
  /** True where the address asks for these fields, so that a kept draft does not replace them. */
  asked: boolean;
  idempotencyKey: string;
  nonce: string | null;
  action: SubmitAction;
}) {
  const [refusal, act, acting] = useActionState(props.action, null);
  const [fields, setFields] = useState<Fields>(refusal?.fields ?? props.initial);
  const [problem, setProblem] = useState<Refusal["problem"] | null>(refusal?.problem ?? null);
  const [restored, setRestored] = useState(false);
  const [sending, setSending] = useState(false);
  const busy = useRef(false);
  const attempt = useRef<{ key: string; body: string } | null>(null);
  const editor = useRef<CodeFieldHandle>(null);
  const touched = useRef(false);
  const preview = usePreview(fields);
  const faultsId = useId();

  useEffect(() => {
    if (refusal === null) return;
    setFields(refusal.fields);
    setProblem(refusal.problem);
  }, [refusal]);

  useEffect(() => {
    const draft = keptDraft();
    if (draft === null || props.asked) return;
    attempt.current = draft.attempt;
    setFields(draft.fields);
    editor.current?.setText(draft.fields.notation);
    setRestored(true);
  }, [props.asked]);

  useEffect(() => {
    if (!touched.current) return;
    const timer = setTimeout(() => keepDraft({ fields, attempt: attempt.current }), 400);
    return () => clearTimeout(timer);
  }, [fields]);

  const change = useCallback((name: FieldName, value: string) => {
    touched.current = true;
    setProblem(null);
    setFields((before) => (before[name] === value ? before : { ...before, [name]: value }));
  }, []);
  const changeNotation = useCallback((text: string) => change("notation", text), [change]);

  const begin = () => {
    dropDraft();
    attempt.current = null;
    setFields(props.initial);
    editor.current?.setText(props.initial.notation);
    setRestored(false);
    touched.current = false;
  };

  /** Sends the entry document; true when the page is being left for the check. */
  const send = async (): Promise<boolean> => {
    const { entry, diagnostics } = entryOf(fields);
    if (diagnostics.length > 0) {
      setProblem({ detail: "A field cannot be read.", diagnostics: [...diagnostics] as Problem["diagnostics"] });
      return false;
    }
    const body = JSON.stringify(entry);
    if (attempt.current?.body !== body) {
      attempt.current = { key: attempt.current === null ? props.idempotencyKey : crypto.randomUUID(), body };
    }
    keepDraft({ fields, attempt: attempt.current });
    const outcome = await post(body, attempt.current.key);
    if (!("check" in outcome)) {
      setProblem(outcome);
      return false;
    }
    dropDraft();
    touched.current = false;
    window.location.assign(`/checks/${outcome.check}`);
    return true;
  };

  const submitted = async (event: React.FormEvent) => {
    event.preventDefault();
    if (busy.current) return;
    busy.current = true;
    setSending(true);
    if (await send()) return;
    busy.current = false;
    setSending(false);
  };

  // A page that comes back from the browser's own cache after "back" can be sent again.
  useEffect(() => {
    const back = (event: PageTransitionEvent) => {
      if (!event.persisted) return;
      busy.current = false;
      setSending(false);
    };
    window.addEventListener("pageshow", back);
    return () => window.removeEventListener("pageshow", back);
  }, []);

  const shown = useMemo(() => {
    if (problem?.diagnostics !== undefined && problem.diagnostics.length > 0) {
      return { source: fields.notation, diagnostics: problem.diagnostics };
    }
    if (preview.preview.kind !== "faults") return null;
    return { source: preview.notation, diagnostics: preview.preview.diagnostics };
  }, [problem, preview, fields.notation]);

  return (
    <form className={styles.form} action={act} onSubmit={submitted} noValidate>
      <input type="hidden" name="idempotencyKey" value={props.idempotencyKey} />
      {restored && (
        <p className={styles.restored}>
          This is the draft that this browser kept.{" "}
          <button type="button" onClick={begin}>
            Begin anew
          </button>
        </p>
      )}
      <EntryFields fields={fields} change={change} part="amplitude" />
      <CodeField
        ref={editor}
        initial={fields.notation}
        nonce={props.nonce}
        describedBy={faultsId}
        faults={shown !== null && shown.source === fields.notation ? shown.diagnostics : none}
        changed={changeNotation}
      />
      <div id={faultsId} aria-live="polite" className={styles.faults}>
        {problem !== null && <p className={styles.problem}>{problem.detail}</p>}
        {shown !== null && (
          <Diagnostics
            source={shown.source}
            diagnostics={shown.diagnostics}
            apply={({ span, replacement }) => editor.current?.replace(span[0], span[1], replacement)}
          />
        )}
      </div>
      <PreviewPane state={preview} />
      <EntryFields fields={fields} change={change} part="about" />
      <p className={styles.send}>
        <button type="submit" disabled={sending || acting}>
          {sending || acting ? "Sending…" : "Submit and check"}
        </button>{" "}
        <span>The form is kept under a new identifier and checked at once.</span>
      </p>
    </form>
  );
}

/** Posts the entry document; a lost connection is a problem like any other, and the text stays. */
async function post(body: string, key: string): Promise<SubmitReply | Refusal["problem"]> {
  try {
    const reply = await fetch("/api/v1/forms", {
      method: "POST",
      headers: { "content-type": "application/json", "idempotency-key": key },
      body,
    });
    const value = (await reply.json()) as SubmitReply | Problem;
    if (reply.ok && "check" in value) return value;
    if ("detail" in value) return value;
    return { detail: `The server answered with status ${reply.status}. The text is kept here; try again.` };
  } catch {
    return { detail: "The server could not be reached. The text is kept in this browser; try again in a moment." };
  }
}

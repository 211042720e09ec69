"use client";

import { type Ref, useEffect, useImperativeHandle, useRef, useState } from "react";
import type { Diagnostic } from "../../../engine/result";
import type { CodeEditor } from "./codeEditor";
import styles from "./SubmitForm.module.css";

export interface CodeFieldHandle {
  setText(text: string): void;
  replace(from: number, to: number, text: string): void;
}

/**
 * The field of the formula: a text area in the page as sent, which the code editor takes the place of once it is loaded.
 * Both have the same size, so nothing moves.
 */
export function CodeField(props: {
  ref: Ref<CodeFieldHandle>;
  initial: string;
  nonce: string | null;
  describedBy: string;
  faults: readonly Diagnostic[];
  changed: (text: string) => void;
}) {
  const { changed, nonce, describedBy, faults } = props;
  const [text, setText] = useState(props.initial);
  const [ready, setReady] = useState(false);
  // What the editor holds; the text area behind it is not kept up to date, because writing a long text into it takes time.
  const latest = useRef(props.initial);
  const place = useRef<HTMLDivElement>(null);
  const area = useRef<HTMLTextAreaElement>(null);
  const editor = useRef<CodeEditor | null>(null);

  useEffect(() => {
    let gone = false;
    import("./codeEditor").then(({ createCodeEditor }) => {
      if (gone || place.current === null) return;
      const focused = document.activeElement === area.current;
      // What was typed into the text area before any script ran is not lost.
      const typed = area.current !== null && !area.current.hidden ? area.current.value : latest.current;
      if (typed !== latest.current) {
        latest.current = typed;
        changed(typed);
      }
      editor.current = createCodeEditor({
        parent: place.current,
        text: latest.current,
        labelledBy: "notation-label",
        describedBy,
        nonce,
        changed: (next) => {
          latest.current = next;
          changed(next);
        },
      });
      setReady(true);
      if (focused) editor.current.focus();
    });
    return () => {
      gone = true;
      editor.current?.destroy();
      editor.current = null;
    };
  }, [changed, nonce, describedBy]);

  useEffect(() => {
    if (ready) editor.current?.showFaults(faults);
  }, [faults, ready]);

  useImperativeHandle(
    props.ref,
    () => ({
      setText: (next) => {
        latest.current = next;
        if (editor.current === null) setText(next);
        else editor.current.setText(next);
      },
      replace: (from, to, next) => editor.current?.replace(from, to, next),
    }),
    [],
  );

  return (
    <div className={styles.code}>
      <label id="notation-label" htmlFor="notation">
        Formula, in the <a href="/reference">notation</a>
      </label>
      <div className={styles.codeBox}>
        <textarea
          id="notation"
          name="notation"
          ref={area}
          hidden={ready}
          value={text}
          rows={7}
          spellCheck={false}
          autoCapitalize="off"
          autoComplete="off"
          onChange={(event) => {
            latest.current = event.target.value;
            setText(event.target.value);
            changed(event.target.value);
          }}
        />
        <div ref={place} className={styles.editor} hidden={!ready} />
      </div>
    </div>
  );
}

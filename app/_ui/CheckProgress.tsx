"use client";

import { useEffect, useState } from "react";
import type { CheckEvent, CheckView } from "../_contract";
import styles from "./CheckProgress.module.css";
import { stageSentence } from "./stages";

/**
 * Progress of a check as it happens. The browser reconnects a lost event stream by itself, from the last event it has; when the
 * check has ended the page is loaded again and then shows the verdict.
 */
export function CheckProgress({ check }: { check: Pick<CheckView, "id" | "state" | "progress"> }) {
  const [now, setNow] = useState(check);
  const [lost, setLost] = useState(false);
  const [cancelling, setCancelling] = useState(false);
  const [live, setLive] = useState(false);

  useEffect(() => {
    setLive(true);
    const events = new EventSource(`/api/v1/checks/${check.id}/events`);
    const heard = (message: MessageEvent<string>) => {
      const event = JSON.parse(message.data) as CheckEvent;
      setLost(false);
      setNow({ id: check.id, state: event.state, progress: event.progress });
    };
    const ended = () => {
      events.close();
      window.location.reload();
    };
    events.addEventListener("progress", heard);
    events.addEventListener("end", ended);
    events.onerror = () => setLost(true);
    return () => events.close();
  }, [check.id]);

  const cancel = async () => {
    setCancelling(true);
    try {
      await fetch(`/api/v1/checks/${check.id}`, { method: "DELETE" });
    } catch {
      setCancelling(false);
      setLost(true);
    }
  };

  const { done, total } = now.progress;
  return (
    <div className={styles.progress}>
      <p aria-live="polite">{stageSentence(now.state, now.progress.stage)}</p>
      <progress aria-label="Progress of the check" max={Math.max(total, 1)} value={Math.min(done, total)} />
      <p className={styles.count}>{total > 0 ? `${done} of ${total} steps` : "\u00a0"}</p>
      <p className={styles.count} role="status">
        {lost ? "The connection is lost; trying again. The check goes on without this page." : "\u00a0"}
      </p>
      {live && (
        <p>
          <button type="button" onClick={cancel} disabled={cancelling}>
            {cancelling ? "Cancelling…" : "Cancel the check"}
          </button>
        </p>
      )}
    </div>
  );
}

"use client";

import { useEffect, useState } from "react";

/** Copies `text`. Appears only where script runs, in a place kept free for it, and says aloud what it did. */
export function CopyButton({ text, what }: { text: string; what: string }) {
  const [ready, setReady] = useState(false);
  const [said, setSaid] = useState("");
  useEffect(() => setReady(true), []);
  useEffect(() => {
    if (said === "") return;
    const timer = setTimeout(() => setSaid(""), 4000);
    return () => clearTimeout(timer);
  }, [said]);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      setSaid("Copied.");
    } catch {
      setSaid("The browser refused to copy; select the text instead.");
    }
  };
  return (
    <span style={{ visibility: ready ? "visible" : "hidden" }} className="screen-only">
      <button type="button" onClick={copy}>
        Copy {what}
      </button>{" "}
      <span role="status">{said}</span>
    </span>
  );
}

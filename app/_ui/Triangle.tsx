import type { CSSProperties } from "react";
import type { Triangle as TriangleView } from "../_contract";
import { Latex } from "./Formula";
import styles from "./Triangle.module.css";
import { amplitudeLatex, amplitudeName } from "./words";

type TriangleRow = TriangleView["rows"][number];
type TriangleEntry = TriangleRow["entries"][number];

/** What is known of an amplitude, in a few words each. */
export function known({
  accepted,
  held,
  checking,
}: Pick<TriangleEntry, "accepted" | "held" | "checking">): readonly string[] {
  const parts = [
    ...(accepted > 0 ? [accepted === 1 ? "1 form" : `${accepted} forms`] : []),
    ...(held > 0 ? [`${held} held`] : []),
    ...(checking > 0 ? [`${checking} in check`] : []),
  ];
  return parts.length === 0 ? ["none yet"] : parts;
}

/**
 * The amplitudes of one loop order: a row for each number of legs n, in it k = 0 ... n-4, centred, so that parity
 * (k to n-4-k) is the reflection of the picture. The strokes between rows are the soft limits: to the upper right k stays,
 * to the upper left it falls by one.
 */
export function Triangle({ loops, rows }: { loops: number; rows: readonly TriangleRow[] }) {
  const widest = Math.max(...rows.map((row) => row.entries.length));
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard
    <section className={styles.box} aria-label="Triangle of amplitudes" tabIndex={0}>
      <ol className={styles.rows} style={{ "--widest": widest } as CSSProperties}>
        {rows.map((row, index) => (
          <li key={row.n} className={styles.row}>
            {index > 0 && <Strokes above={rows[index - 1]?.entries.length ?? 0} />}
            <span className={styles.legs}>
              <i>n</i> = {row.n}
            </span>
            <ol className={styles.entries}>
              {row.entries.map((entry) => (
                <li key={entry.k} className={styles.entry}>
                  <a
                    href={`/amplitudes/${entry.key}`}
                    className={entry.accepted > 0 ? styles.known : styles.open}
                    aria-label={`${amplitudeName({ n: row.n, k: entry.k, loops })}: ${known(entry).join(", ")}`}
                  >
                    <span aria-hidden="true">
                      <Latex latex={amplitudeLatex({ n: row.n, k: entry.k, loops })} />
                    </span>
                    {known(entry).map((words) => (
                      <span key={words} className={styles.words}>
                        {words}
                      </span>
                    ))}
                  </a>
                </li>
              ))}
            </ol>
          </li>
        ))}
      </ol>
    </section>
  );
}

/** Strokes from each entry of the row above to its two neighbours below. */
function Strokes({ above }: { above: number }) {
  const path = Array.from({ length: above }, (_, k) => {
    const x = 2 * k + 2;
    return `M${x} 0L${x - 0.72} 1M${x} 0L${x + 0.72} 1`;
  }).join("");
  return (
    <svg
      className={styles.strokes}
      style={{ "--cells": above + 1 } as CSSProperties}
      viewBox={`0 0 ${2 * above + 2} 1`}
      preserveAspectRatio="none"
      aria-hidden="true"
    >
      <path d={path} vectorEffect="non-scaling-stroke" />
    </svg>
  );
}

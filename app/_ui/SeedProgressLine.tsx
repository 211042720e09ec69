import type { SeedProgress } from "../_contract";
import styles from "./CheckProgress.module.css";
import { listed, numbered } from "./words";

/** How far the library that comes with the program is checked; nothing once it is done and all of it could be read. */
export function SeedProgressLine({ progress }: { progress: SeedProgress }) {
  const { total, accepted, held, refused, unreadable, finished } = progress;
  if (total === 0 || (finished && unreadable.length === 0)) return null;
  const ended = accepted + held + refused + unreadable.length;
  const parts = [
    `${numbered(accepted, "is", "are")} accepted`,
    ...(held > 0 ? [`${numbered(held, "is", "are")} held`] : []),
    ...(refused > 0 ? [`${numbered(refused, "is", "are")} not accepted`] : []),
    ...(unreadable.length > 0 ? [`${numbered(unreadable.length, "is", "are")} unreadable`] : []),
  ];
  return (
    <div className={styles.progress}>
      <p>
        {finished
          ? "The library that comes with the program is checked"
          : "The library that comes with the program is being checked, like any submission"}
        : of its {numbered(total, "form")}, {listed(parts)}.
      </p>
      {!finished && <progress aria-label="Forms of the seed library checked" max={total} value={ended} />}
      {unreadable.length > 0 && (
        <ul>
          {unreadable.map(({ path, problem }) => (
            <li key={path}>
              <code>{path}</code>: {problem}
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}

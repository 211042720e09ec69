import type { Mark, MarkCode, Report } from "../../engine/checks/report";
import styles from "./Marks.module.css";
import { markSentence, marks, readingOrder } from "./marks";
import { Prose } from "./Prose";

/** One mark as a sentence with its evidence; nothing for a mark that states nothing. */
export function MarkSentence({ code, mark }: { code: MarkCode; mark: Mark }) {
  const sentence = markSentence(code, mark);
  if (sentence === null) return null;
  return (
    <li>
      {sentence}
      {mark.evidence !== "" && (
        <span className={styles.evidence}>
          {" "}
          <Prose text={mark.evidence} />
        </span>
      )}
    </li>
  );
}

/** All marks of a report in the order of reading; what was not tested or does not apply is named below. */
export function Marks({ marks: given }: { marks: Report["marks"] }) {
  const present = readingOrder.flatMap((code) => {
    const mark = given[code];
    return mark === undefined ? [] : [{ code, mark }];
  });
  const stated = present.filter(({ mark }) => mark.state === "fails" || mark.state === "holds");
  const silent = present.filter(({ mark }) => mark.state === "untested" || mark.state === "notApplicable");
  return (
    <>
      {stated.length === 0 && <p>Nothing was tested that can be stated of it.</p>}
      <ul className={styles.list}>
        {stated.map(({ code, mark }) => (
          <MarkSentence key={code} code={code} mark={mark} />
        ))}
      </ul>
      {silent.length > 0 && (
        <details>
          <summary>What was not tested, and why</summary>
          <ul className={styles.list}>
            {silent.map(({ code, mark }) => (
              <li key={code}>
                {marks[code].name} {mark.state === "untested" ? "was not tested." : "does not apply."}
                {mark.evidence !== "" && (
                  <span className={styles.evidence}>
                    {" "}
                    <Prose text={mark.evidence} />
                  </span>
                )}
              </li>
            ))}
          </ul>
        </details>
      )}
    </>
  );
}

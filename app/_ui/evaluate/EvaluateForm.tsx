"use client";

import { useActionState } from "react";
import type { EvaluateReply, Problem } from "../../_contract";
import { Diagnostics } from "../Diagnostics";
import styles from "../editor/SubmitForm.module.css";
import { Section } from "../Page";
import own from "./Evaluate.module.css";
import { addressOf, type EvaluateFields } from "./evaluateFields";
import { ValueResult } from "./ValueResult";

/** What the page holds: the fields, and what they came to. */
export interface EvaluateState {
  readonly fields: EvaluateFields;
  /** The formula whose characters a fault's place counts in. */
  readonly notation: string;
  readonly reply: EvaluateReply | null;
  readonly problem: Pick<Problem, "detail" | "diagnostics"> | null;
  /** False where points were typed or uploaded that no address could hold. */
  readonly addressed: boolean;
}

export type EvaluateAction = (before: EvaluateState | null, data: FormData) => Promise<EvaluateState | null>;

/** What is evaluated, where and in which numbers; below it the values. A plain form without script. */
export function EvaluateForm({ initial, action }: { initial: EvaluateState; action: EvaluateAction }) {
  const [after, act, acting] = useActionState(action, null);
  const state = after ?? initial;
  return (
    <>
      <div aria-live="polite" className={own.live}>
        {(state.reply !== null || state.problem !== null) && (
          <Section id="values" head={state.problem === null ? "Values" : "No values"} wide>
            <Result state={state} />
          </Section>
        )}
      </div>
      <Section id="ask" head="Evaluate">
        <form key={JSON.stringify(state.fields)} className={styles.form} action={act} noValidate>
          <WhatFields fields={state.fields} />
          <WhereFields fields={state.fields} />
          <HowFields fields={state.fields} />
          <p className={styles.send}>
            <button type="submit" disabled={acting}>
              {acting ? "Evaluating" : "Evaluate"}
            </button>
            <span>At most 1,000 points and 2,000 values here; the command line has no such limit.</span>
          </p>
        </form>
      </Section>
    </>
  );
}

function Result({ state }: { state: EvaluateState }) {
  const { reply, problem, fields, notation, addressed } = state;
  return (
    <>
      {problem !== null && (
        <>
          <p className={styles.problem}>{problem.detail}</p>
          {problem.diagnostics !== undefined && <Diagnostics source={notation} diagnostics={problem.diagnostics} />}
        </>
      )}
      {reply !== null && (
        <ValueResult
          reply={reply}
          name={fields.form.trim() === "" ? "values" : `${fields.form.trim()}-values`}
          address={addressed ? addressOf({ ...fields, seed: reply.seed ?? fields.seed }) : null}
        />
      )}
    </>
  );
}

type Name = keyof EvaluateFields;

function Text(props: {
  fields: EvaluateFields;
  name: Name;
  label: string;
  help: string;
  size: "short" | "middle" | "wide";
}) {
  const { fields, name, label, help, size } = props;
  return (
    <p className={`${styles.field} ${styles[size] ?? ""}`}>
      <label htmlFor={name}>{label}</label>
      <input id={name} name={name} defaultValue={fields[name]} aria-describedby={`${name}-help`} autoComplete="off" />
      <span id={`${name}-help`} className={styles.help}>
        {help}
      </span>
    </p>
  );
}

function WhatFields({ fields }: { fields: EvaluateFields }) {
  const typed = fields.notation !== "";
  return (
    <fieldset className={styles.fields}>
      <legend>What</legend>
      <Text fields={fields} name="form" label="A kept form" help="its identifier, as n6k1L0-2" size="middle" />
      <Text
        fields={fields}
        name="helicities"
        label="Gluon helicities"
        help="--+-++, or all; empty for the form’s own value"
        size="middle"
      />
      <Text fields={fields} name="at" label="At n" help="for a form for many n" size="short" />
      {fields.derived !== "" && (
        <>
          {(["derived", "leg", "direction"] as const).map((name) => (
            <input key={name} type="hidden" name={name} value={fields[name]} />
          ))}
          <p className={styles.wide}>
            Where neither an identifier nor a formula is given: the form derived by {fields.derived}, n = {fields.n}, k
            = {fields.k}, loops = {fields.loops}
            {fields.leg !== "" && <>, leg {fields.leg}</>}.
          </p>
        </>
      )}
      <details className={styles.rest} open={typed}>
        <summary>A formula or an entry document instead</summary>
        <div className={styles.fields}>
          <Text fields={fields} name="n" label="Legs n" help="7, or 5..12, or 5.. for all" size="short" />
          <Text fields={fields} name="k" label="Degree k" help="0 for MHV, 1 for NMHV" size="short" />
          <Text fields={fields} name="loops" label="Loops" help="0 for a tree" size="short" />
          <Text
            fields={fields}
            name="component"
            label="Component"
            help="--+-++ where the formula is one; empty for the superamplitude"
            size="middle"
          />
          <p className={`${styles.field} ${styles.wide}`}>
            <label htmlFor="notation">Formula in the notation, or entry document as JSON</label>
            <textarea
              id="notation"
              name="notation"
              rows={4}
              className={own.data}
              defaultValue={fields.notation}
              spellCheck={false}
              autoCapitalize="off"
            />
          </p>
        </div>
      </details>
    </fieldset>
  );
}

function WhereFields({ fields }: { fields: EvaluateFields }) {
  const place = (where: string, words: string) => (
    <label>
      <input type="radio" name="where" value={where} defaultChecked={fields.where === where} />
      <span>{words}</span>
    </label>
  );
  return (
    <fieldset className={styles.fields}>
      <legend>Where</legend>
      <div className={own.choices}>
        {place("random", "at random momentum twistors, with loop lines and Grassmann parts")}
        {place("phaseSpace", "at random physical momenta: legs 1 and 2 incoming, the others flat in phase space")}
        {place("own", "at points or momenta of my own")}
      </div>
      <Text fields={fields} name="count" label="How many" help="of the random ones" size="short" />
      <Text fields={fields} name="seed" label="Seed" help="drawn where it is empty" size="middle" />
      <Text fields={fields} name="energy" label="Total energy" help="of physical momenta; 1" size="short" />
      <details className={styles.rest} open={fields.where === "own"}>
        <summary>Points or momenta of my own</summary>
        <div className={styles.fields}>
          <p className={`${styles.field} ${styles.wide}`}>
            <label htmlFor="data">Points or momenta as JSON</label>
            <textarea
              id="data"
              name="data"
              rows={6}
              className={own.data}
              defaultValue={fields.data}
              spellCheck={false}
              aria-describedby="data-help"
            />
            <span id="data-help" className={styles.help}>
              <code>{'{"momenta": [[["E", "x", "y", "z"], ...]]}'}</code>, all outgoing, or{" "}
              <code>{'{"points": [{"twistors": [["1", "0", "3/2", "5"], ...]}]}'}</code>; the command{" "}
              <code>points</code> writes some. Numbers as text keep all their digits.
            </span>
          </p>
          <p className={`${styles.field} ${styles.wide}`}>
            <label htmlFor="upload">Or a file with them</label>
            <input id="upload" name="upload" type="file" accept=".json,application/json" />
          </p>
        </div>
      </details>
    </fieldset>
  );
}

function HowFields({ fields }: { fields: EvaluateFields }) {
  return (
    <fieldset className={styles.fields}>
      <legend>In which numbers</legend>
      <p className={`${styles.field} ${styles.middle}`}>
        <label htmlFor="field">Numbers</label>
        <select id="field" name="field" defaultValue={fields.field} aria-describedby="field-help">
          <option value="">exact; for momenta, double precision</option>
          <option value="rational">exact fractions</option>
          <option value="complex">double precision, with an error</option>
          <option value="prime">integers modulo 2^61 − 1</option>
        </select>
        <span id="field-help" className={styles.help}>
          Physical momenta in exact fractions have signature (2,2).
        </span>
      </p>
    </fieldset>
  );
}

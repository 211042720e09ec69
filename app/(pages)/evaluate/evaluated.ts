/** From the fields of the page to its values or what is wrong with them. */
import { deriveForm } from "../../_server/derive";
import { evaluate } from "../../_server/evaluate";
import { localUser } from "../../_server/principal";
import { deriveRequestOf, readDeriveFields } from "../../_ui/derive/deriveQuery";
import type { EvaluateState } from "../../_ui/evaluate/EvaluateForm";
import { asksForValues, deriveFieldsOf, type EvaluateFields, requestOf } from "../../_ui/evaluate/evaluateFields";

/** @param addressed whether an address says these fields */
export async function evaluated(fields: EvaluateFields, addressed: boolean): Promise<EvaluateState> {
  const blank: EvaluateState = { fields, notation: fields.notation, reply: null, problem: null, addressed };
  if (!asksForValues(fields)) return blank;
  let derived: unknown;
  if (fields.form.trim() === "" && fields.notation.trim() === "") {
    const made = await deriveForm(localUser, deriveRequestOf(readDeriveFields(deriveFieldsOf(fields))));
    if (!made.ok) return { ...blank, problem: made.problem };
    derived = made.value.document;
  }
  const asked = requestOf(fields, derived);
  if ("fault" in asked) return { ...blank, problem: { detail: asked.fault } };
  const values = await evaluate(localUser, asked.request);
  return values.ok
    ? { ...blank, notation: asked.notation, reply: values.value }
    : { ...blank, notation: asked.notation, problem: values.problem };
}

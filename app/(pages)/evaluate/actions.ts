"use server";

import { randomBytes } from "node:crypto";
import { redirect } from "next/navigation";
import type { EvaluateState } from "../../_ui/evaluate/EvaluateForm";
import { addressOf, type EvaluateFields, emptyEvaluate, evaluateFieldNames } from "../../_ui/evaluate/evaluateFields";
import { evaluated } from "./evaluated";

/** Characters of an address that every server and browser on the way takes. */
const longestAddress = 6000;

/** Takes the fields of the page: to the address that says them where one can, else the values of what was typed or uploaded. */
export async function evaluateFields(_before: EvaluateState | null, data: FormData): Promise<EvaluateState | null> {
  const fields: EvaluateFields = { ...emptyEvaluate };
  for (const name of evaluateFieldNames) {
    const value = data.get(name);
    if (typeof value === "string") fields[name] = value.replaceAll("\r\n", "\n");
  }
  const upload = data.get("upload");
  if (upload instanceof File && upload.size > 0) fields.data = await upload.text();
  if (fields.where !== "own") {
    fields.data = "";
    if (fields.seed.trim() === "") fields.seed = randomBytes(8).toString("hex");
  }
  const address = addressOf(fields);
  if (address.length <= longestAddress) redirect(address);
  return evaluated(fields, false);
}

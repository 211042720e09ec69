"use server";

import { redirect } from "next/navigation";
import { submitForm } from "../../_server/forms";
import { localUser } from "../../_server/principal";
import { entryOf, readFields } from "../../_ui/editor/entryFields";
import type { Refusal } from "../../_ui/editor/SubmitForm";

/** Takes the submit page's fields where no script runs: to the check when they are accepted for one, else back with what is wrong. */
export async function submitFields(_before: Refusal | null, data: FormData): Promise<Refusal | null> {
  const fields = readFields((name) => data.get(name));
  const key = data.get("idempotencyKey");
  const { entry, diagnostics } = entryOf(fields);
  if (diagnostics.length > 0) {
    return {
      fields,
      problem: {
        detail: "A field cannot be read.",
        diagnostics: diagnostics.map(({ code, message, help }) => ({
          code,
          message,
          ...(help !== undefined && { help }),
        })),
      },
    };
  }
  const outcome = await submitForm(localUser, entry, typeof key === "string" ? { idempotencyKey: key } : {});
  if (!outcome.ok) return { fields, problem: outcome.problem };
  redirect(`/checks/${outcome.value.check}`);
}

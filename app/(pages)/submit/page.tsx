import { randomUUID } from "node:crypto";
import type { Metadata } from "next";
import { headers } from "next/headers";
import { deriveForm } from "../../_server/derive";
import { getForm } from "../../_server/forms";
import { localUser } from "../../_server/principal";
import { deriveRequestOf, readDeriveFields } from "../../_ui/derive/deriveQuery";
import { exampleFields, fieldNames, fieldsOf, fieldsOfDocument, readFields } from "../../_ui/editor/entryFields";
import { SubmitForm } from "../../_ui/editor/SubmitForm";
import { Lead, Opening, Page, Section } from "../../_ui/Page";
import { submitFields } from "./actions";

export const metadata: Metadata = { title: "Submit a form" };

/** The editor. An address with fields, a kept form or a derived one in its query opens it with these; otherwise it opens with the example or the kept draft. */
export default async function SubmitPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const query = await searchParams;
  const kept = typeof query.form === "string" ? await getForm(localUser, query.form) : null;
  const form = kept?.kind === "form" ? kept : null;
  const derived =
    typeof query.derived === "string" ? await deriveForm(localUser, deriveRequestOf(readDeriveFields(query))) : null;
  const asked = form !== null || fieldNames.some((name) => typeof query[name] === "string");
  const initial =
    form !== null
      ? fieldsOf(form)
      : derived?.ok
        ? fieldsOfDocument(derived.value.document)
        : asked
          ? readFields((name) => query[name])
          : exampleFields;
  const nonce = (await headers()).get("x-nonce");
  return (
    <Page>
      <Opening title="Submit a form">
        <Lead>
          Say which amplitude it is and type it as you would write it. It is compared with an independent calculation
          and with every accepted form; that takes seconds.
        </Lead>
      </Opening>
      <Section id="form" head="The form">
        <SubmitForm initial={initial} asked={asked} idempotencyKey={randomUUID()} nonce={nonce} action={submitFields} />
      </Section>
    </Page>
  );
}

import type { Metadata } from "next";
import { deriveForm } from "../../_server/derive";
import { localUser } from "../../_server/principal";
import { Diagnostics } from "../../_ui/Diagnostics";
import { DerivedArticle } from "../../_ui/derive/DerivedArticle";
import { DeriveFieldsForm } from "../../_ui/derive/DeriveFieldsForm";
import { deriveRequestOf, exampleDerive, readDeriveFields } from "../../_ui/derive/deriveQuery";
import { Lead, Opening, Page, Section } from "../../_ui/Page";

export const metadata: Metadata = { title: "Derive a form" };

/** Writes a form by a published method. All is in the address. */
export default async function DerivePage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const query = await searchParams;
  const asked = typeof query.n === "string" || typeof query.k === "string";
  const fields = asked ? readDeriveFields(query) : exampleDerive;
  const derived = await deriveForm(localUser, deriveRequestOf(fields));
  return (
    <Page>
      <Opening title="Derive a form">
        <Lead>
          A form of an amplitude, written term by term by recursion, vertex expansion or local integrals. It is a
          starting point: submit it to have it checked, or evaluate it.
        </Lead>
      </Opening>
      <Section id="amplitude" head="Which form">
        <DeriveFieldsForm fields={fields} />
      </Section>
      {derived.ok ? (
        <DerivedArticle fields={fields} derived={derived.value} />
      ) : (
        <Section id="wrong" head="No form">
          {derived.problem.diagnostics === undefined ? (
            <p>{derived.problem.detail}</p>
          ) : (
            <Diagnostics source="" diagnostics={derived.problem.diagnostics} />
          )}
        </Section>
      )}
    </Page>
  );
}

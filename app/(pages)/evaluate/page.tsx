import type { Metadata } from "next";
import { EvaluateForm } from "../../_ui/evaluate/EvaluateForm";
import { fieldsOfQuery } from "../../_ui/evaluate/evaluateFields";
import { Lead, Opening, Page } from "../../_ui/Page";
import { evaluateFields } from "./actions";
import { evaluated } from "./evaluated";

export const metadata: Metadata = { title: "Values at points" };

/** Values of a form at points. An address that says which form and where is answered with the values at once. */
export default async function EvaluatePage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const initial = await evaluated(fieldsOfQuery(await searchParams), true);
  return (
    <Page>
      <Opening title="Values at points">
        <Lead>
          A form at random points, at physical momenta or at points of your own: exactly, or in double precision with an
          estimate of the error.
        </Lead>
        <p>
          Values of gluon components include the MHV denominator, without coupling and colour. In double precision the
          form is evaluated again in three other frames; the largest difference, times three, is the error.
        </p>
      </Opening>
      <EvaluateForm initial={initial} action={evaluateFields} />
    </Page>
  );
}

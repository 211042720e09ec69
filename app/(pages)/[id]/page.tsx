import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { bibtexOf } from "../../_server/citations";
import { environment } from "../../_server/env";
import { getForm } from "../../_server/forms";
import { localUser } from "../../_server/principal";
import { FormArticle } from "./FormArticle";
import { TombstoneArticle } from "./TombstoneArticle";

interface Props {
  params: Promise<{ id: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { id } = await params;
  const form = await getForm(localUser, id);
  if (form === null) return { title: "No such form" };
  if (form.kind === "tombstone") return { title: form.version };
  return { title: form.title === null ? form.version : `${form.title} (${form.id})` };
}

/** One form, or what stands for ever in the place of one that was not accepted. */
export default async function FormPage({ params, searchParams }: Props) {
  const { id } = await params;
  const { line } = await searchParams;
  const form = await getForm(localUser, id);
  if (form === null) notFound();
  if (form.kind === "tombstone") return <TombstoneArticle tombstone={form} />;
  const from = typeof line === "string" && /^[1-9]\d{0,6}$/.test(line) ? Number(line) - 1 : 0;
  return (
    <FormArticle
      form={form}
      bibtex={bibtexOf(form, environment().baseUrl)}
      from={Math.min(from, form.latex.length - 1)}
    />
  );
}

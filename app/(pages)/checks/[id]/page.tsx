import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { getCheck } from "../../../_server/checks";
import { localUser } from "../../../_server/principal";
import { CheckProgress } from "../../../_ui/CheckProgress";
import { Opening, Page, Section } from "../../../_ui/Page";
import { VerdictArticle } from "./VerdictArticle";

interface Props {
  params: Promise<{ id: string }>;
}

export const metadata: Metadata = { title: "Check" };

/** One check: its progress while it runs, then the verdict. Without script the page looks again by itself. */
export default async function CheckPage({ params }: Props) {
  const { id } = await params;
  const check = await getCheck(localUser, id);
  if (check === null) notFound();
  if (check.state === "done" && check.report !== null) return <VerdictArticle check={check} report={check.report} />;
  const subject = check.title ?? check.version ?? "An expression";
  return (
    <Page>
      <Opening kicker={check.version} title={subject} />
      <Section id="progress" head={check.state === "cancelled" ? "Cancelled" : "Being checked"}>
        {check.state === "cancelled" ? (
          <p>
            This check was cancelled before it came to a verdict.{" "}
            {check.form !== null && <a href={`/${check.form}`}>The form</a>} <a href="/submit">Submit another form</a>.
          </p>
        ) : (
          <>
            <CheckProgress check={{ id: check.id, state: check.state, progress: check.progress }} />
            <p>The check goes on when this page is closed; its address stays.</p>
            <noscript>
              <meta httpEquiv="refresh" content="2" />
              <p>
                This page looks again every two seconds. <a href={`/checks/${check.id}`}>Look now</a>
              </p>
            </noscript>
          </>
        )}
      </Section>
    </Page>
  );
}

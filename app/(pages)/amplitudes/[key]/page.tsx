import type { Metadata } from "next";
import { notFound } from "next/navigation";
import type { FormSummary } from "../../../_contract";
import { getAmplitude } from "../../../_server/amplitudes";
import { listForms } from "../../../_server/forms";
import { localUser } from "../../../_server/principal";
import { FormTable } from "../../../_ui/FormTable";
import { Latex } from "../../../_ui/Formula";
import { Lead, Opening, Page, Section } from "../../../_ui/Page";
import {
  amplitudeLatex,
  amplitudeName,
  amplitudeOfKey,
  capital,
  componentName,
  numbered,
  targetNames,
} from "../../../_ui/words";

interface Props {
  params: Promise<{ key: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const name = amplitudeOfKey((await params).key);
  return { title: name === null ? "No such amplitude" : capital(amplitudeName(name)) };
}

/** All forms of one amplitude that the reader may see, grouped by what they are a form of. */
export default async function AmplitudePage({ params, searchParams }: Props) {
  const { key } = await params;
  const { cursor } = await searchParams;
  const name = amplitudeOfKey(key);
  const amplitude = name === null ? null : await getAmplitude(localUser, key);
  if (name === null || amplitude === null) notFound();
  const list = await listForms(localUser, {
    amplitude: key,
    limit: 200,
    ...(typeof cursor === "string" && { cursor }),
  });
  if (!list.ok) notFound();
  const forms = list.value.items;
  const groups = grouped(forms.filter((form) => form.state !== "refused"));
  const refused = forms.filter((form) => form.state === "refused");
  return (
    <Page>
      <Opening kicker={<Latex latex={amplitudeLatex(name)} />} title={capital(amplitudeName(name))}>
        <Lead>
          {amplitude.accepted === 0
            ? "No form of this amplitude is accepted yet."
            : `${capital(numbered(amplitude.accepted, "accepted form"))}.`}
          {amplitude.held > 0 && ` ${capital(numbered(amplitude.held, "form is", "forms are"))} held.`}
          {amplitude.checking > 0 && ` ${capital(numbered(amplitude.checking, "form is", "forms are"))} being checked.`}
        </Lead>
        <p>
          {amplitude.mirror !== null && amplitude.mirror !== key && (
            <>
              Parity takes it to <a href={`/amplitudes/${amplitude.mirror}`}>{amplitude.mirror}</a>.{" "}
            </>
          )}
          <a href={`/submit?n=${name.n ?? "5.."}&k=${name.k}&loops=${name.loops}`}>Submit another form of it</a>.
        </p>
      </Opening>
      {groups.map(([head, members], index) => (
        <Section key={head} id={`forms-${index}`} head={head} wide>
          <FormTable forms={members} label={`Forms: ${head}`} />
        </Section>
      ))}
      {refused.length > 0 && (
        <Section id="refused" head="Not accepted" wide>
          <details>
            <summary>{capital(numbered(refused.length, "form"))}, each with what is wrong with it</summary>
            <FormTable forms={refused} label="Forms that were not accepted" />
          </details>
        </Section>
      )}
      {list.value.next !== null && (
        <p>
          <a href={`/amplitudes/${key}?cursor=${encodeURIComponent(list.value.next)}`}>Further forms</a>
        </p>
      )}
    </Page>
  );
}

/** Forms by component and target, the superamplitude itself first, in the order of the list otherwise. */
function grouped(forms: readonly FormSummary[]): readonly (readonly [string, readonly FormSummary[]])[] {
  const groups = new Map<string, FormSummary[]>();
  for (const form of forms) {
    const component = componentName(form.component);
    const what = form.target === "amplitude" ? "" : `, ${targetNames[form.target]}`;
    const head = `${component === null ? "Superamplitude" : `Component with ${component}`}${what}`;
    const group = groups.get(head);
    if (group === undefined) groups.set(head, [form]);
    else group.push(form);
  }
  return [...groups].sort(([a], [b]) => Number(b === "Superamplitude") - Number(a === "Superamplitude"));
}

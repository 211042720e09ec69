import { getTriangle } from "../_server/amplitudes";
import { seedProgress } from "../_server/library";
import { localUser } from "../_server/principal";
import { FirstFormula } from "../_ui/FirstFormula";
import { LoopOrders } from "../_ui/LoopOrders";
import { Lead, Opening, Page, Section } from "../_ui/Page";
import { SeedProgressLine } from "../_ui/SeedProgressLine";
import { known, Triangle } from "../_ui/Triangle";
import { amplitudeName, capital } from "../_ui/words";

/** The first page: what this is, a formula ready to be checked, and all amplitudes of one loop order. */
export default async function Home({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { loops: asked } = await searchParams;
  const loops = typeof asked === "string" && /^[0-4]$/.test(asked) ? Number(asked) : 0;
  const [triangle, seed] = await Promise.all([getTriangle(localUser, loops), seedProgress()]);
  return (
    <Page>
      <Opening title="Forms of scattering amplitudes, checked and kept">
        <Lead>
          Type a form of an amplitude and learn whether it is right, what it makes manifest and, if it is wrong, what is
          wrong with it. What is right is kept under an identifier that you can cite, with a certificate that anyone can
          replay.
        </Lead>
      </Opening>
      <Section id="check" head="Check a form">
        <FirstFormula />
      </Section>
      <Section id="amplitudes" head="Amplitudes">
        <SeedProgressLine progress={seed} />
        <LoopOrders present={triangle.loopOrders} chosen={loops} />
        <Triangle loops={loops} rows={triangle.rows} />
        <p>
          One row for each number of legs <i>n</i>; in it <i>k</i> runs from 0, MHV on the left edge, to <i>n</i>
          &nbsp;−&nbsp;4, its conjugate on the right. Parity reflects the triangle. A stroke to the lower left adds a
          leg at the same <i>k</i>, a stroke to the lower right raises <i>k</i> with it.
        </p>
        {triangle.everyN.length > 0 && (
          <>
            <p>For every number of legs at once:</p>
            <ul>
              {triangle.everyN.map((entry) => (
                <li key={entry.key}>
                  <a href={`/amplitudes/${entry.key}`}>{capital(amplitudeName({ n: null, k: entry.k, loops }))}</a>:{" "}
                  {known(entry).join(", ")}
                </li>
              ))}
            </ul>
          </>
        )}
      </Section>
    </Page>
  );
}

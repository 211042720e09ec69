import type { Metadata } from "next";
import { Lead, Opening, Page, Section } from "./_ui/Page";

export const metadata: Metadata = { title: "Nothing here" };

/** What an address without a page says: how addresses are made, and where to go. */
export default function NotFound() {
  return (
    <Page>
      <Opening title="There is nothing at this address">
        <Lead>No page, amplitude, form or check of this library has it.</Lead>
      </Opening>
      <Section id="addresses" head="How addresses are made">
        <p>
          A form has its identifier as address, for example <code>/n6k1L0-3</code>: the third public form of the
          amplitude with n = 6, k = 1 at L = 0 loops. <code>/n6k1L0-3v2</code> is its second version,{" "}
          <code>/nXk1L0-1</code> a form for every n. An amplitude with all its forms is at{" "}
          <code>/amplitudes/n6k1L0</code>. Numbers are never used again: an identifier that once had a page keeps it.
        </p>
        <p>
          The <a href="/">amplitudes</a> lead to every form there is.
        </p>
      </Section>
    </Page>
  );
}

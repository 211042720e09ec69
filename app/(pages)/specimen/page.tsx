import type { Metadata } from "next";
import { CiteBox } from "../../_ui/CiteBox";
import { Diagnostics } from "../../_ui/Diagnostics";
import { ValueResult } from "../../_ui/evaluate/ValueResult";
import { Formula } from "../../_ui/Formula";
import { Marks } from "../../_ui/MarkSentence";
import { Lead, Opening, Page, Section } from "../../_ui/Page";
import { Poles } from "../../_ui/PoleTable";
import { SeedProgressLine } from "../../_ui/SeedProgressLine";
import { StateSentence } from "../../_ui/StateSentence";
import { Triangle } from "../../_ui/Triangle";
import {
  accepted,
  approximateValues,
  exactValues,
  faults,
  faulty,
  longFormula,
  manyPoles,
  rows,
  shortFormula,
  wideFormula,
} from "./samples";

export const metadata: Metadata = { title: "The parts of the pages", robots: { index: false } };

/** Every part of the pages in its states, for whoever changes one of them. */
export default function Specimen() {
  return (
    <Page>
      <Opening title="The parts of the pages">
        <Lead>Every part in each of its states, filled with made-up data; nothing on this page is a result.</Lead>
      </Opening>
      <Section id="formula" head="Formula">
        <Formula lines={shortFormula} label="Short formula" />
        <Formula lines={wideFormula} label="Wide formula" />
        <Formula lines={longFormula} label="Long formula" />
        <Formula lines={["\\notacommand"]} label="Formula that cannot be rendered" />
      </Section>
      <Section id="state" head="State">
        {(["draft", "checking", "accepted", "held", "refused"] as const).map((state) => (
          <p key={state}>
            <StateSentence
              state={state}
              report={{ ...accepted, summary: state === "held" ? "no source of truth covers it." : "it differs." }}
            />
          </p>
        ))}
      </Section>
      <Section id="marks" head="Marks">
        <Marks marks={accepted.marks} />
      </Section>
      <Section id="poles" head="Poles">
        <Poles poles={accepted.poles} label="A few poles" />
        <Poles poles={manyPoles} label="Many poles" />
      </Section>
      <Section id="faults" head="Faults">
        <Diagnostics source={faulty} diagnostics={faults} />
      </Section>
      <Section id="triangle" head="Triangle">
        <Triangle loops={0} rows={rows} />
      </Section>
      <Section id="values" head="Values" wide>
        <ValueResult reply={exactValues} name="exact-values" address="/specimen" />
        <ValueResult reply={approximateValues} name="approximate-values" address={null} />
      </Section>
      <Section id="seed" head="Progress">
        <SeedProgressLine
          progress={{ total: 44, submitted: 30, accepted: 17, held: 2, refused: 0, unreadable: [], finished: false }}
        />
      </Section>
      <Section id="cite" head="Citation">
        <CiteBox version="n6k1L0-1v1" bibtex={"@misc{n6k1L0-1v1,\n  title = {A title},\n  year = {2025}\n}"} />
      </Section>
    </Page>
  );
}

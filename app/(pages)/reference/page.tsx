import type { Metadata } from "next";
import { Latex } from "../../_ui/Formula";
import {
  codes,
  deepestNesting,
  fewestLegs,
  largestExponent,
  longestInteger,
  mostLegs,
  mostLoops,
  mostSourceUnits,
  mostTerms,
} from "../../_ui/notationFacts";
import { Lead, Opening, Page, Section } from "../../_ui/Page";
import { SourceText } from "../../_ui/SourceText";
import { TableBox } from "../../_ui/TableBox";
import { brackets, expressions, items } from "./rules";
import { valueCodes } from "./valueCodes";

export const metadata: Metadata = { title: "Notation and conventions" };

/** The notation on one page, with the engine's own tables of limits and faults. */
export default function Reference() {
  return (
    <Page>
      <Opening title="Notation and conventions">
        <Lead>
          A formula is typed the way it is written on paper: four-brackets, R-invariants, sums with inequalities. Spaces
          or commas separate the items of a bracket.
        </Lead>
      </Opening>
      <Section id="example" head="Examples">
        <SourceText
          text={
            "[1 2 3 4 5] + [1 2 3 5 6] + [1 3 4 5 6]\n\nsum(i, j : 1 < i, i+1 < j < n) [1 i i+1 j j+1]\n\n<1 2>^4 / prod(i : 1 <= i <= n) <i i+1>"
          }
          label="Formulas in the notation"
          copy="the examples"
        />
        <p>
          They are the six-leg NMHV tree, the NMHV tree for every n, and the MHV component with negative helicities on
          legs 1 and 2 (<a href="/submit">try one</a>).
        </p>
      </Section>
      <Section id="items" head="Items">
        <Rules rows={items} label="Table of items" what="Item" />
      </Section>
      <Section id="brackets" head="Brackets">
        <Rules rows={brackets} label="Table of brackets" what="Bracket" />
      </Section>
      <Section id="expressions" head="Expressions">
        <Rules rows={expressions} label="Table of expressions" what="Written" />
      </Section>
      <Section id="conventions" head="Conventions">
        <p>
          The first two components of a momentum twistor <Latex latex="Z_a" /> are <Latex latex="\lambda_a" />, the last
          two <Latex latex="\mu_a" />. Momenta are <Latex latex="p_a=\lambda_a\tilde\lambda_a" /> with{" "}
          <Latex latex="p^2=\det p" />, all outgoing, so that <Latex latex="s_{ab}=\langle a\,b\rangle[a\,b]" />. Papers
          that write <Latex latex="s_{ab}=\langle a\,b\rangle[b\,a]" /> are as many: choose theirs in the editor.
        </p>
        <p>
          A superamplitude is the ratio to the MHV tree, so that the MHV tree is 1; a component includes the MHV
          denominator. Loop integrands are with respect to the measure of lines, AB, CD, EF and GH being the lines of
          loops one to four.
        </p>
      </Section>
      <Section id="verdicts" head="Verdicts">
        <p>
          A form is accepted when it agrees with at least one <a href="/reference/sources">independent calculation</a>,
          or with an accepted form, at random points over prime fields that are drawn after it was submitted. The report
          states the points and a bound on the probability that a wrong form would pass: a probabilistic identity check,
          not a symbolic proof. Where there is nothing to compare with, the form is held.
        </p>
      </Section>
      <Section id="limits" head="Limits">
        <p>
          From {fewestLegs} to {mostLegs} legs and up to {mostLoops} loops; a source of {number(mostSourceUnits)}{" "}
          characters, {number(mostTerms)} terms once sums are written out, {deepestNesting} levels of nesting, exponents
          up to {number(largestExponent)}, integers of {number(longestInteger)} digits.
        </p>
      </Section>
      <Section id="faults" head="Faults">
        <p>What the codes beside a fault mean.</p>
        <TableBox label="Codes of faults">
          <thead>
            <tr>
              <th scope="col">Code</th>
              <th scope="col">Meaning</th>
            </tr>
          </thead>
          <tbody>
            {Object.entries({ ...codes, ...valueCodes }).map(([code, meaning]) => (
              <tr key={code} id={code}>
                <th scope="row">
                  <code>{code}</code>
                </th>
                <td>{meaning}</td>
              </tr>
            ))}
          </tbody>
        </TableBox>
      </Section>
    </Page>
  );
}

const number = (value: number): string => value.toLocaleString("en");

function Rules({ rows, label, what }: { rows: readonly (readonly [string, string])[]; label: string; what: string }) {
  return (
    <TableBox label={label}>
      <thead>
        <tr>
          <th scope="col">{what}</th>
          <th scope="col">Meaning</th>
        </tr>
      </thead>
      <tbody>
        {rows.map(([written, meaning]) => (
          <tr key={written}>
            <th scope="row">
              <code>{written}</code>
            </th>
            <td>{meaning}</td>
          </tr>
        ))}
      </tbody>
    </TableBox>
  );
}

import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { Bound } from "../../app/_ui/Bound";
import { Comparisons } from "../../app/_ui/ComparisonTable";
import { Diagnostics } from "../../app/_ui/Diagnostics";
import { Formula } from "../../app/_ui/Formula";
import { bracketLatex, renderLatex } from "../../app/_ui/latex";
import { markSentence, marks } from "../../app/_ui/marks";
import { Poles } from "../../app/_ui/PoleTable";
import { DifferenceSentence, StateSentence, weakestBound } from "../../app/_ui/StateSentence";
import { listed, numbered } from "../../app/_ui/words";
import { markCodes, type Report } from "../../engine/checks/report";

const text = (html: string): string => html.replaceAll(/<[^>]*>/g, "");

describe("formulas", () => {
  it("carry MathML for readers who do not see them", () => {
    expect(renderLatex("\\langle 1\\,2\\rangle")).toContain("<math");
  });

  it("show the LaTeX where KaTeX refuses it, and never markup from it", () => {
    const html = renderToStaticMarkup(
      <Formula lines={["\\href{javascript:alert(1)}{x}", "\\undefined<script>"]} label="f" />,
    );
    expect(html).not.toContain("<script>");
    expect(html).not.toContain('href="javascript');
    expect(html).toContain("\\undefined&lt;script&gt;");
  });

  it.each([
    ["<1 2 3 4>", "\\langle 1\\,2\\,3\\,4\\rangle"],
    ["<AB bar(3) cap (1 2 *)>", "\\langle AB\\,\\overline{3}\\cap{}(1\\,2\\,{\\ast})\\rangle"],
    ["x2(1 AB)", "x^2(1\\,AB)"],
  ])("set the bracket %s", (bracket, latex) => {
    expect(bracketLatex(bracket)).toBe(latex);
    expect(renderLatex(latex)).not.toBeNull();
  });

  it("fold what is long and number the folded lines", () => {
    const lines = Array.from({ length: 60 }, (_, index) => `x_{${index}}`);
    const html = renderToStaticMarkup(<Formula lines={lines} first={120} label="f" />);
    expect(html.match(/<details>/g)).toHaveLength(2);
    expect(html).toContain("Lines 133 to 156");
    expect(html).toContain("Lines 157 to 180");
  });
});

describe("sentences", () => {
  it.each(markCodes)("say both what it is for %s to hold and to fail", (code) => {
    const sentences = [marks[code].holds, marks[code].fails];
    for (const sentence of sentences) expect(sentence).toMatch(/^[A-Z].*\.$/);
    expect(markSentence(code, { state: "holds", evidence: "" })).toBe(marks[code].holds);
    expect(markSentence(code, { state: "fails", evidence: "" })).toBe(marks[code].fails);
    expect(markSentence(code, { state: "untested", evidence: "" })).toBeNull();
  });

  const report: Report = {
    verdict: "agrees",
    comparisons: [
      { with: "on-shell recursion", kind: "source", agrees: true, points: 12, primes: 3, bound: "2^-180" },
      { with: "n6k1L0-2", kind: "form", agrees: true, points: 8, primes: 2, bound: "2^-108" },
    ],
    leftOut: [],
    marks: {},
    poles: [],
    diagnosis: [],
    diagnostics: [],
    summary: "Disagrees: The form is twice the truth.",
  };

  it("claim no more than the weakest bound", () => {
    expect(weakestBound(report.comparisons)).toBe("2^-108");
    const html = renderToStaticMarkup(<StateSentence state="accepted" report={report} />);
    expect(text(html)).toBe(
      "Accepted: it agrees with on-shell recursion and n6k1L0-2, by a probabilistic identity check with bound 2−108, not a symbolic proof.",
    );
  });

  it("give the reason of a refusal", () => {
    const html = renderToStaticMarkup(<StateSentence state="refused" report={report} />);
    expect(html).toBe("Not accepted: the form is twice the truth.");
    const range = { ...report, summary: "Disagrees at n = 7: an amplitude is cyclic, and this form is not." };
    expect(renderToStaticMarkup(<StateSentence state="refused" report={range} />)).toBe(
      "Not accepted: it disagrees at n = 7: an amplitude is cyclic, and this form is not.",
    );
    const held = { ...report, summary: "Undecided: there is nothing to compare with." };
    expect(renderToStaticMarkup(<StateSentence state="held" report={held} />)).toBe(
      "Held: there is nothing to compare with.",
    );
  });

  it("say what a wrong form differs from and leave the cause to the diagnosis", () => {
    const differing = (name: string) => ({ with: name, kind: "form" as const, agrees: false, points: 1, primes: 1 });
    const wrong: Report = {
      ...report,
      comparisons: ["a", "b", "c", "d", "e"].map(differing),
      diagnosis: [{ code: "constant-factor", message: "The form is twice the truth." }],
    };
    expect(text(renderToStaticMarkup(<DifferenceSentence report={wrong} />))).toBe(
      "It differs from a, b, c and two others.",
    );
    const unexplained = renderToStaticMarkup(<DifferenceSentence report={{ ...wrong, diagnosis: [] }} />);
    expect(unexplained).toBe("Disagrees: The form is twice the truth.");
  });

  it("fold long tables and count what is folded", () => {
    const pole = { kind: "spurious" as const, reference: false, terms: [0] };
    const poles = Array.from({ length: 30 }, (_, index) => ({ ...pole, bracket: `<1 2 3 ${index}>` }));
    const table = renderToStaticMarkup(<Poles poles={poles} label="p" />);
    expect(table).toContain("<summary>30 spurious poles</summary>");
    expect(table.match(/<tr>/g)).toHaveLength(31);
    const comparisons = Array.from({ length: 20 }, (_, index) => ({
      ...(report.comparisons[1] as Report["comparisons"][number]),
      with: `n6k1L0-${index + 1}v1`,
      agrees: index !== 19,
    }));
    expect(text(renderToStaticMarkup(<Comparisons comparisons={comparisons} label="c" />))).toContain(
      "12 more comparisons, of which 11 agree",
    );
  });

  it("set a bound as a power", () => {
    expect(text(renderToStaticMarkup(<Bound bound="2^-108" />))).toBe("2−108");
    expect(renderToStaticMarkup(<Bound bound="exact" />)).toBe("exact");
  });

  it("count and list in English", () => {
    expect([0, 1, 2, 11, 1234].map((count) => numbered(count, "form"))).toEqual([
      "no forms",
      "one form",
      "two forms",
      "11 forms",
      "1,234 forms",
    ]);
    expect([[], ["a"], ["a", "b"], ["a", "b", "c"]].map(listed)).toEqual(["", "a", "a and b", "a, b and c"]);
  });
});

describe("diagnostics", () => {
  it("stand under the characters, with help and suggestion", () => {
    const html = renderToStaticMarkup(
      <Diagnostics
        source="1 + <AB12>"
        diagnostics={[
          {
            code: "run-together",
            message: "M.",
            help: "H.",
            span: [4, 10],
            suggestion: { span: [4, 10], replacement: "<AB 1 2>" },
          },
        ]}
      />,
    );
    expect(html).toContain("<mark>&lt;AB12&gt;</mark>");
    expect(html).toContain("    ^^^^^^");
    expect(text(html)).toContain("M. H. Suggested instead: &lt;AB 1 2&gt;");
  });
});

/** Made-up data that put each part of the pages into each of its states; nothing here is a result. */

import type { CheckView, EvaluateReply, Triangle } from "../../_contract";

type Report = NonNullable<CheckView["report"]>;

export const rows: Triangle["rows"] = Array.from({ length: 5 }, (_, row) => ({
  n: row + 4,
  entries: Array.from({ length: row + 1 }, (_, k) => ({
    k,
    key: `n${row + 4}k${k}L0`,
    accepted: (row + 2 * k) % 4,
    held: row === 3 && k === 1 ? 1 : 0,
    checking: row === 2 && k === 2 ? 2 : 0,
  })),
}));

export const shortFormula = ["[1\\,2\\,3\\,4\\,5]", "+ [1\\,2\\,3\\,5\\,6]", "+ [1\\,3\\,4\\,5\\,6]"] as const;

export const wideFormula = [
  "\\sum_{1 < i < j < n} \\frac{\\langle AB\\,(1\\,i\\,i{+}1)\\cap(1\\,j\\,j{+}1)\\rangle^{2}}{\\langle AB\\,1\\,i\\rangle\\langle AB\\,i\\,i{+}1\\rangle\\langle AB\\,i{+}1\\,1\\rangle\\langle AB\\,1\\,j\\rangle\\langle AB\\,j\\,j{+}1\\rangle\\langle AB\\,j{+}1\\,1\\rangle}",
] as const;

export const longFormula = Array.from(
  { length: 60 },
  (_, index) => `${index === 0 ? "" : "+ "}[1\\,${index + 2}\\,${index + 3}\\,${index + 4}\\,${index + 5}]`,
);

export const accepted: Report = {
  verdict: "agrees",
  amplitude: { key: "n6k1L0", n: 6, k: 1, loops: 0 },
  comparisons: [
    { with: "on-shell recursion", kind: "source", agrees: true, points: 12, primes: 3, bound: "2^-180" },
    { with: "n6k1L0-2", kind: "form", agrees: true, points: 8, primes: 2, bound: "2^-108" },
  ],
  leftOut: [],
  marks: {
    cyclic: {
      state: "holds",
      manifest: false,
      subgroup: "of rotations by two legs",
      evidence: "All six rotations agree at three points.",
    },
    reflection: { state: "holds", manifest: true, evidence: "" },
    localPoles: { state: "fails", evidence: "Three brackets of single terms are no poles of the amplitude." },
    parity: { state: "untested", evidence: "The conjugate needs twelve Grassmann rows." },
    loopExchange: { state: "notApplicable", evidence: "A tree has no loop lines." },
  },
  poles: [
    { bracket: "<1 2 3 4>", kind: "physical", reference: false, terms: [0], orderInTerms: 1, order: 1 },
    { bracket: "<1 2 3 5>", kind: "spurious", reference: false, terms: [0, 1], orderInTerms: 1, order: 0 },
    { bracket: "<AB (1 2) cap (3 4 5) *>", kind: "spurious", reference: true, terms: [0, 1, 2, 3, 4, 5, 6] },
  ],
  diagnosis: [],
  diagnostics: [],
  summary: "",
};

export const manyPoles: Report["poles"] = Array.from({ length: 30 }, (_, index) => ({
  bracket: `<1 2 ${index + 3} ${index + 4}>`,
  kind: index % 3 === 0 ? "physical" : "spurious",
  reference: false,
  terms: [index],
}));

export const faulty = "[1 2 3 4 5] + <AB12>\n+ [1 2 3 4 n+q] / (1 2";

export const faults: Report["diagnostics"] = [
  {
    code: "run-together",
    span: [14, 20],
    message: "“AB12” is no word of a bracket.",
    help: "Separate the items by spaces.",
    suggestion: { span: [14, 20], replacement: "<AB 1 2>" },
  },
  { code: "unknown-name", span: [34, 35], message: "“q” is not defined.", help: "Define it, or sum over it." },
  { code: "field-n", message: "The field n is empty.", help: "Give one number, as 7, or a range, as 5..12." },
];

export const exactValues: EvaluateReply = {
  values: ["-22/7", "355/113", null],
  reasons: [{ point: 2, message: "a denominator vanishes at characters 4 to 13 of the notation" }],
  seed: "specimen",
};

export const approximateValues: EvaluateReply = {
  components: [
    { helicities: "--+++", values: [["0.5", "-1.25"]], errors: ["2.1e-15"], digits: [14] },
    { helicities: "-+-++", values: [["12.75", "3e-7"]], errors: ["4.0e-9"], digits: [9] },
  ],
  warnings: [{ point: 0, message: "legs 3 and 4 are nearly collinear: digits are lost" }],
};

/** What each mark says, in sentences: one for every state that states something. Their order is the order of reading. */
import type { Mark, MarkCode } from "../../engine/checks/report";
import { decapital } from "./words";

interface Sentences {
  /** Name for the sentence "... was not tested" and for a table. */
  readonly name: string;
  readonly holds: string;
  /** Where the property can be seen term by term without adding them up. */
  readonly manifest?: string;
  readonly fails: string;
}

export const marks: Record<MarkCode, Sentences> = {
  cyclic: {
    name: "Cyclic symmetry",
    holds: "It is cyclic in its legs.",
    manifest: "It is manifestly cyclic.",
    fails: "It is not cyclic in its legs.",
  },
  reflection: {
    name: "Reflection",
    holds: "It has the reflection symmetry.",
    manifest: "It is manifestly symmetric under reflection.",
    fails: "It lacks the reflection symmetry.",
  },
  parity: {
    name: "Parity",
    holds: "Parity takes it to the conjugate amplitude.",
    manifest: "Parity is manifest.",
    fails: "Parity does not take it to the conjugate amplitude.",
  },
  loopExchange: {
    name: "Exchange of loop lines",
    holds: "It does not change when loop lines are exchanged.",
    manifest: "It is manifestly symmetric in its loop lines.",
    fails: "It changes when loop lines are exchanged.",
  },
  dualConformal: {
    name: "Dual conformal symmetry",
    holds: "It is dual conformal.",
    manifest: "It is manifestly dual conformal.",
    fails: "It is not dual conformal.",
  },
  referenceIndependent: {
    name: "Independence of the reference",
    holds: "It does not depend on the reference it is written with.",
    manifest: "No reference is written.",
    fails: "Its value depends on the reference it is written with.",
  },
  lineIndependent: {
    name: "Dependence on loop lines only",
    holds: "It depends on the loop lines, not on the points that span them.",
    manifest: "It is written in loop lines only.",
    fails: "It depends on the points chosen on a loop line.",
  },
  localPoles: {
    name: "Physical poles only",
    holds: "It has physical poles only.",
    manifest: "It is manifestly local: every pole of every term is physical.",
    fails: "Some of its terms have spurious poles.",
  },
  spuriousCancel: {
    name: "Cancellation of spurious poles",
    holds: "Its spurious poles cancel in the sum.",
    fails: "A spurious pole survives in the sum.",
  },
  soft: {
    name: "Soft limits",
    holds: "It has the right soft limits.",
    fails: "A soft limit is wrong.",
  },
  collinear: {
    name: "Collinear limits",
    holds: "It has the right collinear limits.",
    fails: "A collinear limit is wrong.",
  },
  factorisation: {
    name: "Factorisation",
    holds: "It factorises correctly on its poles.",
    fails: "It does not factorise correctly.",
  },
  twoParticleCuts: {
    name: "Two-particle cuts",
    holds: "Its two-particle cuts are right.",
    fails: "A two-particle cut is wrong.",
  },
  unitLeadingSingularities: {
    name: "Unit leading singularities",
    holds: "Its leading singularities are units or zero.",
    fails: "A leading singularity is neither a unit nor zero.",
  },
  logTest: {
    name: "Divergence of the logarithm",
    holds: "Its logarithm is as mildly divergent as it must be.",
    fails: "Its logarithm diverges too strongly.",
  },
  ratioTest: {
    name: "Divergence of the ratio",
    holds: "Its ratio to the MHV amplitude is as mildly divergent as it must be.",
    fails: "Its ratio to the MHV amplitude diverges too strongly.",
  },
  logarithmic: {
    name: "Logarithmic singularities",
    holds: "All singularities that were tried are logarithmic.",
    fails: "A singularity is stronger than logarithmic.",
  },
  oneSign: {
    name: "One sign on positive data",
    holds: "It keeps one sign on all positive data that were tried.",
    fails: "It takes both signs on positive data.",
  },
  termsOneSign: {
    name: "One sign of each term on positive data",
    holds: "Each of its terms keeps one sign on all positive data that were tried.",
    fails: "A term takes both signs on positive data.",
  },
};

/** All marks in the order in which an article speaks of them. */
export const readingOrder = Object.keys(marks) as readonly MarkCode[];

/** The sentence a mark states, null where it states nothing (untested, not applicable). */
export function markSentence(code: MarkCode, mark: Mark): string | null {
  const sentences = marks[code];
  if (mark.state === "fails") return sentences.fails;
  if (mark.state !== "holds") return null;
  return mark.manifest === true && sentences.manifest !== undefined ? sentences.manifest : sentences.holds;
}

/** What a form makes manifest, in a few words each, for a table. */
export const manifestWords = (given: Partial<Record<MarkCode, Mark>>): readonly string[] =>
  (["cyclic", "reflection", "localPoles", "loopExchange", "parity"] as const)
    .filter((code) => given[code]?.state === "holds" && given[code]?.manifest === true)
    .map((code) => shortWords[code]);

const shortWords = {
  cyclic: "cyclic",
  reflection: "reflection",
  localPoles: "physical poles",
  loopExchange: "loop exchange",
  parity: "parity",
};

/** Names of the marks by code, small letters, for a sentence. */
export const markNames: ReadonlyMap<string, string> = new Map(
  readingOrder.map((code) => [code, decapital(marks[code].name)]),
);

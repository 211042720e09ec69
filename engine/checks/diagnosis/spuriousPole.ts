/** Spurious poles that do not cancel, and the terms that carry them. */
import type { Diagnosis } from "../report";
import type { DiagnosisCase } from "./case";

/** Brackets named in the sentence. */
const mostNamed = 4;

export function spuriousPole({ bench }: DiagnosisCase): readonly Diagnosis[] {
  const left = (bench?.poles ?? []).filter((p) => p.kind === "spurious" && p.order !== undefined && p.order > 0);
  if (left.length === 0) return [];
  const brackets = left.map((p) => p.bracket);
  const terms = [...new Set(left.flatMap((p) => p.terms))].sort((a, b) => a - b);
  const named = brackets.slice(0, mostNamed).join(", ");
  const more = brackets.length > mostNamed ? ` and ${brackets.length - mostNamed} more` : "";
  const carriers =
    terms.length > 8 ? `${terms.length} terms hold them` : `terms ${terms.map((t) => t + 1).join(", ")} hold them`;
  return [
    {
      code: "spurious-pole",
      brackets,
      terms,
      message: `Spurious poles are left in the sum: ${named}${more}; ${terms.length === 1 ? `term ${(terms[0] ?? 0) + 1} holds them` : carriers}. A term is missing or has a wrong factor.`,
    },
  ];
}

/** Sources of truth: amplitudes computed by published methods, independent of the notation, the tape and the evaluator. */
import { closedComponents } from "./closedComponents";
import { recursionComponents, vertexComponents } from "./components";
import { dualConformalIntegrals } from "./dualConformal";
import { evenParts } from "./even";
import { gluonRecursion } from "./gluonRecursion";
import { logarithms } from "./log";
import { loopVertexExpansion } from "./loopVertex";
import { chiralPentagons, kermitExpansion, kermitExpansionReference } from "./oneLoopMhv";
import { oneLoopRecursion } from "./oneLoopRecursion";
import { recursion } from "./recursion";
import type { Question, Source } from "./source";
import { doublePentagons } from "./twoLoopMhv";
import { twoLoopVertexExpansion } from "./twoLoopVertex";
import { vertexExpansion } from "./vertex";
import { zero } from "./zero";

export type { Question, SizeBound, Source } from "./source";

/** Every source. */
export const sources: readonly Source[] = [
  recursion,
  vertexExpansion,
  recursionComponents,
  vertexComponents,
  gluonRecursion,
  closedComponents,
  kermitExpansion,
  kermitExpansionReference,
  chiralPentagons,
  oneLoopRecursion,
  loopVertexExpansion,
  doublePentagons,
  twoLoopVertexExpansion,
  dualConformalIntegrals,
  ...evenParts,
  ...logarithms,
  zero,
];

/** The sources that cover the question, in the order of `sources`; empty where the truth is not known. */
export const answering = (question: Question): Source[] => sources.filter((source) => source.covers(question));

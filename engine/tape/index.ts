/** Forms compiled to straight-line tapes, and the fast evaluators that run them at many points. */
export { type CompileLimits, compile, MOST_OPERATIONS, MOST_SLOTS } from "./compile";
export {
  type Evaluated,
  type EvaluateOptions,
  evaluateTape,
  evaluateTapeComplex,
  evaluateTapeModulo61,
  evaluateTapeReal,
  type PrimePoint,
} from "./evaluate";
export { type Interpretation, interpretTape } from "./interpret";
export { KernelUnavailable, kernelSources } from "./kernel/kernel";
export { type Complex, MERSENNE_31 } from "./kernelFields";
export type { FormToCompile } from "./lower";
export { type Opcode, opcodes } from "./opcodes";
export type { PointValue, Progress } from "./run";
export type { Tape, TapeCounts } from "./tape";

/** How fast the kernel runs a tape on points that are in place already. */
import type { Point } from "../../kinematics/point";
import { loadKernel } from "../kernel/kernel";
import type { KernelField } from "../kernelFields";
import { BlockRun, sliceExtent } from "../run";
import type { Tape } from "../tape";
import { rate } from "./measure";

/** Points a second of processor time for a block of copies of one point, and the value there. */
export function kernelRate<T, P>(
  field: KernelField<T, P>,
  tape: Tape,
  point: Point<T>,
  parameter: P,
  points: number,
  seconds: number,
): { readonly rate: number; readonly sum: T | null } {
  const block = Array.from({ length: points }, () => ({ point, parameter }));
  const extent = sliceExtent(tape);
  const run = (): BlockRun<T, P> => new BlockRun(loadKernel(), field, tape, block, extent, false);
  const once = (at: BlockRun<T, P>): void => {
    for (let slice = 0; slice + 1 < tape.slices.length; slice++) at.slice(slice);
  };
  const first = run();
  once(first);
  const value = first.values()[0]!;
  const again = run();
  return { rate: points * rate(() => once(again), seconds), sum: value.kind === "value" ? value.sum : null };
}

/** Runs a tape in the kernel, block by block of points and slice by slice of code. */
import type { Point } from "../kinematics/point";
import type { Span } from "../result";
import { BATCH } from "./encode";
import { readInput } from "./inputs";
import { FIRST_ADDRESS, type Kernel } from "./kernel/kernel";
import type { KernelField } from "./kernelFields";
import { TERM } from "./opcodes";
import { tableImage } from "./tableImage";
import { HEAD, runsOf, type Tape } from "./tape";

/** Vectors of a block at most. */
const MOST_VECTORS = 16;

/** A block's slots should fit the second-level cache: fewer points go at a time where a tape has many slots, ... */
const BLOCK_BYTES = 1 << 20;

/** ... but four vectors at least, so that a tape is read once for 16 points, unless memory is short. */
const FEW_VECTORS = 4;
const MOST_BYTES = 1 << 28;

const NO_DENOMINATOR = 0xffffffff;

/** What came out at one point. `terms` are the values of the top-level terms with their signs, when they were asked for. */
export type PointValue<T> =
  | { readonly kind: "value"; readonly sum: T; readonly terms: readonly T[] | null }
  | { readonly kind: "zero-denominator"; readonly span: Span };

/** A point and what its lane of the kernel is told. */
export interface Sample<T, P> {
  readonly point: Point<T>;
  readonly parameter: P;
}

/** Between two slices: how much of the work is done. */
export interface Progress {
  readonly done: number;
  readonly total: number;
}

/** The longest run of code between two stops, and the most terms in one: what buffers must hold. */
export function sliceExtent(tape: Tape): { words: number; terms: number } {
  let [words, terms] = [0, 0];
  const termsAt = new Map<number, number>();
  for (const run of runsOf(tape.code)) if (run.code === TERM) termsAt.set(run.at - HEAD, run.count);
  for (let i = 0; i + 1 < tape.slices.length; i++) {
    words = Math.max(words, tape.slices[i + 1]! - tape.slices[i]!);
  }
  const counts = new Array<number>(tape.slices.length).fill(0);
  let slice = 0;
  for (const [at, count] of termsAt) {
    while (at >= tape.slices[slice + 1]!) slice += 1;
    counts[slice]! += count;
  }
  terms = Math.max(0, ...counts);
  return { words, terms };
}

function vectorsOfBlock(slots: number): number {
  const bytes = 16 * Math.max(1, slots);
  if (FEW_VECTORS * bytes > MOST_BYTES) return 1;
  return Math.max(FEW_VECTORS, Math.min(MOST_VECTORS, Math.floor(BLOCK_BYTES / bytes)));
}

/** Runs the tape at all samples; yields between slices, where a caller may stop. Values come back in the order of the samples. */
export function* runTape<T, P>(
  kernel: Kernel,
  field: KernelField<T, P>,
  tape: Tape,
  samples: readonly Sample<T, P>[],
  wantTerms: boolean,
): Generator<Progress, PointValue<T>[]> {
  const extent = sliceExtent(tape);
  const values: PointValue<T>[] = [];
  const fitting = vectorsOfBlock(tape.slots);
  const slicesPerBlock = tape.slices.length - 1;
  const blocks: (readonly Sample<T, P>[])[] = [];
  const size = fitting * field.lanes;
  for (let from = 0; from < samples.length; from += size) blocks.push(samples.slice(from, from + size));
  const total = blocks.length * slicesPerBlock;
  for (const [number, block] of blocks.entries()) {
    const run = new BlockRun(kernel, field, tape, block, extent, wantTerms);
    for (let slice = 0; slice < slicesPerBlock; slice++) {
      run.slice(slice);
      yield { done: number * slicesPerBlock + slice + 1, total };
    }
    values.push(...run.values());
  }
  return values;
}

/** One block of points in the kernel's memory. */
export class BlockRun<T, P> {
  private readonly stride: number;
  private readonly at: Readonly<Record<"context" | "bad" | "sum" | "entry" | "exit" | "scratch" | "tables", number>> & {
    readonly code: number;
    readonly terms: number;
    readonly slots: number;
  };
  private view: DataView;
  private words: Int32Array;
  private readonly terms: T[][];
  /** Lanes where a constant has no value: the place in the source. */
  private readonly badConstants = new Map<number, Span>();

  constructor(
    private readonly kernel: Kernel,
    private readonly field: KernelField<T, P>,
    private readonly tape: Tape,
    private readonly block: readonly Sample<T, P>[],
    extent: { words: number; terms: number },
    private readonly wantTerms: boolean,
  ) {
    const vectors = Math.ceil(block.length / field.lanes);
    this.stride = 16 * vectors;
    let end = FIRST_ADDRESS;
    const room = (bytes: number): number => {
      const at = end;
      end += Math.ceil(bytes / 16) * 16;
      return at;
    };
    const context = room(3 * this.stride);
    const bad = room(4 * vectors * field.lanes);
    const sum = room(this.stride);
    const entry = room(this.stride);
    const exit = room(this.stride);
    const scratch = room(16 * (BATCH + 1));
    const image = tableImage(tape, end, this.stride);
    const tables = room(image.byteLength);
    const code = room(4 * extent.words);
    const terms = room(wantTerms ? this.stride * extent.terms : 0);
    const slots = room(this.stride * tape.slots);
    this.at = { context, bad, sum, entry, exit, scratch, tables, code, terms, slots };
    const memory = kernel.memory(end);
    this.view = new DataView(memory);
    this.words = new Int32Array(memory);
    this.words.set(image, tables / 4);
    this.words.fill(0, sum / 4, (sum + this.stride) / 4);
    this.words.fill(NO_DENOMINATOR | 0, bad / 4, bad / 4 + vectors * field.lanes);
    kernel.exports.place(slots, this.stride, context, bad, sum, tables, scratch);
    this.terms = block.map(() => []);
    this.writeSamples(vectors * field.lanes);
  }

  /** Inputs and constants, in the first slots of the block; lanes without a point of their own repeat the last one. */
  private writeSamples(lanes: number): void {
    const { field, tape, view, at, stride, block } = this;
    let given = 0;
    for (let lane = 0; lane < lanes; lane++) {
      const number = Math.min(lane, block.length - 1);
      const { point, parameter } = block[number]!;
      const offset = this.offset(lane);
      field.writeContext(view, at.context + 48 * Math.floor(lane / field.lanes), lane % field.lanes, parameter);
      for (const input of tape.inputs) {
        let address = at.slots + input.slot * stride + offset;
        for (const row of readInput(input, point, field.zero, field.one)) {
          field.writeRow(view, address, stride, row);
          address += stride * row.length;
        }
        given = Math.max(given, input.slot + input.width);
      }
      for (const { slot, numerator, denominator, span } of tape.constants) {
        const x = field.constant(numerator, denominator, parameter);
        if (x === null && !this.badConstants.has(number)) this.badConstants.set(number, span);
        field.write(view, at.slots + slot * stride + offset, x ?? field.one);
        given = Math.max(given, slot + 1);
      }
      if (field.entry !== null) {
        view.setUint32(at.entry + offset, field.entry(parameter), true);
        view.setUint32(at.exit + offset, 1, true);
      }
    }
    if (field.entry !== null) this.kernel.exports.convertMontgomery31(at.slots, at.entry, given);
  }

  /** Byte offset of a lane in a slot. */
  private offset(lane: number): number {
    return lane * (16 / this.field.lanes);
  }

  slice(number: number): void {
    const { at, tape, kernel, field } = this;
    const code = tape.code.subarray(tape.slices[number]!, tape.slices[number + 1]!);
    this.words.set(code, at.code / 4);
    kernel.exports.placeTerms(this.wantTerms ? at.terms : 0);
    field.run(kernel.exports, at.code, at.code + 4 * code.length);
    if (this.wantTerms) this.collectTerms(code);
  }

  private collectTerms(code: Int32Array): void {
    const { at, field, view, stride } = this;
    let count = 0;
    for (const run of runsOf(code)) if (run.code === TERM) count += run.count;
    if (field.entry !== null) this.kernel.exports.convertMontgomery31(at.terms, at.exit, count);
    this.terms.forEach((terms, lane) => {
      const from = at.terms + this.offset(lane);
      for (let term = 0; term < count; term++) terms.push(field.read(view, from + term * stride));
    });
  }

  values(): PointValue<T>[] {
    const { at, field, view, tape } = this;
    if (field.entry !== null) this.kernel.exports.convertMontgomery31(at.sum, at.exit, 1);
    return this.block.map((_, lane) => {
      const constant = this.badConstants.get(lane);
      if (constant !== undefined) return { kind: "zero-denominator", span: constant };
      const denominator = view.getUint32(at.bad + 4 * lane, true);
      if (denominator !== NO_DENOMINATOR) return { kind: "zero-denominator", span: tape.denominators[denominator]! };
      const sum = field.read(view, at.sum + this.offset(lane));
      return { kind: "value", sum, terms: this.wantTerms ? this.terms[lane]! : null };
    });
  }
}

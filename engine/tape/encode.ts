/** Puts ordered nodes into slots and writes the code: a slot is free again once its value has been used for the last time. */
import { CONSTANT, type Graph, INPUT, PART } from "./graph";
import type { TapeInput } from "./inputs";
import { BRACKET, INVERT, LINE, MINOR, TERM } from "./opcodes";
import { type Order, operandsFrom, operandsTo } from "./order";
import type { Tape } from "./tape";

/** Denominators of one batch at most. */
export const BATCH = 64;

/** Entries of one slice of code, about: between slices a call can be cancelled. */
const SLICE_ENTRIES = 4096;

export type Encoded = Pick<Tape, "code" | "slices" | "slots" | "inputs" | "constants">;

/** Slots by width: a freed vector is used again by the next one of its width. */
class Slots {
  private readonly free = new Map<number, number[]>();
  count = 0;

  take(width: number): number {
    const slot = this.free.get(width)?.pop();
    if (slot !== undefined) return slot;
    this.count += width;
    return this.count - width;
  }

  give(slot: number, width: number): void {
    const list = this.free.get(width);
    if (list === undefined) this.free.set(width, [slot]);
    else list.push(slot);
  }
}

class Code {
  words = new Int32Array(1 << 16);
  length = 0;

  push(word: number): void {
    if (this.length === this.words.length) {
      const larger = new Int32Array(this.words.length * 2);
      larger.set(this.words);
      this.words = larger;
    }
    this.words[this.length++] = word;
  }
}

export function encode(graph: Graph, order: Order, needed: Uint8Array, terms: ArrayLike<number>): Encoded {
  const encoder = new Encoder(graph, order, needed, terms);
  return encoder.encode();
}

class Encoder {
  private readonly code = new Code();
  private readonly slots = new Slots();
  private readonly slotOf: Int32Array;
  /** Position in the order of the last use of each node; terms are used at the end of their slice. */
  private readonly lastUse: Int32Array;
  private readonly base: Int32Array;
  private readonly offset: Int32Array;
  private readonly denominators = new Map<number, number>();
  private readonly slices: number[] = [0];
  /** Of the run at hand: where its head is, and what it is a run of. */
  private head = -1;
  private runKind = -1;
  private entries = 0;
  private readonly waiting: number[] = [];
  /** The inversions of the batch at hand: it must not hold an inverse of one of its own. */
  private readonly batch = new Set<number>();

  constructor(
    private readonly graph: Graph,
    private readonly order: Order,
    private readonly needed: Uint8Array,
    private readonly terms: ArrayLike<number>,
  ) {
    this.base = new Int32Array(graph.size);
    this.offset = new Int32Array(graph.size);
    this.slotOf = new Int32Array(graph.size).fill(-1);
    this.lastUse = new Int32Array(graph.size).fill(-1);
    graph.denominatorNodes.forEach((node, i) => {
      this.denominators.set(node, i);
    });
  }

  encode(): Encoded {
    this.placeParts();
    const { inputs, constants } = this.placeGiven();
    this.findLastUses();
    let position = 0;
    let term = 0;
    for (const end of this.order.ends) {
      for (; position < end.nodes; position++) this.operation(this.order.nodes[position]!, position);
      for (; term < end.terms; term++) this.term(this.terms[term]!, position);
      this.closeRun();
      if (this.entries >= SLICE_ENTRIES) this.closeSlice();
    }
    this.closeRun();
    if (this.slices.at(-1) !== this.code.length) this.closeSlice();
    return {
      code: this.code.words.slice(0, this.code.length),
      slices: this.slices,
      slots: this.slots.count,
      inputs,
      constants,
    };
  }

  /** Inputs and constants stay in their slots all the time. */
  private placeGiven(): { inputs: TapeInput[]; constants: Tape["constants"] } {
    const { graph, slots } = this;
    const { words, starts } = graph.nodes;
    const inputs: TapeInput[] = [];
    const constants: Tape["constants"][number][] = [];
    for (let node = 0; node < graph.size; node++) {
      if (this.needed[node] === 0) continue;
      const operation = graph.operation(node);
      if (operation !== INPUT && operation !== CONSTANT) continue;
      const width = graph.width(node);
      const slot = slots.take(width);
      this.slotOf[node] = slot;
      const index = words[starts[node]! + 1]!;
      if (operation === INPUT) inputs.push({ kind: words[starts[node]!]! >> 8, index, slot, width });
      else constants.push({ ...graph.constants[index]!, slot });
    }
    return { inputs, constants };
  }

  /** For each node the one whose slots it stands in, itself unless it is a part of a vector, and where in them. */
  private placeParts(): void {
    const { graph, base, offset } = this;
    const { words, starts } = graph.nodes;
    for (let node = 0; node < graph.size; node++) {
      base[node] = node;
      if (graph.operation(node) !== PART) continue;
      const vector = words[starts[node]! + 1]! >> 1;
      base[node] = base[vector]!;
      offset[node] = offset[vector]! + words[starts[node]! + 2]!;
    }
  }

  private findLastUses(): void {
    const { words, starts } = this.graph.nodes;
    const { nodes, ends } = this.order;
    for (let position = 0; position < nodes.length; position++) {
      const node = nodes[position]!;
      this.lastUse[node] = Math.max(this.lastUse[node]!, position);
      const operation = this.graph.operation(node);
      const to = operandsTo(operation, starts[node]!, starts[node + 1]!);
      for (let at = operandsFrom(operation, starts[node]!, starts[node + 1]!); at < to; at++) {
        this.lastUse[this.base[words[at]! >> 1]!] = position;
      }
    }
    let term = 0;
    for (const end of ends) {
      for (; term < end.terms; term++) {
        const base = this.base[this.terms[term]! >> 1]!;
        this.lastUse[base] = Math.max(this.lastUse[base]!, end.nodes);
      }
    }
  }

  private slot(ref: number): number {
    return this.slotOf[this.base[ref >> 1]!]! + this.offset[ref >> 1]!;
  }

  private operation(node: number, position: number): void {
    const { graph, code } = this;
    const { words, starts } = graph.nodes;
    const [start, end] = [starts[node]!, starts[node + 1]!];
    const operation = words[start]! & 255;
    const parameter = words[start]! >> 8;
    if (operation === INVERT && this.batch.has(words[start + 1]! >> 1)) this.closeRun();
    this.beginEntry(operation, parameter);
    if (operation === INVERT) this.batch.add(node);
    const width = graph.width(node);
    const out = this.slots.take(width);
    this.slotOf[node] = out;
    code.push(out);
    const from = operandsFrom(operation, start, end);
    const to = operandsTo(operation, start, end);
    // Signs of a combination.
    if (from === start + 2) code.push(words[start + 1]!);
    for (let at = from; at < to; at++) code.push(this.slot(words[at]!));
    if (operation === INVERT) code.push(this.denominators.get(node)!);
    for (let at = from; at < to; at++) this.release(this.base[words[at]! >> 1]!, position);
    this.release(node, position);
  }

  private term(ref: number, position: number): void {
    this.beginEntry(TERM, 0);
    this.code.push(this.slot(ref));
    this.code.push(ref & 1);
    this.code.push(0);
    this.release(this.base[ref >> 1]!, position);
  }

  /** Gives the slots of a node back after its last use; a batch of inversions reads its operands until its end. */
  private release(node: number, position: number): void {
    if (this.lastUse[node]! > position || this.slotOf[node]! < 0) return;
    const operation = this.graph.operation(node);
    if (operation === INPUT || operation === CONSTANT) return;
    // Once only, also when the node stands twice among the operands.
    this.lastUse[node] = 0x7fffffff;
    this.waiting.push(node);
    if (this.runKind !== INVERT) this.giveWaiting();
  }

  private giveWaiting(): void {
    for (const node of this.waiting) this.slots.give(this.slotOf[node]!, this.graph.width(node));
    this.waiting.length = 0;
  }

  private beginEntry(operation: number, parameter: number): void {
    const plain = operation === LINE || operation === BRACKET || operation === MINOR;
    const kind = operation | ((plain ? 0 : parameter) << 8);
    const full = operation === INVERT && this.head >= 0 && this.code.words[this.head + 1]! === BATCH;
    if (kind !== this.runKind || full) {
      if (this.head >= 0) this.closeRun();
      this.head = this.code.length;
      this.runKind = kind;
      this.code.push(operation);
      this.code.push(0);
      this.code.push(plain ? 0 : parameter);
      this.code.push(0);
    }
    this.code.words[this.head + 1]! += 1;
    this.entries += 1;
  }

  private closeRun(): void {
    this.head = -1;
    this.runKind = -1;
    this.batch.clear();
    this.giveWaiting();
  }

  private closeSlice(): void {
    this.slices.push(this.code.length);
    this.entries = 0;
  }
}

/** In which order the nodes of a graph run: slice by slice, within a slice by inversions passed, then depth, then operation. */
import { CONSTANT, type Graph, INPUT, PART } from "./graph";
import { INVERT } from "./opcodes";

/** A slice of the graph: nodes and terms up to these numbers, from where the last one ended. */
export interface Boundary {
  readonly nodes: number;
  readonly terms: number;
}

/** Nodes of one slice at most: enough for long runs and batches, few enough for their values to stay in the cache. */
export const SLICE_NODES = 1024;

/** The operations in the order they run; each slice ends with its terms. */
export interface Order {
  readonly nodes: Int32Array;
  /** For each slice where its nodes end in `nodes`, and how many terms are done then. */
  readonly ends: readonly Boundary[];
}

/** Keys put level, depth and kind into one number that sorts them, with the place in the slice last. */
const KINDS = 4096;
const PLACES = 2048;
const DEPTHS = 2048;

/** Nodes that the terms or an inversion depend on. An inversion always runs: it says whether the point is a bad one. */
export function neededNodes(graph: Graph, terms: ArrayLike<number>): Uint8Array {
  const { words, starts } = graph.nodes;
  const needed = new Uint8Array(graph.size);
  for (let i = 0; i < terms.length; i++) needed[terms[i]! >> 1] = 1;
  for (const node of graph.denominatorNodes) needed[node] = 1;
  for (let node = graph.size - 1; node >= 0; node--) {
    if (needed[node] === 0) continue;
    const operation = graph.operation(node);
    const to = operandsTo(operation, starts[node]!, starts[node + 1]!);
    for (let at = operandsFrom(operation, starts[node]!, starts[node + 1]!); at < to; at++) needed[words[at]! >> 1] = 1;
  }
  return needed;
}

/**
 * Where among the words start .. end-1 of a node its operands begin: behind the operation, and the signs of a combination, which
 * is the only operation of more than two operands. Scalars and vectors of a combination are operands alike.
 */
export function operandsFrom(operation: number, start: number, end: number): number {
  if (operation === INPUT || operation === CONSTANT) return end;
  return end - start > 3 ? start + 2 : start + 1;
}

/** Where they end: a part has one operand, and then an offset. */
export const operandsTo = (operation: number, start: number, end: number): number =>
  operation === PART ? start + 2 : end;

export function orderNodes(graph: Graph, needed: Uint8Array, boundaries: readonly Boundary[]): Order {
  const { words, starts } = graph.nodes;
  let total = 0;
  for (let node = 0; node < needed.length; node++) total += needed[node]!;
  const nodes = new Int32Array(total);
  const ends: Boundary[] = [];
  const level = new Uint16Array(SLICE_NODES);
  const depth = new Uint16Array(SLICE_NODES);
  const keys = new Float64Array(SLICE_NODES);
  let length = 0;
  let first = 0;
  for (const boundary of boundaries) {
    let count = 0;
    for (let node = first; node < boundary.nodes; node++) {
      const operation = graph.operation(node);
      const place = node - first;
      level[place] = 0;
      depth[place] = 0;
      const given = operation === INPUT || operation === CONSTANT;
      if (needed[node] === 0 || given) continue;
      let l = 0;
      let d = 0;
      const to = operandsTo(operation, starts[node]!, starts[node + 1]!);
      for (let at = operandsFrom(operation, starts[node]!, starts[node + 1]!); at < to; at++) {
        const operand = (words[at]! >> 1) - first;
        if (operand < 0) continue;
        const inverted = graph.operation(operand + first) === INVERT;
        const reached = level[operand]! + (inverted ? 1 : 0);
        const behind = inverted ? 0 : depth[operand]! + 1;
        if (reached > l) {
          l = reached;
          d = behind;
        } else if (reached === l && behind > d) d = behind;
      }
      level[place] = l;
      if (operation === PART) {
        // A part is there as soon as its vector is.
        depth[place] = Math.max(0, d - 1);
        continue;
      }
      depth[place] = operation === INVERT ? DEPTHS - 1 : d;
      const kind = operation * 128 + Math.min(127, words[starts[node]!]! >> 8);
      keys[count++] = ((l * DEPTHS + depth[place]!) * KINDS + kind) * PLACES + place;
    }
    const sorted = keys.subarray(0, count).sort();
    for (let i = 0; i < count; i++) nodes[length++] = first + (sorted[i]! % PLACES);
    first = boundary.nodes;
    ends.push({ nodes: length, terms: boundary.terms });
  }
  return { nodes: nodes.subarray(0, length), ends };
}

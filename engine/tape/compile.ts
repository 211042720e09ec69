/** From a form to a tape, with the limits that are checked while it is built. */
import { failure, type Result, success } from "../result";
import { encode } from "./encode";
import { Graph, GraphOverflow, type Ref } from "./graph";
import { type FormToCompile, Lowering } from "./lower";
import { type Boundary, neededNodes, orderNodes, SLICE_NODES } from "./order";
import { countOperations, printTape, type Tape } from "./tape";

/** Operations of a tape at most. */
export const MOST_OPERATIONS = 16_000_000;

/** Slots at most: with four points of four bytes each they are 256 MiB. */
export const MOST_SLOTS = 16_777_216;

/** Terms of one slice: enough to make a full batch of inversions. */
const SLICE_TERMS = 64;

/** Limits that a caller may set lower than the ones above. */
export interface CompileLimits {
  readonly operations?: number;
  readonly slots?: number;
}

/**
 * Compiles a form that was validated for its n, k and loops.
 * Fails with `limit-tape-operations` or `limit-tape-memory` before anything larger than the limit is built.
 */
export function compile(form: FormToCompile, limits: CompileLimits = {}): Result<Tape> {
  const operations = limits.operations ?? MOST_OPERATIONS;
  const graph = new Graph(operations);
  const terms: Ref[] = [];
  const boundaries: Boundary[] = [];
  try {
    // Slices never hold more nodes than they may, and end with a term where they can.
    const cut = (): void => {
      for (let last = boundaries.at(-1)?.nodes ?? 0; graph.size - last > SLICE_NODES; last += SLICE_NODES) {
        boundaries.push({ nodes: last + SLICE_NODES, terms: boundaries.at(-1)?.terms ?? 0 });
      }
    };
    for (const term of new Lowering(graph, form).terms()) {
      terms.push(term);
      cut();
      const last = boundaries.at(-1);
      if (terms.length - (last?.terms ?? 0) >= SLICE_TERMS) boundaries.push({ nodes: graph.size, terms: terms.length });
    }
    cut();
    boundaries.push({ nodes: graph.size, terms: terms.length });
  } catch (reason) {
    if (!(reason instanceof GraphOverflow)) throw reason;
    return failure({
      code: "limit-tape-operations",
      message: `this formula takes more than ${operations.toLocaleString("en")} operations for one point`,
      span: form.formula.expression.span,
      help: "split it, or write what is used again as a definition with let",
    });
  }
  const needed = neededNodes(graph, terms);
  const encoded = encode(graph, orderNodes(graph, needed, boundaries), needed, terms);
  const slots = limits.slots ?? MOST_SLOTS;
  if (encoded.slots > slots) {
    return failure({
      code: "limit-tape-memory",
      message: `this formula keeps ${encoded.slots.toLocaleString("en")} numbers at a time, more than ${slots.toLocaleString("en")}`,
      span: form.formula.expression.span,
      help: "put terms that share their factors next to each other",
    });
  }
  const tape = {
    n: form.n,
    k: form.k,
    loops: form.loops,
    ...encoded,
    denominators: graph.denominatorSpans,
    counts: countOperations(encoded.code, form.k, encoded.slots),
  };
  return success({ ...tape, print: () => printTape(tape) });
}

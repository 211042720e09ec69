/** The digest of a form: its identity wherever it is kept (DATA rule 1). */
import { Sha256 } from "../sha256";
import { canonicalPieces } from "./canonical";
import type { Form } from "./entry";

/** Version of what is hashed; part of it. */
const digestSchema = "equiform-form-1";

/**
 * "sha256:" and 64 hexadecimal digits: SHA-256 of the canonical JSON of schema, n or range, k, loops, component (its negative legs),
 * target, s and the syntax tree without spans. Title, references, note and comments do not count.
 */
export function digestOf(form: Form): string {
  const { n, k, loops } = form.amplitude;
  const content = {
    schema: digestSchema,
    n,
    k,
    loops,
    component: form.component,
    target: form.target,
    s: form.squareSign === 1 ? "<ab>[ab]" : "<ab>[ba]",
    tree: withoutSpans(form.formula),
  };
  const hash = new Sha256();
  const encoder = new TextEncoder();
  let waiting = "";
  for (const piece of canonicalPieces(content)) {
    waiting += piece;
    if (waiting.length < 65_536) continue;
    hash.update(encoder.encode(waiting));
    waiting = "";
  }
  hash.update(encoder.encode(waiting));
  return `sha256:${[...hash.digest()].map((byte) => byte.toString(16).padStart(2, "0")).join("")}`;
}

/** A copy of a tree, or of a part of one, without the places in the source. */
export function withoutSpans(node: unknown): unknown {
  if (Array.isArray(node)) return node.map(withoutSpans);
  if (typeof node !== "object" || node === null) return node;
  return Object.fromEntries(
    Object.entries(node)
      .filter(([name]) => name !== "span")
      .map(([name, child]) => [name, withoutSpans(child)]),
  );
}

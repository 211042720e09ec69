/** How deep the tree of a formula is once definitions are looked into: what bounds the recursion of everything that walks it. */
import type { Faults } from "./faults";
import { deepestTree } from "./limits";
import type { Expression, Formula, Item } from "./tree";
import { innerExpressions, itemsOf, operandsOf } from "./walk";

type Node = { readonly expression: Expression } | { readonly item: Item };

function innerNodes(node: Node): Node[] {
  if ("expression" in node) {
    return [
      ...innerExpressions(node.expression).map((expression) => ({ expression })),
      ...itemsOf(node.expression).map((item) => ({ item })),
    ];
  }
  return operandsOf(node.item).flatMap((operand) =>
    operand.kind === "group" ? operand.items.map((item) => ({ item })) : [],
  );
}

/** Height over a root: 1 for a leaf; a use of a definition is one more than its height. Without recursion, the tree being as deep as the text allows. */
function heightOf(roots: readonly Node[], definitions: ReadonlyMap<string, number>): number {
  let highest = 0;
  const stack: { node: Node; depth: number }[] = roots.map((node) => ({ node, depth: 1 }));
  for (let top = stack.pop(); top !== undefined; top = stack.pop()) {
    const { node, depth } = top;
    const inner = "expression" in node ? node.expression : node.item;
    const used = inner.kind === "call" || inner.kind === "named" ? (definitions.get(inner.name) ?? 0) : 0;
    highest = Math.max(highest, depth + used);
    for (const child of innerNodes(node)) stack.push({ node: child, depth: depth + 1 });
  }
  return highest;
}

/** Reports the first definition, or the formula, that is deeper than `deepestTree`. @throws stop after the report. */
export function checkHeight(formula: Formula, faults: Faults): void {
  const heights = new Map<string, number>();
  const help = "Let definitions rest on fewer levels of other definitions.";
  for (const { name, value, span } of formula.definitions) {
    const roots: Node[] =
      value.kind === "scalar"
        ? [{ expression: value.expression }]
        : value.geometry.kind === "meet"
          ? [{ item: value.geometry }]
          : value.geometry.items.map((item) => ({ item }));
    const height = heightOf(roots, heights);
    if (height > deepestTree)
      faults.fatal(
        "limit-nesting",
        span,
        `The definition of ${name} is more than ${deepestTree.toLocaleString("en")} levels deep.`,
        { help },
      );
    heights.set(name, height);
  }
  if (heightOf([{ expression: formula.expression }], heights) > deepestTree) {
    faults.fatal(
      "limit-nesting",
      formula.expression.span,
      `The formula is more than ${deepestTree.toLocaleString("en")} levels deep.`,
      { help },
    );
  }
}

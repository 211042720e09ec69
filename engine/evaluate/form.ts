/** A form at one n, ready to be evaluated, and what it reads. */
import type { PointUse } from "../kinematics";
import type { Formula } from "../notation/tree";

/** A formula with the size of its amplitude. `negativeLegs` (ascending) make it a component, null is the superamplitude. */
export interface FormAtN {
  readonly n: number;
  readonly k: number;
  readonly loops: number;
  readonly negativeLegs: readonly number[] | null;
  /** -1 in the convention s(a b) = <ab>[ba]: turns every square bracket, leaves s( ) and x2( ) alone. */
  readonly squareSign: 1 | -1;
  readonly formula: Formula;
}

/** What is needed of an entry that was read. */
export interface FormSource {
  readonly amplitude: { readonly k: number; readonly loops: number };
  readonly component: readonly number[] | null;
  readonly squareSign: 1 | -1;
  readonly formula: Formula;
}

/** The form that an entry states for n legs; n is one of the entry's range. */
export const formAt = (form: FormSource, n: number): FormAtN => ({
  n,
  k: form.amplitude.k,
  loops: form.amplitude.loops,
  negativeLegs: form.component,
  squareSign: form.squareSign,
  formula: form.formula,
});

/** What occurs in a formula: kinds of nodes, with loop lines in `x2( )` and elsewhere told apart. Definitions count where they are used. */
interface Inventory {
  readonly kinds: ReadonlySet<string>;
  readonly loopsInDistances: boolean;
  readonly loopsElsewhere: boolean;
}

/** A formula never changes, and is asked for at every point. */
const inventories = new WeakMap<Formula, Inventory>();

function inventory(formula: Formula): Inventory {
  const known = inventories.get(formula);
  if (known !== undefined) return known;
  const made = takeInventory(formula);
  inventories.set(formula, made);
  return made;
}

/** Nodes with nothing inside but index expressions. */
const LEAVES = new Set([
  "label",
  "loopPoint",
  "loopLine",
  "referenceTwistor",
  "referenceLine",
  "integer",
  "index",
  "unknown",
  "call",
  "named",
  "bar",
  "single",
  "range",
]);

function takeInventory(formula: Formula): Inventory {
  const definitions = new Map(formula.definitions.map((definition) => [definition.name, definition.value]));
  const kinds = new Set<string>();
  const names = new Set<string>();
  /** R-invariants that were looked into: derived forms share their nodes, and have hundreds of thousands of them. */
  const seen = new Set<object>();
  const used: unknown[] = [formula.expression];
  let [loopsInDistances, loopsElsewhere] = [false, false];
  const visit = (node: object, inDistance: boolean): void => {
    const { kind, name } = node as { kind?: unknown; name?: unknown };
    if (typeof kind === "string") {
      if (kind === "five") {
        if (seen.has(node)) return;
        seen.add(node);
      }
      kinds.add(kind);
      if (kind === "loopLine" || kind === "loopPoint") {
        if (inDistance) loopsInDistances = true;
        else loopsElsewhere = true;
      }
      if ((kind === "call" || kind === "named") && typeof name === "string" && !names.has(name)) {
        names.add(name);
        used.push(definitions.get(name));
      }
      if (LEAVES.has(kind)) return;
    }
    const inner = inDistance || kind === "distance";
    for (const key in node) {
      const child = (node as Record<string, unknown>)[key];
      if (key !== "span" && typeof child === "object" && child !== null) visit(child, inner);
    }
  };
  // The tree is not deeper than the limit on nesting; definitions wait their turn.
  for (let root = used.pop(); root !== undefined; root = used.pop()) visit(root as object, false);
  return { kinds, loopsInDistances, loopsElsewhere };
}

/** Whether a form's loop lines occur only in `x2( )`: it is then one in dual points, and <AB>^-4 for each line is supplied. */
export function inDualPoints(formula: Formula): boolean {
  const { loopsInDistances, loopsElsewhere } = inventory(formula);
  return loopsInDistances && !loopsElsewhere;
}

const EXTERNAL_KINDS = ["label", "bar", "single", "range"];

/** Which parts of a point a form reads. */
export function pointUse(form: FormAtN): PointUse {
  const { kinds, loopsInDistances, loopsElsewhere } = inventory(form.formula);
  const grassmann = form.k > 0 && (kinds.has("five") || kinds.has("delta"));
  return {
    twistors: EXTERNAL_KINDS.some((kind) => kinds.has(kind)),
    chi: grassmann,
    lines: loopsInDistances || loopsElsewhere,
    referenceTwistor: kinds.has("referenceTwistor"),
    referenceChi: grassmann && kinds.has("referenceTwistor"),
    referenceLine: kinds.has("referenceLine"),
  };
}

/** The kinds of nodes that occur in a formula, definitions counted where they are used. */
export const kindsOf = (formula: Formula): ReadonlySet<string> => inventory(formula).kinds;

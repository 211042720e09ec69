/** Writes forms as syntax trees by published recursions and expansions; shares nothing with the sources of truth. */
import type { Formula } from "../notation/tree";
import { type Diagnostic, failure, type Result, success } from "../result";
import { chiralPentagons, doublePentagons } from "./local";
import { leg, Meets } from "./points";
import { countRecursionTerms, Recursion } from "./recursion";
import { nmhvVertexExpansion, oneLoopVertexExpansion } from "./vertex";
import { writeTerms } from "./write";

export { countRecursionTerms } from "./recursion";

/** The methods by the names that callers use. */
export const deriveMethods = ["recursion", "vertex", "local"] as const;
export type DeriveMethod = (typeof deriveMethods)[number];

/** Recursion forms with more terms than this are refused: nobody reads them and a check would take hours. */
export const mostDerivedTerms = 20_000;
const mostLegs = 64;

export interface DeriveRequest {
  /** 4..64 */
  readonly n: number;
  /** 0..n-4 */
  readonly k: number;
  readonly loops: number;
  readonly method: DeriveMethod;
  /** Recursion only: the leg that is shifted, 1..n; n where it is left out. */
  readonly leg?: number;
  /** Recursion only: whether leg l is shifted along the line to l-1 (`forward`, the default) or to l+1 (`backward`). */
  readonly direction?: "forward" | "backward";
}

/** What an entry document needs; the notation text is the printer's work. */
export interface DerivedForm {
  readonly amplitude: { readonly n: number; readonly k: number; readonly loops: number };
  readonly title: string;
  readonly formula: Formula;
  readonly method: string;
  readonly references: readonly { readonly arxiv: string; readonly title: string }[];
}

interface Method {
  readonly name: string;
  /** For people: which amplitudes the method writes. */
  readonly available: string;
  covers(k: number, loops: number): boolean;
  title(request: DeriveRequest): string;
  write(request: DeriveRequest): Formula;
  references(loops: number): DerivedForm["references"];
}

const allLoop = { arxiv: "1008.2958", title: "The All-Loop Integrand For Scattering Amplitudes in Planar N=4 SYM" };
const local = { arxiv: "1012.6032", title: "Local Integrals for Planar Scattering Amplitudes" };
const treeRecursion = {
  arxiv: "hep-th/0501052",
  title: "Direct Proof Of Tree-Level Recursion Relation In Yang-Mills Theory",
};
const vertexDiagrams = { arxiv: "1009.1854", title: "MHV Diagrams in Momentum Twistor Space" };

/** Label a of the recursion, whose shifted leg is n, carried to the shifted leg and direction that were asked for. */
function carry(label: number, { n, leg: shifted = n, direction = "forward" }: DeriveRequest): number {
  const carried = direction === "forward" ? shifted + label : shifted - label;
  return ((carried - 1 + 2 * n) % n) + 1;
}

const methods: Readonly<Record<DeriveMethod, Method>> = {
  recursion: {
    name: "on-shell recursion",
    available: "trees and one loop for every n and k",
    covers: (_, loops) => loops <= 1,
    title({ n, leg: shifted = n, direction = "forward" }) {
      const neighbour = carry(n - 1, { n, k: 0, loops: 0, method: "recursion", leg: shifted, direction });
      return `On-shell recursion, leg ${shifted} shifted towards leg ${neighbour}`;
    },
    write(request) {
      const points = Array.from({ length: request.n }, (_, position) => leg(carry(position + 1, request)));
      return writeTerms(new Recursion(new Meets()).terms(points, request.k, request.loops as 0 | 1));
    },
    references: (loops) => (loops === 0 ? [treeRecursion, allLoop] : [allLoop]),
  },
  vertex: {
    name: "vertex expansion",
    available: "trees with k = 1 and one loop with k = 0",
    covers: (k, loops) => (loops === 0 && k === 1) || (loops === 1 && k === 0),
    title: () => "Vertex expansion with a reference twistor",
    write: ({ loops }) => (loops === 0 ? nmhvVertexExpansion() : oneLoopVertexExpansion()),
    references: () => [vertexDiagrams],
  },
  local: {
    name: "local integrals",
    available: "one and two loops with k = 0",
    covers: (k, loops) => k === 0 && (loops === 1 || loops === 2),
    title: ({ loops }) => (loops === 1 ? "Chiral pentagons with a reference line" : "Chiral double pentagons"),
    write: ({ loops }) => (loops === 1 ? chiralPentagons() : doublePentagons()),
    references: () => [local],
  },
};

const fault = (code: string, message: string, help: string): Diagnostic => ({ code, message, help });

function faults(request: DeriveRequest): Diagnostic[] {
  const { n, k, loops, leg: shifted } = request;
  if (!Number.isInteger(n) || n < 4 || n > mostLegs) {
    return [
      fault(
        "derive-n",
        `n is ${n}: an amplitude has 4 to ${mostLegs} legs here.`,
        `Give a whole number from 4 to ${mostLegs}.`,
      ),
    ];
  }
  const found: Diagnostic[] = [];
  if (!Number.isInteger(k) || k < 0 || k > n - 4) {
    found.push(
      fault(
        "derive-k",
        `k is ${k}: with n = ${n} it goes from 0 to ${n - 4}.`,
        `Give k from 0 to ${n - 4}, or more legs.`,
      ),
    );
  }
  const method = Object.hasOwn(methods, request.method) ? methods[request.method] : undefined;
  if (method === undefined) {
    found.push(
      fault("derive-method", `There is no method "${request.method}".`, `Methods: ${deriveMethods.join(", ")}.`),
    );
  } else if (!Number.isInteger(loops) || loops < 0 || (found.length === 0 && !method.covers(k, loops))) {
    const list = deriveMethods.map((name) => `${name}: ${methods[name].available}`).join("; ");
    const message = `The method "${request.method}" does not write amplitudes with k = ${k} and loops = ${loops}.`;
    found.push(fault("derive-not-available", message, `Available: ${list}.`));
  }
  if (shifted !== undefined && (!Number.isInteger(shifted) || shifted < 1 || shifted > n)) {
    found.push(
      fault("derive-leg", `Leg ${shifted} does not exist: the legs are 1 to ${n}.`, `Give a leg from 1 to ${n}.`),
    );
  }
  if (found.length === 0 && request.method === "recursion") {
    const terms = countRecursionTerms(n, k, loops as 0 | 1);
    if (terms > mostDerivedTerms) {
      const number = Number.isFinite(terms) ? String(terms) : "more than 2^53";
      const message = `The recursion writes ${number} terms here; the limit is ${mostDerivedTerms}.`;
      found.push(fault("derive-too-many-terms", message, "Ask for fewer legs, or for a k further from the middle."));
    }
  }
  return found;
}

/**
 * Writes a form of the amplitude (n, k, loops) by one of the methods: `recursion` (hep-th/0501052, 1008.2958) term by term for
 * the legs and the shift asked for, `vertex` (1009.1854) and `local` (1012.6032) as sums over indices.
 * What cannot be written is a diagnostic: derive-n, derive-k, derive-method, derive-not-available, derive-leg,
 * derive-too-many-terms.
 */
export function derive(request: DeriveRequest): Result<DerivedForm> {
  const found = faults(request);
  if (found.length > 0) return failure(...found);
  const { n, k, loops } = request;
  const method = methods[request.method];
  return success({
    amplitude: { n, k, loops },
    title: method.title(request),
    formula: method.write(request),
    method: method.name,
    references: method.references(loops),
  });
}

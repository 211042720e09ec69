import { describe, expect, it } from "vitest";
import { countRecursionTerms, type DeriveRequest, derive, mostDerivedTerms } from "../../../engine/derive";
import { parse, printFormula, withoutSpans } from "../../../engine/notation";
import type { Formula } from "../../../engine/notation/tree";

const written = (request: DeriveRequest) => {
  const result = derive(request);
  if (!result.ok) throw new Error(result.diagnostics.map(({ message }) => message).join("\n"));
  return result.value;
};

const terms = ({ expression }: Formula): number => (expression.kind === "add" ? expression.summands.length : 1);

const codes = (request: DeriveRequest): string[] => {
  const result = derive(request);
  return result.ok ? [] : result.diagnostics.map(({ code }) => code);
};

/** Narayana number C(n-3,k) C(n-3,k+1)/(n-3), the number of terms of the tree recursion. */
function narayana(n: number, k: number): number {
  const choose = (from: number, take: number): number => (take === 0 ? 1 : (choose(from - 1, take - 1) * from) / take);
  return (choose(n - 3, k) * choose(n - 3, k + 1)) / (n - 3);
}

describe("the recursion written as syntax trees", () => {
  it("has as many terms as the Narayana number says, for trees with n = 4..10", () => {
    for (let n = 4; n <= 10; n++) {
      for (let k = 0; k <= n - 4; k++) {
        const { formula } = written({ n, k, loops: 0, method: "recursion" });
        expect(terms(formula), `n=${n} k=${k}`).toBe(narayana(n, k));
        expect(countRecursionTerms(n, k, 0)).toBe(narayana(n, k));
      }
    }
  });

  // 1008.2958: 16 terms for the six-leg one-loop NMHV integrand; the other counts follow from parity and from kermit sums.
  it("has 1; 3, 3; 6, 16, 6; 10, 50, 50, 10 live terms at one loop for n = 4..7", () => {
    const counts = [4, 5, 6, 7].map((n) =>
      Array.from({ length: n - 3 }, (_, k) => terms(written({ n, k, loops: 1, method: "recursion" }).formula)),
    );
    expect(counts).toEqual([[1], [3, 3], [6, 16, 6], [10, 50, 50, 10]]);
  });

  it("defines every name once, before its use, and no name that is not used", () => {
    for (const request of [
      { n: 9, k: 3, loops: 0, method: "recursion", leg: 4 },
      { n: 7, k: 2, loops: 1, method: "recursion", leg: 2, direction: "backward" },
    ] as const) {
      const { definitions, expression } = written(request).formula;
      const names = definitions.map(({ name }) => name);
      expect(new Set(names).size).toBe(names.length);
      const mentioned = (tree: unknown): string[] =>
        [...JSON.stringify(tree).matchAll(/"kind":"(?:named|call)","name":"(\w+)"/g)].map((match) => match[1]!);
      for (const [position, { value }] of definitions.entries()) {
        for (const name of mentioned(value)) expect(names.slice(0, position)).toContain(name);
      }
      const used = new Set([...mentioned(definitions.map(({ value }) => value)), ...mentioned(expression)]);
      expect([...used].sort()).toEqual([...names].sort());
      const values = definitions.map(({ value }) => JSON.stringify(value));
      expect(new Set(values).size).toBe(values.length);
    }
  });

  it("is a formula of the notation: printed and read again it is the same tree", () => {
    for (const request of [
      { n: 4, k: 0, loops: 0, method: "recursion" },
      { n: 8, k: 3, loops: 0, method: "recursion" },
      { n: 6, k: 0, loops: 1, method: "recursion" },
      { n: 7, k: 2, loops: 1, method: "recursion" },
      { n: 7, k: 1, loops: 0, method: "vertex" },
      { n: 7, k: 0, loops: 1, method: "vertex" },
      { n: 7, k: 0, loops: 1, method: "local" },
      { n: 7, k: 0, loops: 2, method: "local" },
    ] as const) {
      const { formula } = written(request);
      const read = parse(printFormula(formula));
      expect(read.ok && withoutSpans(read.value), JSON.stringify(request)).toEqual(withoutSpans(formula));
    }
  });

  it("says which leg is shifted, and carries the labels there", () => {
    const forward = written({ n: 6, k: 1, loops: 0, method: "recursion", leg: 2 });
    expect(forward.title).toBe("On-shell recursion, leg 2 shifted towards leg 1");
    const backward = written({ n: 6, k: 1, loops: 0, method: "recursion", leg: 2, direction: "backward" });
    expect(backward.title).toBe("On-shell recursion, leg 2 shifted towards leg 3");
    expect(forward.references[0]!.arxiv).toBe("hep-th/0501052");
    expect(forward.amplitude).toEqual({ n: 6, k: 1, loops: 0 });
  });
});

describe("requests that cannot be met", () => {
  it("names each fault", () => {
    expect(codes({ n: 3, k: 0, loops: 0, method: "recursion" })).toEqual(["derive-n"]);
    expect(codes({ n: 6.5, k: 0, loops: 0, method: "recursion" })).toEqual(["derive-n"]);
    expect(codes({ n: 65, k: 0, loops: 0, method: "recursion" })).toEqual(["derive-n"]);
    expect(codes({ n: 6, k: 3, loops: 0, method: "recursion" })).toEqual(["derive-k"]);
    expect(codes({ n: 6, k: -1, loops: 0, method: "recursion", leg: 7 })).toEqual(["derive-k", "derive-leg"]);
    expect(codes({ n: 6, k: 1, loops: 0, method: "feynman" as "local" })).toEqual(["derive-method"]);
    expect(codes({ n: 6, k: 1, loops: 0, method: "toString" as "local" })).toEqual(["derive-method"]);
    expect(codes({ n: 6, k: 1, loops: 2, method: "recursion" })).toEqual(["derive-not-available"]);
    expect(codes({ n: 6, k: 2, loops: 0, method: "vertex" })).toEqual(["derive-not-available"]);
    expect(codes({ n: 6, k: 0, loops: 3, method: "local" })).toEqual(["derive-not-available"]);
    expect(codes({ n: 6, k: 0, loops: -1, method: "local" })).toEqual(["derive-not-available"]);
  });

  it("refuses more terms than anybody can use, at once", () => {
    const started = performance.now();
    expect(codes({ n: 64, k: 30, loops: 1, method: "recursion" })).toEqual(["derive-too-many-terms"]);
    expect(performance.now() - started).toBeLessThan(10_000);
    expect(countRecursionTerms(12, 4, 0)).toBeLessThanOrEqual(mostDerivedTerms);
  });

  it("says which amplitudes the methods write", () => {
    const result = derive({ n: 6, k: 1, loops: 2, method: "recursion" });
    expect(result).toEqual({
      ok: false,
      diagnostics: [
        {
          code: "derive-not-available",
          message: 'The method "recursion" does not write amplitudes with k = 1 and loops = 2.',
          help: "Available: recursion: trees and one loop for every n and k; vertex: trees with k = 1 and one loop with k = 0; local: one and two loops with k = 0.",
        },
      ],
    });
  });
});

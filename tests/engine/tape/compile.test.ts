import { describe, expect, it } from "vitest";
import { compile, opcodes } from "../../../engine/tape";
import { formOf, published } from "../../support/forms";
import { evaluators, sampleAt, tapeOf, walk } from "../conformance/evaluators";

const kernel = evaluators.find(({ name }) => name === "tape in WebAssembly, a prime for each point")!;

/** Kernel and tree walker at a few points. */
function compared(notation: string, size: { n: number; k: number }) {
  const form = formOf(notation, size);
  const samples = Array.from({ length: 2 }, (_, i) => sampleAt(form, kernel.prime(i), `compile ${i}`));
  return { kernel: kernel.evaluate(form, samples), walker: samples.map((sample) => walk(form, sample)) };
}

const invariants = [
  "[1 2 3 4 5]",
  "[2 3 4 5 6]",
  "[3 5 6 7 8]",
  "[1 4 7 9 10]",
  "[2 6 8 9 10]",
  "[1 3 5 8 (9 10) cap (1 2 3)]",
  "[4 6 7 9 1]",
];

describe("Grassmann values", () => {
  it.each([1, 2, 3, 4, 5, 6])("a product of %i deltas is the product of four determinants", (k) => {
    const { kernel: fast, walker } = compared(invariants.slice(0, k).join(" "), { n: 10, k });
    expect(fast).toEqual(walker);
    expect(walker[0]!.sum).not.toBe(0n);
  });

  it.each([
    ["a sum times a sum", "([1 2 3 4 5] + [2 3 4 5 6]) ([3 5 6 7 8] + [1 4 7 9 10])", 2],
    ["the square of a long sum, by tensors", `(${invariants.join(" + ")})^2`, 2],
    ["a cube", "([1 2 3 4 5] + [3 5 6 7 8] - [2 6 8 9 10])^3", 3],
    ["sums of degree two", "([1 2 3 4 5][3 5 6 7 8] + [2 3 4 5 6][1 4 7 9 10])^2", 4],
    ["a square of one delta, zero", "[1 2 3 4 5]^2", 2],
    ["too many deltas, zero", "[1 2 3 4 5][2 3 4 5 6][3 5 6 7 8]", 2],
    ["too few deltas", "[1 2 3 4 5] + [2 3 4 5 6]", 2],
    ["parts of several degrees", "1 + [1 2 3 4 5] + [1 2 3 4 5][3 5 6 7 8]", 2],
    ["a delta without denominators", "delta(1 2 3 4 5) delta(* 2 3 4 6)", 2],
    ["deltas at k = 0", "[1 2 3 4 5] + 1", 0],
  ])("%s", (_, notation, k) => {
    const { kernel: fast, walker } = compared(notation, { n: 10, k });
    expect(fast).toEqual(walker);
    expect(walker).not.toContain(null);
  });
});

describe("sharing", () => {
  it("a bracket is one operation however it is written", () => {
    const tape = tapeOf(formOf("<1 2 3 4> + <4 1 2 3> + <2 1 4 3> + <1 3 2 4>", { n: 5, k: 0 }));
    expect(tape.counts.operations.bracket).toBe(1);
    expect(tape.counts.operations.line).toBe(2);
  });

  it("a repeated R-invariant costs nothing again", () => {
    const once = tapeOf(formOf("[1 2 3 4 5]", { n: 6, k: 1 }));
    const often = tapeOf(formOf("[1 2 3 4 5] + [1 2 3 4 5] + [1 2 3 4 5]", { n: 6, k: 1 }));
    expect(often.counts.multiplications).toBe(once.counts.multiplications);
    expect(often.counts.terms).toBe(3);
  });

  it("the NMHV sum takes a number of lines that grows with n, not with its square", () => {
    const n = 12;
    const { operations } = tapeOf(formOf(published.nmhv, { n, k: 1 })).counts;
    expect(operations.term).toBe(((n - 3) * (n - 4)) / 2);
    expect(operations.line).toBeLessThanOrEqual(3 * n);
  });

  it("grows linearly with a sum of independent terms", () => {
    const terms = (count: number) =>
      Array.from({ length: count }, (_, i) => `${i + 2} <1 2 3 4>^${(i % 50) + 1}`).join(" + ");
    const [small, large] = [100, 1000].map((count) => tapeOf(formOf(terms(count), { n: 5, k: 0 })));
    expect(large!.counts.entries).toBeLessThan(10.5 * small!.counts.entries);
    expect(large!.slots).toBeLessThan(10.5 * small!.slots);
  });
});

describe("limits", () => {
  it("refuses more operations than allowed, before they are built", () => {
    const refused = compile(formOf(published.nmhv, { n: 12, k: 1 }), { operations: 200 });
    expect(refused).toEqual({
      ok: false,
      diagnostics: [
        {
          code: "limit-tape-operations",
          message: "this formula takes more than 200 operations for one point",
          span: [0, published.nmhv.length],
          help: "split it, or write what is used again as a definition with let",
        },
      ],
    });
  });

  it("refuses more slots than allowed", () => {
    const refused = compile(formOf(published.nmhv, { n: 12, k: 1 }), { slots: 100 });
    expect(refused.ok ? [] : refused.diagnostics.map(({ code }) => code)).toEqual(["limit-tape-memory"]);
  });
});

describe("print", () => {
  it("says every operation on a line of its own", () => {
    const tape = tapeOf(formOf("<1 2 3 4> / 3 - 1/<1 2 3 5>", { n: 5, k: 0 }));
    expect(tape.print()).toBe(
      [
        "# 42 slots, 9 operations, 53 multiplications",
        "s0 .. s3 = Z1",
        "s4 .. s7 = Z2",
        "s8 .. s11 = Z3",
        "s12 .. s15 = Z4",
        "s17 .. s20 = Z5",
        "s16 = 1/3",
        "s21 = line s0 s4",
        "s27 = line s8 s12",
        "s33 = line s8 s17",
        "s39 = bracket s21 s27",
        "s40 = bracket s21 s33",
        "s41 = multiply s39 s16",
        "s39 = invert s40, denominator 0",
        "term +s41",
        "term -s39",
        "",
      ].join("\n"),
    );
  });

  it("has a name and a synopsis for every operation", () => {
    expect(new Set(opcodes.map(({ name }) => name)).size).toBe(opcodes.length);
    expect(opcodes.every(({ synopsis }) => synopsis.length > 5)).toBe(true);
  });
});

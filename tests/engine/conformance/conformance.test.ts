/** One suite for every evaluator: random formulas against the tree walker, laws, and values known from elsewhere. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { FormAtN } from "../../../engine/evaluate/form";
import { formOf, published } from "../../support/forms";
import { pari } from "../../support/pari";
import { type Evaluator, evaluators, sampleAt, walk } from "./evaluators";
import { randomForms } from "./formulas";

const runs = process.env.EQUIFORM_LONG === "1" ? 5000 : 150;

const samplesFor = (evaluator: Evaluator, form: FormAtN, count: number, seed: string) =>
  Array.from({ length: count }, (_, i) => sampleAt(form, evaluator.prime(i), `${seed} ${i}`));

describe.each(evaluators)("$name", (evaluator) => {
  const samplesOf = (form: FormAtN, count: number, seed: string) => samplesFor(evaluator, form, count, seed);

  it("has the tree walker's value and terms, or its vanishing denominator, on random formulas", () => {
    fc.assert(
      fc.property(randomForms, fc.integer(), (random, seed) => {
        const form = formOf(random.notation, random, { squareSign: random.squareSign });
        const samples = samplesOf(form, 3, `random ${seed}`);
        expect(evaluator.evaluate(form, samples)).toEqual(samples.map((sample) => walk(form, sample)));
      }),
      { numRuns: runs, seed: 20240501 },
    );
  });

  it.each(Object.entries(published))("has the tree walker's value on a published form: %s", (_, notation) => {
    const loops = notation.includes("CD") ? 2 : notation.includes("AB") ? 1 : 0;
    const form = formOf(notation, { n: 6, k: notation.includes("[") ? 1 : 0, loops });
    const samples = samplesOf(form, 9, "published");
    expect(evaluator.evaluate(form, samples)).toEqual(samples.map((sample) => walk(form, sample)));
  });
});

describe.each(evaluators.filter(({ small }) => !small))("$name", (evaluator) => {
  const samplesOf = (form: FormAtN, count: number, seed: string) => samplesFor(evaluator, form, count, seed);

  const valuesOf = (notation: string, size: { n: number; k: number; loops?: number }) => {
    const form = formOf(notation, size);
    const samples = samplesOf(form, 5, "values");
    return evaluator.evaluate(form, samples).map((outcome) => outcome?.sum ?? null);
  };

  it("obeys the laws of a field", () => {
    const [a, b, c] = ["<1 2 3 4>", "<2 3 4 5>", "<1 3 4 5>"];
    const zeros = [
      `(${a} + ${b}) ${c} - ${a} ${c} - ${b} ${c}`,
      `${a} (${b} ${c}) - (${a} ${b}) ${c}`,
      `(${a} + ${b}) + ${c} - (${a} + (${b} + ${c}))`,
      `${a} ${b} - ${b} ${a}`,
      `${a} + (0 - ${a})`,
      `${a} * 0`,
      `${a} / ${a} - 1`,
      `1 / (1 / ${a}) - ${a}`,
      `(${a} / ${b}) (${b} / ${a}) - 1`,
      `${a}^7 - ${a}^3 ${a}^4`,
      `${a}^(-3) ${a}^3 - 1`,
    ];
    for (const notation of zeros) expect(valuesOf(notation, { n: 5, k: 0 })).toEqual([0n, 0n, 0n, 0n, 0n]);
  });

  it("knows identities of the literature", () => {
    // 1008.2958: the six-term identity of R-invariants.
    const six = "[1 2 3 4 5] - [1 2 3 4 6] + [1 2 3 5 6] - [1 2 4 5 6] + [1 3 4 5 6] - [2 3 4 5 6]";
    // 1012.6032: chiral pentagons with a reference line, and the kermits of 1008.2958, are one integrand.
    const oneLoop = `${published.kermits} - (${published.pentagons})`;
    const schouten = "<1 2><3 4> + <1 3><4 2> + <1 4><2 3>";
    const pluecker = "<1 2 3 4><1 2 5 6> + <1 2 3 5><1 2 6 4> + <1 2 3 6><1 2 4 5>";
    expect(valuesOf(six, { n: 6, k: 1 })).toEqual([0n, 0n, 0n, 0n, 0n]);
    expect(valuesOf(oneLoop, { n: 6, k: 0, loops: 1 })).toEqual([0n, 0n, 0n, 0n, 0n]);
    expect(valuesOf(schouten, { n: 4, k: 0 })).toEqual([0n, 0n, 0n, 0n, 0n]);
    expect(valuesOf(pluecker, { n: 6, k: 0 })).toEqual([0n, 0n, 0n, 0n, 0n]);
  });

  it("has PARI/GP's value of the NMHV sum at n = 7, from matdet and Mod", () => {
    const form = formOf(published.nmhv, { n: 7, k: 1 });
    const samples = samplesOf(form, 3, "pari");
    const programs = samples.map(({ point, prime }) => {
      const matrix = (rows: readonly (readonly bigint[])[]) => `[${rows.map((row) => row.join(",")).join(";")}]`;
      return [
        `p=${prime};`,
        `Z=${matrix(point.twistors)}*Mod(1,p);`,
        `C=${matrix(point.chi.map((flavours) => flavours.map((row) => row[0]!)))}*Mod(1,p);`,
        "b(v)=matdet(matrix(4,4,i,j,Z[v[i],j]));",
        "five(v)={my(c=vector(5,i,b(vector(4,j,v[(i+j-1)%5+1]))));prod(A=1,4,sum(i=1,5,c[i]*C[v[i],A]))/vecprod(c)};",
        "print(lift(sum(i=2,4,sum(j=i+2,6,five([1,i,i+1,j,j+1])))))",
      ].join("\n");
    });
    const expected = programs.map((program) => BigInt(pari(program)));
    expect(evaluator.evaluate(form, samples).map((outcome) => outcome?.sum)).toEqual(expected);
  });

  it("keeps exact what is a quotient of integers, also p/p", () => {
    for (const prime of [evaluator.prime(0), 2147483647n, (1n << 61n) - 1n]) {
      expect(valuesOf(`${prime}/${prime} <1 2 3 4>/<1 2 3 4>`, { n: 4, k: 0 })).toEqual([1n, 1n, 1n, 1n, 1n]);
    }
    // A denominator of zero modulo the prime of a point makes that point a bad one.
    expect(valuesOf(`<1 2 3 4>/${evaluator.prime(0)}`, { n: 4, k: 0 })[0]).toBe(null);
  });
});

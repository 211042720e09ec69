/** Random formulas that have a value: notation text for given n, k and loops, every construct of the notation among them. */
import fc from "fast-check";

export interface RandomForm {
  readonly n: number;
  readonly k: number;
  readonly loops: number;
  readonly squareSign: 1 | -1;
  readonly notation: string;
}

const join = (items: readonly string[]) => items.join(" ");

/** Distinct labels in any order. */
const labels = (n: number, count: number) =>
  fc.shuffledSubarray(
    Array.from({ length: n }, (_, i) => i + 1),
    { minLength: count, maxLength: count },
  );

/** Points of one slot that may stand anywhere, and planes of three. */
function figures(n: number, loops: number) {
  const loopWords = ["AB", "CD", "EF"].slice(0, loops);
  const letters = [...loopWords.join("")];
  const label = fc.integer({ min: 1, max: n }).map(String);
  const word = fc.constantFrom(...loopWords, "X");
  const plane = fc.oneof(
    labels(n, 3).map((l) => `(${join(l.map(String))})`),
    label.map((i) => `bar(${i})`),
    fc.tuple(label, word).map(([i, w]) => `(${i} ${w})`),
    fc
      .tuple(label, labels(n, 3), labels(n, 3))
      .map(([i, a, b]) => `(${i} (${join(a.map(String))}) cap (${join(b.map(String))}))`),
  );
  const line = fc.oneof(
    { weight: 3, arbitrary: labels(n, 2).map((l) => `(${join(l.map(String))})`) },
    word,
    fc.tuple(plane, plane).map(([a, b]) => `(${a} cap ${b})`),
  );
  const meet = fc
    .tuple(line, plane, fc.boolean())
    .map(([l, p, turned]) => (turned ? `${p} cap ${l}` : `${l} cap ${p}`));
  const nested = fc.tuple(meet, labels(n, 4)).map(([m, l]) => `(${m} ${l[0]}) cap (${l[1]} ${l[2]} ${l[3]})`);
  const point = fc.oneof(
    { weight: 6, arbitrary: label },
    { weight: 1, arbitrary: fc.constant("*") },
    { weight: letters.length > 0 ? 1 : 0, arbitrary: fc.constantFrom(...letters, "1") },
    { weight: 2, arbitrary: meet },
    { weight: 1, arbitrary: nested },
  );
  /** Points whose Grassmann part is theirs or zero: what may stand in [ ] and delta. */
  const superpoint = fc.oneof(
    { weight: 6, arbitrary: label },
    { weight: 1, arbitrary: fc.constant("*") },
    {
      weight: 2,
      arbitrary: fc
        .tuple(labels(n, 2), labels(n, 3))
        .map(([a, b]) => `(${join(a.map(String))}) cap (${join(b.map(String))})`),
    },
    {
      weight: loops > 0 ? 1 : 0,
      arbitrary: fc.tuple(fc.constantFrom(...loopWords, "1 2"), label).map(([w, i]) => `(${w}) cap bar(${i})`),
    },
  );
  return { label, word, line, plane, point, superpoint };
}

function scalars(n: number, loops: number) {
  const { label, word, point, plane } = figures(n, loops);
  const threeLabels = labels(n, 3).map((l) => `(${join(l.map(String))})`);
  const bracket = fc.oneof(
    { weight: 4, arbitrary: fc.array(point, { minLength: 4, maxLength: 4 }).map((p) => `<${join(p)}>`) },
    fc.tuple(word, point, point).map(([w, a, b]) => `<${w} ${a} ${b}>`),
    fc
      .tuple(
        word,
        fc.oneof(
          threeLabels,
          label.map((i) => `bar(${i})`),
        ),
        plane,
      )
      .map(([w, a, b]) => `<${w} ${a} cap ${b}>`),
  );
  const ends = labels(n, 2);
  const sums = fc.tuple(labels(n, 2), labels(n, 3)).map(([a, b]) => [a.join("+"), b.join("+")] as const);
  const spinors = fc.oneof(
    ends.map(([a, b]) => `<${a} ${b}>`),
    ends.map(([a, b]) => `[${a} ${b}]`),
    label.map((a) => `[* ${a}]`),
    fc.tuple(ends, sums).map(([[a, b], [p]]) => `<${a}|${p}|${b}]`),
    fc.tuple(ends, sums).map(([[a, b], [p]]) => `[${a}|${p}|${b}>`),
    fc.tuple(ends, sums).map(([[a, b], [p, q]]) => `<${a}|${p}|${q}|${b}>`),
    fc.tuple(ends, sums).map(([[a, b], [p, q]]) => `[${a}|${p}|${q}|${b}]`),
    labels(n, 3).map((l) => `s(${join(l.map(String))})`),
    ends.map(([a, b]) => `x2(${a} ${b})`),
  );
  const integer = fc.bigInt({ min: 0n, max: 10n ** 25n }).map(String);
  const { value } = fc.letrec<{ value: string; atom: string }>((tie) => ({
    atom: fc.oneof({ weight: 4, arbitrary: bracket }, { weight: 3, arbitrary: spinors }, integer),
    value: fc.oneof(
      { maxDepth: 3, withCrossShrink: true },
      { weight: 3, arbitrary: tie("atom") },
      { weight: 2, arbitrary: fc.tuple(tie("value"), tie("value")).map(([a, b]) => `(${a} + ${b})`) },
      { weight: 1, arbitrary: fc.tuple(tie("value"), tie("value")).map(([a, b]) => `(${a} - ${b})`) },
      { weight: 2, arbitrary: fc.tuple(tie("value"), tie("value")).map(([a, b]) => `(${a} * ${b})`) },
      { weight: 2, arbitrary: fc.tuple(tie("value"), tie("atom")).map(([a, b]) => `(${a} / ${b})`) },
      { weight: 1, arbitrary: fc.tuple(tie("atom"), tie("value")).map(([a, b]) => `(${a} / ${b})`) },
      {
        weight: 1,
        arbitrary: fc.tuple(tie("atom"), fc.integer({ min: -3, max: 4 })).map(([a, e]) => `${a}^(${e})`),
      },
      {
        weight: 1,
        arbitrary: fc
          .constantFrom("<i i+1 j j+1>", "<1 i j j+1>", "(i + 2*j)", "<i j>", "(-1)^(i+j) <i j>", "i <j-1 j>^2")
          .map((body) => `(sum(i, j : 1 < i, i+1 < j < n) ${body})`),
      },
      {
        weight: 1,
        arbitrary: fc.constantFrom("prod(i : 1 <= i < n) <i i+1>", "cyc(<1 2>)", "cyc(<1 2 3 5>)").map((t) => `(${t})`),
      },
    ),
  }));
  return value;
}

/** Elements of degree d in units of four eta. */
function graded(n: number, loops: number): (degree: number) => fc.Arbitrary<string> {
  const { superpoint } = figures(n, loops);
  const scalar = scalars(n, loops);
  const invariant = fc
    .tuple(fc.constantFrom("[", "delta("), fc.array(superpoint, { minLength: 5, maxLength: 5 }))
    .map(([open, points]) => `${open}${join(points)}${open === "[" ? "]" : ")"}`);
  const plain = labels(n, 5).map((l) => `[${join(l.map(String))}]`);
  const element = (degree: number): fc.Arbitrary<string> => {
    if (degree === 0) return scalar;
    const product = fc.array(fc.oneof(plain, invariant), { minLength: degree, maxLength: degree }).map(join);
    const options = [product, fc.tuple(scalar, product).map(([a, b]) => `${a} * ${b}`)];
    if (degree > 1) {
      // A sum of lower degree times another: the tensors of the algebra.
      const sum = fc.array(plain, { minLength: 2, maxLength: 3 }).map((parts) => `(${parts.join(" + ")})`);
      options.push(fc.tuple(sum, element(degree - 1)).map(([a, b]) => `${a} * (${b})`));
      options.push(sum.map((a) => `${a}^${degree}`));
    }
    return fc.oneof(...options);
  };
  return element;
}

/** Forms of one to four terms. k up to 3, so that sums of products of deltas occur in every degree. */
export const randomForms: fc.Arbitrary<RandomForm> = fc
  .tuple(fc.integer({ min: 5, max: 8 }), fc.integer({ min: 0, max: 3 }), fc.integer({ min: 0, max: 2 }), fc.boolean())
  .chain(([n, degree, loops, turned]) => {
    const k = Math.min(degree, n - 4);
    return fc.array(graded(n, loops)(k), { minLength: 1, maxLength: 4 }).map((terms) => ({
      n,
      k,
      loops,
      squareSign: turned ? (-1 as const) : (1 as const),
      notation: terms.join("\n + "),
    }));
  });

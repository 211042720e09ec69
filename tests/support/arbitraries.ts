/** Random syntax trees that the notation can write: well scoped, with the right slots, without spans ([0, 0] everywhere). */
import fc from "fast-check";
import type {
  Condition,
  Definition,
  DualPoint,
  Expression,
  Formula,
  IndexExpression,
  Item,
  LoopLetter,
  LoopNumber,
  MeetItem,
  Momentum,
  Operand,
  SpinorEnd,
} from "../../engine/notation/tree";

const span = [0, 0] as const;

/** What may be used at a place of a tree. */
interface Scope {
  readonly indices: readonly string[];
  readonly scalars: readonly (readonly [name: string, arity: number])[];
  readonly points: readonly (readonly [name: string, arity: number])[];
  readonly lines: readonly (readonly [name: string, arity: number])[];
  readonly planes: readonly (readonly [name: string, arity: number])[];
  /** Loop lines stand in brackets or in x2, not in both. */
  readonly dual: boolean;
}

const empty = (dual: boolean): Scope => ({ indices: [], scalars: [], points: [], lines: [], planes: [], dual });
const one: IndexExpression = { terms: [], constant: "1", span };

const smallFactor = fc
  .integer({ min: -3, max: 3 })
  .filter((factor) => factor !== 0)
  .map(String);

/** An integer-linear expression in the names at hand. */
function linear({ indices }: Scope): fc.Arbitrary<IndexExpression> {
  return fc.record({
    terms: fc.uniqueArray(fc.record({ name: fc.constantFrom("n", ...indices), factor: smallFactor }), {
      maxLength: 3,
      selector: ({ name }) => name,
    }),
    constant: fc.integer({ min: -9, max: 9 }).map(String),
    span: fc.constant(span),
  });
}

/** A label: a bare one is not negative. */
const label = (scope: Scope): fc.Arbitrary<IndexExpression> =>
  linear(scope).map((index) =>
    index.terms.length === 0 ? { ...index, constant: index.constant.replace("-", "") } : index,
  );

/** A number or name alone, as in the middle of a spinor string. */
const bare = ({ indices }: Scope): fc.Arbitrary<IndexExpression> =>
  fc.oneof(
    fc.integer({ min: 0, max: 9 }).map((value) => ({ terms: [], constant: String(value), span })),
    fc.constantFrom("n", ...indices).map((name) => ({ terms: [{ name, factor: "1" }], constant: "0", span })),
  );

const using = (scope: Scope, names: readonly (readonly [string, number])[]) =>
  fc
    .constantFrom(...names)
    .chain(([name, arity]) =>
      fc
        .array(linear(scope), { minLength: arity, maxLength: arity })
        .map((values) => ({ name, arguments: values, span })),
    );

function point(scope: Scope, depth: number): fc.Arbitrary<Item> {
  const choices: fc.Arbitrary<Item>[] = [
    label(scope).map((index) => ({ kind: "label", index, span })),
    fc.constant<Item>({ kind: "referenceTwistor", span }),
  ];
  if (!scope.dual)
    choices.push(
      fc.constantFrom(..."ABCDEFGH").map((letter) => ({ kind: "loopPoint", letter: letter as LoopLetter, span })),
    );
  if (scope.points.length > 0) choices.push(using(scope, scope.points).map((use) => ({ kind: "named", ...use })));
  if (depth > 0) choices.push(meetInPoint(scope, depth - 1));
  return fc.oneof(...choices);
}

/** An item of two slots; `plain` excludes those without Grassmann part. */
function line(scope: Scope, depth: number, plain: boolean): fc.Arbitrary<Item> | null {
  const choices: fc.Arbitrary<Item>[] = [];
  if (!scope.dual)
    choices.push(fc.constantFrom(0, 1, 2, 3).map((loop) => ({ kind: "loopLine", loop: loop as LoopNumber, span })));
  if (!plain) {
    choices.push(fc.constant<Item>({ kind: "referenceLine", span }));
    if (scope.lines.length > 0) choices.push(using(scope, scope.lines).map((use) => ({ kind: "named", ...use })));
    if (depth > 0) choices.push(meetInLine(scope, depth - 1));
  }
  return choices.length === 0 ? null : fc.oneof(...choices);
}

/** Items that fill exactly so many slots. */
function items(scope: Scope, slots: number, depth: number, plain: boolean): fc.Arbitrary<Item[]> {
  if (slots === 0) return fc.constant([]);
  const first = fc
    .tuple(point(scope, depth), fc.constant(null))
    .chain(([item]) => items(scope, slots - 1, depth, plain).map((rest) => [item, ...rest]));
  const pair = slots >= 2 ? line(scope, depth, plain) : null;
  if (pair === null) return first;
  return fc.oneof(
    { weight: 3, arbitrary: first },
    {
      weight: 1,
      arbitrary: pair.chain((item) => items(scope, slots - 2, depth, plain).map((rest) => [item, ...rest])),
    },
  );
}

const group = (members: fc.Arbitrary<Item[]>): fc.Arbitrary<Extract<Operand, { kind: "group" }>> =>
  members.map((list) => ({ kind: "group", items: list, span }));

function plane(scope: Scope, depth: number): fc.Arbitrary<Operand> {
  const choices: fc.Arbitrary<Operand>[] = [
    group(items(scope, 3, depth, true)),
    linear(scope).map((index) => ({ kind: "bar", index, span })),
  ];
  if (scope.planes.length > 0)
    choices.push(group(using(scope, scope.planes).map((use) => [{ kind: "named", ...use }])));
  return fc.oneof(...choices);
}

/** A meet of a line of chosen points and a plane, in either order: it has a Grassmann part, so it may stand in any bracket. */
function meetInPoint(scope: Scope, depth: number): fc.Arbitrary<MeetItem> {
  return fc
    .tuple(group(items(scope, 2, depth, true)), plane(scope, depth), fc.boolean())
    .map(([a, b, swap]) =>
      swap ? { kind: "meet", left: b, right: a, span } : { kind: "meet", left: a, right: b, span },
    );
}

const meetInLine = (scope: Scope, depth: number): fc.Arbitrary<MeetItem> =>
  fc.tuple(plane(scope, depth), plane(scope, depth)).map(([a, b]) => ({ kind: "meet", left: a, right: b, span }));

const spinor = (scope: Scope, side: "angle" | "square"): fc.Arbitrary<SpinorEnd> => {
  const leg = label(scope).map((index): SpinorEnd => ({ kind: "label", index, span }));
  return side === "angle"
    ? leg
    : fc.oneof(
        { weight: 4, arbitrary: leg },
        { weight: 1, arbitrary: fc.constant<SpinorEnd>({ kind: "referenceTwistor", span }) },
      );
};

const momentum = (index: fc.Arbitrary<IndexExpression>): fc.Arbitrary<Momentum> =>
  fc.oneof(
    index.map((only): Momentum => ({ kind: "single", index: only, span })),
    fc.tuple(index, index).map(([from, to]): Momentum => ({ kind: "range", from, to, span })),
  );

const spinorString = (scope: Scope): fc.Arbitrary<Expression> =>
  fc
    .tuple(
      fc.constantFrom("angle" as const, "square" as const),
      fc.array(fc.array(momentum(bare(scope)), { minLength: 1, maxLength: 3 }), { minLength: 1, maxLength: 3 }),
    )
    .chain(([left, middle]) => {
      const same = middle.length % 2 === 0;
      const right = same === (left === "angle") ? ("angle" as const) : ("square" as const);
      return fc
        .tuple(spinor(scope, left), spinor(scope, right))
        .map(([first, last]): Expression => ({ kind: "string", left, right, first, last, middle, span }));
    });

function distance(scope: Scope): fc.Arbitrary<Expression> {
  const leg = label(scope).map((index): DualPoint => ({ kind: "label", index, span }));
  const lineOf = fc
    .constantFrom(0, 1, 2, 3)
    .map((loop): DualPoint => ({ kind: "loopLine", loop: loop as LoopNumber, span }));
  const dual = scope.dual ? fc.oneof(leg, lineOf) : leg;
  return fc.tuple(dual, dual).map(([left, right]) => ({ kind: "distance", left, right, span }));
}

/** A value that holds no other expression. */
function leaf(scope: Scope): fc.Arbitrary<Expression> {
  const bracket = (
    kind: "four" | "five" | "delta" | "angle",
    slots: number,
    plain: boolean,
  ): fc.Arbitrary<Expression> =>
    items(scope, slots, 2, plain).map((list) => ({ kind, items: list, span }) as Expression);
  const choices: fc.Arbitrary<Expression>[] = [
    fc.bigInt({ min: 0n, max: 10n ** 30n }).map((value) => ({ kind: "integer", value: String(value), span })),
    fc.constantFrom("n", ...scope.indices).map((name) => ({ kind: "index", name, span })),
    bracket("four", 4, false),
    bracket("five", 5, true),
    bracket("delta", 5, true),
    bracket("angle", 2, false),
    fc
      .tuple(spinor(scope, "square"), spinor(scope, "square"))
      .map(([left, right]) => ({ kind: "square", left, right, span })),
    spinorString(scope),
    fc
      .array(momentum(label(scope)), { minLength: 1, maxLength: 3 })
      .map((momenta) => ({ kind: "mandelstam", momenta, span })),
    distance(scope),
  ];
  if (scope.scalars.length > 0) choices.push(using(scope, scope.scalars).map((use) => ({ kind: "call", ...use })));
  return fc.oneof(...choices);
}

function exponent({ indices }: Scope): fc.Arbitrary<Expression> {
  const integer = fc
    .integer({ min: 0, max: 9 })
    .map((value): Expression => ({ kind: "integer", value: String(value), span }));
  const index = fc.constantFrom("n", ...indices).map((name): Expression => ({ kind: "index", name, span }));
  return fc.oneof(
    integer,
    index,
    integer.map((operand): Expression => ({ kind: "negate", operand, span })),
    fc.tuple(index, integer).map(([a, b]): Expression => ({ kind: "add", summands: [a, b], span })),
    fc.tuple(integer, index).map((factors): Expression => ({ kind: "multiply", factors, span })),
  );
}

/** Fresh or familiar index names; `s` and `x2` mean something else before a parenthesis. */
const indexNames = fc.uniqueArray(fc.constantFrom("i", "j", "k", "s", "x2", "row"), { minLength: 1, maxLength: 3 });

function conditions(scope: Scope, names: readonly string[]): fc.Arbitrary<Condition[]> {
  const index = (name: string): IndexExpression => ({ terms: [{ name, factor: "1" }], constant: "0", span });
  const chain = (expressions: IndexExpression[], relation: "<" | "<="): Condition => ({
    expressions,
    relations: expressions.slice(1).map(() => relation),
    span,
  });
  const inner = { ...scope, indices: [...scope.indices, ...names] };
  const ordered = fc
    .constantFrom("<" as const, "<=" as const)
    .map((relation) => [chain([one, ...names.map(index), index("n")], relation)]);
  const cyclic = fc.constant([chain([...names.map(index), index(names[0]!)], "<")]);
  const extra = fc
    .tuple(linear(inner), linear(inner))
    .map(([a, b]): Condition[] => [{ expressions: [a, b], relations: ["!="], span }]);
  const base = names.length > 1 ? fc.oneof(ordered, cyclic) : ordered;
  return fc.tuple(base, fc.oneof(fc.constant([]), extra)).map(([first, second]) => [...first, ...second]);
}

/** Any expression, at most `depth` operations deep. */
export function expression(scope: Scope, depth: number): fc.Arbitrary<Expression> {
  if (depth === 0) return leaf(scope);
  const inner = expression(scope, depth - 1);
  const quantified = (kind: "sum" | "product"): fc.Arbitrary<Expression> =>
    indexNames.chain((names) =>
      fc
        .tuple(conditions(scope, names), expression({ ...scope, indices: [...scope.indices, ...names] }, depth - 1))
        .map(([list, body]) => ({ kind, indices: names, conditions: list, body, span }) as Expression),
    );
  return fc.oneof(
    leaf(scope),
    fc.array(inner, { minLength: 2, maxLength: 4 }).map((summands): Expression => ({ kind: "add", summands, span })),
    fc.array(inner, { minLength: 2, maxLength: 4 }).map((factors): Expression => ({ kind: "multiply", factors, span })),
    inner.map((operand): Expression => ({ kind: "negate", operand, span })),
    fc
      .tuple(inner, inner)
      .map(([numerator, denominator]): Expression => ({ kind: "divide", numerator, denominator, span })),
    fc.tuple(inner, exponent(scope)).map(([base, size]): Expression => ({ kind: "power", base, exponent: size, span })),
    quantified("sum"),
    quantified("product"),
    fc
      .tuple(fc.constantFrom("cyc" as const, "sym" as const), inner)
      .map(([kind, body]): Expression => ({ kind, body, span })),
  );
}

function definition(scope: Scope, name: string): fc.Arbitrary<{ definition: Definition; next: Scope }> {
  return fc.uniqueArray(fc.constantFrom("i", "j", "a", "b"), { maxLength: 2 }).chain((parameters) => {
    const inner = { ...scope, indices: parameters };
    const known = [name, parameters.length] as const;
    const geometry = (value: MeetItem | Extract<Operand, { kind: "group" }>): Definition => ({
      name,
      parameters,
      value: { kind: "geometry", geometry: value },
      span,
    });
    return fc.oneof(
      expression(inner, 2).map((value) => ({
        definition: { name, parameters, value: { kind: "scalar" as const, expression: value }, span },
        next: { ...scope, scalars: [...scope.scalars, known] },
      })),
      fc
        .oneof(group(items(inner, 1, 1, true)), meetInPoint(inner, 1))
        .map((value) => ({ definition: geometry(value), next: { ...scope, points: [...scope.points, known] } })),
      fc
        .oneof(group(items(inner, 2, 1, false)), meetInLine(inner, 1))
        .map((value) => ({ definition: geometry(value), next: { ...scope, lines: [...scope.lines, known] } })),
      group(items(inner, 3, 1, true)).map((value) => ({
        definition: geometry(value),
        next: { ...scope, planes: [...scope.planes, known] },
      })),
    );
  });
}

/** A formula with up to three definitions. */
export const formulas: fc.Arbitrary<Formula> = fc.boolean().chain((dual) => {
  const grow = (scope: Scope, definitions: readonly Definition[], names: readonly string[]): fc.Arbitrary<Formula> => {
    const [name, ...rest] = names;
    if (name === undefined) return expression(scope, 3).map((value) => ({ definitions, expression: value }));
    return definition(scope, name).chain((made) => grow(made.next, [...definitions, made.definition], rest));
  };
  return fc.subarray(["kermit", "p1", "L"]).chain((names) => grow(empty(dual), [], names));
});

/** The items of a bracket as points by name: labels and definitions resolved, `cyc` and `sym` carried out. */
import { definitionPlace, type Place } from "../notation/expand";
import { evaluateLabel } from "../notation/indices";
import type { Definition, DualPoint, Item, MeetItem, NamedItem, Operand } from "../notation/tree";
import { meetLine, meetPoint, type Point } from "./brackets";

export class PlacedPoints {
  /** Points of definitions without arguments, and of labels, that nothing moves. */
  readonly #fixed = new Map<string, readonly Point[]>();
  readonly #labels: (Point | undefined)[] = [];

  constructor(
    private readonly n: number,
    private readonly definitions: ReadonlyMap<string, Definition>,
  ) {}

  /** The line of a dual point: two legs, or the two points of a loop line. */
  dual(point: DualPoint, at: Place): readonly Point[] {
    if (point.kind === "loopLine") return line(at, point.loop);
    const label = evaluateLabel(point.index, at.bindings, this.n, at.shift);
    return [
      { kind: "label", label: label === 1 ? this.n : label - 1 },
      { kind: "label", label },
    ];
  }

  points(items: readonly Item[], at: Place): readonly Point[] {
    return items.flatMap((item) => this.#item(item, at));
  }

  #item(item: Item, at: Place): readonly Point[] {
    switch (item.kind) {
      case "label":
        return [this.#label(evaluateLabel(item.index, at.bindings, this.n, at.shift))];
      case "loopPoint": {
        const letter = "ABCDEFGH".indexOf(item.letter);
        const point = line(at, Math.floor(letter / 2))[letter % 2];
        return point === undefined ? [] : [point];
      }
      case "loopLine":
        return line(at, item.loop);
      case "referenceTwistor":
        return [{ kind: "star" }];
      case "referenceLine":
        return [
          { kind: "reference", which: 0 },
          { kind: "reference", which: 1 },
        ];
      case "meet":
        return this.#meet(item, at);
      case "named":
        return this.#named(item, at);
    }
  }

  #label(label: number): Point {
    this.#labels[label] ??= { kind: "label", label };
    return this.#labels[label];
  }

  #named(item: NamedItem, at: Place): readonly Point[] {
    const fixed = item.arguments.length === 0 && at.shift === 0 && at.permutation.length < 2;
    const known = fixed ? this.#fixed.get(item.name) : undefined;
    if (known !== undefined) return known;
    const definition = this.definitions.get(item.name);
    if (definition?.value.kind !== "geometry")
      throw new Error(`points: expected ${item.name} to be a point, line or plane`);
    const place = definitionPlace(definition, item.arguments, at, this.n);
    const { geometry } = definition.value;
    const points = geometry.kind === "meet" ? this.#meet(geometry, place) : this.points(geometry.items, place);
    if (fixed) this.#fixed.set(item.name, points);
    return points;
  }

  #meet(meet: MeetItem, at: Place): readonly Point[] {
    const left = this.#operand(meet.left, at);
    const right = this.#operand(meet.right, at);
    if (left.length === 3 && right.length === 3) return meetLine(left, right);
    return [left.length === 2 ? meetPoint(left, right) : meetPoint(right, left)];
  }

  #operand(operand: Operand, at: Place): readonly Point[] {
    if (operand.kind === "group") return this.points(operand.items, at);
    return [-1, 0, 1].map((offset) => ({
      kind: "label",
      label: evaluateLabel(operand.index, at.bindings, this.n, at.shift + offset),
    }));
  }
}

function line(at: Place, loop: number): readonly Point[] {
  const moved = at.permutation[loop];
  if (moved === undefined) throw new Error(`points: no loop line ${loop}`);
  return [
    { kind: "letter", line: moved, which: 0 },
    { kind: "letter", line: moved, which: 1 },
  ];
}

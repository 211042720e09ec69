/**
 * The points that a recursion makes: external legs and, out of them, intersections of lines and planes.
 *
 * A point stands for a supertwistor up to scale. Meets are interned: the same line and plane give the same point, so that a
 * formula defines it once.
 */

export interface Leg {
  readonly kind: "leg";
  readonly leg: number;
  readonly key: string;
}

/** (line) cap (plane). "AB" is the loop line; a plane is three points, or the loop line and one point. */
export interface Meet {
  readonly kind: "meet";
  readonly line: readonly [Vertex, Vertex] | "AB";
  readonly plane: readonly (Vertex | "AB")[];
  readonly key: string;
}

export type Vertex = Leg | Meet;

export const leg = (number: number): Leg => ({ kind: "leg", leg: number, key: String(number) });

const keyOf = (part: Vertex | "AB"): string => (part === "AB" ? part : part.key);

/** Loop line first, then legs ascending, then meets in the order they were made. */
function compare(a: Vertex | "AB", b: Vertex | "AB"): number {
  const rank = (part: Vertex | "AB") =>
    part === "AB" ? 0 : part.kind === "leg" ? part.leg : 1_000 + Number(part.key.slice(1));
  return rank(a) - rank(b);
}

/** Whether the point was made on the loop line. Its Grassmann part is then that of the plane, so only its position lies there. */
const onLoopLine = (point: Vertex | "AB"): boolean => point !== "AB" && point.kind === "meet" && point.line === "AB";

/**
 * The same span in fewer words: a meet made on the line (a b), next to a, is as good as b. The scale changes and the meet of
 * which this is an operand does not notice. For the superline (a b) it holds with the Grassmann parts.
 */
function simplify(points: readonly Vertex[]): Vertex[] {
  const simple = [...points];
  for (let again = true; again; ) {
    again = false;
    for (const [position, point] of simple.entries()) {
      if (point.kind !== "meet" || point.line === "AB") continue;
      const [a, b] = point.line;
      const other = simple.includes(a) ? b : simple.includes(b) ? a : null;
      if (other === null || simple.includes(other)) continue;
      simple[position] = other;
      again = true;
    }
  }
  return simple;
}

/** Makes meets and remembers them. One instance for one formula. */
export class Meets {
  private readonly known = new Map<string, Meet>();

  /** The point where the line through `a` and `b` meets a plane; the Grassmann part is that of the line. */
  ofLine(a: Vertex, b: Vertex, plane: readonly [Vertex, Vertex, Vertex] | { readonly loopAnd: Vertex }): Meet {
    const [first, second] = simplify([a, b]).sort(compare);
    return this.intern([first!, second!], this.plane(plane));
  }

  /** The point where the loop line meets a plane; the Grassmann part is that of the plane, which is therefore kept as it is. */
  ofLoop(plane: readonly [Vertex, Vertex, Vertex]): Meet {
    return this.intern("AB", [...plane].sort(compare));
  }

  private plane(plane: readonly [Vertex, Vertex, Vertex] | { readonly loopAnd: Vertex }): (Vertex | "AB")[] {
    if ("loopAnd" in plane) return ["AB", plane.loopAnd];
    const simple = simplify(plane);
    const off = simple.filter((point) => !onLoopLine(point));
    return off.length === 1 ? ["AB", off[0]!] : simple.sort(compare);
  }

  private intern(line: Meet["line"], plane: Meet["plane"]): Meet {
    const key = `${line === "AB" ? line : line.map(keyOf).join(" ")}|${plane.map(keyOf).join(" ")}`;
    const known = this.known.get(key);
    if (known !== undefined) return known;
    const made: Meet = { kind: "meet", line, plane, key: `m${this.known.size}` };
    this.known.set(key, made);
    return made;
  }
}

/** Whether the point lies in the plane of the loop line and `pivot`, by the way it was made. */
export function inForwardPlane(point: Vertex | "AB", pivot: Vertex): boolean {
  if (point === "AB" || point.key === pivot.key) return true;
  if (point.kind === "leg") return false;
  if (point.line === "AB") return true;
  const all = (points: readonly (Vertex | "AB")[]) => points.every((part) => inForwardPlane(part, pivot));
  return all(point.line) || all(point.plane);
}

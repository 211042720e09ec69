/**
 * Brackets by name: what a bracket of the notation is once indices have their values, labels are moved by `cyc` and definitions are
 * put in, printed in canonical order (loop words first, then `*`, X, labels ascending). Meets are taken apart where a bracket with
 * one is a product of two brackets.
 */
import type { LoopNumber } from "../notation/tree";

export type Point =
  | { readonly kind: "label"; readonly label: number }
  | { readonly kind: "letter"; readonly line: LoopNumber; readonly which: 0 | 1 }
  | { readonly kind: "star" }
  | { readonly kind: "reference"; readonly which: 0 | 1 }
  | { readonly kind: "meet"; readonly line: readonly Point[]; readonly plane: readonly Point[]; readonly text: string }
  /** One of the two points of the line where two planes meet: only the pair has a value. */
  | {
      readonly kind: "planes";
      readonly which: 0 | 1;
      readonly left: readonly Point[];
      readonly right: readonly Point[];
      readonly text: string;
    };

const letters = "ABCDEFGH";

export function pointText(p: Point): string {
  switch (p.kind) {
    case "label":
      return String(p.label);
    case "letter":
      return letters.charAt(2 * p.line + p.which);
    case "star":
      return "*";
    case "reference":
      return p.which === 0 ? "X" : "X'";
    case "meet":
      return p.text;
    case "planes":
      return p.which === 0 ? p.text : `${p.text}'`;
  }
}

/** Items in canonical order, two points of one loop line written as its word. */
export function itemsText(points: readonly Point[]): string {
  const words: { readonly rank: number; readonly label: number; readonly text: string }[] = [];
  const has = (line: number, which: number) =>
    points.some((p) => p.kind === "letter" && p.line === line && p.which === which);
  for (const p of points) {
    if (p.kind === "letter") {
      const whole = has(p.line, 0) && has(p.line, 1);
      if (whole && p.which === 1) continue;
      const text = whole ? letters.slice(2 * p.line, 2 * p.line + 2) : pointText(p);
      words.push({ rank: whole ? 0 : 1, label: 2 * p.line + p.which, text });
    } else if (p.kind === "star") words.push({ rank: 2, label: 0, text: "*" });
    else if (p.kind === "reference") {
      if (p.which === 0) words.push({ rank: 3, label: 0, text: "X" });
    } else if (p.kind === "label") words.push({ rank: 4, label: p.label, text: String(p.label) });
    else if (p.kind === "meet" || p.which === 0) words.push({ rank: 5, label: 0, text: p.text });
  }
  words.sort((a, b) => a.rank - b.rank || a.label - b.label || (a.text < b.text ? -1 : a.text > b.text ? 1 : 0));
  return words.map((w) => w.text).join(" ");
}

/** The point where a line meets a plane. */
export function meetPoint(line: readonly Point[], plane: readonly Point[]): Point {
  return { kind: "meet", line, plane, text: `(${itemsText(line)}) cap (${itemsText(plane)})` };
}

/** The line where two planes meet, as its two formal points. */
export function meetLine(left: readonly Point[], right: readonly Point[]): readonly Point[] {
  const [a, b] = [itemsText(left), itemsText(right)].sort();
  const text = `(${a}) cap (${b})`;
  return [
    { kind: "planes", which: 0, left, right, text },
    { kind: "planes", which: 1, left, right, text },
  ];
}

const same = (a: Point, b: Point): boolean => pointText(a) === pointText(b);
const without = (points: readonly Point[], p: Point): readonly Point[] => {
  const at = points.findIndex((q) => same(p, q));
  return points.filter((_, i) => i !== at);
};

/**
 * The factors of a four-bracket, each a list of four points. <(a b) cap (c d e) a f g> = -<b a f g><a c d e>, and
 * <(a b) cap (c d e) d e f> = -<c d e f><d e a b>. Two points of one line, (a b) cap P and (a b) cap Q, span that line times
 * <a b P cap Q>; (a b) cap (c d e) and (c d) cap (a b e) span the line (c d e) cap (a b e) times <a b c d>. Other brackets are one factor.
 */
export function factorsOfFour(points: readonly Point[]): readonly (readonly Point[])[] {
  for (const p of points) {
    if (p.kind !== "meet") continue;
    const others = without(points, p);
    const [a, b] = p.line;
    if (p.line.length === 2 && a !== undefined && b !== undefined) {
      for (const [shared, left] of [[a, b] as const, [b, a] as const])
        if (others.some((q) => same(q, shared)))
          return [...factorsOfFour([left, ...others]), ...factorsOfFour([shared, ...p.plane])];
    }
    const inPlane = p.plane.filter((q) => others.some((o) => same(o, q)));
    if (inPlane.length === 2) {
      const rest = p.plane.find((q) => !inPlane.includes(q));
      if (rest !== undefined) return [...factorsOfFour([rest, ...others]), ...factorsOfFour([...inPlane, ...p.line])];
    }
  }
  const [p, q] = points.filter((point) => point.kind === "meet");
  if (p?.kind === "meet" && q?.kind === "meet") {
    const others = without(without(points, p), q);
    const line = [...p.line];
    if (sameSet(p.line, q.line))
      return [
        [...others, ...line],
        [...line, ...meetLine(p.plane, q.plane)],
      ].flatMap(factorsOfFour);
    const [rest] = p.plane.filter((point) => !holds(q.line, point));
    if (rest !== undefined && sameSet(p.plane, [...q.line, rest]) && sameSet(q.plane, [...p.line, rest]))
      return [
        [...p.line, ...q.line],
        [...others, ...meetLine(p.plane, q.plane)],
      ].flatMap(factorsOfFour);
  }
  return [points];
}

const holds = (points: readonly Point[], p: Point): boolean => points.some((q) => same(p, q));
const sameSet = (a: readonly Point[], b: readonly Point[]): boolean =>
  a.length === b.length && a.every((p) => holds(b, p)) && b.every((p) => holds(a, p));

/** True for <i i+1 j j+1>, <AB i i+1> and <AB CD>: the poles that a planar amplitude has. */
export function isPhysicalFour(points: readonly Point[], n: number): boolean {
  const labels = points.flatMap((p) => (p.kind === "label" ? [p.label] : []));
  const lines = points.flatMap((p) => (p.kind === "letter" ? [p] : []));
  if (labels.length + lines.length !== 4) return false;
  if (lines.length > 0) {
    const whole = lines.every((p) => lines.some((q) => q.line === p.line && q.which !== p.which));
    if (!whole) return false;
    return lines.length === 4 || adjacent(labels[0] ?? 0, labels[1] ?? 0, n);
  }
  const [a, b, c, d] = labels as [number, number, number, number];
  return (
    (adjacent(a, b, n) && adjacent(c, d, n)) ||
    (adjacent(a, c, n) && adjacent(b, d, n)) ||
    (adjacent(a, d, n) && adjacent(b, c, n))
  );
}

export const adjacent = (a: number, b: number, n: number): boolean => (a - b + n) % n === 1 || (b - a + n) % n === 1;

export const holdsReference = (points: readonly Point[]): boolean =>
  points.some(
    (p) =>
      p.kind === "star" ||
      p.kind === "reference" ||
      ((p.kind === "meet" || p.kind === "planes") && /[*X]/.test(p.text)),
  );

/** The ways to share loop lines between two smaller amplitudes, and products of k = 0 integrands over them. */
import type { Point, Twistor } from "../../kinematics";
import type { Ground } from "../ground";
import { type Lower, lowerAmplitude, superamplitude, valueOfLower } from "./lower";
import type { Leg } from "./moves";

/** All splittings of a list in two. */
export function splittings<T>(list: readonly T[]): readonly (readonly [readonly T[], readonly T[]])[] {
  return Array.from({ length: 2 ** list.length }, (_, set) => [
    list.filter((_item, at) => (set & (1 << at)) !== 0),
    list.filter((_item, at) => (set & (1 << at)) === 0),
  ]);
}

/** The k = 0 integrand of n legs: 1 without loops, 0 for three legs with loops. */
export const integrand = (n: number, loops: number): Lower | "one" => {
  if (loops === 0) return "one";
  return n < 4 ? { kind: "zero" } : lowerAmplitude(superamplitude(n, 0, loops));
};

/** The first integrand of the splittings that no source knows. */
export function firstUnknown(sizes: readonly (readonly [number, number])[], loops: number) {
  for (const pair of sizes)
    for (let left = 0; left <= loops; left++)
      for (const side of [integrand(pair[0], left), integrand(pair[1], loops - left)])
        if (side !== "one" && side.kind === "unknown") return side.question;
  return null;
}

/** The sum over all splittings of the lines of the product of two integrands; null at a bad point. */
export function sumOverSplittings(
  ground: Ground,
  sides: readonly [readonly Leg<number>[], readonly Leg<number>[]],
  lines: readonly (readonly [Twistor<number>, Twistor<number>])[],
): number | null {
  const { field, prime } = ground;
  const value = (legs: readonly Leg<number>[], own: typeof lines): number | null => {
    const of = integrand(legs.length, own.length);
    if (of === "one") return 1;
    if (of.kind === "unknown") throw new Error("sumOverSplittings: an integrand without a source");
    const point: Point<number> = {
      ...ground.point,
      n: legs.length,
      k: 0,
      loops: own.length,
      twistors: legs.map((leg) => leg.z),
      chi: [],
      lines: own,
    };
    return valueOfLower(of, point, prime);
  };
  let sum = 0;
  for (const [left, right] of splittings(lines)) {
    const [x, y] = [value(sides[0], left), value(sides[1], right)];
    if (x === null || y === null) return null;
    sum = field.add(sum, field.multiply(x, y));
  }
  return sum;
}

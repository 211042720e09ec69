/**
 * One key for all ways to write the same divisor: brackets with meets can be written in many, such as with (8 9 q) for (8 9 1) where
 * q lies in that plane. Two polynomials that are equal up to a constant have equal quotients of their values at two random points.
 */
import { type Field, randomness, smallPrimeField } from "../fields";
import { type AmplitudeSize, type Point as KinematicPoint, randomPoint } from "../kinematics";
import type { Point } from "./brackets";
import type { Divisor } from "./divisor";
import { bracketOf } from "./factoring";

const field: Field<number> = smallPrimeField(2147483647);

export class BracketNames {
  readonly #points: readonly [KinematicPoint<number>, KinematicPoint<number>];

  constructor(size: AmplitudeSize) {
    const random = randomness("names of brackets");
    const { n, loops } = size;
    const draw = () => randomPoint(field, { n, k: 0, loops }, random);
    this.#points = [draw(), draw()];
  }

  /** The key of a four-bracket, divided by those `without` names; its text where it is plain or vanishes at one of the points. */
  keyOf(points: readonly Point[], without: Divisor["without"], text: string): string {
    if (!points.some((p) => p.kind === "meet" || p.kind === "planes")) return text;
    const [first, second] = this.#points.map((point) => {
      let value: number | null = bracketOf(field, points, point);
      for (const other of without) {
        const inverse = field.inverse(bracketOf(field, other.points, point));
        for (let i = 0; i < other.power; i++)
          value = value === null || inverse === null ? null : field.multiply(value, inverse);
      }
      return value;
    }) as [number | null, number | null];
    const inverse = second === null ? null : field.inverse(second);
    return first === null || first === 0 || inverse === null ? text : `bracket ${field.multiply(first, inverse)}`;
  }
}

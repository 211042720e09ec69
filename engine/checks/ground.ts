/** Points that paths start from: where poles, limits and cuts are looked at, a generic point is moved along a line by a parameter. */
import type { FormAtN } from "../evaluate/form";
import { type Field, randomness } from "../fields";
import type { Point } from "../kinematics";
import { drawOverOnePrime } from "./draws";

/** A generic point, a second one whose coordinates serve as directions, and further residues, all modulo one prime. */
export interface Ground {
  readonly prime: number;
  readonly field: Field<number>;
  readonly point: Point<number>;
  readonly direction: Point<number>;
  /** Residues that belong to a purpose, always the same ones. */
  numbers(purpose: string, count: number): readonly number[];
}

/** Ground number `attempt` of a check; the first one is shared by all marks, further ones replace it where it was a bad one. */
export function drawGround(seed: string, form: FormAtN, attempt: number): Ground {
  const purpose = `series ${attempt}`;
  const [first, second] = drawOverOnePrime(seed, purpose, form, 2);
  if (first === undefined || second === undefined) throw new Error("drawGround: two points were asked for");
  return {
    prime: first.prime,
    field: first.field,
    point: first.point,
    direction: second.point,
    numbers(name, count) {
      const random = randomness(`${seed}|${purpose}|${name}`);
      return Array.from({ length: count }, () => Number(random.below(BigInt(first.prime))));
    },
  };
}

/** Grounds by number, each drawn once. */
export function groundsOf(seed: string, form: FormAtN): (attempt: number) => Ground {
  const drawn = new Map<number, Ground>();
  return (attempt) => {
    const ground = drawn.get(attempt) ?? drawGround(seed, form, attempt);
    drawn.set(attempt, ground);
    return ground;
  };
}

/** So many grounds are tried where something vanishes that should not. */
export const mostAttempts = 3;

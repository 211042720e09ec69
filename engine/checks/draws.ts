/**
 * Samples drawn at check time: a fresh 31-bit prime and a point modulo it, all from one recorded seed (DATA rule 5). Nobody can fit
 * a formula to them, and anybody can draw them again.
 */
import { draw31BitPrime, randomness, smallPrimeField } from "../fields";
import { type AmplitudeSize, randomPoint, sizeKey } from "../kinematics";
import type { Sample } from "./evaluator";

/** Sample number `index` of a check: the stream of `seed|purpose|nNkKLL|index` gives first the prime, then the point. */
export function drawSample(seed: string, purpose: string, shape: AmplitudeSize, index: number): Sample {
  const random = randomness(`${seed}|${purpose}|${sizeKey(shape)}|${index}`);
  const prime = draw31BitPrime(random);
  const field = smallPrimeField(prime);
  return { prime, field, point: randomPoint(field, shape, random) };
}

/** `count` points that share one prime: what a ratio that should be constant is tried on. */
export function drawOverOnePrime(
  seed: string,
  purpose: string,
  shape: AmplitudeSize,
  count: number,
): readonly Sample[] {
  const random = randomness(`${seed}|${purpose}|${sizeKey(shape)}|one prime`);
  const prime = draw31BitPrime(random);
  const field = smallPrimeField(prime);
  return Array.from({ length: count }, () => ({ prime, field, point: randomPoint(field, shape, random) }));
}

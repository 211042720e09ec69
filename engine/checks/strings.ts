/**
 * Spinor strings by name: what momentum conservation and vanishing brackets make of a string, so that equal divisors have equal
 * names, and a string that is a product is taken apart.
 */
import type { SpinorKind } from "./divisor";

/** A string with its momenta as sets of legs; an end is a leg or `*`. The kind of bracket alternates from `left` on. */
export interface PlainString {
  readonly left: SpinorKind;
  readonly first: string;
  readonly middle: readonly (readonly number[])[];
  readonly last: string;
}

/**
 * The factors of a string of n legs, none of which has a momentum of a single leg: <a|P|b] with P = {c} is <a c>[c b]. A sum of
 * momenta is replaced by the other legs' where they are fewer, and loses a leg that is the end beside it.
 * Empty where the string vanishes identically.
 */
export function stringFactors(n: number, whole: PlainString): readonly PlainString[] {
  const done: PlainString[] = [];
  const waiting: PlainString[] = [whole];
  for (let string = waiting.pop(); string !== undefined; string = waiting.pop()) {
    const { left, first, last } = string;
    const middle = string.middle.map((legs, i) =>
      shortest(n, legs, [i === 0 ? first : "", i === string.middle.length - 1 ? last : ""]),
    );
    if (middle.some((legs) => legs.length === 0)) return [];
    const single = middle.findIndex((legs) => legs.length === 1);
    if (single < 0) {
      done.push(oriented({ left, first, middle, last }));
      continue;
    }
    const leg = String(middle[single]![0]);
    // The momentum lambda lambdatilde of one leg ends the left part with one spinor and begins the right part with the other.
    waiting.push({ left, first, middle: middle.slice(0, single), last: leg });
    waiting.push({ left: kindAfter(left, single + 1), first: leg, middle: middle.slice(single + 1), last });
  }
  return done.reverse();
}

/** The kind of contraction number `count` (from 0) of a string. */
const kindAfter = (left: SpinorKind, count: number): SpinorKind =>
  count % 2 === 0 ? left : left === "angle" ? "square" : "angle";

function shortest(n: number, legs: readonly number[], ends: readonly string[]): readonly number[] {
  const own = [...new Set(legs)].sort((a, b) => a - b).filter((a) => !ends.includes(String(a)));
  const others = Array.from({ length: n }, (_, i) => i + 1).filter(
    (a) => !legs.includes(a) && !ends.includes(String(a)),
  );
  if (own.length !== others.length) return own.length < others.length ? own : others;
  return (own[0] ?? 0) <= (others[0] ?? 0) ? own : others;
}

/** Read from the angle end, or from the end with the lower label where both are alike. */
function oriented(string: PlainString): PlainString {
  const { left, first, middle, last } = string;
  const right = kindAfter(left, middle.length);
  const swap = left === right ? Number(first) > Number(last) || last === "*" : left === "square";
  return swap ? { left: right, first: last, middle: [...middle].reverse(), last: first } : string;
}

const open = { angle: "<", square: "[" } as const;
const close = { angle: ">", square: "]" } as const;

/** In the notation: `<1|2+3|4]`, `<1 2>`. */
export function stringText({ left, first, middle, last }: PlainString): string {
  const end = close[kindAfter(left, middle.length)];
  if (middle.length === 0) return `${open[left]}${first} ${last}${end}`;
  return `${open[left]}${first}|${middle.map((legs) => [...legs].sort((a, b) => a - b).join("+")).join("|")}|${last}${end}`;
}

/** Sums of momenta in which a momentum is named twice. */
import type { Faults } from "./faults";
import { type Bindings, momentumLegs } from "./indices";
import type { Momentum } from "./tree";

/** Reports a leg that a sum of momenta names twice among n legs; true when there is one. */
export function reportRepeated(momenta: readonly Momentum[], bindings: Bindings, n: number, faults: Faults): boolean {
  const legs = momentumLegs(momenta, bindings, n);
  const twice = legs.find((leg, at) => legs.indexOf(leg) !== at);
  if (twice === undefined) return false;
  faults.add(
    "repeated-momentum",
    [momenta[0]!.span[0], momenta.at(-1)!.span[1]],
    `The momentum of leg ${twice} is named twice in one sum at n = ${n}.`,
    {
      help: "Name each momentum once; a range holds both of its ends.",
    },
  );
  return true;
}

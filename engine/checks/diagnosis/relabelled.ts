/** The form is right after a relabelling: for components a rotation or a reflection, for superamplitudes of few legs any permutation. */
import { relabelPoint } from "../../kinematics";
import { prepare } from "../evaluator";
import type { Diagnosis } from "../report";
import type { DiagnosisCase } from "./case";

/** Permutations beyond rotations and reflections are tried up to this many legs: (n-1)!/2 of them. */
const mostLegsForPermutations = 8;

export function relabelled({ form, probes, spend }: DiagnosisCase): readonly Diagnosis[] {
  if (probes.length < 2) return [];
  const { n } = form;
  const prepared = prepare(form);
  /** The sign with which form(labels) is the truth at every probe, or null. The first probe alone dismisses most labellings. */
  const signOf = (labels: readonly number[]): 1 | -1 | null => {
    let sign: 1 | -1 | null = null;
    for (const { sample, truth } of probes) {
      if (!spend(prepared.operations)) return null;
      const [outcome] = prepared.evaluate([{ ...sample, point: relabelPoint(sample.point, labels) }]);
      if (outcome?.kind !== "value") return null;
      const here = outcome.sum === truth ? 1 : sample.field.negate(outcome.sum) === truth ? -1 : null;
      if (here === null || (sign !== null && sign !== here)) return null;
      sign = here;
    }
    return sign;
  };
  const legs = Array.from({ length: n }, (_, i) => i + 1);
  // A superamplitude is dihedrally symmetric: if its truth is met after a rotation or reflection, it is met before.
  for (const reflected of form.negativeLegs === null ? [] : [false, true]) {
    for (let shift = 0; shift < n; shift++) {
      if (shift === 0 && !reflected) continue;
      const labels = legs.map((a) => (((((reflected ? -a : a) + shift - 1) % n) + n) % n) + 1);
      const sign = signOf(labels);
      if (sign === null) continue;
      const turned = reflected ? `reversed (leg i is leg ${shift}-i)` : `moved by ${shift} (leg i is leg i+${shift})`;
      const factor = sign === -1 ? ", times -1" : "";
      return [
        {
          code: "relabelled",
          shift,
          reflected,
          ...(sign === -1 ? { factor: "-1" } : {}),
          message: `The form is right with its legs ${turned}${factor}.`,
        },
      ];
    }
  }
  if (n > mostLegsForPermutations || form.negativeLegs !== null) return [];
  for (const permutation of upToDihedral(n)) {
    const sign = signOf(permutation);
    if (sign === null) continue;
    const factor = sign === -1 ? ", times -1" : "";
    const moved = legs.filter((a) => permutation[a - 1] !== a).map((a) => `${a} -> ${permutation[a - 1]}`);
    return [
      {
        code: "relabelled",
        permutation: [...permutation],
        ...(sign === -1 ? { factor: "-1" } : {}),
        message: `The form is right with its legs exchanged: ${moved.join(", ")}${factor}.`,
      },
    ];
  }
  return [];
}

/** Orders of 1..n up to rotation and reflection of their places, transpositions first, without the identity. */
function* upToDihedral(n: number): Generator<readonly number[]> {
  const legs = Array.from({ length: n }, (_, i) => i + 1);
  const seen = new Set<string>([canonical(legs)]);
  const fresh = (p: readonly number[]): boolean => {
    const key = canonical(p);
    if (seen.has(key)) return false;
    seen.add(key);
    return true;
  };
  for (let i = 0; i < n; i++)
    for (let j = i + 1; j < n; j++) {
      const p = legs.map((a) => (a === i + 1 ? j + 1 : a === j + 1 ? i + 1 : a));
      if (fresh(p)) yield p;
    }
  for (const rest of orders(legs.slice(1))) {
    const p = [1, ...rest];
    if (fresh(p)) yield p;
  }
}

/**
 * The truth has the dihedral symmetry, so form(z_p) = truth(z) and form(z_pg) = truth(z) say the same for a rotation or reflection
 * g of the values: orders are told apart by the values up to rotation and reflection.
 */
function canonical(p: readonly number[]): string {
  const n = p.length;
  let best = "";
  for (const sign of [1, -1])
    for (let shift = 0; shift < n; shift++) {
      const key = p.map((a) => ((((sign * a + shift) % n) + n) % n) + 1).join(",");
      if (best === "" || key < best) best = key;
    }
  return best;
}

function* orders(items: readonly number[]): Generator<readonly number[]> {
  if (items.length === 0) {
    yield [];
    return;
  }
  for (const [i, item] of items.entries()) {
    for (const rest of orders([...items.slice(0, i), ...items.slice(i + 1)])) yield [item, ...rest];
  }
}

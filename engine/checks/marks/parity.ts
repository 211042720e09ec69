/**
 * Parity of the whole superamplitude: (n,k) at Grassmann components E is (n,n-4-k) at the image of the point and the orthogonal
 * complement of E, up to a known factor (MARKS "Parity, the whole superamplitude"; 0905.1473 for the twistors of lambdatilde).
 */
import { type Field, randomness } from "../../fields";
import {
  angle,
  bracket,
  determinant,
  type GrassmannVectors,
  type Plane,
  type Point,
  planeThrough,
  type Twistor,
  wrapLabel,
} from "../../kinematics";
import { asValue, type Bench } from "../bench";
import { boundText } from "../bound";
import type { Sample } from "../evaluator";
import type { Mark } from "../report";
import {
  keyOf,
  type Lower,
  lowerAmplitude,
  missingSource,
  onlyAmplitudes,
  superamplitude,
  untested,
  valueOfLower,
} from "./lower";

type Rows<T> = readonly (readonly T[])[];

/** Samples that are compared; each has a prime of its own. */
const mostSamples = 4;

export function parity(bench: Bench): Mark {
  const { n, k, loops } = bench.form;
  const notHere = onlyAmplitudes(bench);
  if (notHere !== null) return notHere;
  const conjugate = n - 4 - k;
  const itself = conjugate === k;
  // The conjugate of a form of middle k is the form itself: no source is asked.
  const other: Lower = itself ? { kind: "zero" } : lowerAmplitude(superamplitude(n, conjugate, loops));
  if (other.kind === "unknown") return missingSource(other.question);
  let compared = 0;
  for (const sample of bench.samples.slice(0, mostSamples)) {
    const sides = paritySides(bench, sample, itself ? null : other);
    if (sides === null) continue;
    compared += 1;
    if (sides[0] !== sides[1])
      return {
        state: "fails",
        evidence: `The parity image of the form is not ${itself ? "the form" : `the ${keyOf({ n, k: conjugate, loops })} amplitude`}.`,
      };
  }
  if (compared === 0) return untested("The parity image of every sample was a point with a vanishing denominator.");
  const image = itself
    ? "the form itself"
    : `the ${keyOf({ n, k: conjugate, loops })} amplitude${other.kind === "source" ? ` (${other.source.name})` : ""}`;
  return {
    state: "holds",
    evidence: `Its image under parity, all Grassmann components included, is ${image}, at ${compared} samples with a fresh 31-bit prime each (bound ${boundText(Math.min(1, 4 * bench.miss), compared)}).`,
  };
}

/** The value of the conjugate at the image, and what the form says it is; null where a denominator vanishes. */
function paritySides(
  bench: Bench,
  { prime, field, point }: Sample,
  other: Exclude<Lower, { kind: "unknown" }> | null,
): readonly [number, number] | null {
  const { n, k } = bench.form;
  const random = randomness(`${bench.seed}|parity|${prime}`);
  const draw = (): number => Number(random.below(BigInt(prime)));
  const flavours = [0, 1, 2, 3].map(() => Array.from({ length: k + 2 }, () => Array.from({ length: n }, draw)));
  let factor = field.one;
  const complements: Rows<number>[] = [];
  for (const rows of flavours) {
    const found = complement(field, rows);
    if (found === null) return null;
    factor = field.multiply(factor, found.factor);
    complements.push(found.rows);
  }
  const image = parityImage(field, point);
  if (image === null) return null;
  const ownValue = (at: Point<number>): number | null => {
    const [outcome] = bench.prepared.evaluate([{ prime, field, point: at }]);
    return outcome === undefined ? null : (asValue(outcome)?.sum ?? null);
  };
  const otherValue = (at: Point<number>): number | null =>
    other === null ? ownValue(at) : valueOfLower(other, at, prime);
  const here = withComponents(field, point, k, flavours, ownValue);
  const there = withComponents(field, image.point, n - 4 - k, complements, otherValue);
  if (here === null || there === null) return null;
  return [field.multiply(there, image.lineFactor), field.multiply(factor, here)];
}

/** The superamplitude, MHV factor included, at Grassmann components E, one (k+2) x n matrix for each flavour. */
function withComponents(
  field: Field<number>,
  point: Point<number>,
  k: number,
  flavours: readonly Rows<number>[],
  value: (point: Point<number>) => number | null,
): number | null {
  const { n, twistors } = point;
  const { add, subtract, multiply } = field;
  const between = (a: number, b: number): number => angle(field, twistors[a]!, twistors[b]!);
  let factor = field.one;
  const chi: number[][][] = Array.from({ length: n }, () => []);
  for (const e of flavours) {
    const q = ([0, 1] as const).map((i) =>
      e.map((row) => row.reduce((sum, x, a) => add(sum, multiply(x, twistors[a]![i]!)), 0)),
    );
    const corner = subtract(multiply(q[0]![0]!, q[1]![1]!), multiply(q[0]![1]!, q[1]![0]!));
    const inverse = field.inverse(corner);
    if (inverse === null) return null;
    factor = multiply(factor, corner);
    for (let a = 0; a < n; a++) {
      // chi_a = <theta_a lambda_a>, theta_a = -sum over b < a of lambda_b etatilde_b.
      const full = e.map((row) => row.slice(0, a).reduce((sum, x, b) => subtract(sum, multiply(between(b, a), x)), 0));
      // The combination of the two rows of q that clears the first two entries.
      const solve = (p: number, r: number): number =>
        multiply(inverse, subtract(multiply(full[0]!, r), multiply(full[1]!, p)));
      const [x, y] = [solve(q[1]![0]!, q[1]![1]!), field.negate(solve(q[0]![0]!, q[0]![1]!))];
      chi[a]!.push(full.map((v, i) => subtract(v, add(multiply(x, q[0]![i]!), multiply(y, q[1]![i]!)))).slice(2));
    }
  }
  const cycle = twistors.reduce((product, _, a) => multiply(product, between(a, (a + 1) % n)), field.one);
  const inverse = field.inverse(cycle);
  // The references keep a Grassmann part of the right length: what it is does not matter to an amplitude.
  const found = value({ ...point, k, chi: chi as GrassmannVectors<number>[], referenceChi: noChi(k) });
  return inverse === null || found === null ? null : multiply(factor, multiply(inverse, found));
}

const noChi = (k: number): GrassmannVectors<number> => [0, 1, 2, 3].map(() => new Array<number>(k).fill(0));

/** E = (A | B) has the null space (-(A^-1 B)^T | 1), and factor (-1)^(sum of the first k+2 labels, from 0) / det A. */
function complement(
  field: Field<number>,
  e: Rows<number>,
): { readonly rows: Rows<number>; readonly factor: number } | null {
  const size = e.length;
  const n = e[0]!.length;
  const inverse = field.inverse(
    determinant(
      field,
      e.map((row) => row.slice(0, size)),
    ),
  );
  if (inverse === null) return null;
  const rows = Array.from({ length: n - size }, (_, free) => {
    const solution = Array.from({ length: size }, (_, column) => {
      const replaced = e.map((row) => row.slice(0, size).map((x, at) => (at === column ? row[size + free]! : x)));
      return field.negate(field.multiply(inverse, determinant(field, replaced)));
    });
    return [...solution, ...Array.from({ length: n - size }, (_, at) => (at === free ? 1 : 0))];
  });
  const odd = ((size * (size - 1)) / 2) % 2 === 1;
  return { rows, factor: odd ? field.negate(inverse) : inverse };
}

/**
 * W_a = <a-1 a a+1 e_x> / (<a-1 a><a a+1>), Z'_a = (W_4, -W_3, W_2, -W_1); lines likewise through (A B e_1) and (A B e_2), with the
 * factor <AB e_1 e_2>^4 each that restores their weight.
 */
function parityImage(
  field: Field<number>,
  point: Point<number>,
): { readonly point: Point<number>; readonly lineFactor: number } | null {
  const { n, twistors } = point;
  const at = (label: number): Twistor<number> => twistors[wrapLabel(n, label) - 1]!;
  // <x y z e_i> is minus entry i of the form Z -> <Z x y z>.
  const image = ([w1, w2, w3, w4]: Plane<number>, scale: number): Twistor<number> =>
    [field.negate(w4), w3, field.negate(w2), w1].map((x) => field.multiply(scale, x));
  const images: Twistor<number>[] = [];
  for (let a = 1; a <= n; a++) {
    const below = field.multiply(angle(field, at(a - 1), at(a)), angle(field, at(a), at(a + 1)));
    const scale = field.inverse(below);
    if (scale === null) return null;
    images.push(image(planeThrough(field, at(a - 1), at(a), at(a + 1)), scale));
  }
  const [e1, e2] = [
    [1, 0, 0, 0],
    [0, 1, 0, 0],
  ] as const;
  let lineFactor = field.one;
  const lines = point.lines.map(([a, b]) => {
    const across = bracket(field, a, b, e1, e2);
    const square = field.multiply(across, across);
    lineFactor = field.multiply(lineFactor, field.multiply(square, square));
    return [image(planeThrough(field, a, b, e1), 1), image(planeThrough(field, a, b, e2), 1)] as const;
  });
  return { point: { ...point, twistors: images, lines }, lineFactor };
}

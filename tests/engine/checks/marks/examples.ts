/** One form or more of every kind and size that the coverage table has a row for: derived or published. */
import type { CoverageKind } from "../../../../engine/checks/marks/coverage";
import { derive } from "../../../../engine/derive";
import { type Form, printFormula } from "../../../../engine/notation";
import { published } from "../../../support/forms";
import { entry } from "./support";

export interface Example {
  readonly kind: CoverageKind;
  readonly n: number;
  readonly k: number;
  readonly loops: number;
  readonly form: Form;
}

function derived(n: number, k: number, loops: number, method: "recursion" | "local"): string {
  const found = derive({ n, k, loops, method });
  if (!found.ok) throw new Error(`nothing was derived for (${n},${k},${loops})`);
  return printFormula(found.value.formula);
}

const box = (line: string) => `<1 2 3 4>^2 / (<${line} 1 2><${line} 2 3><${line} 3 4><${line} 1 4>)`;
const halfBoxes =
  "1/2 sum(i, j : 1 <= i, i+1 < j <= n, j != i+n-1) <i-1 i i+1 j><i j-1 j j+1> / (<AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>)";
const kermitsIn = (line: string) => published.kermits.replaceAll("AB", line);
/** hep-th/0505205 */
const threeLoops = `sym(x2(1 3)^3 x2(2 4)/(x2(1 AB) x2(2 AB) x2(3 AB) x2(AB CD) x2(1 CD) x2(3 CD) x2(CD EF) x2(1 EF) x2(3 EF) x2(4 EF)))
  + sym(x2(2 4)^3 x2(1 3)/(x2(2 AB) x2(3 AB) x2(4 AB) x2(AB CD) x2(2 CD) x2(4 CD) x2(CD EF) x2(2 EF) x2(4 EF) x2(1 EF)))
  + cyc(sym(x2(1 3) x2(2 4)^2 x2(3 AB)/(x2(4 AB) x2(1 AB) x2(2 AB) x2(AB CD) x2(AB EF) x2(2 CD) x2(3 CD) x2(CD EF) x2(4 EF) x2(3 EF))))`;

function superamplitudes(): Example[] {
  const list: Example[] = [];
  const add = (n: number, k: number, loops: number, notation: string) =>
    list.push({ kind: "superamplitude", n, k, loops, form: entry(notation, { n, k, loops }) });
  for (let n = 4; n <= 8; n++)
    for (let k = 0; k <= n - 4; k++) {
      add(n, k, 0, k === 0 ? "1" : derived(n, k, 0, "recursion"));
      if (k === 1) add(n, k, 0, published.vertex);
    }
  for (let n = 4; n <= 6; n++) {
    add(n, 0, 1, published.pentagons);
    for (let k = 0; k <= n - 4; k++) add(n, k, 1, derived(n, k, 1, "recursion"));
    add(n, 0, 2, published.doublePentagons);
  }
  // No integrand: which marks are tested does not depend on whether they hold.
  add(5, 1, 2, `[1 2 3 4 5] (${box("AB")}) (${box("CD")})`);
  add(4, 0, 3, threeLoops);
  add(5, 0, 3, threeLoops);
  return list;
}

function others(): Example[] {
  const component = (n: number, k: number, pattern: string, notation: string): Example => ({
    kind: "component",
    n,
    k,
    loops: 0,
    form: entry(notation, { n, k }, { component: pattern }),
  });
  const cycle = (bracket: string, n: number) =>
    Array.from({ length: n }, (_, a) =>
      bracket === "<" ? `<${a + 1} ${((a + 1) % n) + 1}>` : `[${a + 1} ${((a + 1) % n) + 1}]`,
    ).join("");
  const target = (kind: "even" | "log" | "zero", n: number, k: number, loops: number, notation: string): Example => ({
    kind,
    n,
    k,
    loops,
    form: entry(notation, { n, k, loops }, { target: kind }),
  });
  return [
    component(4, 0, "--++", `<1 2>^4 / (${cycle("<", 4)})`),
    component(5, 0, "--+++", `<1 2>^4 / (${cycle("<", 5)})`),
    component(6, 0, "-+++-+", `<1 5>^4 / (${cycle("<", 6)})`),
    component(5, 1, "---++", `[4 5]^4 / (${cycle("[", 5)})`),
    component(
      6,
      1,
      "---+++",
      "<1|2+3|4]^3 / ([2 3][3 4]<5 6><6 1> s(2 3 4) <5|3+4|2]) + <3|4+5|6]^3 / ([6 1][1 2]<3 4><4 5> s(3 4 5) <5|3+4|2])",
    ),
    target("even", 4, 0, 1, halfBoxes),
    target("even", 5, 0, 1, halfBoxes),
    target("log", 4, 0, 2, `${published.doublePentagons} - (${box("AB")}) (${box("CD")})`),
    target("log", 5, 0, 2, `${published.doublePentagons} - (${kermitsIn("AB")}) (${kermitsIn("CD")})`),
    target("zero", 6, 1, 0, "[1 2 3 4 5] - [2 3 4 5 6] + [3 4 5 6 1] - [4 5 6 1 2] + [5 6 1 2 3] - [6 1 2 3 4]"),
  ];
}

export const examples = (): readonly Example[] => [...superamplitudes(), ...others()];

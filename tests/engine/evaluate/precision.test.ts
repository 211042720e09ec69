import { describe, expect, it } from "vitest";
import { evaluateForm } from "../../../engine/evaluate";
import { allHelicities, helicityPoint } from "../../../engine/evaluate/helicity";
import { evaluateApproximately } from "../../../engine/evaluate/precision";
import { complexDoubles, magnitude, randomness, rationals, toDouble } from "../../../engine/fields";
import { mapPoint, randomPoint } from "../../../engine/kinematics";
import { formOf, treeForm } from "../../support/physics";

describe("scan", () => {
  it("x", () => {
    for (const [n, k] of [
      [5, 0],
      [5, 1],
      [6, 1],
      [6, 2],
      [7, 1],
      [7, 2],
      [8, 1],
      [8, 2],
      [8, 4],
    ] as const) {
      const form = treeForm(n, k);
      const ratios: number[] = [];
      const digs: number[] = [];
      const all = allHelicities(n, k);
      for (let i = 0; i < 30; i++) {
        const exactPoint = randomPoint(rationals, { n, k, loops: 0 }, randomness(`p ${n} ${k} ${i}`));
        const neg = all[(i * 7) % all.length]!;
        const at = helicityPoint(rationals, exactPoint, neg)!;
        const ev = evaluateForm(rationals, form, at.point);
        if (ev.kind !== "value") throw new Error("zero");
        const exact = toDouble(rationals.multiply(ev.sum, at.factor));
        const dp = mapPoint(exactPoint, (x) => complexDoubles.real(toDouble(x)));
        const approx = evaluateApproximately(form, dp, neg);
        if (approx.kind !== "value") throw new Error(approx.kind);
        const err = magnitude(complexDoubles.subtract(approx.value, complexDoubles.real(exact)));
        ratios.push(err / approx.error);
        digs.push(approx.digits);
      }
      console.log(
        n,
        k,
        "max true/est",
        Math.max(...ratios).toFixed(3),
        "median",
        ratios.sort((a, b) => a - b)[15]!.toFixed(3),
        "digits",
        Math.min(...digs),
        Math.max(...digs),
      );
    }
    expect(formOf("1", 4, 0)).toBeTruthy();
  });
});

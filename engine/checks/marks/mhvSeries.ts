/** Integrands of fewer loops at k = 0 as series: what the log and ratio tests subtract. They are the derived local forms. */
import { type DeriveRequest, derive } from "../../derive";
import { prepare } from "../evaluator";
import { prepareSeries, type SeriesForm } from "../seriesEvaluator";

/** The (n,0,loops) integrand in chiral pentagons or double pentagons, loops 1 or 2; null where it is not derived. */
export function mhvSeries(n: number, loops: number): SeriesForm | null {
  const request: DeriveRequest = { n, k: 0, loops, method: "local" };
  const derived = derive(request);
  if (!derived.ok) return null;
  return prepareSeries(prepare({ n, k: 0, loops, negativeLegs: null, squareSign: 1, formula: derived.value.formula }));
}

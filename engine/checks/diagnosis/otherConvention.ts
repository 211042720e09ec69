/** The form is right when square brackets have the other sign. */
import { kindsOf } from "../../evaluate/form";
import { prepare } from "../evaluator";
import type { Diagnosis } from "../report";
import { allEqual, type DiagnosisCase } from "./case";

export function otherConvention({ form, probes }: DiagnosisCase): readonly Diagnosis[] {
  const kinds = kindsOf(form.formula);
  if (probes.length === 0 || !(kinds.has("square") || kinds.has("string"))) return [];
  const flipped = prepare({ ...form, squareSign: form.squareSign === 1 ? -1 : 1 });
  const outcomes = flipped.evaluate(probes.map((p) => p.sample));
  if (
    !allEqual(
      outcomes,
      probes.map((p) => p.truth),
    )
  )
    return [];
  const [mine, other] =
    form.squareSign === 1 ? ["s_ab = <a b>[a b]", '"<ab>[ba]"'] : ["s_ab = <a b>[b a]", '"<ab>[ab]"'];
  return [
    {
      code: "other-convention",
      message: `The form is right in the other sign convention of the square bracket: it was read with ${mine}; set the field "s" to ${other}.`,
    },
  ];
}

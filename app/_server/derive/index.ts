/** Derives forms by published methods. */
import { z } from "zod";
import { deriveRequestSchema } from "../../_contract";
import { compute, type Derived } from "../compute";
import { answer, type Outcome, refuse } from "../outcome";
import type { Principal } from "../principal";

/** The form that `value`, a derive request, asks for. Anybody may derive. */
export async function deriveForm(_principal: Principal, value: unknown): Promise<Outcome<Derived>> {
  const parsed = deriveRequestSchema.safeParse(value);
  if (!parsed.success) return refuse("bad-request", z.prettifyError(parsed.error));
  const { leg, direction, ...rest } = parsed.data;
  const request = { ...rest, ...(leg !== undefined && { leg }), ...(direction !== undefined && { direction }) };
  const computed = await compute({ what: "derive", request });
  if (!computed.ok) return computed;
  if (computed.value.kind === "derived") return answer(computed.value.derived);
  const diagnostics = computed.value.kind === "refused" ? computed.value.diagnostics : [];
  return refuse(
    "cannot-derive",
    diagnostics.map(({ message, help }) => `${message} ${help ?? ""}`.trim()).join(" "),
    diagnostics,
  );
}

import { deriveForm } from "../../../_server";
import { json, problemReply, readJsonBody, route } from "../../../_server/http";

export const POST = route(async (request, principal) => {
  const body = await readJsonBody(request);
  if (!body.ok) return problemReply(body.problem);
  const derived = await deriveForm(principal, body.value);
  return derived.ok ? json(derived.value.document) : problemReply(derived.problem);
});

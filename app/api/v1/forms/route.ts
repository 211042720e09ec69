import { listForms, submitForm } from "../../../_server";
import { idempotencyKeyOf, outcome, problemReply, readJsonBody, route } from "../../../_server/http";

export const GET = route(async (request, principal) =>
  outcome(await listForms(principal, Object.fromEntries(new URL(request.url).searchParams))),
);

export const POST = route(async (request, principal) => {
  const body = await readJsonBody(request);
  if (!body.ok) return problemReply(body.problem);
  return outcome(await submitForm(principal, body.value, { idempotencyKey: idempotencyKeyOf(request) }), 202);
});

import { startCheck } from "../../../_server";
import { idempotencyKeyOf, outcome, problemReply, readJsonBody, route } from "../../../_server/http";

export const POST = route(async (request, principal) => {
  const body = await readJsonBody(request);
  if (!body.ok) return problemReply(body.problem);
  return outcome(await startCheck(principal, body.value, { idempotencyKey: idempotencyKeyOf(request) }), 202);
});

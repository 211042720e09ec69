import { evaluate } from "../../../_server";
import { outcome, problemReply, readJsonBody, route } from "../../../_server/http";

export const POST = route(async (request, principal) => {
  const body = await readJsonBody(request);
  if (!body.ok) return problemReply(body.problem);
  return outcome(await evaluate(principal, body.value));
});

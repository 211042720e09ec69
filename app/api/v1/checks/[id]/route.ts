import { cancelCheck, getCheck } from "../../../../_server";
import { json, outcome, problem, route } from "../../../../_server/http";

export const GET = route(async (_request, principal, { id = "" }) => {
  const check = await getCheck(principal, id);
  return check ? json(check) : problem("not-found", `There is no check ${id} that you may see.`);
});

export const DELETE = route(async (_request, principal, { id = "" }) => outcome(await cancelCheck(principal, id)));

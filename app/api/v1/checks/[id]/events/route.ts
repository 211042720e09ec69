import { getCheck, watchCheck } from "../../../../../_server";
import { eventStream, lastEventId, problem, route } from "../../../../../_server/http";

export const GET = route(async (request, principal, { id = "" }) => {
  if (!(await getCheck(principal, id))) return problem("not-found", `There is no check ${id} that you may see.`);
  const stop = new AbortController();
  const signal = AbortSignal.any([request.signal, stop.signal]);
  return eventStream(watchCheck(principal, id, lastEventId(request), signal), () => stop.abort());
});

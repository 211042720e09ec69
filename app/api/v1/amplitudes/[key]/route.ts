import { getAmplitude } from "../../../../_server";
import { json, problem, route } from "../../../../_server/http";

export const GET = route(async (_request, principal, { key = "" }) => {
  const amplitude = await getAmplitude(principal, key);
  return amplitude
    ? json(amplitude)
    : problem("bad-identifier", `${key} names no amplitude; one looks like n6k1L0, with 0 <= k <= n-4.`);
});

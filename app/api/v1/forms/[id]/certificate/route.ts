import { getCertificate } from "../../../../../_server";
import { file, problem, route } from "../../../../../_server/http";

export const GET = route(async (_request, principal, { id = "" }) => {
  const certificate = await getCertificate(principal, id);
  return certificate === null
    ? problem("not-checked-yet", `There is no certificate of ${id}: no such form, or its check has not ended yet.`)
    : file(certificate, "application/json; charset=utf-8", `${id}-certificate.json`);
});

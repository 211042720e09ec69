import { getForm } from "../../../../_server";
import { json, problem, route } from "../../../../_server/http";

export const GET = route(async (_request, principal, { id = "" }) => {
  const form = await getForm(principal, id);
  return form
    ? json(form)
    : problem("not-found", `There is no form ${id}. Identifiers look like n6k1L0-3 or n6k1L0-3v2.`);
});

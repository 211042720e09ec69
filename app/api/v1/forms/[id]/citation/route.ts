import { citationFormats, environment, getForm } from "../../../../../_server";
import { file, problem, route } from "../../../../../_server/http";

export const GET = route(async (request, principal, { id = "" }) => {
  const style = new URL(request.url).searchParams.get("style") ?? "bibtex";
  const format = citationFormats.find((other) => other.style === style);
  if (!format)
    return problem("bad-request", `Known styles: ${citationFormats.map((other) => other.style).join(", ")}.`);
  const form = await getForm(principal, id);
  if (form?.kind !== "form") return problem("not-found", `There is no form ${id} to cite.`);
  return file(format.write(form, environment().baseUrl), format.mediaType, `${form.version}.${format.extension}`);
});

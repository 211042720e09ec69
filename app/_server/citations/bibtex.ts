/** A form as a BibTeX entry. */
import type { FormView } from "../../_contract";

const special: Record<string, string> = {
  "\\": "\\textbackslash{}",
  // An escaped brace still counts when BibTeX matches braces; the named ones come in no pair.
  "{": "\\textbraceleft{}",
  "}": "\\textbraceright{}",
  $: "\\$",
  "&": "\\&",
  "#": "\\#",
  "%": "\\%",
  _: "\\_",
  "^": "\\textasciicircum{}",
  "~": "\\textasciitilde{}",
  '"': "{''}",
  "<": "\\textless{}",
  ">": "\\textgreater{}",
};

/** Text as it may stand inside braces: TeX's own characters escaped, control characters and line ends as blanks. */
export const escapeBibtex = (text: string): string =>
  text.replace(/[\p{Cc}\s]+/gu, " ").replace(/[\\{}$&#%_^~"<>]/g, (character) => special[character] as string);

/** The BibTeX entry of one version of a form; `baseUrl` without a slash at its end. Its key is the version's identifier. */
export function bibtexOf(form: FormView, baseUrl: string): string {
  const { amplitude } = form;
  const n = amplitude.n ?? "every n";
  const fallback = `Form of the amplitude (n, k, L) = (${n}, ${amplitude.k}, ${amplitude.loops})`;
  const sources = form.references.map((reference) => {
    const where = reference.where ? `, ${reference.where}` : "";
    if (reference.arxiv) return `arXiv:${reference.arxiv}${where}`;
    return `${reference.doi ? `doi:${reference.doi}` : (reference.journal ?? reference.title ?? "")}${where}`;
  });
  const after = sources.filter((source) => source !== "");
  const fields: [string, string][] = [
    // Doubled braces: a title's capitals are meant, and a group is one name.
    ["title", `{${escapeBibtex(form.title ?? fallback)}}`],
    ["author", `{${escapeBibtex(form.group.name)}}`],
    ["howpublished", "Equiform, library of amplitude forms"],
    ["year", form.createdAt.slice(0, 4)],
    ["month", String(Number(form.createdAt.slice(5, 7)))],
    ["version", form.version],
    ["url", `${baseUrl}/${form.version}`],
    [
      "note",
      escapeBibtex(`${form.version}, ${form.digest}${after.length > 0 ? `; formula after ${after.join("; ")}` : ""}`),
    ],
  ];
  return `@misc{${form.version},\n${fields.map(([name, value]) => `  ${name} = {${value}},`).join("\n")}\n}\n`;
}

import type { FormView } from "../_contract";

type Reference = FormView["references"][number];

/** The identifier of a cited paper, linked to where it can be read. */
export function ReferenceLink({ reference }: { reference: Reference }) {
  const { arxiv, doi, journal } = reference;
  if (arxiv !== undefined) return <a href={`https://arxiv.org/abs/${encodeURI(arxiv)}`}>arXiv:{arxiv}</a>;
  if (doi !== undefined) return <a href={`https://doi.org/${encodeURI(doi)}`}>doi:{doi}</a>;
  return <>{journal ?? reference.title}</>;
}

/** Cited papers: title, identifier, and where in the paper. */
export function ReferenceList({ references }: { references: readonly Reference[] }) {
  return (
    <ul>
      {references.map((reference) => (
        <li key={JSON.stringify(reference)}>
          {reference.title !== undefined && (reference.arxiv ?? reference.doi ?? reference.journal) !== undefined && (
            <>
              <cite>{reference.title}</cite>,{" "}
            </>
          )}
          <ReferenceLink reference={reference} />
          {reference.arxiv !== undefined && reference.journal !== undefined && <>, {reference.journal}</>}
          {reference.where !== undefined && <>, {reference.where}</>}
        </li>
      ))}
    </ul>
  );
}

import { SourceText } from "./SourceText";

/** How to cite one version: what the entry pins down, and the BibTeX entry. */
export function CiteBox({ version, bibtex }: { version: string; bibtex: string }) {
  return (
    <>
      <p>
        Cite the version, <code>{version}</code>: its content never changes, and the number is never used again.
      </p>
      <SourceText text={bibtex} label={`BibTeX entry of ${version}`} copy="BibTeX" />
    </>
  );
}

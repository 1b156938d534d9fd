import { CopyText } from '@/components/ui/copy-text';
import { bibtexOf } from '@/lib/entries/bibtex';
import type { SheetView } from '@/lib/entries/entry';
import { Part } from './part';

/** The sources, each with its DOI and an entry for a bibliography. */
export const ReferencesPart = ({ sheet, figure }: { sheet: SheetView; figure: number }) => (
  <Part id="references" figure={figure} name="References">
    {sheet.references.length === 0 ? (
      <p className="cap">No source is booked; the derivation stands in the notes.</p>
    ) : (
      <ol className="refs small">
        {sheet.references.map((reference) => (
          <li key={`${reference.authors}:${reference.title}`}>
            {reference.authors}, <i>{reference.title}</i>, {reference.source}, {reference.year}.
            {reference.note && <span className="q"> {reference.note}</span>}{' '}
            <span className="reftools">
              {reference.doi && (
                <a href={`https://doi.org/${encodeURI(reference.doi)}`} rel="noreferrer">
                  doi:{reference.doi}
                </a>
              )}
              <CopyText className="word" text={bibtexOf(reference)}>
                Copy BibTeX
              </CopyText>
            </span>
          </li>
        ))}
      </ol>
    )}
  </Part>
);

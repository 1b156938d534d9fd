import { CopyText } from '@/components/ui/copy-text';
import { bibtexOf } from '@/lib/entries/bibtex';
import { type AttachmentView, sizeText, TYPE_NAMES } from '@/lib/attachments/attachment';
import type { SheetView } from '@/lib/entries/entry';
import { Part } from './part';

interface ReferencesPartProps {
  sheet: SheetView;
  attachments: readonly AttachmentView[];
  figure: number;
}

/** The sources, each with its DOI and an entry for a bibliography; the files that the author added. */
export const ReferencesPart = ({ sheet, attachments, figure }: ReferencesPartProps) => (
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
    {attachments.length > 0 && (
      <ul className="attachments small" aria-label="Attachments">
        {attachments.map(({ id, name, type, bytes }) => (
          <li key={id}>
            <a href={`/attachments/${id}`} download={name}>
              {name}
            </a>
            <span>{TYPE_NAMES[type]}</span>
            <span className="num">{sizeText(bytes)}</span>
          </li>
        ))}
      </ul>
    )}
  </Part>
);

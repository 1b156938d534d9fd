import type { RowChange } from '@/lib/reviews/difference/row-difference';
import { isChanged } from '@/lib/reviews/difference/row-difference';
import type { LineChange } from '@/lib/reviews/difference/text-difference';
import type { RevisionDifference } from '@/lib/reviews/difference/revision-difference';
import { Fix, Pieces } from './fix';

/** Notes as they are typed, line by line. */
export function NoteCorrections({ changes }: { changes: readonly LineChange[] }) {
  if (changes.length === 0) return <p className="cap">There are no notes.</p>;
  return (
    <div className="notetext corrs">
      {changes.map((change, k) => (
        <p key={k}>
          {change.kind === 'changed' && <Pieces pieces={change.pieces} />}
          {change.kind === 'same' && change.text}
          {change.kind === 'added' && <Fix was={null} now={change.text} />}
          {change.kind === 'gone' && <Fix was={change.text} now={null} />}
        </p>
      ))}
    </div>
  );
}

export const NamingCorrections = ({ naming }: { naming: RevisionDifference['naming'] }) => (
  <dl className="numbers naming corrs">
    {naming.map(({ term, pieces }) => (
      <div key={term}>
        <dt>{term}</dt>
        <dd>{pieces.length > 0 ? <Pieces pieces={pieces} /> : <span className="q">none</span>}</dd>
      </div>
    ))}
  </dl>
);

export function ReferenceCorrections({ rows }: { rows: readonly RowChange[] }) {
  if (rows.length === 0) return <p className="cap">There are no references.</p>;
  return (
    <ul className="refs corrs">
      {rows.map((row) => (
        <li key={row.place}>
          {row.was !== null && row.now !== null ? (
            <>
              {row.place}
              {(row.now || row.was) && (
                <span className="small q">
                  {' '}
                  ({isChanged(row) ? <Fix was={row.was || null} now={row.now || null} /> : row.now})
                </span>
              )}
            </>
          ) : (
            <Fix was={row.was === null ? null : row.place} now={row.now === null ? null : row.place} />
          )}
        </li>
      ))}
    </ul>
  );
}

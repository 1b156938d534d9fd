import { Letters } from '@/components/math/letters';
import { type ReadingChange, isChangedReading } from '@/lib/reviews/difference/reading-difference';
import { Fix } from './fix';

const LONG_VALUE = 10;
const isLong = ({ was, now }: ReadingChange) => Math.max(was?.length ?? 0, now?.length ?? 0) > LONG_VALUE;

function Reading({ change }: { change: ReadingChange }) {
  const { term, was, now, how, howWas } = change;
  const isFixed = was !== now;
  return (
    <div className={isFixed ? 'read' : 'read same'}>
      <dt>{term}</dt>
      <dd className={isLong(change) ? 'long' : undefined}>
        {isFixed ? (
          <Fix was={was && <Letters text={was} />} now={now && <Letters text={now} />} />
        ) : (
          <Letters text={now ?? ''} />
        )}
      </dd>
      <dd>
        <Letters text={how} />
        {howWas !== null && (
          <>
            {' '}
            <span className="sr">was</span>{' '}
            <del>
              <Letters text={howWas} />
            </del>
          </>
        )}
      </dd>
    </div>
  );
}

/** The readings that changed, each in its place; the others in one line. Without corrections, all of them as they are. */
export function ReadingCorrections({ changes }: { changes: readonly ReadingChange[] }) {
  const changed = changes.filter(isChangedReading);
  const same = changes.filter((change) => !isChangedReading(change));
  if (changes.length === 0) return <p className="cap after">There are no readings: the definition does not hold.</p>;
  return (
    <dl className="corrs">
      {(changed.length > 0 ? changed : same).map((change) => (
        <Reading key={change.term} change={change} />
      ))}
      {changed.length > 0 && same.length > 0 && (
        <div className="read same unchanged">
          <dt>Unchanged</dt>
          <dd>
            {same.map(({ term, now }, k) => (
              <span key={term}>
                {k > 0 && ', '}
                {term.toLowerCase()} <Letters text={now ?? ''} />
              </span>
            ))}
          </dd>
        </div>
      )}
    </dl>
  );
}

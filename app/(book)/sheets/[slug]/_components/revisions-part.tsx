import type { Route } from 'next';
import Link from 'next/link';
import { StateMark } from '@/components/marks/vial';
import { longDate } from '@/lib/entries/dates';
import type { SheetView } from '@/lib/entries/entry';
import { Part } from './part';

/** Every revision this reader may see, newest first; the one shown is marked. */
export const RevisionsPart = ({ sheet, figure }: { sheet: SheetView; figure: number }) => (
  <Part
    id="revisions"
    figure={figure}
    name="Revisions"
    aside="nothing is erased: a wrong reading is struck, the right one set above it"
  >
    <table className="revs">
      <thead className="sr">
        <tr>
          <th scope="col">Revision</th>
          <th scope="col">Date</th>
          <th scope="col">Note</th>
          <th scope="col">People</th>
          <th scope="col">State</th>
        </tr>
      </thead>
      <tbody>
        {sheet.revisions.map((revision) => (
          <tr key={revision.number} aria-current={revision.number === sheet.revision ? 'true' : undefined}>
            <td className="num">
              {revision.number === sheet.revision ? (
                revision.number
              ) : (
                <Link href={`/sheets/${sheet.slug}/${revision.number}`} aria-label={`Revision ${revision.number}`}>
                  {revision.number}
                </Link>
              )}
            </td>
            <td>{longDate(revision.since)}</td>
            <td>
              {revision.note} <span className="qq small">engine {revision.engineVersion}</span>
            </td>
            <td className="q">{revision.people.join(', ')}</td>
            <td>
              <StateMark state={revision.state} />
            </td>
          </tr>
        ))}
      </tbody>
    </table>
    {sheet.revisions.length > 1 && (
      <p className="bar">
        <Link href={`/sheets/${sheet.slug}/compare?to=${sheet.revision}` as Route}>Compare two revisions</Link>
      </p>
    )}
  </Part>
);

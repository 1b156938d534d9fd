import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { Nothing } from '@/components/ui/nothing';
import { db } from '@/db/client';
import { type ListedEvent, listEvents, listNames } from '@/db/queries/ledger';
import { requireActor } from '@/lib/auth/require-actor';
import { moment } from '@/lib/entries/dates';
import { eventDetail, eventWords, ownEventWords } from '@/lib/ledger/event-words';
import { ledgerQuery, readLedgerFilter } from '@/lib/ledger/ledger-filter';
import { LedgerConditions } from './_components/ledger-conditions';

export const metadata: Metadata = { title: 'Ledger' };

const PAGE = 50;

function Subject({ revision, person }: Pick<ListedEvent, 'revision' | 'person'>) {
  if (revision)
    return (
      <Link href={`/sheets/${revision.slug}/${revision.number}` as Route}>
        {revision.title}, revision {revision.number}
      </Link>
    );
  return person && <b>{person.name}</b>;
}

/** Who did what, when and why. */
export default async function LedgerPage({ searchParams }: PageProps<'/ledger'>) {
  await requireActor('administrator');
  const query = await searchParams;
  const { filter, problems } = readLedgerFilter((name) => {
    const value = query[name];
    return Array.isArray(value) ? value[0] : value;
  });
  const [found, names] = await Promise.all([listEvents(db, filter, PAGE + 1), listNames(db)]);
  const events = found.slice(0, PAGE);
  const last = events.at(-1);

  return (
    <>
      <header className="placehd">
        <h1>Ledger</h1>
        <p className="q">Who did what, when and why. Lines are added, never changed or taken out.</p>
      </header>
      <section aria-labelledby="lines">
        <h2 className="parthd" id="lines">
          Lines
        </h2>
        {/* The key renews the fields when the address changes without a whole page. */}
        <LedgerConditions key={ledgerQuery(filter)} filter={filter} names={names} />
        {problems.map((problem) => (
          <p key={problem} className="red small" role="alert">
            {problem} This condition is left out.
          </p>
        ))}
        {events.length === 0 ? (
          <div className="lone">
            <Nothing />
            <p>No line of the ledger meets these conditions.</p>
            <Link href="/ledger">Show all of the ledger</Link>
          </div>
        ) : (
          <table className="events stacked">
            <thead>
              <tr>
                <th scope="col">When</th>
                <th scope="col">Who</th>
                <th scope="col">What</th>
                <th scope="col">Why</th>
              </tr>
            </thead>
            <tbody>
              {events.map((event) => (
                <tr key={event.id}>
                  <td>
                    <time dateTime={event.at.toISOString()}>{moment(event.at.toISOString())}</time>
                  </td>
                  <td>{event.actor ?? 'The house'}</td>
                  <td>
                    {event.person && event.subjectId === event.actorId ? (
                      ownEventWords(event.kind)
                    ) : (
                      <>
                        {eventWords(event.kind)} <Subject revision={event.revision} person={event.person} />
                      </>
                    )}
                    <small className="q"> {eventDetail(event.data)}</small>
                  </td>
                  <td>{event.reason}</td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
        <nav className="pager" aria-label="Pages of the ledger">
          {filter.before !== undefined && (
            <Link href={`/ledger${ledgerQuery(filter, { before: null })}` as Route}>Latest lines</Link>
          )}
          {found.length > PAGE && last && (
            <Link href={`/ledger${ledgerQuery(filter, { before: last.id })}` as Route}>Earlier lines</Link>
          )}
          <a href={`/ledger/export${ledgerQuery(filter, { before: null })}`} download>
            All lines that meet these conditions, as CSV
          </a>
        </nav>
      </section>
    </>
  );
}

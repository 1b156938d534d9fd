import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { db } from '@/db/client';
import { findSettings } from '@/db/queries/house';
import { type Decision, listDecisions, listDesk } from '@/db/queries/review-desk';
import { requireActor } from '@/lib/auth/require-actor';
import { longDate } from '@/lib/entries/dates';
import { Queue } from './_components/queue';

export const metadata: Metadata = { title: 'Review desk' };

const DECISIONS_SHOWN = 12;
const DONE: Readonly<Record<string, string>> = {
  'revision.signed': 'signed',
  'revision.vetted': 'vetted',
  'revision.returned': 'returned',
  'revision.withdrawn': 'withdrew',
};

const Decisions = ({ decisions }: { decisions: readonly Decision[] }) => (
  <section className="sec" aria-labelledby="decided">
    <header>
      <h2 id="decided">Decided lately</h2>
      <span className="aside">who, what, when and why, from the ledger</span>
    </header>
    {decisions.map(({ id, by, kind, revisionId, callNumber, number, title, at, reason }) => (
      <div key={id} className="talk">
        <div>
          <b>{by ?? 'The house'}</b>
          <div className="small q">{longDate(at)}</div>
        </div>
        <p>
          {DONE[kind] ?? kind}{' '}
          <Link href={`/reviews/${revisionId}` as Route}>
            {callNumber} {title}, revision {number}
          </Link>
          {reason && <span className="q">: “{reason}”</span>}
        </p>
      </div>
    ))}
  </section>
);

/** The desk with nothing taken up: what waits, and what was decided last. */
export default async function DeskPage() {
  const actor = await requireActor('contributor');
  const [items, decisions, settings] = await Promise.all([
    listDesk(db, actor),
    listDecisions(db, actor, DECISIONS_SHOWN),
    findSettings(db),
  ]);
  const waiting = items.filter(({ state }) => state === 'in-review').length;
  return (
    <div className="rev3">
      <Queue items={items} viewerId={actor.id} now={new Date()} signaturesNeeded={settings.signaturesNeeded} />
      <div className="case">
        <div className="title">
          <div>
            <h1>Review desk</h1>
            <p className="lead">
              {waiting === 0
                ? 'Nothing waits for a decision.'
                : waiting === 1
                  ? 'One revision waits for a decision.'
                  : `${waiting} revisions wait for a decision. Those that have waited longest come first.`}
            </p>
          </div>
        </div>
        {decisions.length > 0 ? (
          <Decisions decisions={decisions} />
        ) : (
          <p className="cap">Nothing has been decided yet.</p>
        )}
      </div>
    </div>
  );
}

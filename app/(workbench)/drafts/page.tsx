import type { Metadata } from 'next';
import type { Route } from 'next';
import Link from 'next/link';
import { StateMark } from '@/components/marks/vial';
import { Nothing } from '@/components/ui/nothing';
import { db } from '@/db/client';
import { listOwnDrafts, listVettedEntries, type OwnDraft } from '@/db/queries/drafts';
import { requireActor } from '@/lib/auth/require-actor';
import { moment } from '@/lib/entries/dates';
import { NewDraft } from './_components/new-draft';

export const metadata: Metadata = { title: 'Drafting table' };

const VERDICTS = {
  facts: 'facts hold',
  inconsistent: 'does not approximate its equation yet',
  invalid: 'the definition has errors',
} as const satisfies Record<OwnDraft['verdict'], string>;

const DraftLine = ({ draft }: { draft: OwnDraft }) => (
  <li className="draftline">
    <span className="m2">{draft.callNumber}</span>
    <span>
      <Link href={`/drafts/${draft.id}` as Route}>{draft.title}</Link>
      <small className="q">
        {' '}
        revision {draft.number}, {VERDICTS[draft.verdict]}
      </small>
      {draft.state === 'returned' && draft.stateReason && <small className="draftwhy">{draft.stateReason}</small>}
    </span>
    <StateMark state={draft.state} />
    <time className="q small" dateTime={draft.updatedAt}>
      {moment(draft.updatedAt)}
    </time>
  </li>
);

/** What the actor has on the table, and the ways to begin. */
export default async function DraftsPage({ searchParams }: { searchParams: Promise<{ from?: string }> }) {
  const actor = await requireActor('contributor');
  const [drafts, entries, { from }] = await Promise.all([
    listOwnDrafts(db, actor.id),
    listVettedEntries(db),
    searchParams,
  ]);
  return (
    <div className="drafts">
      <div className="title">
        <div>
          <h1>Drafting table</h1>
          <p className="lead">Schemes, stencils and time methods that you are writing.</p>
        </div>
      </div>
      <div className="spread keep">
        <section className="left" aria-labelledby="yours">
          <div className="leafhd">
            <h2 id="yours">Yours</h2>
            <span>{drafts.length === 0 ? 'none' : `${drafts.length} not in the book yet`}</span>
          </div>
          {drafts.length === 0 ? (
            <div className="nodraft">
              <Nothing />
              <p>Nothing lies on your table. Begin with a blank sheet, or with what the book has.</p>
            </div>
          ) : (
            <ul className="draftlist">
              {drafts.map((draft) => (
                <DraftLine key={draft.id} draft={draft} />
              ))}
            </ul>
          )}
        </section>
        <section className="right" aria-labelledby="new">
          <div className="leafhd">
            <h2 id="new">New</h2>
            <span>kept from the first word</span>
          </div>
          <NewDraft entries={entries} from={from ?? null} />
        </section>
      </div>
    </div>
  );
}

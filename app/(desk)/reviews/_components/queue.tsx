import type { Route } from 'next';
import Link from 'next/link';
import { Vial } from '@/components/marks/vial';
import { capital, counted } from '@/lib/facts/readings';
import { type DeskItem, daysText, waitsFor } from '@/lib/reviews/desk-item';

interface QueueProps {
  items: readonly DeskItem[];
  viewerId: string;
  now: Date;
  signaturesNeeded: number;
  /** Revision that is open. */
  current?: string;
}

const STATE = { 'in-review': 'in review', returned: 'returned' } as const;
const signedText = ({ signers, signaturesNeeded }: DeskItem) =>
  signers.length === 0
    ? `no signature of ${signaturesNeeded}`
    : `signed by ${signers.map(({ name }) => name).join(', ')} (${signers.length} of ${signaturesNeeded})`;

function remarksText({ openRemarks }: DeskItem) {
  if (openRemarks === 0) return null;
  return openRemarks === 1 ? '1 open remark' : `${openRemarks} open remarks`;
}

function summary(items: readonly DeskItem[], now: Date): string {
  const waiting = items.filter(({ state }) => state === 'in-review');
  const [oldest] = waiting;
  if (!oldest) return 'nothing waits';
  const age = daysText(oldest.since, now);
  return `${waiting.length}, oldest ${age === 'today' ? 'of today' : age}`;
}

/** What lies on the desk, since when, for whom, and who has signed. */
export function Queue({ items, viewerId, now, signaturesNeeded, current }: QueueProps) {
  return (
    <aside className="queue" aria-label="Queue">
      <div className="leafhd first">
        <span>On the desk</span>
        <span>{summary(items, now)}</span>
      </div>
      {items.length > 0 && (
        <ol>
          {items.map((item) => (
            <li key={item.id} className={item.id === current ? 'on' : undefined}>
              <Link
                href={`/reviews/${item.id}` as Route}
                aria-current={item.id === current ? 'page' : undefined}
                scroll={item.id !== current}
              >
                <Vial state={item.state} small />
                <span>
                  <b>{item.callNumber}</b> {item.title}
                  <small>
                    r{item.number} · {item.author} ·{' '}
                    {item.state === 'returned' ? STATE.returned : daysText(item.since, now)}
                  </small>
                  <small>{waitsFor(item, viewerId)}</small>
                  {item.state === 'in-review' && <small>{signedText(item)}</small>}
                  {remarksText(item) && <small>{remarksText(item)}</small>}
                </span>
              </Link>
            </li>
          ))}
        </ol>
      )}
      <p className="cap after">
        {capital(counted(signaturesNeeded, 'maintainer'))} who did not write the revision must sign. One <em>return</em>{' '}
        sends it back.
      </p>
    </aside>
  );
}

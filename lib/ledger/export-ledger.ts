import 'server-only';
import type { Database } from '@/db/client';
import { type ListedEvent, listEvents } from '@/db/queries/ledger';
import { csvLine } from './csv-line';
import type { LedgerFilter } from './ledger-filter';

const BATCH = 500;
const COLUMNS = ['number', 'when', 'who', 'what', 'about', 'address', 'why', 'particulars'];

const subjectOf = ({ revision, person }: ListedEvent): [string, string] => {
  if (revision)
    return [`${revision.title}, revision ${revision.number}`, `/sheets/${revision.slug}/${revision.number}`];
  return person ? [person.name, person.email] : ['', ''];
};

/** The ledger as CSV, the latest first, read in portions: however long it is, little of it is in memory. */
export function exportLedger(db: Database, filter: LedgerFilter): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  let before = filter.before;
  return new ReadableStream({
    start: (controller) => controller.enqueue(encoder.encode(csvLine(COLUMNS))),
    async pull(controller) {
      const events = await listEvents(db, { ...filter, before }, BATCH);
      const lines = events.map((event) =>
        csvLine([
          String(event.id),
          event.at.toISOString(),
          event.actor ?? 'the house',
          event.kind,
          ...subjectOf(event),
          event.reason ?? '',
          Object.keys(event.data).length > 0 ? JSON.stringify(event.data) : '',
        ]),
      );
      if (lines.length > 0) controller.enqueue(encoder.encode(lines.join('')));
      before = events.at(-1)?.id;
      if (events.length < BATCH) controller.close();
    },
  });
}

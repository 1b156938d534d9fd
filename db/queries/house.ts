/** Ledger, outbox and settings: what every change writes beside itself. */
import type { EventKind } from '@/lib/ledger/event';
import type { LetterKind } from '@/lib/mail/letter';
import type { Database } from '../client';
import { events, letters, settings } from '../schema/house';

export interface NewEvent {
  kind: EventKind;
  /** null where the house itself acted. */
  actorId: string | null;
  subjectId: string | null;
  reason?: string;
  data?: Record<string, unknown>;
}

/** One line of the ledger; give the transaction that makes the change. */
export async function insertEvent(tx: Database, event: NewEvent) {
  await tx.insert(events).values(event);
}

/** One letter for each recipient, to go out with the change or not at all. */
export async function insertLetters(
  tx: Database,
  kind: LetterKind,
  recipientIds: readonly string[],
  payload: Record<string, unknown>,
) {
  const distinct = [...new Set(recipientIds)];
  if (distinct.length === 0) return;
  await tx.insert(letters).values(distinct.map((recipientId) => ({ kind, recipientId, payload })));
}

export async function findSettings(db: Database) {
  const [row] = await db.select({ signaturesNeeded: settings.signaturesNeeded }).from(settings);
  if (!row) throw new Error('findSettings: the row of settings is missing');
  return row;
}

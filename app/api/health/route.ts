import { NextResponse } from 'next/server';
import { db } from '@/db/client';
import { countMigrations, listWorkersSeen } from '@/db/queries/health';
import journal from '@/drizzle/meta/_journal.json';

export const dynamic = 'force-dynamic';

/** A worker reports every few seconds; one that was silent for this long is taken for gone. */
const WORKER_SEEN_WITHIN_SECONDS = 60;

/**
 * Whether this instance can serve, for load balancers and people; needs no account and tells no secrets.
 * 200 when the database answers and has every migration of this release, 503 otherwise. Without a worker
 * the book can still be read: that is reported, and no reason for 503.
 */
export async function GET() {
  const headers = { 'Cache-Control': 'no-store' };
  try {
    const applied = await countMigrations(db);
    const known = journal.entries.length;
    const isCurrent = applied >= known;
    const seen = isCurrent ? await listWorkersSeen(db, WORKER_SEEN_WITHIN_SECONDS) : [];
    return NextResponse.json(
      {
        status: isCurrent ? 'ok' : 'database behind this release',
        database: { reachable: true, migrations: { applied, known } },
        workers: {
          seenLately: seen.length,
          lastSeenAt: seen[0]?.seenAt ?? null,
          sandboxModes: [...new Set(seen.map((worker) => worker.sandboxMode ?? 'unknown'))],
        },
      },
      { status: isCurrent ? 200 : 503, headers },
    );
  } catch {
    return NextResponse.json(
      { status: 'database unreachable or empty', database: { reachable: false }, workers: { seenLately: 0 } },
      { status: 503, headers },
    );
  }
}

import { db } from '@/db/client';
import { exportLedger } from '@/lib/ledger/export-ledger';
import { readLedgerFilter } from '@/lib/ledger/ledger-filter';
import { includesRole } from '@/lib/people/role';
import { Refusal } from '@/lib/refusal';
import { route } from '@/lib/web/route';

/** The ledger as CSV, under the same conditions as the page. */
export const GET = route(({ actor, url }) => {
  if (!includesRole(actor.role, 'administrator'))
    throw new Refusal('not-allowed', 'Only an administrator reads the ledger.');
  const { filter, problems } = readLedgerFilter((name) => url.searchParams.get(name));
  if (problems.length > 0) throw new Refusal('invalid', problems.join(' '));
  return new Response(exportLedger(db, filter), {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': 'attachment; filename="ledger.csv"',
      'Cache-Control': 'no-store',
    },
  });
});

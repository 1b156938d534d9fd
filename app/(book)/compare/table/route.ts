import { FINDING_TITLES } from '@/components/trials/finding-rows';
import { compareEntries } from '@/lib/comparisons/compare-entries';
import { comparedFindings, plainText } from '@/lib/comparisons/side-by-side';
import { csvLine } from '@/lib/ledger/csv-line';
import { Refusal } from '@/lib/refusal';
import { route } from '@/lib/web/route';

/** Side by side as CSV: one row a reading, one column an entry. */
export const GET = route(async ({ actor, url }) => {
  const { sheets, rows } = await compareEntries(actor, url.searchParams.getAll('entry'));
  if (sheets.length === 0) throw new Refusal('not-found', 'None of these entries is there, or none that you may see.');
  const lines = [
    csvLine(['', ...sheets.map(({ callNumber, title }) => `${callNumber} ${title}`)]),
    ...[...rows, ...comparedFindings(sheets, FINDING_TITLES)].map(({ term, values }) =>
      csvLine([term, ...values.map(plainText)]),
    ),
  ];
  return new Response(lines.join(''), {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': 'attachment; filename="side-by-side.csv"',
      'Cache-Control': 'no-store',
    },
  });
});

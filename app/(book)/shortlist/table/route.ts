import { Refusal } from '@/lib/refusal';
import { answerShortlist } from '@/lib/shortlist/answer-shortlist';
import { readQuestion } from '@/lib/shortlist/question';
import { shortlistCsv } from '@/lib/shortlist/shortlist-csv';
import { route } from '@/lib/web/route';

/** The shortlist as CSV, for the same question as the page. */
export const GET = route(async ({ actor, url }) => {
  const { asked, faults } = readQuestion((name) => url.searchParams.get(name) ?? undefined);
  if (Object.keys(faults).length > 0) throw new Refusal('invalid', Object.values(faults).join(' '), faults);
  const answer = await answerShortlist(actor, asked);
  if (!answer.known) throw new Refusal('not-found', `The book has no ${asked.equation} in ${asked.dims} dimensions.`);
  return new Response(shortlistCsv(answer.list), {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': 'attachment; filename="shortlist.csv"',
      'Cache-Control': 'no-store',
    },
  });
});

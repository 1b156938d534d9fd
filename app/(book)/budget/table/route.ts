import { db } from '@/db/client';
import { listCandidates } from '@/db/queries/candidates';
import { budgetCsv } from '@/lib/budgets/budget-csv';
import { readBudget } from '@/lib/budgets/read-budget';
import { ladder } from '@/lib/budgets/run';
import { EQUATIONS } from '@/lib/numerics/equation';
import { Refusal } from '@/lib/refusal';
import { route } from '@/lib/web/route';

/** The ladder as CSV, for the same question as the page. */
export const GET = route(async ({ actor, url }) => {
  const rows = await listCandidates(db, actor, EQUATIONS);
  const read = readBudget(rows, (name) => url.searchParams.get(name) ?? undefined);
  if (!read) throw new Refusal('not-found', 'There is no scheme to budget with.');
  const { run, subject, spacing, parameter, question, obstacle } = read;
  if (!run || !subject || spacing === null || parameter === null)
    throw new Refusal('invalid', obstacle ?? Object.values(question.faults).join(' '), question.faults);
  return new Response(budgetCsv(ladder(run, subject, spacing, parameter)), {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': 'attachment; filename="run-budget.csv"',
      'Cache-Control': 'no-store',
    },
  });
});
